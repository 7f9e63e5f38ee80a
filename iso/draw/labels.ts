/**
 * Labels: each is tried on rings of candidate places (label-candidates.ts) against what is on paper already and against the
 * other labels (label-grid.ts), and improves by being taken out, put back and putting others out (label-search.ts). A
 * place on another label is never taken: the rings go on outwards until one is free, so labels cannot overlap.
 * Deterministic.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { DisplayItem, LabelReport } from "./drawing-types";
import { boxMap, turnedInk, type InkMap } from "./ink-map";
import { Candidates, FROM_X, FROM_Y, LED, STRIDE, TO_X, TO_Y, X, Y, type Label, type LabelInk } from "./label-candidates";
import { COARSE, FINE } from "./label-rings";
import { LabelGrid } from "./label-grid";
import { LabelSearch, QUICK, THOROUGH } from "./label-search";
import { numbersAside, type PlacedNumber } from "./number-places";
import { boxesMeet, segmentInBox, type Segment, type TurnedBox } from "./plane";

/** A leader this near a number touches it, mm. */
const LEADER_MARGIN = 0.25;
/** Share of labels that may stay unclean before the search is made thorough: it costs many times more. */
const FEW = 0.05;
/** A sheet with more labels is read in the editor only, where it must come at once. */
const MANY = 190;
/** Paper for labels beside what stands out of the room, mm. */
const BESIDE = 20;

export interface PlacedLabels {
  readonly items: readonly DisplayItem[];
  readonly boxes: readonly TurnedBox[];
  /** Where the numbers of dimensions stand now, in their order. */
  readonly numbers: readonly TurnedBox[];
  readonly report: LabelReport;
}

/**
 * @param still boxes already on paper that stay (box words, slopes, north arrow)
 * @param numbers those of dimensions, which may step aside
 */
export function placeLabels(labels: readonly Label[], still: readonly TurnedBox[], ink: LabelInk, numbers: readonly PlacedNumber[] = []): PlacedLabels {
  const room = roomBeside(labels, ink.room);
  const numberMap = boxMap([...still, ...numbers.map(({ box }) => box)]);
  const { candidates, grid } = seated(labels, { ...ink, room }, numberMap);
  const items: DisplayItem[] = [];
  const boxes: TurnedBox[] = [];
  const lengths: number[] = [];
  const leaders: Segment[] = [];
  /** Whose leaders they are. */
  const owners: number[] = [];
  const touched = new Set<number>();
  const { at, flags } = candidates;
  for (let i = 0; i < labels.length; i++) {
    const label = labels[i]!;
    const seat = grid.seats[i]!;
    if (seat < 0) continue;
    const o = seat * STRIDE;
    const centre: PaperPoint = [at[o + X]!, at[o + Y]!];
    const leader: Segment | null = (flags[seat]! & LED) !== 0 ? { from: [at[o + FROM_X]!, at[o + FROM_Y]!], to: [at[o + TO_X]!, at[o + TO_Y]!] } : null;
    if (leader) {
      leaders.push(leader);
      owners.push(i);
    }
    lengths.push(leader ? lengthOf(leader) : 0);
    if (candidates.touches(i, seat) || grid.touched(i)) touched.add(i);
    items.push(...label.draw(centre, leader));
    boxes.push({ centre, halfWidth: label.halfWidth, halfHeight: label.halfHeight, angle: 0 });
  }
  const aside = numbersAside(numbers, [...boxes, ...still], leaders, ink.heavy);
  const fixed = [...still, ...aside];
  // A number counts as touched when it lies on pipe or a leader runs through it, and so does that leader's label.
  let touches = 0;
  for (const box of fixed) {
    let through = false;
    for (let i = 0; i < leaders.length; i++) {
      if (segmentInBox(leaders[i]!.from, leaders[i]!.to, box, LEADER_MARGIN) === 0) continue;
      touched.add(owners[i]!);
      through = true;
    }
    if (through || turnedInk(ink.heavy, box) > 0) touches++;
  }
  return { items, boxes, numbers: aside, report: reportOf(boxes, fixed, touches + touched.size, lengths) };
}

function lengthOf({ from, to }: Segment): number {
  const x = to[0] - from[0];
  const y = to[1] - from[1];
  return Math.sqrt(x * x + y * y);
}

/** Seats from few places first; where those leave more than a few labels unclean, from many places, searched deeper. */
function seated(labels: readonly Label[], ink: LabelInk, numbers: InkMap): { readonly candidates: Candidates; readonly grid: LabelGrid } {
  const quick = new Candidates(labels, ink, numbers, COARSE);
  const grid = new LabelGrid(labels, quick, ink.room);
  const left = new LabelSearch(labels, quick, grid).run(QUICK);
  if (left <= FEW * labels.length || labels.length > MANY) return { candidates: quick, grid };
  const candidates = new Candidates(labels, ink, numbers, FINE);
  const fine = new LabelGrid(labels, candidates, ink.room);
  new LabelSearch(labels, candidates, fine).run(THOROUGH);
  return { candidates, grid: fine };
}

/** The room, widened where a line that is too large for it stands out: its labels are better beside it than crowded inside. */
function roomBeside(labels: readonly Label[], room: PaperBox): PaperBox {
  let { minX, minY, maxX, maxY } = room;
  for (const { anchors } of labels) {
    for (const [x, y] of anchors) {
      if (x < room.minX) minX = Math.min(minX, x - BESIDE);
      if (y < room.minY) minY = Math.min(minY, y - BESIDE);
      if (x > room.maxX) maxX = Math.max(maxX, x + BESIDE);
      if (y > room.maxY) maxY = Math.max(maxY, y + BESIDE);
    }
  }
  return { minX, minY, maxX, maxY };
}

function reportOf(boxes: readonly TurnedBox[], fixed: readonly TurnedBox[], touches: number, leaders: readonly number[]): LabelReport {
  const sorted = [...leaders].sort((p, q) => p - q);
  const mean = leaders.length === 0 ? 0 : leaders.reduce((sum, l) => sum + l, 0) / leaders.length;
  const labels = boxes.length + fixed.length;
  return { labels, clean: labels - touches, overlaps: overlapsOf([...boxes, ...fixed], boxes.length), touches, meanLeaderMm: mean, p95LeaderMm: sorted[Math.floor(sorted.length * 0.95)] ?? 0 };
}

/** Pairs of boxes that meet, the first of them one of the first `movable`. */
function overlapsOf(boxes: readonly TurnedBox[], movable: number): number {
  const flat = new Float64Array(boxes.length * 3);
  boxes.forEach(({ centre, halfWidth, halfHeight }, i) => flat.set([centre[0], centre[1], Math.sqrt(halfWidth * halfWidth + halfHeight * halfHeight)], i * 3));
  let overlaps = 0;
  for (let i = 0; i < movable; i++) {
    const x = flat[i * 3]!;
    const y = flat[i * 3 + 1]!;
    const reach = flat[i * 3 + 2]!;
    for (let j = i + 1; j < boxes.length; j++) {
      const far = reach + flat[j * 3 + 2]!;
      if (Math.abs(flat[j * 3]! - x) < far && Math.abs(flat[j * 3 + 1]! - y) < far && boxesMeet(boxes[i]!, boxes[j]!, 0)) overlaps++;
    }
  }
  return overlaps;
}
