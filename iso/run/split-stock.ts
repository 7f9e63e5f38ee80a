/**
 * Pieces longer than the stock are split with added butt welds. Full stock lengths come first; the last two are evened when
 * the rest would be a short pup (common practice). Each added weld takes one root gap out of the pipe.
 */
import { SAME_POINT_MM } from "../geometry/tolerances";
import { formatLength } from "../units/format";
import { vecAddScaled, vecDistance, vecDot, vecSub } from "../geometry/vec3";
import type { Vec3 } from "../geometry/types";
import { plainTerm, type BuildContext } from "./build-context";
import type { JointDraft, PieceDraft, Stretch } from "./build-types";
import { leastPupMm } from "./check-piece";
import { makeJoint } from "./fit-common";
import { isTurnedRound } from "./original-side";
import type { CutTerm, PieceEnd } from "./model-types";

/** Most pieces one stretch is split into; more is a slip in the stock length. */
const MOST_PIECES = 100;

export interface Split {
  readonly pieces: readonly PieceDraft[];
  readonly joints: readonly JointDraft[];
  /** Key of the piece at a position on the pipe. */
  pieceAt(position: Vec3): string;
}

/** The piece as it is, or split where the stock is too short for it. */
export function splitStock(s: Stretch, whole: PieceDraft, ctx: BuildContext): Split {
  const sorted = stockLengths(s, whole, ctx);
  if (sorted === null) return { pieces: [whole], joints: [], pieceAt: () => whole.key };
  // A run turned round is cut where it was cut before, and its added welds keep their names.
  const lengths = isTurnedRound(s) ? sorted.reverse() : sorted;
  const gap = ctx.settings.allowances.rootGapMm;
  const pieces: PieceDraft[] = [];
  const joints: JointDraft[] = [];
  let from = 0;
  lengths.forEach((length, i) => {
    pieces.push(partOf(s, whole, { lengths, index: i, from, length, gap }));
    from += length;
    if (i === lengths.length - 1) return;
    joints.push(makeJoint(s.to, {
      key: splitKey(s, i, lengths.length - 1), kind: "butt", a: `${keyRoot(whole)}:${i + 1}`, b: `${keyRoot(whole)}:${i + 2}`, runId: whole.runId, nps: whole.nps,
      position: vecAddScaled(whole.start, whole.direction, from - startTrim(s) + gap / 2), direction: whole.direction, gapMm: gap,
    }));
    from += gap;
  });
  return { pieces, joints, pieceAt: (position) => pieceAt(pieces, whole, position) };
}

function keyRoot(whole: PieceDraft): string {
  return whole.key.replace(/:1$/, "");
}

function splitKey(s: Stretch, index: number, welds: number): string {
  return isTurnedRound(s) ? `${s.from.uid}:stock-${welds - index}` : `${s.to.uid}:stock-${index + 1}`;
}

function startTrim(s: Stretch): number {
  return s.start.trimMm;
}

function pieceAt(pieces: readonly PieceDraft[], whole: PieceDraft, position: Vec3): string {
  const along = vecDot(vecSub(position, whole.start), whole.direction);
  const hit = pieces.find((p) => along <= vecDot(vecSub(p.end, whole.start), whole.direction));
  return (hit ?? pieces[pieces.length - 1] ?? whole).key;
}

