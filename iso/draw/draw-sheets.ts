/**
 * A line or spool on as many sheets as it needs. A sheet is too full when it holds more welds or marks than its paper takes
 * (about 36 welds on A3, common practice), when what is drawn stands out of its room, or when its labels could not be kept
 * clean; then it is cut at a joint (sheet-split.ts). Match lines say where it goes on; marks run on from sheet to sheet; a
 * dimension that is cut stands in full on the sheet before the cut.
 */
import type { View } from "../run/document";
import type { Model } from "../run/model-types";
import { drawPlan, linesFit, overrun, standingOf, viewOf, type Standing } from "./draw-model";
import type { Drawing, DrawOptions } from "./drawing-types";
import { matchWords } from "./match-marks";
import { placePlan, type PlacePlan } from "./place";
import { joinedParts, matchesOf, splitFull, splitOne, wholePlan, type Match, type SheetCapacity, type SheetPart, type SheetPlan } from "./sheet-split";
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
/** Labels less clean than this are crowded; with this few of them a cut would not help. */
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
  const mode = options.sheets ?? model.document.sheets ?? "auto";
  const desk: Desk = { model, options, view: viewOf(model, options, options.spool === null ? plan : null), laid: new Map(), drawn: new Map(), whole: plan };
  let split = wholePlan(whole);
  if (mode === "auto") split = splitFull(split, capacityOf(options));
  split = split.parts.length > 1 || !laidOut(desk, split, 0).fits ? untilItFits(desk, split, mode) : split;
  for (let round = 0; ; round++) {
    const drawings = drawParts(desk, split);
    const next = round < ROUNDS ? splitWhere(split, options, (i) => needsCut(drawings[i], mode)) : null;
    if (!next) return [...drawings];
    split = next;
  }
}

/** What is worked out once for each part and kept while others are still being cut. */
interface Desk {
  readonly model: Model;
  readonly options: SheetsOptions;
  readonly view: View;
  readonly whole: PlacePlan;
  readonly laid: Map<string, Laid>;
  readonly drawn: Map<string, Drawn>;
}

interface Laid {
  readonly plan: PlacePlan;
  readonly standing: Standing;
  readonly fits: boolean;
}

function capacityOf(options: SheetsOptions): SheetCapacity {
  const room = options.later ?? options;
  const area = Math.min(options.widthMm * options.heightMm, room.widthMm * room.heightMm);
  const share = Math.min(ROOM_SHARES[1], Math.max(ROOM_SHARES[0], area / A3_ROOM));
  return { welds: SHEET_WELDS * share, labels: SHEET_LABELS * share };
}

/** Cuts what stands out of its paper before a single label is placed, then joins small parts that fit one paper together. */
function untilItFits(desk: Desk, start: SheetPlan, mode: "auto" | "one"): SheetPlan {
  let split = start;
  for (let next: SheetPlan | null = split; next; ) {
    split = next;
    const now: SheetPlan = split;
    next = splitWhere(now, desk.options, (i) => !laidOut(desk, now, i).fits);
  }
  const capacity = mode === "auto" ? capacityOf(desk.options) : ANY_LOAD;
  return joinedParts(split, capacity, (joined) => joined.parts.every((_, i) => laidOut(desk, joined, i).fits));
}

const ANY_LOAD: SheetCapacity = { welds: Infinity, labels: Infinity };

function laidOut(desk: Desk, split: SheetPlan, index: number): Laid {
  const part = split.parts[index]!;
  const key = `${index === 0} ${pointsKey(part)}`;
  const known = desk.laid.get(key);
  if (known) return known;
  const options = roomOptions(desk, index);
  const plan = split.parts.length === 1 ? desk.whole : placePlan(sketchOf(desk.model, options.spool, part), options.measure);
  const standing = standingOf(plan, desk.view, options);
  const laid: Laid = { plan, standing, fits: linesFit(plan, desk.view, options, standing) };
  desk.laid.set(key, laid);
  return laid;
}

function roomOptions({ options }: Desk, index: number): DrawOptions {
  const { widthMm, heightMm } = index === 0 ? options : (options.later ?? options);
  return { ...options, widthMm, heightMm };
}

const pointsKey = (part: SheetPart): string => part.vertices.map(({ id }) => id).join(" ");

/** Drawings of all parts; those that were drawn before are taken from the desk, with the numbers of their neighbours put right. */
function drawParts(desk: Desk, split: SheetPlan): readonly Drawing[] {
  const matches = matchesOf(split);
  return split.parts.map((part, i) => {
    const mine = matches.filter(({ fromSheet, toSheet }) => fromSheet === i + 1 || toSheet === i + 1);
    const words = mine.map((match) => matchWords(match, i + 1));
    const key = [i === 0, pointsKey(part), ...mine.map(({ legId, fromSheet }) => `${legId} ${fromSheet === i + 1}`)].sort().join(" ");
    const known = desk.drawn.get(key);
    const drawing = (known && renumbered(known, words)) ?? drawPart(desk, split, i, mine);
    desk.drawn.set(key, { drawing, words });
    return drawing;
  });
}

function drawPart(desk: Desk, split: SheetPlan, index: number, matches: readonly Match[]): Drawing {
  const { plan, standing } = laidOut(desk, split, index);
  return drawPlan(plan, desk.view, roomOptions(desk, index), { sheet: index + 1, matches }, standing);
}

interface Drawn {
  readonly drawing: Drawing;
  /** What its match lines say. */
  readonly words: readonly string[];
}

/** The same drawing after other sheets were put in before it; null when its words would come out longer or shorter than their places. */
function renumbered({ drawing, words }: Drawn, next: readonly string[]): Drawing | null {
  if (words.every((word, i) => word === next[i])) return drawing;
  if (words.some((word, i) => word.length !== next[i]?.length)) return null;
  const now = new Map(words.map((word, i) => [word, next[i] ?? word]));
  return { ...drawing, items: drawing.items.map((item) => (item.type === "text" && now.has(item.text) ? { ...item, text: now.get(item.text) ?? item.text } : item)) };
}

/** Cuts every sheet that is found wanting; null when none is, or nothing more can be cut. */
function splitWhere(split: SheetPlan, options: SheetsOptions, wanting: (index: number) => boolean): SheetPlan | null {
  const capacity = capacityOf(options);
  let next: SheetPlan | null = null;
  for (let i = split.parts.length - 1; i >= 0; i--) if (wanting(i)) next = splitOne(next ?? split, split.parts[i]!, capacity) ?? next;
  return next;
}

function needsCut(drawing: Drawing | undefined, mode: "auto" | "one"): boolean {
  return drawing !== undefined && (overrun(drawing) > size.PAPER_EPS || (mode === "auto" && isCrowded(drawing)));
}

function isCrowded({ report }: Drawing): boolean {
  return report.labels > FEW_LABELS && report.clean < CLEAN_SHARE * report.labels;
}
