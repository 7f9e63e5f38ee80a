/** Three-way joining of a survey two people changed: what only one touched is taken, what both touched is asked. Pure. */
import type { SurveyDocument, SurveyEnd, SurveyReading } from "@/iso";

type Row = SurveyReading | SurveyEnd;

/** One row both changed, each in another way; null = taken away there. */
export interface SurveyConflict {
  readonly list: "readings" | "ends" | "note";
  readonly id: string;
  readonly mine: Row | string | null;
  readonly theirs: Row | string | null;
}

export interface MergedSurvey {
  /** Joined document; rows in conflict stand as mine until chosen. */
  readonly document: SurveyDocument;
  readonly conflicts: readonly SurveyConflict[];
}

const same = (a: unknown, b: unknown): boolean => JSON.stringify(a ?? null) === JSON.stringify(b ?? null);

/** Joins `mine` and `theirs`, both made from `base`. */
export function mergeSurveys(base: SurveyDocument, mine: SurveyDocument, theirs: SurveyDocument): MergedSurvey {
  const readings = mergeRows("readings", base.readings, mine.readings, theirs.readings);
  const ends = mergeRows("ends", base.ends, mine.ends, theirs.ends);
  const conflicts = [...readings.conflicts, ...ends.conflicts];
  const noteKept = same(mine.note, base.note) ? theirs.note : mine.note;
  if (!same(mine.note, base.note) && !same(theirs.note, base.note) && !same(mine.note, theirs.note)) conflicts.push({ list: "note", id: "note", mine: mine.note, theirs: theirs.note });
  return { document: { ...mine, readings: readings.rows, ends: ends.rows, note: noteKept }, conflicts };
}

function mergeRows<R extends Row>(list: "readings" | "ends", base: readonly R[], mine: readonly R[], theirs: readonly R[]): { rows: R[]; conflicts: SurveyConflict[] } {
  const find = (rows: readonly R[], id: string) => rows.find((row) => row.id === id) ?? null;
  const order = [...mine, ...theirs.filter((row) => find(mine, row.id) === null), ...base.filter((row) => !find(mine, row.id) && !find(theirs, row.id))];
  const conflicts: SurveyConflict[] = [];
  const rows = order.flatMap(({ id }) => {
    const [was, ours, other] = [find(base, id), find(mine, id), find(theirs, id)];
    if (same(ours, other) || same(other, was)) return ours ?? [];
    if (same(ours, was)) return other ?? [];
    conflicts.push({ list, id, mine: ours, theirs: other });
    return ours ?? other ?? [];
  });
  return { rows, conflicts };
}

/** The document with one conflict decided. */
export function chooseSide(document: SurveyDocument, conflict: SurveyConflict, side: "mine" | "theirs"): SurveyDocument {
  const chosen = conflict[side];
  if (conflict.list === "note") return { ...document, note: typeof chosen === "string" ? chosen : "" };
  const put = <R extends Row>(rows: readonly R[]): R[] =>
    chosen === null ? rows.filter((row) => row.id !== conflict.id) : rows.some((row) => row.id === conflict.id) ? rows.map((row) => (row.id === conflict.id ? (chosen as R) : row)) : [...rows, chosen as R];
  return conflict.list === "readings" ? { ...document, readings: put(document.readings) } : { ...document, ends: put(document.ends) };
}
