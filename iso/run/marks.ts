/**
 * Marks that stick. A draft renumbers along flow; once the register is sticky a mark is never changed and never given
 * again: what comes in between takes its forerunner's number with a letter, what comes at the end continues, what is
 * gone is listed as void for ever. Keyed by joint key, piece key, and a spool by its parts.
 */
import { letterMark, markNumber } from "./mark-names";
import type { MarksRegister } from "./model-types";

/** What a built line has to mark, everything in flow order. */
export interface Markable {
  readonly welds: readonly { readonly key: string; readonly runId: string }[];
  readonly pieces: readonly { readonly key: string; readonly runId: string }[];
  readonly spools: readonly { readonly anchor: string; readonly parts: readonly string[] }[];
}

export function emptyMarks(): MarksRegister {
  return { version: 1, sticky: false, welds: {}, pieces: {}, spools: {}, voided: [] };
}

/** The same register, from now on never renumbering: at the first submission or the first work recorded. */
export function stickMarks(register: MarksRegister): MarksRegister {
  return { ...register, sticky: true };
}

/** The mark of each weld, piece and spool by its key. */
export interface GivenMarks {
  readonly welds: ReadonlyMap<string, string>;
  readonly pieces: ReadonlyMap<string, string>;
  readonly spools: ReadonlyMap<string, string>;
}

/** The marks a line carries under a register: fresh along flow in a draft, else the sticky ones and what came in since. */
export function givenMarks(line: Markable, register: MarksRegister): GivenMarks {
  if (!register.sticky) {
    return {
      welds: new Map(line.welds.map((w, i) => [w.key, String(i + 1)])),
      pieces: new Map(line.pieces.map((p, i) => [p.key, `P${i + 1}`])),
      spools: new Map(line.spools.map((s, i) => [s.anchor, letterMark(i)])),
    };
  }
  return {
    welds: stickyNumbers(line.welds, register.welds, voidedMarks(register, "weld"), ""),
    pieces: stickyNumbers(line.pieces, register.pieces, voidedMarks(register, "piece"), "P"),
    spools: stickyLetters(line.spools, register),
  };
}

/** The register after a line was built. Pure; the register handed in is left as it is. */
export function advanceMarks(line: Markable, register: MarksRegister): MarksRegister {
  const given = givenMarks(line, register);
  // Object.fromEntries makes own properties even of names such as "__proto__"; own() reads them.
  return {
    version: 1, sticky: register.sticky,
    welds: Object.fromEntries(given.welds), pieces: Object.fromEntries(given.pieces), spools: Object.fromEntries(given.spools),
    spoolParts: Object.fromEntries(line.spools.map((s) => [s.anchor, s.parts])),
    voided: register.sticky ? [...register.voided, ...gone("weld", register.welds, given.welds), ...gone("piece", register.pieces, given.pieces), ...goneLetters(register.spools, given.spools)] : register.voided,
  };
}

function own<T>(record: Readonly<Record<string, T>>, key: string): T | undefined {
  return Object.hasOwn(record, key) ? record[key] : undefined;
}

function voidedMarks(register: MarksRegister, kind: "weld" | "piece" | "spool"): string[] {
  return register.voided.filter((v) => v.kind === kind).map((v) => v.mark);
}

function gone(kind: "weld" | "piece", before: Readonly<Record<string, string>>, after: ReadonlyMap<string, string>) {
  return Object.entries(before).filter(([key]) => !after.has(key)).map(([key, mark]) => ({ kind, mark, key }));
}

function goneLetters(before: Readonly<Record<string, string>>, after: ReadonlyMap<string, string>) {
  const kept = new Set(after.values());
  return Object.entries(before).filter(([, mark]) => !kept.has(mark)).map(([key, mark]) => ({ kind: "spool" as const, mark, key }));
}

/** Old keys keep their marks; a new one between two marked ones of its run takes the forerunner's number and a letter. */
function stickyNumbers(
  items: readonly { readonly key: string; readonly runId: string }[], before: Readonly<Record<string, string>>, voided: readonly string[], prefix: string,
): Map<string, string> {
  const taken = new Set([...Object.values(before), ...voided]);
  let last = Math.max(0, ...[...taken].map(markNumber));
  const lastKept = new Map<string, number>();
  items.forEach((item, i) => {
    if (own(before, item.key) !== undefined) lastKept.set(item.runId, i);
  });
  const forerunner = new Map<string, string>();
  return new Map(items.map((item, i) => {
    const old = own(before, item.key);
    const ahead = forerunner.get(item.runId);
    const between = ahead !== undefined && i < (lastKept.get(item.runId) ?? -1);
    const mark = old ?? (between ? suffixed(`${prefix}${markNumber(ahead)}`, taken) : `${prefix}${(last += 1)}`);
    taken.add(mark);
    forerunner.set(item.runId, mark);
    return [item.key, mark] as const;
  }));
}

function suffixed(base: string, taken: ReadonlySet<string>): string {
  for (let i = 0; ; i++) {
    const mark = base + letterMark(i);
    if (!taken.has(mark)) return mark;
  }
}

/**
 * A spool keeps its letter while it is the only one holding parts of the old one and holds parts of no other. Where a
 * field joint merely moved, the larger share decides; a true split or merger voids the letters it touches.
 */
function stickyLetters(spools: Markable["spools"], register: MarksRegister): Map<string, string> {
  const share = spoolShares(spools, register);
  const taken = new Set([...Object.values(register.spools), ...voidedMarks(register, "spool")]);
  let next = 0;
  const fresh = (): string => {
    while (taken.has(letterMark(next))) next += 1;
    const mark = letterMark(next);
    taken.add(mark);
    return mark;
  };
  const used = new Set<string>();
  return new Map(spools.map((s, i) => {
    const heir = share.heirOf(i);
    const letter = heir === null ? undefined : own(register.spools, heir);
    if (letter === undefined || used.has(letter)) return [s.anchor, fresh()] as const;
    used.add(letter);
    return [s.anchor, letter] as const;
  }));
}

function spoolShares(spools: Markable["spools"], register: MarksRegister): { heirOf(index: number): string | null } {
  const oldOf = new Map<string, string>();
  for (const anchor of Object.keys(register.spools)) {
    for (const part of own(register.spoolParts ?? {}, anchor) ?? [anchor]) oldOf.set(part, anchor);
  }
  const counts = spools.map((s) => {
    const count = new Map<string, number>();
    for (const part of s.parts) {
      const old = oldOf.get(part);
      if (old !== undefined) count.set(old, (count.get(old) ?? 0) + 1);
    }
    return count;
  });
  const holders = (old: string) => counts.flatMap((count, i) => (count.has(old) ? [i] : []));
  const heirOf = (index: number): string | null => {
    const mine = counts[index];
    if (!mine || mine.size === 0) return null;
    const best = [...mine.entries()].reduce((a, b) => (b[1] > a[1] ? b : a))[0];
    const swallowed = [...mine.keys()].some((old) => old !== best && holders(old).length === 1);
    const rivals = holders(best).filter((i) => i !== index);
    const splitOff = rivals.some((i) => counts[i]?.size === 1);
    const outweighed = rivals.some((i) => (counts[i]?.get(best) ?? 0) > (mine.get(best) ?? 0));
    return swallowed || splitOff || outweighed ? null : best;
  };
  return { heirOf };
}
