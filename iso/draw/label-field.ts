/** The labels placed so far: boxes and leaders in a grid of cells, asked before the next one is placed. */
import type { PaperPoint } from "../geometry/types";
import { boxesMeet, boxReach, crossingOf, segmentInBox, type Segment, type TurnedBox } from "./plane";

/** Clear paper kept between two labels, mm. */
export const LABEL_MARGIN = 0.6;
const CELL = 16;

export interface FieldEntry {
  readonly id: string;
  readonly box: TurnedBox | null;
  readonly leader: Segment | null;
}

export class LabelField {
  private readonly cells = new Map<number, Set<FieldEntry>>();

  private *keys(minX: number, minY: number, maxX: number, maxY: number): Generator<number> {
    for (let y = Math.floor(minY / CELL); y <= Math.floor(maxY / CELL); y++) {
      for (let x = Math.floor(minX / CELL); x <= Math.floor(maxX / CELL); x++) yield (y + 4096) * 8192 + x + 4096;
    }
  }

  private extent(entry: FieldEntry): readonly [number, number, number, number] {
    const { box, leader } = entry;
    if (box) {
      const [w, h] = boxReach(box);
      return [box.centre[0] - w - 1, box.centre[1] - h - 1, box.centre[0] + w + 1, box.centre[1] + h + 1];
    }
    const [p, q] = [leader?.from ?? [0, 0], leader?.to ?? [0, 0]];
    return [Math.min(p[0], q[0]), Math.min(p[1], q[1]), Math.max(p[0], q[0]), Math.max(p[1], q[1])];
  }

  add(entry: FieldEntry): void {
    for (const key of this.keys(...this.extent(entry))) {
      const cell = this.cells.get(key);
      if (cell) cell.add(entry);
      else this.cells.set(key, new Set([entry]));
    }
  }

  remove(entry: FieldEntry): void {
    for (const key of this.keys(...this.extent(entry))) this.cells.get(key)?.delete(entry);
  }

  private near(probe: FieldEntry): Set<FieldEntry> {
    const found = new Set<FieldEntry>();
    for (const key of this.keys(...this.extent(probe))) for (const entry of this.cells.get(key) ?? []) found.add(entry);
    return found;
  }

  /** The first label whose box comes within the margin of this one; null when it is free. */
  overlapping(box: TurnedBox, margin = LABEL_MARGIN): FieldEntry | null {
    for (const entry of this.near({ id: "", box, leader: null })) if (entry.box && boxesMeet(entry.box, box, margin)) return entry;
    return null;
  }

  /** Every label whose box comes within the margin of this one. */
  allOverlapping(box: TurnedBox, margin = LABEL_MARGIN): readonly FieldEntry[] {
    return [...this.near({ id: "", box, leader: null })].filter((entry) => entry.box !== null && boxesMeet(entry.box, box, margin));
  }

  /** How many foreign leaders run through a box. */
  leadersIn(box: TurnedBox): number {
    let count = 0;
    for (const entry of this.near({ id: "", box, leader: null })) if (entry.leader && segmentInBox(entry.leader.from, entry.leader.to, box) > 0) count++;
    return count;
  }

  /** How many labels a leader runs through, and how many foreign leaders it crosses. */
  onLeader(from: PaperPoint, to: PaperPoint): { readonly labels: number; readonly leaders: number } {
    const leader = { from, to };
    let labels = 0;
    let leaders = 0;
    for (const entry of this.near({ id: "", box: null, leader })) {
      if (entry.box && segmentInBox(from, to, entry.box) > 0) labels++;
      if (entry.leader && crossingOf(entry.leader, leader)) leaders++;
    }
    return { labels, leaders };
  }
}
