/** Take-outs of butt-welding fittings: elbows, returns, caps, stub ends, tees, crosses, reducers, outlets. */
import { NPS_SIZES } from "../run/document";
import { CAP_ROWS, HEAVY_CAP_ROWS } from "./b16-9-caps";
import { LR_45_ROWS, LR_90_ROWS, SR_90_ROWS } from "./b16-9-elbows";
import { REDUCER_ROWS } from "./b16-9-reducers";
import { LR_RETURN_BACKS, LR_RETURN_CENTRES, SR_RETURN_BACKS, SR_RETURN_CENTRES } from "./b16-9-returns";
import { LONG_STUB_ENDS, SHORT_STUB_ENDS } from "./b16-9-stub-ends";
import { TEE_ROWS, type TeeRow } from "./b16-9-tees";
import { entryOf, sizeEntries, type Entry } from "./entry";
import {
  capKey, crossBranchKey, crossRunKey, elbowKey, outletKey, reducerKey, returnKey, stubEndKey, teeBranchKey, teeRunKey,
} from "./keys";
import { OUTLET_HEIGHTS, OUTLET_SOURCE } from "./sp-97-outlets";

export function buttWeldEntries(): Entry[] {
  return [...elbows(), ...returns(), ...ends(), ...TEE_ROWS.flatMap(teeEntries), ...TEE_ROWS.flatMap(crossEntries), ...reducers(), ...outlets()];
}

function elbows(): Entry[] {
  return [
    ...sizeEntries(LR_90_ROWS, (n) => elbowKey("lr-90", n), (n) => `LR 90 elbow NPS ${n}, centre to end`),
    ...sizeEntries(SR_90_ROWS, (n) => elbowKey("sr-90", n), (n) => `SR 90 elbow NPS ${n}, centre to end`),
    ...sizeEntries(LR_45_ROWS, (n) => elbowKey("lr-45", n), (n) => `LR 45 elbow NPS ${n}, centre to end`),
  ];
}

function returns(): Entry[] {
  return [
    ...sizeEntries(LR_RETURN_CENTRES, (n) => returnKey("LR", "centres", n), (n) => `LR 180 return NPS ${n}, centre to centre`),
    ...sizeEntries(LR_RETURN_BACKS, (n) => returnKey("LR", "back", n), (n) => `LR 180 return NPS ${n}, back to face`),
    ...sizeEntries(SR_RETURN_CENTRES, (n) => returnKey("SR", "centres", n), (n) => `SR 180 return NPS ${n}, centre to centre`),
    ...sizeEntries(SR_RETURN_BACKS, (n) => returnKey("SR", "back", n), (n) => `SR 180 return NPS ${n}, back to face`),
  ];
}

function ends(): Entry[] {
  return [
    ...sizeEntries(CAP_ROWS, (n) => capKey(n), (n) => `cap NPS ${n}, length`),
    ...sizeEntries(HEAVY_CAP_ROWS, (n) => capKey(n, true), (n) => `cap NPS ${n} of heavy wall, length`),
    ...sizeEntries(LONG_STUB_ENDS, (n) => stubEndKey("long", n), (n) => `stub end NPS ${n}, long, face to end`),
    ...sizeEntries(SHORT_STUB_ENDS, (n) => stubEndKey("short", n), (n) => `stub end NPS ${n}, short, face to end`),
  ];
}

function teeEntries(r: TeeRow): Entry[] {
  const words = r.run === r.branch ? `tee NPS ${r.run}` : `reducing tee NPS ${r.run} x ${r.branch}`;
  return [
    entryOf(teeRunKey(r.run, r.branch), `${words}, centre to run end`, r.runIn, r.runMm, r.fromMemory, r.source),
    entryOf(teeBranchKey(r.run, r.branch), `${words}, centre to branch end`, r.branchIn, r.branchMm, r.fromMemory, r.source),
  ];
}

/** B16.9 tabulates tees and crosses together: a cross takes the tee's dimensions. */
function crossEntries(r: TeeRow): Entry[] {
  const words = r.run === r.branch ? `cross NPS ${r.run}` : `reducing cross NPS ${r.run} x ${r.branch}`;
  return [
    entryOf(crossRunKey(r.run, r.branch), `${words}, centre to run end`, r.runIn, r.runMm, r.fromMemory, r.source),
    entryOf(crossBranchKey(r.run, r.branch), `${words}, centre to branch end`, r.branchIn, r.branchMm, r.fromMemory, r.source),
  ];
}

function reducers(): Entry[] {
  return REDUCER_ROWS.map((r) =>
    entryOf(reducerKey(r.large, r.small), `reducer NPS ${r.large} x ${r.small}, end to end`, r.inches, r.mm, r.fromMemory, r.source),
  );
}

/** A reducing outlet's height does not vary with the run, so each branch has a key for every larger run. */
function outlets(): Entry[] {
  return OUTLET_HEIGHTS.flatMap(([branch, inches, mm]) =>
    NPS_SIZES.filter((run) => NPS_SIZES.indexOf(run) > NPS_SIZES.indexOf(branch)).map((run) =>
      entryOf(outletKey(branch, run), `outlet NPS ${branch} on ${run}, height`, inches, mm, "yes", OUTLET_SOURCE),
    ),
  );
}
