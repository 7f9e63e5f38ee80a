/**
 * Which letter a spool carries on. It keeps its letter while it is the only one holding parts of the old one and holds
 * parts of no other. Where a field joint merely moved, the larger share decides; a true split or merger voids the letters
 * it touches.
 */
import type { MarksRegister } from "./model-types";

export interface MarkableSpool {
  readonly anchor: string;
  readonly parts: readonly string[];
}

/** The old letter each spool is heir to, or null where it needs a new one. `oldPart` names a part as it was last time. */
export function inheritedLetters(spools: readonly MarkableSpool[], register: MarksRegister, oldPart: (part: string) => string | null): (string | null)[] {
  const heirOf = spoolHeirs(spools, register, oldPart);
  const used = new Set<string>();
  return spools.map((_, i) => {
    const heir = heirOf(i);
    const letter = heir !== null && Object.hasOwn(register.spools, heir) ? (register.spools[heir] ?? null) : null;
    if (letter === null || used.has(letter)) return null;
    used.add(letter);
    return letter;
  });
}

function spoolHeirs(spools: readonly MarkableSpool[], register: MarksRegister, oldPart: (part: string) => string | null): (index: number) => string | null {
  const oldOf = new Map<string, string>();
  const lists = register.spoolParts ?? {};
  for (const anchor of Object.keys(register.spools)) {
    for (const part of (Object.hasOwn(lists, anchor) ? lists[anchor] : undefined) ?? [anchor]) oldOf.set(part, anchor);
  }
  const counts = spools.map((s) => {
    const count = new Map<string, number>();
    for (const part of s.parts) {
      const name = oldPart(part);
      const old = name === null ? undefined : oldOf.get(name);
      if (old !== undefined) count.set(old, (count.get(old) ?? 0) + 1);
    }
    return count;
  });
  const holders = new Map<string, number[]>();
  counts.forEach((count, i) => count.forEach((_, old) => holders.set(old, [...(holders.get(old) ?? []), i])));
  return (index) => heirAt(index, counts, holders);
}

function heirAt(index: number, counts: readonly ReadonlyMap<string, number>[], holders: ReadonlyMap<string, readonly number[]>): string | null {
  const mine = counts[index];
  if (!mine || mine.size === 0) return null;
  const best = [...mine.entries()].reduce((a, b) => (b[1] > a[1] ? b : a))[0];
  const swallowed = [...mine.keys()].some((old) => old !== best && holders.get(old)?.length === 1);
  const rivals = (holders.get(best) ?? []).filter((i) => i !== index);
  const splitOff = rivals.some((i) => counts[i]?.size === 1);
  const outweighed = rivals.some((i) => (counts[i]?.get(best) ?? 0) > (mine.get(best) ?? 0));
  return swallowed || splitOff || outweighed ? null : best;
}
