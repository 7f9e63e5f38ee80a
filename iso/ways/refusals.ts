/** Why a kind of way is not there, as a proof where there is one, and the nearest change that would open it. */
import { WAYS_ANGLE } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAngle, vecLength } from "../geometry/vec3";
import { formatAngleDeg, formatDecimal } from "../units/format";
import { fieldTrimDrafts, nearestMove, trimWords } from "./field-trims";
import { ROLL_STEPS } from "./one-trimmed";
import { waysProblem, type WaysProblem } from "./problem";
import { WALK_STEPS } from "./three-elbow";
import type { WayRefusal, WaysInput } from "./ways-types";
import { tapeWords } from "./words";

/** Why no two whole elbows close. */
export function standardRefusal(problem: WaysProblem): WayRefusal {
  const turn = vecAngle(problem.d0, problem.into1);
  const angles = stockAngles(problem);
  const about = "two-standard";
  if (angles.length === 0) return { about, sentence: "The tables have no whole elbow of the chosen angles and radii in this size.", whatWouldWork: null };
  const fits = angles.some((a) => angles.some((b) => turn <= a + b + WAYS_ANGLE && turn >= Math.abs(a - b) - WAYS_ANGLE));
  if (!fits) return { about, sentence: angleSentence(turn, angles), whatWouldWork: turn > 2 * (angles[0] ?? 0) ? "Three or more elbows, or an end turned." : "Another elbow angle, or a trimmed elbow." };
  const trims = fieldTrimDrafts(problem)[0];
  const move = nearestMove(problem);
  const parts = [
    ...(trims ? [`${trimWords(trims.trims, problem.input.units)} opens ${trims.turns.map((t) => t.fitting.name).join(", ")}`] : []),
    ...(move && vecLength(move.move) > 0 ? [`moving end 1 by ${moveWords(move.move, problem)} opens ${move.names}`] : []),
  ];
  const sentence = "With the elbows' angles fixed the pipe between them can run in two directions at most, and in each of them a straight comes out shorter than its fittings or its shortest pup.";
  return { about, sentence, whatWouldWork: parts.length > 0 ? capital(`${parts.join("; or ")}.`) : null };
}

/** Why no three whole elbows close: by their angles, which is a proof, or by the search, which says its grid. */
export function threeElbowRefusal(input: WaysInput): WayRefusal | null {
  const problem = waysProblem(input);
  if (typeof problem === "string") return null;
  const turn = vecAngle(problem.d0, problem.into1);
  const most = 3 * (stockAngles(problem)[0] ?? 0);
  const sentence = turn > most + WAYS_ANGLE
    ? `The ends turn through ${formatAngleDeg(turn)}, more than three of the shop's elbows can (${formatAngleDeg(most)}).`
    : `No three whole elbows close these ends: searched in steps of ${formatDecimal(360 / WALK_STEPS, 1)}° round every family and refined. They need four elbows or more, or a trimmed one.`;
  return { about: "three-standard", sentence, whatWouldWork: null };
}

/** Why no whole and trimmed elbow together close. */
export function oneTrimmedRefusal(): WayRefusal {
  return { about: "one-trimmed", sentence: `No whole elbow with one cut to another angle closes: searched in steps of ${formatDecimal(360 / ROLL_STEPS, 1)}° of the whole elbow's roll and refined.`, whatWouldWork: null };
}

function stockAngles({ pipes }: WaysProblem): number[] {
  return [...new Set(pipes.flatMap((pipe) => pipe.stock.map((elbow) => elbow.angleRad)))].sort((a, b) => b - a);
}

function angleSentence(turn: number, angles: readonly number[]): string {
  const names = angles.map((a) => formatAngleDeg(a)).join(", ");
  const most = 2 * (angles[0] ?? 0);
  if (turn > most) return `The ends turn through ${formatAngleDeg(turn)}, and two elbows of ${names} turn ${formatAngleDeg(most)} at most: two cannot close.`;
  return `The ends turn through ${formatAngleDeg(turn)}. Two elbows turn no less than the difference of their angles and no more than the sum, and no two of ${names} take it in: two cannot close.`;
}

/** A move in east, north and up, smallest parts left out. */
function moveWords(move: Vec3, { input }: WaysProblem): string {
  const names = [["east", "west"], ["north", "south"], ["up", "down"]] as const;
  const parts = names.flatMap(([plus, minus], i) => {
    const mm = move[i] ?? 0;
    return Math.abs(mm) < SMALLEST_MOVE_MM ? [] : [`${tapeWords(Math.abs(mm), input.units)} ${mm > 0 ? plus : minus}`];
  });
  return parts.join(", ");
}

/** A part of a move under this shows on no tape, mm. */
const SMALLEST_MOVE_MM = 0.8;

function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1);
}
