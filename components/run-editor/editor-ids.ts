/** Ids of new points and branches: made outside the reducer, handed in with each action, never used twice. */

const ID_LENGTH = 12;

/** A fresh id in the run document's alphabet. Random, since a deleted point's id keeps its weld numbers for ever. */
export function freshId(prefix: "p" | "r"): string {
  const random = typeof crypto.randomUUID === "function" ? crypto.randomUUID() : `${Math.random()}${Math.random()}`;
  return `${prefix}${random.replace(/[^a-z0-9]/g, "").slice(0, ID_LENGTH)}`;
}
