/** Trade words of the model: sizes, classes, parts. American trade English, plain and short. */
import { pipeSize } from "../catalogue/pipe";
import type { Item, Nps, UnitSystem } from "./document";

/** Class of socket-welding fittings the tables are read for (common for line sizes to NPS 2; common practice). */
export const SOCKET_CLASS = 3000;

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
