/** Trade words of the model: sizes, classes, parts. American trade English, plain and short. */
import { pipeSize } from "../catalogue/pipe";
import type { ForgedClass } from "../catalogue/keys";
import { inchesMm } from "../units/length";
import type { Item, LineSettings, Nps, UnitSystem } from "./document";

/** Class of socket-welding fittings the tables are read for (common for line sizes to NPS 2; common practice). */
export const SOCKET_CLASS = 3000;

/** Class of a line's forged fittings; socket-weld ones start at class 3000 (ASME B16.11). */
export function forgedClass(settings: LineSettings, ends: "socket" | "threaded"): ForgedClass {
  const named = settings.forgedClass ?? SOCKET_CLASS;
  return ends === "socket" && named === 2000 ? SOCKET_CLASS : named;
}

/** Nominal size in millimetres: 4 for NPS 4 times 25.4. */
export function nominalMm(nps: Nps): number {
  const [whole, fraction] = nps.includes("-") ? nps.split("-") : nps.includes("/") ? ["0", nps] : [nps, "0/1"];
  const [over, under] = (fraction ?? "0/1").split("/");
  return inchesMm(Number(whole) + Number(over) / Number(under));
}

/** "NPS 4", or "DN 100" on a metric line. */
export function sizeText(nps: Nps, units: UnitSystem): string {
  if (units === "imperial") return `NPS ${nps}`;
  const dn = pipeSize(nps)?.dn;
  return dn === undefined ? `NPS ${nps}` : `DN ${dn}`;
}

/** "NPS 6 x 4" or "DN 150 x 100". */
export function sizePairText(large: Nps, small: Nps | null, units: UnitSystem): string {
  return small === null || small === large ? sizeText(large, units) : `${sizeText(large, units)} x ${sizeText(small, units).replace(/^(NPS|DN) /, "")}`;
}

/** "STD", or "SCH 80" for a schedule that is a bare number. */
export function scheduleText(schedule: string): string {
  return /^\d/.test(schedule) ? `SCH ${schedule}` : schedule;
}

type FlangeName = Extract<Item, { kind: "flange" }>["flange"];
type ValveName = Extract<Item, { kind: "valve" }>["valve"];

export const FLANGE_WORDS: Readonly<Record<FlangeName, string>> = {
  "weld-neck": "weld-neck", "slip-on": "slip-on", "socket-weld": "socket-weld", threaded: "threaded",
  "lap-joint": "lap-joint", blind: "blind",
};

export const VALVE_WORDS: Readonly<Record<ValveName, string>> = {
  gate: "gate valve", globe: "globe valve", check: "check valve", ball: "ball valve", butterfly: "butterfly valve",
};

/** What stands at a point, for the label of a dimension: "face", "centre", "end", "large end", "weld", "point". */
export function workingPointWord(item: Item, turns: boolean): string {
  switch (item.kind) {
    case "flange":
      return "face";
    case "end":
    case "cap":
      return "end";
    case "reducer":
      return "large end";
    case "return":
      return "return end";
    case "bend":
    case "mitre":
      return "corner";
    case "joint":
      return "weld";
    case "support":
      return "support";
    case "none":
      return turns ? "centre" : "point";
    default:
      return "centre";
  }
}
