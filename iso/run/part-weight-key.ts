/** What tells one part's weight from another's: the key a shop's own weight hangs on. */
import { weightKey } from "../catalogue/keys";
import type { Component } from "./model-types";

/** "weight:valve-gate-flanged:150:4", "weight:elbow-90-SR:40:6", "weight:outlet-butt::6:2". */
export function partWeightKey(c: Pick<Component, "kind" | "valve" | "ends" | "nps" | "nps2" | "schedule" | "ratingClass" | "description">): string {
  const size = c.nps2 === null || c.nps2 === c.nps ? c.nps : `${c.nps}:${c.nps2}`;
  return weightKey(`${partName(c)}:${c.ratingClass ?? forgedClass(c.description) ?? c.schedule ?? ""}:${size}`);
}

function partName(c: Pick<Component, "kind" | "valve" | "ends" | "description">): string {
  if (c.kind === "valve") return `valve-${c.valve ?? ""}-${c.ends ?? ""}`;
  const turn = /^Elbow (45|90)(?: (LR|SR))?/.exec(c.description);
  const bend = turn ? `-${turn[1]}${turn[2] ? `-${turn[2]}` : ""}` : c.kind === "return" && /SR/.test(c.description) ? "-SR" : "";
  const ends = c.ends === null || c.ends === "flanged" || c.kind.startsWith("flange-") ? "" : `-${c.ends}`;
  return `${c.kind}${bend}${ends}`;
}

function forgedClass(description: string): string | null {
  return /class (2000|3000|6000)/.exec(description)?.[1] ?? null;
}
