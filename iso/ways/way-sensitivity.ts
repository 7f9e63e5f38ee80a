/**
 * What an error in an end's position does to a way whose turns are fixed. The error e must be made up by what can give:
 * each cut length along its direction, and where the directions form a family (three whole elbows out of a plane, or one
 * trimmed) one turn of the family. As columns of a matrix A, the least change that makes it up is Aᵀ(AAᵀ)⁻¹e; what AAᵀ
 * cannot reach stays at a weld. Two trimmed elbows have their own rates (iso/closing/sensitivity.ts).
 */
import type { Vec3 } from "../geometry/types";
import { WAYS_FLAT, WAYS_STAYS_SHARE } from "../geometry/tolerances";
import { vecAdd, vecAddScaled, vecCross, vecDot, vecLength, vecScale } from "../geometry/vec3";
import { formatDecimal } from "../units/format";
import type { Draft } from "./draft";
import type { WaySensitivity } from "./ways-types";
import { fineWords } from "./words";
import type { UnitSystem } from "../run/document";

const DEG = 180 / Math.PI;

/** A turn of the family: how the way's end moves per radian, and the largest turn of a bend or roll per radian. */
interface FamilyTurn {
  readonly column: Vec3;
  readonly turns: number;
}

/** @param cuttable which straights have a pipe that can be cut otherwise. @param perMm size of the error, mm. */
export function waySensitivity(draft: Draft, cuttable: readonly boolean[], perMm: number, units: UnitSystem): WaySensitivity {
  const lengths = draft.directions.filter((_, j) => cuttable[j]);
  const alone = madeUp(lengths);
  if (alone.stays <= WAYS_STAYS_SHARE) return told({ bendDeg: 0, lengthMm: alone.most(lengths.length) * perMm, perMm, takenBy: "lengths" }, units);
  const family = familyTurn(draft, cuttable);
  const both = family ? madeUp([...lengths, family.column]) : alone;
  if (family && both.stays <= WAYS_STAYS_SHARE) {
    const turned = both.row(lengths.length) * perMm * family.turns;
    return told({ bendDeg: turned * DEG, lengthMm: both.most(lengths.length) * perMm, perMm, takenBy: "bends" }, units);
  }
  return told({ bendDeg: 0, lengthMm: alone.most(lengths.length) * perMm, perMm, takenBy: "nothing" }, units);
}

/** The sensitivity with its sentence. */
export function told(given: Omit<WaySensitivity, "words">, units: UnitSystem): WaySensitivity {
  const error = fineWords(given.perMm, units);
  const length = `a cut length by ${fineWords(given.lengthMm, units)}`;
  const words = {
    lengths: `${error} off at an end changes ${length} at most; no bend changes.`,
    bends: `${error} off at an end changes ${length} and turns a bend or a roll by ${formatDecimal(given.bendDeg, 2)}° at most.`,
    nothing: `Cut lengths take up ${error} of error at an end only in some directions; across them it stays at a weld.`,
  }[given.takenBy];
  return { ...given, words };
}

interface MadeUp {
  /** Largest share of an error that no column reaches. */
  readonly stays: number;
  /** Largest size of unknown i per unit of error. */
  readonly row: (i: number) => number;
  /** Largest of the first n. */
  readonly most: (n: number) => number;
}

/** Least-norm answers of A·x = e for the columns given, with a grain of damping where they do not span space. */
function madeUp(columns: readonly Vec3[]): MadeUp {
  const sum = (i: 0 | 1 | 2, j: 0 | 1 | 2) => columns.reduce((total, c) => total + c[i] * c[j], 0);
  const grain = WAYS_FLAT * Math.max(1, sum(0, 0) + sum(1, 1) + sum(2, 2));
  const rows: Vec3[] = [[sum(0, 0) + grain, sum(0, 1), sum(0, 2)], [sum(1, 0), sum(1, 1) + grain, sum(1, 2)], [sum(2, 0), sum(2, 1), sum(2, 2) + grain]];
  const [a, b, c] = rows as [Vec3, Vec3, Vec3];
  const answers = columns.map((column) => answer(a, b, c, column));
  const stays = Math.max(...[[1, 0, 0], [0, 1, 0], [0, 0, 1]].map((e) => left(e as unknown as Vec3, columns, answers)));
  const row = (i: number) => vecLength(answers[i] ?? [0, 0, 0]);
  return { stays, row, most: (n) => Math.max(0, ...Array.from({ length: n }, (_, i) => row(i))) };
}

/** (AAᵀ)⁻¹·column, column by column elimination being Cramer's rule here; AAᵀ is symmetric. */
function answer(a: Vec3, b: Vec3, c: Vec3, column: Vec3): Vec3 {
  const bc = vecCross(b, c);
  const det = vecDot(a, bc);
  if (det === 0) return [0, 0, 0];
  return vecScale(vecAdd(vecAdd(vecScale(bc, column[0]), vecScale(vecCross(c, a), column[1])), vecScale(vecCross(a, b), column[2])), 1 / det);
}

function left(e: Vec3, columns: readonly Vec3[], answers: readonly Vec3[]): number {
  let rest = e;
  columns.forEach((column, i) => {
    rest = vecAddScaled(rest, column, -vecDot(answers[i] ?? [0, 0, 0], e));
  });
  return vecLength(rest);
}

/** How the family of directions turns at this member; null when there is none. */
function familyTurn(draft: Draft, cuttable: readonly boolean[]): FamilyTurn | null {
  const [d0, u1, u2, into] = draft.directions;
  if (draft.turns.length === 3 && d0 && u1 && u2 && into) {
    const [turn1, turn2] = [vecCross(d0, u1), vecCross(into, u2)];
    const [alpha, beta] = [vecDot(u1, turn2), -vecDot(turn1, u2)];
    if (Math.hypot(alpha, beta) < WAYS_FLAT) return null;
    const column = vecAdd(vecScale(turn1, alpha * (draft.lengths[1] ?? 0)), vecScale(turn2, beta * (draft.lengths[2] ?? 0)));
    return normal(column, Math.max(Math.abs(alpha), Math.abs(beta)));
  }
  return draft.kind === "one-trimmed" && d0 && u1 && u2 ? trimmedTurn(draft, cuttable, d0, u1, u2) : null;
}

/** The whole elbow rolls about its end's axis; the trimmed one bends after it, and takes its neighbours along where they are welded to it. */
function trimmedTurn({ turns, lengths }: Draft, cuttable: readonly boolean[], d0: Vec3, u: Vec3, into: Vec3): FamilyTurn | null {
  const trimmedFirst = turns[0]?.fitting.make === "elbow" && !turns[0].fitting.whole;
  const turn = trimmedFirst ? turns[0] : turns[1];
  if (!turn) return null;
  const [about, other] = trimmedFirst ? [into, d0] : [d0, into];
  const du = vecCross(about, u);
  const bend = -vecDot(du, other) / Math.sin(turn.angleRad);
  const reach = (turn.radiusMm * bend) / (2 * Math.cos(turn.angleRad / 2) ** 2);
  let column = vecScale(du, lengths[1] ?? 0);
  if (!cuttable[1]) column = vecAddScaled(column, u, reach);
  if (!cuttable[trimmedFirst ? 0 : 2]) column = vecAddScaled(column, other, reach);
  return normal(column, Math.max(1, Math.abs(bend)));
}

/** Scaled so that its column is as long as a cut length's: then the least change is shared out fairly. */
function normal(column: Vec3, turns: number): FamilyTurn | null {
  const size = vecLength(column);
  return size < WAYS_FLAT ? null : { column: vecScale(column, 1 / size), turns: turns / size };
}

