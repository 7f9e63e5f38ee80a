/**
 * What was measured on a finished spool, as typed: points in the measurer's own frame, each named to a face or a corner of
 * the sheet, and what they are judged by. Kept per measurement and never changed; a new one is a new row.
 */
import { z } from "zod";
import { INCH_MM, parseLength, type ParsedLength } from "../units/length";
import type { UnitSystem } from "../run/document";
import { idSchema as id } from "../run/scalar-schemas";
import { pastePoints } from "../survey/paste-points";

export const MOST_FITTED_POINTS = 200;

const typed = z.string().max(60);

/** A face "1", "2" or a corner "W1" of the sheet. */
const place = z.string().regex(/^(W?[1-9]\d{0,2})?$/);

export const fittedPointSchema = z.object({
  id,
  /** "" = not named yet. */
  of: place,
  /** centre of a face or corner; axis: any other point on the face's centre line; hole: centre of one of its bolt holes. */
  what: z.enum(["centre", "axis", "hole"]),
  /** As typed, along the measurer's own first, second and upward direction. */
  at: z.array(typed).length(3),
  /** Left out of the fit, kept in the record. */
  leftOut: z.boolean(),
});
export type FittedPoint = z.infer<typeof fittedPointSchema>;

/** What a number without a unit means. */
export const READ_AS = ["inches", "feet", "millimetres", "metres"] as const;
export type ReadAs = (typeof READ_AS)[number];
export const READ_AS_MM: Readonly<Record<ReadAs, number>> = { inches: INCH_MM, feet: 12 * INCH_MM, millimetres: 1, metres: 1000 };

export const asFittedDocumentSchema = z.object({
  schema: z.literal(1),
  readAs: z.enum(READ_AS),
  points: z.array(fittedPointSchema).max(MOST_FITTED_POINTS),
  /** Face held exactly on the sheet; "" = the best fit on all. */
  hold: place,
  /** As typed; blank = the usual one. position: +/- in any direction; square: per foot, or per metre; holes: round the bolt circle. */
  tolerances: z.object({ position: typed, square: typed, holes: typed }),
  tool: z.string().max(120),
  note: z.string().max(2_000),
});
export type AsFittedDocument = z.infer<typeof asFittedDocumentSchema>;

export function emptyAsFitted(units: UnitSystem, points: readonly FittedPoint[] = []): AsFittedDocument {
  return { schema: 1, readAs: units === "metric" ? "millimetres" : "inches", points: [...points], hold: "", tolerances: { position: "", square: "", holes: "" }, tool: "", note: "" };
}

/** An as-fitted document from anything, or null when it is none. */
export function parseAsFitted(value: unknown): AsFittedDocument | null {
  const parsed = asFittedDocumentSchema.safeParse(value);
  return parsed.success ? parsed.data : null;
}

const BARE = /^([+-]?)\s*((?:\d+\.?\d*|\.\d+)(?:e[+-]?\d{1,2})?)$/i;

/** One measured number: bare ones by what they are read as, others as any length. */
export function fittedLength(text: string, readAs: ReadAs): ParsedLength {
  const units = readAs === "inches" || readAs === "feet" ? "imperial" : "metric";
  const bare = BARE.exec(text.trim().replace(/[\u2010-\u2015\u2212]/g, "-"));
  if (!bare) return parseLength(text, units);
  return parseLength(`${bare[1]}${Number(bare[2]) * READ_AS_MM[readAs]}mm`.replace(/e[+-]\d+/i, ""), units);
}

export interface PastedFitted {
  readonly points: readonly FittedPoint[];
  /** One sentence per row that was not taken. */
  readonly refused: readonly string[];
}

/** Rows of name and three lengths. Names: `1` or `end 1` its centre, `1 axis`, `1 hole` or `1 h3`, `W2` a corner. @param ids one fresh id per row. */
export function pasteFitted(text: string, readAs: ReadAs, ids: readonly string[]): PastedFitted {
  const units = readAs === "inches" || readAs === "feet" ? "imperial" : "metric";
  const { readings, refused } = pastePoints(text, units, "known", ids);
  const wrong: string[] = [];
  const points = readings.flatMap((reading): FittedPoint[] => {
    const named = pointNamed(reading.to);
    if (!named) wrong.push(`"${reading.to}" names no face: write 1, 1 axis, 1 hole or W1.`);
    return named ? [{ id: reading.id, ...named, at: [...reading.first], leftOut: false }] : [];
  });
  return { points, refused: [...refused, ...wrong] };
}

const FACE_NAME = /^(?:end|face)?\s*([1-9]\d{0,2})\s*[-.,]?\s*(?:(axis|a)|(?:holes?|h|bolt)\s*\d*|cent(?:re|er)|c)?$/i;
const CORNER_NAME = /^(?:corner\s*)?W\s*([1-9]\d{0,2})$/i;

function pointNamed(name: string): Pick<FittedPoint, "of" | "what"> | null {
  const corner = CORNER_NAME.exec(name.trim());
  if (corner) return { of: `W${corner[1]}`, what: "centre" };
  const face = FACE_NAME.exec(name.trim());
  if (!face) return null;
  const isHole = /h|bolt/i.test(name.trim().replace(/^(end|face)/i, ""));
  return { of: face[1]!, what: face[2] ? "axis" : isHole ? "hole" : "centre" };
}

/** A change that mends a slip. */
export type FittedMend =
  | { readonly kind: "read-as"; readonly readAs: ReadAs }
  | { readonly kind: "rename"; readonly names: Readonly<Record<string, string>> }
  | { readonly kind: "flip" }
  | { readonly kind: "leave-out"; readonly of: string };

/** The document with a slip mended; texts stay as typed where they can. */
export function asFittedMended(document: AsFittedDocument, mend: FittedMend): AsFittedDocument {
  if (mend.kind === "read-as") return { ...document, readAs: mend.readAs };
  const points = document.points.map((point): FittedPoint => {
    if (mend.kind === "rename") return { ...point, of: mend.names[point.of] ?? point.of };
    if (mend.kind === "leave-out") return point.of === mend.of ? { ...point, leftOut: true } : point;
    return { ...point, at: [negated(point.at[0]!), point.at[1]!, point.at[2]!] };
  });
  return { ...document, points };
}

function negated(text: string): string {
  const plain = text.trim().replace(/^[\u2010-\u2015\u2212]/, "-");
  return plain === "" || /^[+-]?[0.]*$/.test(plain) ? plain : plain.startsWith("-") ? plain.slice(1).trim() : `-${plain.replace(/^\+/, "")}`;
}
