/**
 * The same turns cut from pipe. A mitre of n pieces turns θ in n - 1 equal welds of δ; its segments touch the arc of the
 * elbow's radius, so the corners of the trimmed pair stay where they are and the first cut comes R·(tan(θ/2) - tan(δ/2))
 * before the corner (geometry of a polygon around an arc).
 */
import { SQUARE_RAD } from "../geometry/tolerances";
import { formatAngleDeg } from "../units/format";
import type { Draft, DraftTurn } from "./draft";
import type { CutPath } from "./trimmed-pair";
import type { WaysProblem } from "./problem";
import { wayOf } from "./way";
import type { Way } from "./ways-types";

const PIECES = [2, 3, 4, 5] as const;
/** Over this much off square many codes ask for the engineer's permission (from memory). */
const CUT_LIMIT_RAD = (22.5 * Math.PI) / 180;

/** The path with each of its turns mitred in 2 to 5 pieces, where every piece has length. */
export function mitreWays(problem: WaysProblem, { draft: path, rates }: CutPath): Way[] {
  // A reducer cannot be mitred: it stands at end 0 or nowhere.
  if (path.turns.length === 0 || (path.reducerAt !== null && path.reducerAt !== 0)) return [];
  return PIECES.flatMap((pieces) => {
    const turns = path.turns.map((turn) => mitredTurn(turn, pieces));
    const draft: Draft = { kind: "mitre", turns, reducerAt: path.reducerAt, directions: path.directions, lengths: path.lengths, warnings: mitreCautions(turns, pieces) };
    const way = hasThroats(problem, turns, pieces) ? wayOf(problem, draft, rates) : null;
    return way && way.cuts.every((cut) => cut > 0) ? [way] : [];
  });
}

function mitredTurn(turn: DraftTurn, pieces: number): DraftTurn {
  const delta = turn.angleRad / (pieces - 1);
  return {
    ...turn, fitting: { make: "mitre", name: `mitre of ${pieces}, ${formatAngleDeg(turn.angleRad)}`, pieces },
    takeOutMm: pieces === 2 ? 0 : turn.radiusMm * (Math.tan(turn.angleRad / 2) - Math.tan(delta / 2)), source: "geometry of the mitre", unverified: false,
  };
}

/** Segments need a throat: a radius over half the OD, and some length left on the inside after both cuts. */
function hasThroats({ pipes }: WaysProblem, turns: readonly DraftTurn[], pieces: number): boolean {
  return pieces === 2 || turns.every((turn) => turn.radiusMm > (pipes.find((pipe) => pipe.nps === turn.nps) ?? pipes[0]).odMm / 2);
}

function mitreCautions(turns: readonly DraftTurn[], pieces: number): string[] {
  const steep = turns.map((turn) => turn.angleRad / (pieces - 1) / 2).filter((cut) => cut > CUT_LIMIT_RAD + SQUARE_RAD);
  const off = steep.length > 0 ? ` Cuts are up to ${formatAngleDeg(Math.max(...steep))} off square, over 22.5°.` : "";
  return [`Mitred turns: confirm with the engineer that mitres are permitted here.${off}`];
}
