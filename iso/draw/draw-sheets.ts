/**
 * A line or spool on as many sheets as it needs. A sheet is too full when it holds more welds or marks than its paper takes
 * (about 36 welds on A3, common practice), when what is drawn stands out of its room, or when its labels could not be kept
 * clean; then it is cut at a joint (sheet-split.ts). Match lines say where it goes on; marks run on from sheet to sheet; a
 * dimension that is cut stands in full on the sheet before the cut.
 */
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { drawPlan, overrun, viewOf } from "./draw-model";
import type { Drawing, DrawOptions } from "./drawing-types";
import { placePlan } from "./place";
import { matchesOf, splitFull, splitOne, wholePlan, type Match, type SheetCapacity, type SheetPart, type SheetPlan } from "./sheet-split";
import * as size from "./sizes";
import { sketchOf } from "./sketch";

export interface SheetsOptions extends DrawOptions {
  /** Room of the second sheet and those after it; absent = that of the first. */
  readonly later?: { readonly widthMm: number; readonly heightMm: number };
  /** "one": only what cannot stand on one sheet is split; absent = as the document says, else "auto". */
  readonly sheets?: "auto" | "one";
}

/** Paper that SHEET_WELDS and SHEET_LABELS are judged on: the drawing's room on A3, square mm. */
const A3_ROOM = 285 * 235;
const SHEET_WELDS = 36;
const SHEET_LABELS = 130;
/** Rooms are smaller or larger than that by these shares at most. */
const ROOM_SHARES = [0.3, 1.3] as const;
/** A drawing this clean is not crowded whatever it holds, and one with this few labels cannot get cleaner by a cut. */
const CLEAN_SHARE = 0.85;
const FEW_LABELS = 40;
/** Rounds of drawing, judging and cutting again. */
const ROUNDS = 8;

/**
 * Draws a model on one or more sheets, first to last. Every dimension, weld, piece and item is on one of them; only the joint
 * two sheets meet at is on both.
 */
export function drawSheets(model: Model, options: SheetsOptions): Drawing[] {
  const whole = sketchOf(model, options.spool);
  const plan = placePlan(whole, options.measure);
  const view = viewOf(model, options, options.spool === null ? plan : null);
  const mode = options.sheets ?? model.document.sheets ?? "auto";
  let split = wholePlan(whole);
  if (mode === "auto") split = splitFull(split, capacityOf(options));
  const drawn = new Map<string, Drawing>();
  for (let round = 0; ; round++) {
    const drawings = drawParts(model, options, view, split, drawn);
    const next = round < ROUNDS ? splitAgain(split, drawings, options, mode) : null;
    if (!next) return [...drawings];
    split = next;
  }
}

function capacityOf(options: SheetsOptions): SheetCapacity {
  const room = options.later ?? options;
  const area = Math.min(options.widthMm * options.heightMm, room.widthMm * room.heightMm);
  const share = Math.min(ROOM_SHARES[1], Math.max(ROOM_SHARES[0], area / A3_ROOM));
  return { welds: SHEET_WELDS * share, labels: SHEET_LABELS * share };
}

/** Drawings of all parts; those that come out as before are taken from `drawn`. */
function drawParts(model: Model, options: SheetsOptions, view: View, split: SheetPlan, drawn: Map<string, Drawing>): readonly Drawing[] {
  const matches = matchesOf(split);
  return split.parts.map((part, i) => {
    const mine = matches.filter(({ fromSheet, toSheet }) => fromSheet === i + 1 || toSheet === i + 1);
    const room = i === 0 ? options : (options.later ?? options);
    const key = partKey(part, i === 0, i + 1, mine);
    const drawing = drawn.get(key) ?? drawPart(model, { ...options, widthMm: room.widthMm, heightMm: room.heightMm }, view, split.parts.length === 1 ? null : part, i + 1, mine);
    drawn.set(key, drawing);
    return drawing;
  });
}

function partKey(part: SheetPart, first: boolean, sheet: number, matches: readonly Match[]): string {
  return [first, ...part.vertices.map(({ id }) => id), ...matches.map((match) => `${match.mark} ${match.legId} ${match.fromSheet === sheet ? match.toSheet : -match.fromSheet}`)].join(" ");
}

function drawPart(model: Model, options: DrawOptions, view: View, part: SheetPart | null, sheet: number, matches: readonly Match[]): Drawing {
  return drawPlan(placePlan(sketchOf(model, options.spool, part), options.measure), view, options, { sheet, matches });
}

/** Cuts every sheet that turned out too full; null when all read, or nothing more can be cut. */
function splitAgain(split: SheetPlan, drawings: readonly Drawing[], options: SheetsOptions, mode: "auto" | "one"): SheetPlan | null {
  const capacity = capacityOf(options);
  let next: SheetPlan | null = null;
  for (let i = split.parts.length - 1; i >= 0; i--) {
    const drawing = drawings[i];
    if (!drawing || !(overrun(drawing) > size.PAPER_EPS || (mode === "auto" && isCrowded(drawing)))) continue;
    next = splitOne(next ?? split, i, capacity) ?? next;
  }
  return next;
}

function isCrowded({ report }: Drawing): boolean {
  return report.labels > FEW_LABELS && report.clean < CLEAN_SHARE * report.labels;
}
