/**
 * Which old piece a piece of pipe is. Its key is that of the leg it ends in, and a reversal or a reorder gives that name
 * to another pipe: so a piece is known first by what stands at both its ends, then by its key, then by one end it kept.
 */
import type { MarksRegister } from "./model-types";

export interface MarkablePiece {
  readonly key: string;
  readonly runId: string;
  /** What stands at its two ends: the joint's key, or the id of a point where nobody welds. */
  readonly ends: readonly [string, string];
}

/** Old key of each piece, by its key now. Each old piece is found once at most. */
export function oldPieceKeys(pieces: readonly MarkablePiece[], register: MarksRegister): Map<string, string> {
  const found = new Map<string, string>();
  const taken = new Set<string>();
  const claim = (piece: MarkablePiece, old: string | undefined): void => {
    if (old === undefined || taken.has(old) || found.has(piece.key)) return;
    taken.add(old);
    found.set(piece.key, old);
  };
  const joints = Object.entries(register.pieceJoints ?? {}).filter(([key]) => Object.hasOwn(register.pieces, key));
  const byBoth = new Map(joints.map(([key, ends]) => [bothEnds(ends), key]));
  for (const piece of pieces) claim(piece, byBoth.get(bothEnds(piece.ends)));
  for (const piece of pieces) claim(piece, Object.hasOwn(register.pieces, piece.key) ? piece.key : undefined);
  const byOne = new Map<string, string[]>();
  for (const [key, ends] of joints) for (const end of ends) byOne.set(end, [...(byOne.get(end) ?? []), key]);
  for (const piece of pieces) for (const end of piece.ends) claim(piece, byOne.get(end)?.find((key) => !taken.has(key)));
  return found;
}

function bothEnds(ends: readonly string[]): string {
  return JSON.stringify([...ends].sort());
}
