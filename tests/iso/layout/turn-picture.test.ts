/** What the picture of a turn tells a fitter to do: only what is cut is told to be cut. */
import { expect, test } from "vitest";
import { buildModel } from "@/iso";
import { fittingShape } from "@/iso/layout/turn-picture";
import { spoolTurns, type Turn } from "@/iso/layout/turns";
import { GOLDEN_RUNS } from "../../fixtures/golden-runs";
import { benchInput } from "./bench-inputs";

const TURNS: readonly Turn[] = GOLDEN_RUNS.flatMap(({ document }) => {
  const { marks } = benchInput(document, "letter");
  const model = buildModel(document, marks, []);
  return model.spools.flatMap((spool) => spoolTurns(model, spool));
});
const told = (turn: Turn) => fittingShape(turn, "imperial").labels.map(({ text }) => text).join(" | ");

test("a mitre and a trimmed elbow say where to cut, a whole elbow of any kind does not", () => {
  for (const kind of ["mitre", "trimmed", "whole"] as const) {
    const turns = TURNS.filter((turn) => turn.kind === kind);
    expect(turns.length).toBeGreaterThan(0);
    for (const turn of turns) expect(/\bCUT\b/.test(told(turn)), `${kind}: ${told(turn)}`).toBe(kind !== "whole");
  }
});

test("a socket elbow shows its corner and how far from it each pipe ends", () => {
  const forged = TURNS.filter((turn) => turn.kind === "whole" && turn.radiusMm === null);
  expect(forged.length).toBeGreaterThan(0);
  for (const turn of forged) expect(told(turn).match(/PIPE'S END/g)).toHaveLength(2);
});
