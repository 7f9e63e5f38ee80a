/**
 * Labels: each is tried on rings of candidate places (label-candidates.ts) against what is on paper already and against the
 * other labels (label-grid.ts), and improves by being taken out, put back and putting others out (label-search.ts). A
 * place on another label is never taken: the rings go on outwards until one is free, so labels cannot overlap.
 * Deterministic.
 */
import type { PaperBox } from "../geometry/types";
import type { DisplayItem, LabelReport } from "./drawing-types";
import { boxMap, turnedInk, type InkMap } from "./ink-map";
import { Candidates, FROM_X, FROM_Y, LED, STRIDE, TO_X, TO_Y, X, Y, type Label, type LabelInk } from "./label-candidates";
import { COARSE, FINE } from "./label-rings";
import { LabelGrid } from "./label-grid";
import { LabelSearch, QUICK, THOROUGH } from "./label-search";
import { numbersAside, type PlacedNumber } from "./number-places";
import { boxesMeet, segmentInBox, segmentsApart, type Segment, type TurnedBox } from "./plane";

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
  labels.forEach((label, i) => {
    const seat = grid.seats[i]!;
    if (seat < 0) return;
    const at = candidates.at.subarray(seat * STRIDE, (seat + 1) * STRIDE);
    const leader: Segment | null = (candidates.flags[seat]! & LED) !== 0 ? { from: [at[FROM_X]!, at[FROM_Y]!], to: [at[TO_X]!, at[TO_Y]!] } : null;
    if (leader) {
      leaders.push(leader);
      owners.push(i);
    }
    lengths.push(leader ? Math.hypot(leader.to[0] - leader.from[0], leader.to[1] - leader.from[1]) : 0);
    if (candidates.touches(i, seat) || grid.touched(i)) touched.add(i);
    items.push(...label.draw([at[X]!, at[Y]!], leader));
    boxes.push({ centre: [at[X]!, at[Y]!], halfWidth: label.halfWidth, halfHeight: label.halfHeight, angle: 0 });
  });
  const aside = numbersAside(numbers, [...boxes, ...still], leaders, ink.heavy);
  const fixed = [...still, ...aside];
  // A number counts as touched when it lies on pipe or a leader runs through it, and so does that leader's label.
  let touches = 0;
  for (const box of fixed) {
    const through = leaders.flatMap(({ from, to }, i) => (segmentInBox(from, to, box, LEADER_MARGIN) > 0 ? [owners[i]!] : []));
    for (const label of through) touched.add(label);
    if (through.length > 0 || turnedInk(ink.heavy, box) > 0) touches++;
  }
  return { items, boxes, numbers: aside, report: reportOf(boxes, fixed, touches + touched.size, lengths) };
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
  const diagonals = boxes.map(({ centre, halfWidth, halfHeight }): Segment => {
    const reach = Math.hypot(halfWidth, halfHeight);
    return { from: [centre[0] - reach, centre[1] - reach], to: [centre[0] + reach, centre[1] + reach] };
  });
  let overlaps = 0;
  for (let i = 0; i < movable; i++) {
    for (let j = i + 1; j < boxes.length; j++) {
      if (!segmentsApart(diagonals[i]!, diagonals[j]!) && boxesMeet(boxes[i]!, boxes[j]!, 0)) overlaps++;
    }
  }
  return overlaps;
}
