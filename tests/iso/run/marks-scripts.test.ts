/**
 * Marks under random edit scripts, 2 000 of them, each an editor's session on a line whose register has stuck: put in,
 * take out, move, reorder, turn round, change the item, add and remove a branch, field joints, undo. After every step:
 * a live weld or piece keeps its mark, no mark is there twice, a void one never comes back, a mark with a letter stands
 * behind its own number, and a reversal changes nothing at all (common practice of weld maps).
 */
import { expect, it } from "vitest";
import { buildModel, nextMarks } from "../../../iso/run/build-model";
import { defaultLineSettings, newRunDocument } from "../../../iso/run/defaults";
import type { Item, Place, Point, RunDocument } from "../../../iso/run/document";
import { branchAdd, newPoint, pointInsert, pointMove, pointRemove, pointUpdate } from "../../../iso/run/edit";
import { markNumber, markStem } from "../../../iso/run/mark-names";
import { emptyMarks, stickMarks } from "../../../iso/run/marks";
import type { MarksRegister } from "../../../iso/run/model-types";
import { pointsInsert, pointsMove, pointsRemove } from "../../../iso/run/reorder";
import { runReverse } from "../../../iso/run/reverse";
import { end, flange, joint, outlet, reducer, tee, valve } from "../../fixtures/run-builder";
import { seededRandom } from "../../oracle/random";

const SCRIPTS = 2_000;
const STEPS = 5;
const ITEMS: readonly Item[] = [
  { kind: "none" }, joint, flange(), valve(), valve({ ends: "butt", valve: "check" }), tee(), outlet("2"), end("field-weld"), reducer("3"), { kind: "support", text: "" },
  { kind: "coupling", half: false },
];
const MOVES: readonly (readonly [number, number, number])[] = [[900, 0, 0], [0, 900, 0], [0, 0, 900], [-900, 0, 0], [700, 700, 0]];
const PLACES: readonly Point["places"][] = [{}, { in: "field" }, { out: "field" }, { in: "field-fit", out: "shop" }];

type Kind = "weld" | "piece" | "spool";
const KINDS: readonly Kind[] = ["weld", "piece", "spool"];
const LIVE = { weld: "welds", piece: "pieces", spool: "spools" } as const;
type Step = "insert" | "insert-rows" | "remove" | "remove-rows" | "move" | "reorder" | "reverse" | "item" | "places" | "branch" | "unbranch" | "undo";
const STEP_KINDS: readonly Step[] = ["insert", "insert", "insert-rows", "remove", "remove-rows", "move", "reorder", "reverse", "reverse", "item", "places", "branch", "unbranch", "undo"];

/** One editor with its own dice. */
class Session {
  document: RunDocument = newRunDocument("M", defaultLineSettings("imperial"));
  private readonly history: RunDocument[] = [];
  private serial = 0;

  constructor(private readonly random: () => number) {}

  pick<T>(list: readonly T[]): T {
    return list[Math.floor(this.random() * list.length)]!;
  }

  step(kind: Step): void {
    const before = this.document;
    this.document = this.edited(kind);
    if (kind !== "undo") this.history.push(before);
  }

  private edited(kind: Step): RunDocument {
    const { document } = this;
    const run = this.pick(document.runs);
    const row = Math.floor(this.random() * run.points.length);
    const id = run.points[row]?.id ?? "";
    switch (kind) {
      case "insert":
        return pointInsert(document, run.id, Math.floor(this.random() * (run.points.length + 1)), this.point());
      case "insert-rows":
        return pointsInsert(document, run.id, row, [this.point(), this.point()]);
      case "remove":
        return pointRemove(document, id);
      case "remove-rows":
        return pointsRemove(document, run.points.slice(row, row + 2).map((p) => p.id));
      case "move":
        return pointUpdate(document, id, { offset: this.point().offset });
      case "reorder":
        return this.random() < 0.5 ? pointMove(document, run.id, row, Math.floor(this.random() * run.points.length)) : pointsMove(document, run.id, row, 2, 0);
      case "reverse": {
        const turned = runReverse(document, "main");
        return turned.ok ? turned.document : document;
      }
      case "item":
        return pointUpdate(document, id, { item: this.pick(ITEMS) });
      case "places":
        return pointUpdate(document, id, { places: this.pick(PLACES) });
      case "branch":
        return branchAdd(document, id, `b${(this.serial += 1)}`);
      case "unbranch":
        return document.runs.length < 2 ? document : pointsRemove(document, document.runs[document.runs.length - 1]!.points.map((p) => p.id));
      case "undo":
        return this.history.pop() ?? document;
    }
  }

