/**
 * Take-outs a line may ask for that no table here has: each waits for the shop's own measure. And the weights only a
 * maker or a scale can tell. Listed so that a shop finds them before a line does.
 */
import { NPS_SIZES, type Nps, type RatingClass } from "../run/document";
import { catalogueEntries } from "./entries";
import { elbowKey, flangeHubKey, outletKey, socketKey, threadedKey, valveKey, weightKey, type ForgedClass, type ValveName } from "./keys";

/** Sizes forged fittings come in (B16.11). */
const FORGED_SIZES: readonly Nps[] = ["1/2", "3/4", "1", "1-1/4", "1-1/2", "2", "2-1/2", "3", "4"];
/** Sizes socket-weld and threaded valves and unions are common in. */
const SMALL_SIZES: readonly Nps[] = ["1/2", "3/4", "1", "1-1/4", "1-1/2", "2"];
const CLASSES: readonly RatingClass[] = [150, 300, 600, 900, 1500];
const FORGED_CLASSES: readonly ForgedClass[] = [3000, 6000];
const VALVE_NAMES: readonly ValveName[] = ["gate", "globe", "check", "ball", "butterfly"];

/** Keys a line may ask for and no table has, in list order. */
export function missingKeys(): readonly string[] {
  return wantedKeys().filter((key) => !catalogueEntries().has(key));
}

function wantedKeys(): string[] {
  return [
    ...NPS_SIZES.flatMap((nps) => [elbowKey("sr-45", nps), elbowKey("sr-90", nps)]),
    ...CLASSES.flatMap((c) => NPS_SIZES.flatMap((nps) => [flangeHubKey("weld-neck", c, nps), flangeHubKey("blind", c, nps)])),
    ...FORGED_CLASSES.flatMap((c) => FORGED_SIZES.flatMap((nps) => [
      socketKey("union", c, nps), threadedKey("union", c, nps), socketKey("half-coupling", c, nps), socketKey("sw-90", c, nps), socketKey("sw-45", c, nps),
      socketKey("tee", c, nps), socketKey("cross", c, nps), socketKey("coupling", c, nps),
    ])),
    ...CLASSES.flatMap((c) => VALVE_NAMES.flatMap((valve) => [
      ...NPS_SIZES.flatMap((nps) => [valveKey(valve, c, nps, "flanged"), valveKey(valve, c, nps, "butt")]),
      ...(valve === "butterfly" ? [] : SMALL_SIZES.flatMap((nps) => [valveKey(valve, c, nps, "socket"), valveKey(valve, c, nps, "threaded")])),
    ])),
    ...NPS_SIZES.flatMap((branch, i) => NPS_SIZES.slice(i).map((run) => outletKey(branch, run))),
  ];
}

/** Parts whose weight no table or formula here gives: valves, outlets, forged fittings. */
export function weightKeys(): readonly string[] {
  return [
    ...VALVE_NAMES.flatMap((valve) => CLASSES.flatMap((c) => [
      ...(["flanged", "butt"] as const).flatMap((ends) => NPS_SIZES.map((nps) => weightKey(`valve-${valve}-${ends}:${c}:${nps}`))),
      ...(["socket", "threaded"] as const).flatMap((ends) => SMALL_SIZES.map((nps) => weightKey(`valve-${valve}-${ends}:${c}:${nps}`))),
    ])),
    ...(["socket", "threaded"] as const).flatMap((ends) => ["socket-elbow-90", "socket-elbow-45", "socket-tee", "socket-cross", "coupling", "half-coupling", "socket-cap", "union"].flatMap((part) =>
      FORGED_CLASSES.flatMap((c) => FORGED_SIZES.map((nps) => weightKey(`${part}-${ends}:${c}:${nps}`))))),
    ...NPS_SIZES.flatMap((branch, i) => NPS_SIZES.slice(i).map((run) => weightKey(`outlet-butt::${run === branch ? run : `${run}:${branch}`}`))),
  ];
}
