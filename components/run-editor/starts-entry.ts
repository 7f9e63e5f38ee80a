/** What changes from a point on, typed after a plus in its Item cell: "+ spec B2", "+ ins 2 in", "+ trace steam". */
import type { Point } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";

export type Starts = NonNullable<Point["starts"]>;
export type StartKey = keyof Starts;

export const START_KEYS: readonly StartKey[] = ["specification", "material", "insulation", "tracing"];
export const START_LABEL: Readonly<Record<StartKey, string>> = { specification: "Specification", material: "Material", insulation: "Insulation", tracing: "Tracing" };
const START_WORD: Readonly<Record<StartKey, string>> = { specification: "spec", material: "mat", insulation: "ins", tracing: "trace" };
const KEY_BY_WORD: Readonly<Record<string, StartKey>> = {
  spec: "specification", specification: "specification", mat: "material", material: "material",
  ins: "insulation", insul: "insulation", insulation: "insulation", trace: "tracing", tracing: "tracing",
};
const TEXT_LIMIT = 120;
export const STARTS_HINT = "After a plus type spec, mat, ins or trace and its text, such as + spec B2 or + ins none.";

/** Reads "+ spec B2 + ins 2 in". @returns what changes there, or one sentence. */
export function parseStarts(text: string): EntryResult<Starts> {
  const starts: Record<string, string> = {};
  for (const part of text.split(/(?:^|\s)\+/).map((each) => each.trim()).filter((each) => each !== "")) {
    const [, word = "", words = ""] = /^(\S+)\s*(.*)$/.exec(part) ?? [];
    const key = KEY_BY_WORD[word.toLowerCase()];
    if (!key || words === "" || words.length > TEXT_LIMIT) return refused(STARTS_HINT);
    starts[key] = words;
  }
  return Object.keys(starts).length === 0 ? refused(STARTS_HINT) : understood(starts, startsEcho(starts));
}

/** The text that reads back to the same changes; "" for none. */
export function startsText(starts: Starts | null | undefined): string {
  return START_KEYS.flatMap((key) => (starts?.[key] ? [`+ ${START_WORD[key]} ${starts[key]}`] : [])).join(" ");
}

/** "from here specification B2, insulation 2 in". */
export function startsEcho(starts: Starts | null | undefined): string {
  const named = START_KEYS.flatMap((key) => (starts?.[key] ? [`${START_LABEL[key].toLowerCase()} ${starts[key]}`] : []));
  return named.length === 0 ? "" : `from here ${named.join(", ")}`;
}

/** A point with what changes there set; the field is left out when nothing does, as in a document that never had it. */
export function pointWithStarts(point: Point, starts: Starts | null): Point {
  const { starts: _before, ...plain } = point;
  const kept = Object.fromEntries(Object.entries(starts ?? {}).filter(([, text]) => text !== undefined && text.trim() !== ""));
  return Object.keys(kept).length === 0 ? plain : { ...plain, starts: kept };
}
