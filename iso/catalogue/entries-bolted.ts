/** Take-outs of flanges and valves. */
import { VALVE_FACES } from "./b16-10-valves";
import { FLANGE_ROWS, SOCKET_DEPTH_SOURCE, SOCKET_FLANGE_DEPTHS } from "./b16-5-flanges";
import { entryOf, type Entry } from "./entry";
import type { FlangeRow } from "./flange-row";
import { flangeHubKey, flangeThicknessKey, socketFlangeDepthKey, valveKey } from "./keys";

export function flangeEntries(): Entry[] {
  const depths = SOCKET_FLANGE_DEPTHS.map(([nps, inches, mm]) =>
    entryOf(socketFlangeDepthKey(nps), `socket-weld flange NPS ${nps}, socket depth`, inches, mm, "partial", SOCKET_DEPTH_SOURCE));
  return [...FLANGE_ROWS.flatMap(flangeRowEntries), ...depths];
}

function flangeRowEntries(r: FlangeRow): Entry[] {
  const size = `class ${r.ratingClass} NPS ${r.nps}`;
  const hub = (flange: "weld-neck" | "slip-on" | "socket-weld" | "threaded" | "lap-joint", inches: number | null, memory = r.lengthMemory) =>
    inches === null ? [] : [entryOf(flangeHubKey(flange, r.ratingClass, r.nps), `${flange} flange ${size}, length through hub`, inches, null, memory, r.source)];
  return [
    ...hub("weld-neck", r.weldNeckIn),
    ...hub("slip-on", r.slipOnIn),
    ...hub("socket-weld", r.socketWeldIn),
    ...hub("threaded", r.threadedIn),
    ...hub("lap-joint", r.lapJointIn, r.lapJointMemory),
    entryOf(flangeThicknessKey(r.ratingClass, r.nps), `flange ${size}, thickness`, r.thicknessIn, null, r.thicknessMemory, r.source),
  ];
}

const ENDS_WORDS = { flanged: "flanged, face to face", butt: "butt-weld, end to end", wafer: "wafer, face to face" } as const;

export function valveEntries(): Entry[] {
  return VALVE_FACES.flatMap((table) =>
    table.faces.map(([nps, inches, mm]) =>
      entryOf(valveKey(table.valve, table.ratingClass, nps, table.ends === "wafer" ? "flanged" : table.ends),
        `${table.words} class ${table.ratingClass} NPS ${nps}, ${ENDS_WORDS[table.ends]}`, inches, mm, "yes", table.source),
    ),
  );
}
