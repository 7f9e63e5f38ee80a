/** What a label's leader runs over: pipe, symbols and thin lines other than those it names and starts from. */
import type { PaperPoint } from "../geometry/types";
import { ALONG_COSINE, type Candidate, type Label, type LabelInk } from "./label-candidates";

/** A leader no longer than this has no room to touch anything. */
const LEADER_NONE = 1.6;
/** Half the pipe's width on the ink map and a hair: so far beside its pipe a leader has left it, mm. */
const PIPE_LEFT = 1.25;
/** A little beyond the anchor nothing counts, mm. */
const NEAR_ANCHOR = 0.9;
/** Nearer to the pipe than this (cosine) a leader could run over the next weld instead of its own symbol. */
const BESIDE_COSINE = 0.85;

/** Where ink under a leader begins to count: what it names, and the pipe it starts from, are no foreign ink. Null: nowhere. */
function leaderBegin(label: Label, { fromX, fromY, toX, toY, ring }: Candidate): PaperPoint | null {
  if (ring <= LEADER_NONE) return null;
  const d: PaperPoint = [(toX - fromX) / ring, (toY - fromY) / ring];
  const beside = label.along.reduce((most, way) => Math.max(most, Math.abs(way[0] * d[0] + way[1] * d[1])), 0);
  const left = label.along.length === 0 || beside > ALONG_COSINE ? 0 : PIPE_LEFT / Math.sqrt(1 - beside * beside);
  const skip = Math.max(NEAR_ANCHOR, left - label.clear, beside < BESIDE_COSINE ? (label.own ?? 0) - label.clear : 0);
  return skip >= ring ? null : [fromX + d[0] * skip, fromY + d[1] * skip];
}

/** Price of fixed ink under the leader. */
export function leaderPrice(label: Label, candidate: Candidate, ink: LabelInk): number {
  const begin = leaderBegin(label, candidate);
  if (!begin) return 0;
  const to: PaperPoint = [candidate.toX, candidate.toY];
  const crossed = ink.heavy.along(begin, to);
  const thin = ink.light.along(begin, to);
  return (crossed > 0 ? 16 + crossed : 0) + (thin > 0 ? 5 + thin * 0.6 : 0);
}

/** True when the leader runs over foreign pipe or symbols. */
export function leaderTouches(label: Label, candidate: Candidate, ink: LabelInk): boolean {
  const begin = leaderBegin(label, candidate);
  return begin !== null && ink.heavy.along(begin, [candidate.toX, candidate.toY]) > 0;
}
