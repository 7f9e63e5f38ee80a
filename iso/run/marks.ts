/**
 * Marks that stick. A draft renumbers along flow; once the register is sticky a mark is never changed and never given
 * again: what comes in between takes its forerunner's number with a letter (or the next free number, as the line's rules
 * say), what comes at the end continues, what is gone is listed as void for ever. A weld is known by its joint's key, a
 * piece by the joints at its ends (piece-match.ts), a spool by its parts (spool-letters.ts).
 */
import { DEFAULT_MARK_RULES, type MarkRules } from "./settings-schema";
import { letterMark, markNumber, markStem } from "./mark-names";
import type { MarksRegister } from "./model-types";
import { oldPieceKeys, type MarkablePiece } from "./piece-match";
import { inheritedLetters, type MarkableSpool } from "./spool-letters";

/** What a built line has to mark, everything in flow order. */
export interface Markable {
  readonly welds: readonly { readonly key: string; readonly runId: string }[];
  readonly pieces: readonly MarkablePiece[];
  readonly spools: readonly MarkableSpool[];
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
export function givenMarks(line: Markable, register: MarksRegister, rules: MarkRules = DEFAULT_MARK_RULES): GivenMarks {
  if (!register.sticky) {
    return {
      welds: new Map(line.welds.map((w, i) => [w.key, `${rules.weldPrefix}${rules.weldStart + i}`])),
      pieces: new Map(line.pieces.map((p, i) => [p.key, `${rules.piecePrefix}${rules.pieceStart + i}`])),
      spools: new Map(line.spools.map((s, i) => [s.anchor, spoolName(i, rules)])),
    };
  }
  const oldKeys = oldPieceKeys(line.pieces, register);
  const [weldRule, pieceRule] = [{ prefix: rules.weldPrefix, start: rules.weldStart, added: rules.added }, { prefix: rules.piecePrefix, start: rules.pieceStart, added: rules.added }];
  return {
    welds: stickyNumbers(line.welds, (key) => own(register.welds, key), takenMarks(register, "weld"), weldRule),
    pieces: stickyNumbers(line.pieces, (key) => own(register.pieces, oldKeys.get(key) ?? ""), takenMarks(register, "piece"), pieceRule),
    spools: stickySpools(line, register, oldKeys, rules),
  };
}

/** The register after a line was built. Pure; the register handed in is left as it is. */
export function advanceMarks(line: Markable, register: MarksRegister, rules: MarkRules = DEFAULT_MARK_RULES): MarksRegister {
  const given = givenMarks(line, register, rules);
  // Object.fromEntries makes own properties even of names such as "__proto__"; own() reads them.
  return {
    version: 1, sticky: register.sticky,
    welds: Object.fromEntries(given.welds), pieces: Object.fromEntries(given.pieces), spools: Object.fromEntries(given.spools),
    pieceJoints: Object.fromEntries(line.pieces.map((p) => [p.key, p.ends])),
    spoolParts: Object.fromEntries(line.spools.map((s) => [s.anchor, s.parts])),
    voided: register.sticky
      ? [...register.voided, ...gone("weld", register.welds, given.welds), ...gone("piece", register.pieces, given.pieces), ...gone("spool", register.spools, given.spools)]
      : register.voided,
  };
}

type MarkKind = MarksRegister["voided"][number]["kind"];

function own<T>(record: Readonly<Record<string, T>>, key: string): T | undefined {
  return Object.hasOwn(record, key) ? record[key] : undefined;
}

function takenMarks(register: MarksRegister, kind: MarkKind): Set<string> {
  const live = kind === "weld" ? register.welds : kind === "piece" ? register.pieces : register.spools;
  return new Set([...Object.values(live), ...register.voided.filter((v) => v.kind === kind).map((v) => v.mark)]);
}

/** Marks nobody carries any more, with the key that carried them last. */
function gone(kind: MarkKind, before: Readonly<Record<string, string>>, after: ReadonlyMap<string, string>): MarksRegister["voided"] {
  const kept = new Set(after.values());
  return Object.entries(before).filter(([, mark]) => !kept.has(mark)).map(([key, mark]) => ({ kind, mark, key }));
}

interface NumberRule {
  readonly prefix: string;
  readonly start: number;
  readonly added: MarkRules["added"];
}

/** Known ones keep their marks; a new one between two marked ones of its run takes the forerunner's number and a letter. */
function stickyNumbers(
  items: readonly { readonly key: string; readonly runId: string }[], knownMark: (key: string) => string | undefined, taken: Set<string>, rule: NumberRule,
): Map<string, string> {
  let last = [...taken].reduce((most, mark) => Math.max(most, markNumber(mark, rule.prefix)), rule.start - 1);
  const fresh = (): string => {
    do last += 1;
    while (taken.has(`${rule.prefix}${last}`));
    return `${rule.prefix}${last}`;
  };
  const lastKept = new Map<string, number>();
  items.forEach((item, i) => {
    if (knownMark(item.key) !== undefined) lastKept.set(item.runId, i);
  });
  const forerunner = new Map<string, string>();
  return new Map(items.map((item, i) => {
    const ahead = forerunner.get(item.runId);
    const between = rule.added === "letter" && ahead !== undefined && i < (lastKept.get(item.runId) ?? -1);
    const mark = knownMark(item.key) ?? (between ? suffixed(markStem(ahead), taken) : fresh());
    taken.add(mark);
    forerunner.set(item.runId, mark);
    return [item.key, mark] as const;
  }));
}

function suffixed(stem: string, taken: ReadonlySet<string>): string {
  for (let i = 0; ; i++) {
    const mark = stem + letterMark(i);
    if (!taken.has(mark)) return mark;
  }
}

/** A spool's mark by its place in flow. */
function spoolName(index: number, rules: MarkRules): string {
  return rules.spools === "letters" ? letterMark(index) : String(index + 1);
}

function stickySpools(line: Markable, register: MarksRegister, oldKeys: ReadonlyMap<string, string>, rules: MarkRules): Map<string, string> {
  const pieces = new Set(line.pieces.map((p) => p.key));
  const kept = inheritedLetters(line.spools, register, (part) => (pieces.has(part) ? (oldKeys.get(part) ?? null) : part));
  const taken = takenMarks(register, "spool");
  let next = 0;
  const fresh = (): string => {
    while (taken.has(spoolName(next, rules))) next += 1;
    const mark = spoolName(next, rules);
    taken.add(mark);
    return mark;
  };
  return new Map(line.spools.map((s, i) => [s.anchor, kept[i] ?? fresh()] as const));
}