/** Cut lengths in flow order, or null when nothing is to be split. */
function stockLengths(s: Stretch, whole: PieceDraft, ctx: BuildContext): number[] | null {
  const bought = ctx.settings.stockLengthMm;
  const total = whole.cutLengthMm;
  if (bought === undefined || bought <= 0) return null;
  const stock = bought - mitreReachMm(whole);
  if (total <= stock + SAME_POINT_MM) return null;
  const where = { pointId: s.to.point.id, runId: s.to.runId };
  const say = `The pipe between ${s.from.label} and ${s.to.label} is ${formatLength(total, ctx.units)}, longer than the stock of ${formatLength(bought, ctx.units)}`;
  const gap = ctx.settings.allowances.rootGapMm;
  const count = Math.ceil((total + gap - SAME_POINT_MM) / (stock + gap));
  const least = leastPupMm(whole.odMm, ctx);
  if (whole.bends !== undefined || count > MOST_PIECES || stock < 2 * least) {
    const why = whole.bends !== undefined ? "and is bent: put a weld on one of its straights" : "and is not split: the stock is too short to weld from. Correct the stock length";
    ctx.report("stock-too-short", "warning", `${say}, ${why}.`, where);
    return null;
  }
  const lengths = new Array<number>(count - 1).fill(stock);
  const rest = total - (count - 1) * (stock + gap);
  if (rest >= least) lengths.push(rest);
  else lengths.splice(count - 2, 1, (stock + rest) / 2, (stock + rest) / 2);
  ctx.report("stock-split", "note", `${say}: it is made of ${count} pieces with ${count - 1} added ${count === 2 ? "weld" : "welds"}.`, where);
  return lengths;
}

/** How much longer a mitred end's back is than its centre line, mm: the stock has to give that too. */
function mitreReachMm({ ends, odMm }: PieceDraft): number {
  return Math.max(...ends.map((end) => (odMm / 2) * Math.tan(((end.cutAngleDeg ?? 0) * Math.PI) / 180)));
}

interface Part {
  readonly lengths: readonly number[];
  readonly index: number;
  /** Where the part begins along the whole cut pipe, gaps counted, mm. */
  readonly from: number;
  readonly length: number;
  readonly gap: number;
}

function partOf(s: Stretch, whole: PieceDraft, part: Part): PieceDraft {
  const { index, from, length, lengths } = part;
  const isFirst = index === 0;
  const isLast = index === lengths.length - 1;
  const weldEnd = (i: number): PieceEnd => ({ prep: "bevel", jointKey: splitKey(s, i, lengths.length - 1) });
  const start = isFirst ? whole.start : vecAddScaled(whole.start, whole.direction, from - startTrim(s));
  const end = isLast ? whole.end : vecAddScaled(whole.start, whole.direction, from + length - startTrim(s));
  const legs = legsUnder(s, start, end);
  return {
    ...whole, key: `${keyRoot(whole)}:${index + 1}`, start, end, ...(legs.length > 0 ? { legId: legs[legs.length - 1]!, legIds: legs } : {}),
    terms: isLast ? [...whole.terms, ...termsBefore(part)] : [fixedTerm(part)], cutLengthMm: length,
    ends: [isFirst ? whole.ends[0] : weldEnd(index - 1), isLast ? whole.ends[1] : weldEnd(index)],
    weightKg: whole.weightKg === null ? null : (whole.weightKg * length) / whole.cutLengthMm,
  };
}

/** Legs of the stretch a part of its pipe lies on, in flow order. */
function legsUnder(s: Stretch, start: Vec3, end: Vec3): string[] {
  const origin = s.legs[0]?.from ?? start;
  const [from, to] = [vecDistance(origin, start), vecDistance(origin, end)];
  let at = 0;
  return s.legs.flatMap((leg) => {
    const [begin, finish] = [at, at + leg.lengthMm];
    at = finish;
    return finish > from && begin < to ? [leg.id] : [];
  });
}

function fixedTerm({ length, lengths }: Part): CutTerm {
  const alike = lengths.filter((l) => l === length).length;
  const isFull = length === Math.max(...lengths) && !(lengths.length === 2 && alike === 2);
  const what = isFull ? "full stock length" : alike === 1 ? "what is left" : "half of what is left";
  return { kind: "centre-to-centre", label: `${what}, weld to weld`, valueMm: length, componentId: null, source: null, unconfirmed: false };
}

/** What the pieces before the last one and their welds take from the whole. */
function termsBefore({ lengths, gap }: Part): CutTerm[] {
  const before = lengths.slice(0, -1);
  const gaps = gap === 0 ? [] : before.map(() => plainTerm("root-gap", "root gap", gap));
  return [...before.map((length) => plainTerm("take-out", "piece before it", length)), ...gaps];
}