  private point(): Point {
    const [e, n, u] = this.pick(MOVES).map((mm) => ({ text: "", mm })) as [never, never, never];
    const places: Partial<Record<"in", Place>> = this.random() < 0.15 ? { in: "field" } : {};
    return { ...newPoint(`n${(this.serial += 1)}`), offset: { kind: "enu", e, n, u }, item: this.pick(ITEMS), places };
  }
}

const endsOf = (marks: MarksRegister, key: string): string => [...(marks.pieceJoints?.[key] ?? [])].sort().join(" & ");

function fail(what: string, before: MarksRegister, after: MarksRegister): never {
  throw new Error(`${what}\nbefore ${JSON.stringify(before)}\nafter ${JSON.stringify(after)}`);
}

function checkStep(before: MarksRegister, after: MarksRegister): void {
  for (const kind of KINDS) {
    const [was, is] = [before[LIVE[kind]], after[LIVE[kind]]];
    const voided = after.voided.filter((v) => v.kind === kind).map((v) => v.mark);
    const all = [...Object.values(is), ...voided];
    if (new Set(all).size !== all.length) fail(`a ${kind} mark is there twice, or a void one came back`, before, after);
    if (!Object.values(was).every((mark) => all.includes(mark))) fail(`a ${kind} mark is forgotten`, before, after);
  }
  if (!before.voided.every((v) => after.voided.includes(v))) fail("a void mark left the list", before, after);
  for (const [key, mark] of Object.entries(before.welds)) if (after.welds[key] !== undefined && after.welds[key] !== mark) fail(`weld ${key} was renumbered`, before, after);
  const nowAt = new Map(Object.keys(after.pieces).map((key) => [endsOf(after, key), after.pieces[key]]));
  for (const [key, mark] of Object.entries(before.pieces)) {
    const now = nowAt.get(endsOf(before, key));
    if (now !== undefined && now !== mark) fail(`piece between ${endsOf(before, key)} was renumbered`, before, after);
  }
}

/** A weld that is new and has a letter stands right behind one of its own number, in the flow of its run. */
function checkSuffixes(document: RunDocument, before: MarksRegister, after: MarksRegister): void {
  const joints = buildModel(document, after, []).joints.filter((j) => j.number !== null);
  if (joints.map((j) => j.key).join() !== Object.keys(after.welds).join()) fail("the model's weld numbers are not the register's", before, after);
  joints.forEach((j, i) => {
    const mark = j.number!;
    if (before.welds[j.key] !== undefined || markStem(mark) === mark) return;
    const ahead = joints.slice(0, i).map((other) => markStem(other.number!));
    if (!ahead.includes(markStem(mark))) fail(`weld ${mark} does not follow its forerunner`, before, after);
  });
}

const signature = (m: MarksRegister): string => JSON.stringify([
  Object.entries(m.welds).sort(), Object.keys(m.pieces).map((key) => [endsOf(m, key), m.pieces[key]]).sort(), Object.values(m.spools).sort(), m.voided,
]);

it("2 000 random edit scripts change, repeat, forget and revive no mark; a reversal changes none at all", () => {
  const reached = { reversals: 0, suffixed: 0, voided: 0, steps: 0 };
  for (let seed = 1; seed <= SCRIPTS; seed++) {
    const random = seededRandom(seed);
    const session = new Session(random);
    for (let i = 0; i < 3 + (seed % 5); i++) session.step("insert");
    let marks = stickMarks(nextMarks(session.document, emptyMarks(), []));
    for (let i = 0; i < STEPS; i++) {
      const kind = session.pick(STEP_KINDS);
      const from = session.document;
      session.step(kind);
      const next = nextMarks(session.document, marks, []);
      checkStep(marks, next);
      if (seed % 20 === 0) checkSuffixes(session.document, marks, next);
      if (kind === "reverse" && session.document !== from) {
        reached.reversals += 1;
        if (signature(next) !== signature(marks)) fail(`seed ${seed}: the reversal changed a mark`, marks, next);
      }
      marks = next;
      reached.steps += 1;
    }
    reached.suffixed += Object.values(marks.welds).filter((m) => markStem(m) !== m && markNumber(m) > 0).length;
    reached.voided += marks.voided.length;
  }
  expect(reached.steps).toBe(SCRIPTS * STEPS);
  expect(reached.reversals).toBeGreaterThan(1_000);
  expect(reached.suffixed).toBeGreaterThan(300);
  expect(reached.voided).toBeGreaterThan(1_000);
});
