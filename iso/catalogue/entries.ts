/** Every take-out of the tables under its key, put together once from the tables of the standards. */
import { NPS_SIZES, type Nps } from "../run/document";
import { VALVE_FACES, VALVE_SOURCE } from "./b16-10-valves";
import { SOCKET_SOURCES, SOCKET_TUPLES } from "./b16-11-socket";
import { FLANGE_ROWS, type FlangeRow } from "./b16-5-flanges";
import { CAP_ROWS, LR_45_ROWS, LR_90_ROWS, SR_90_ROWS } from "./b16-9-elbows";
import { REDUCER_ROWS } from "./b16-9-reducers";
import { TEE_ROWS } from "./b16-9-tees";
import {
  capKey, elbowKey, flangeHubKey, flangeThicknessKey, outletKey, reducerKey, socketKey, teeBranchKey, teeRunKey, valveKey,
  type SocketFitting,
} from "./keys";
import type { Memory, SizeRow } from "./row";
import { OUTLET_HEIGHTS, OUTLET_SOURCE } from "./sp-97-outlets";

/** One tabulated take-out. Inches null = the tables read have millimetres only; mm null = inches only. */
export interface Entry {
  readonly key: string;
  /** What it is, in the trade's words: "LR 90 elbow NPS 4, centre to end". */
  readonly words: string;
  readonly inches: number | null;
  readonly mm: number | null;
  readonly fromMemory: Memory;
  readonly source: string;
}

let cached: ReadonlyMap<string, Entry> | null = null;

/** The table of tables; the same object on every call. */
export function catalogueEntries(): ReadonlyMap<string, Entry> {
  cached ??= new Map(
    [...elbows(), ...tees(), ...reducers(), ...flanges(), ...valves(), ...sockets(), ...outlets()].map((e) => [e.key, e]),
  );
  return cached;
}

function entry(key: string, words: string, inches: number | null, mm: number | null, fromMemory: Memory, source: string): Entry {
  return { key, words, inches, mm, fromMemory, source: fromMemory === "yes" ? `${source.split(" (")[0]} (from memory)` : source };
}

function elbows(): Entry[] {
  const of = (rows: readonly SizeRow[], keyOf: (nps: Nps) => string, words: (nps: Nps) => string) =>
    rows.map((r) => entry(keyOf(r.nps), words(r.nps), r.inches, r.mm, r.fromMemory, r.source));
  return [
    ...of(LR_90_ROWS, (n) => elbowKey("lr-90", n), (n) => `LR 90 elbow NPS ${n}, centre to end`),
    ...of(SR_90_ROWS, (n) => elbowKey("sr-90", n), (n) => `SR 90 elbow NPS ${n}, centre to end`),
    ...of(LR_45_ROWS, (n) => elbowKey("lr-45", n), (n) => `LR 45 elbow NPS ${n}, centre to end`),
    ...of(CAP_ROWS, capKey, (n) => `cap NPS ${n}, length`),
  ];
}

function tees(): Entry[] {
  return TEE_ROWS.flatMap((r) => {
    const words = r.run === r.branch ? `tee NPS ${r.run}` : `reducing tee NPS ${r.run} x ${r.branch}`;
    return [
      entry(teeRunKey(r.run, r.branch), `${words}, centre to run end`, r.runIn, r.runMm, r.fromMemory, r.source),
      entry(teeBranchKey(r.run, r.branch), `${words}, centre to branch end`, r.branchIn, r.branchMm, r.fromMemory, r.source),
    ];
  });
}

function reducers(): Entry[] {
  return REDUCER_ROWS.map((r) =>
    entry(reducerKey(r.large, r.small), `reducer NPS ${r.large} x ${r.small}, end to end`, r.inches, r.mm, r.fromMemory, r.source),
  );
}

function flanges(): Entry[] {
  return FLANGE_ROWS.flatMap(flangeEntries);
}

function flangeEntries(r: FlangeRow): Entry[] {
  const size = `class ${r.ratingClass} NPS ${r.nps}`;
  const hub = (flange: "weld-neck" | "slip-on" | "socket-weld", name: string, inches: number | null) =>
    inches === null ? [] : [entry(flangeHubKey(flange, r.ratingClass, r.nps), `${name} flange ${size}, length through hub`, inches, null, r.lengthMemory, r.source)];
  return [
    ...hub("weld-neck", "weld-neck", r.weldNeckIn),
    ...hub("slip-on", "slip-on", r.slipOnIn),
    ...hub("socket-weld", "socket-weld", r.socketWeldIn),
    entry(flangeThicknessKey(r.ratingClass, r.nps), `flange ${size}, thickness`, r.thicknessIn, null, r.thicknessMemory, r.source),
  ];
}

function valves(): Entry[] {
  return VALVE_FACES.flatMap(([valve, ratingClass, faces]) =>
    faces.map(([nps, inches, mm]) =>
      entry(valveKey(valve, ratingClass, nps, "flanged"), `${valve} valve class ${ratingClass} NPS ${nps}, flanged, face to face`, inches, mm, "yes", VALVE_SOURCE),
    ),
  );
}

function sockets(): Entry[] {
  return SOCKET_TUPLES.flatMap(([c, nps, in90, mm90, in45, mm45, inTee, inCoupling, mmCoupling, mmHalf, inDepth, mmDepth]) => {
    const one = (fitting: SocketFitting, words: string, inches: number | null, mm: number | null, memory: Memory = "partial") =>
      inches === null && mm === null ? [] : [entry(socketKey(fitting, c, nps), `${words} class ${c} NPS ${nps}`, inches, mm, memory, SOCKET_SOURCES[c])];
    const heavy: Memory = c === 6000 ? "yes" : "partial";
    return [
      ...one("sw-90", "socket 90, centre to socket bottom,", in90, mm90, heavy),
      ...one("sw-45", "socket 45, centre to socket bottom,", in45, mm45),
      ...one("tee", "socket tee, centre to socket bottom,", inTee, mm90, heavy),
      ...one("coupling", "coupling, laying length,", inCoupling, mmCoupling),
      ...one("half-coupling", "half coupling, laying length,", null, mmHalf),
      ...one("depth", "socket depth, least,", inDepth, mmDepth),
    ];
  });
}

/** A reducing outlet's height does not vary with the run, so each branch has a key for every larger run. */
function outlets(): Entry[] {
  return OUTLET_HEIGHTS.flatMap(([branch, inches, mm]) =>
    NPS_SIZES.filter((run) => NPS_SIZES.indexOf(run) > NPS_SIZES.indexOf(branch)).map((run) =>
      entry(outletKey(branch, run), `outlet NPS ${branch} on ${run}, height`, inches, mm, "yes", OUTLET_SOURCE),
    ),
  );
}
