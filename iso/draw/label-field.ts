/** The labels placed so far: boxes and leaders in a grid of cells, asked before the next one is placed. */
import type { PaperPoint } from "../geometry/types";
import { boxesMeet, boxReach, crossingOf, segmentInBox, type Segment, type TurnedBox } from "./plane";

/** Clear paper kept between two labels, mm. */
export const LABEL_MARGIN = 0.6;
/** Clear paper kept between a leader and a label that is not its own, mm. */
const LEADER_MARGIN = 0.25;
const CELL = 14;
/** Cells are numbered row by row; drawings stay far within this many columns either way. */
const SPAN = 8192;

export interface FieldEntry {
  readonly id: string;
  readonly box: TurnedBox | null;
  readonly leader: Segment | null;
}

/** An entry with the axis-parallel box around it, and the last query that met it (so that none counts twice). */
interface Held {
  readonly entry: FieldEntry;
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
  query: number;
}

function heldOf(entry: FieldEntry): Held {
  const { box, leader } = entry;
  if (box) {
    const [w, h] = boxReach(box);
    return { entry, minX: box.centre[0] - w, minY: box.centre[1] - h, maxX: box.centre[0] + w, maxY: box.centre[1] + h, query: 0 };
  }
  const [p, q] = [leader?.from ?? [0, 0], leader?.to ?? [0, 0]];
  return { entry, minX: Math.min(p[0], q[0]), minY: Math.min(p[1], q[1]), maxX: Math.max(p[0], q[0]), maxY: Math.max(p[1], q[1]), query: 0 };
}

export class LabelField {
  private readonly cells = new Map<number, Held[]>();
  private readonly held = new Map<FieldEntry, Held>();
  private query = 0;

  add(entry: FieldEntry): void {
    const held = heldOf(entry);
    this.held.set(entry, held);
    this.eachCell(held.minX, held.minY, held.maxX, held.maxY, (key) => {
      const cell = this.cells.get(key);
      if (cell) cell.push(held);
      else this.cells.set(key, [held]);
    });
  }

  remove(entry: FieldEntry): void {
    const held = this.held.get(entry);
    if (!held) return;
    this.held.delete(entry);
    this.eachCell(held.minX, held.minY, held.maxX, held.maxY, (key) => {
      const cell = this.cells.get(key);
      const at = cell ? cell.indexOf(held) : -1;
      if (cell && at >= 0) cell.splice(at, 1);
    });
  }

  private eachCell(minX: number, minY: number, maxX: number, maxY: number, visit: (key: number) => void): void {
    const [x0, x1] = [Math.floor(minX / CELL), Math.floor(maxX / CELL)];
    const [y0, y1] = [Math.floor(minY / CELL), Math.floor(maxY / CELL)];
    for (let y = y0; y <= y1; y++) for (let x = x0; x <= x1; x++) visit(y * SPAN + x);
  }

  /** Visits every entry whose outer box comes within the given one, once; stops when the visit says so. */
  private near(minX: number, minY: number, maxX: number, maxY: number, visit: (entry: FieldEntry) => boolean): void {
    const query = ++this.query;
    const [x0, x1] = [Math.floor(minX / CELL), Math.floor(maxX / CELL)];
    const [y0, y1] = [Math.floor(minY / CELL), Math.floor(maxY / CELL)];
    for (let y = y0; y <= y1; y++) {
      for (let x = x0; x <= x1; x++) {
        const cell = this.cells.get(y * SPAN + x);
        if (!cell) continue;
        for (const held of cell) {
          if (held.query === query || held.minX > maxX || held.maxX < minX || held.minY > maxY || held.maxY < minY) continue;
          held.query = query;
          if (visit(held.entry)) return;
        }
      }
    }
  }

  private nearBox(box: TurnedBox, margin: number, visit: (entry: FieldEntry) => boolean): void {
    const [w, h] = boxReach(box);
    const [x, y] = box.centre;
    this.near(x - w - margin, y - h - margin, x + w + margin, y + h + margin, visit);
  }

  /** True when the box comes within the margin of a label already placed. */
  overlapping(box: TurnedBox, margin = LABEL_MARGIN): boolean {
    let found = false;
    this.nearBox(box, margin, (entry) => (found = entry.box !== null && boxesMeet(entry.box, box, margin)));
    return found;
  }

  /** Every label whose box comes within the margin of this one. */
  allOverlapping(box: TurnedBox, margin = LABEL_MARGIN): readonly FieldEntry[] {
    const found: FieldEntry[] = [];
    this.nearBox(box, margin, (entry) => {
      if (entry.box && boxesMeet(entry.box, box, margin)) found.push(entry);
      return false;
    });
    return found;
  }

  /** How many foreign leaders run through a box. */
  leadersIn(box: TurnedBox): number {
    let count = 0;
    this.nearBox(box, LEADER_MARGIN, (entry) => {
      if (entry.leader && segmentInBox(entry.leader.from, entry.leader.to, box, LEADER_MARGIN) > 0) count++;
      return false;
    });
    return count;
  }

  /** How many labels a leader runs through, and how many foreign leaders it crosses. */
  onLeader(from: PaperPoint, to: PaperPoint): { readonly labels: number; readonly leaders: number } {
    const leader = { from, to };
    let labels = 0;
    let leaders = 0;
    const [minX, maxX] = [Math.min(from[0], to[0]) - LEADER_MARGIN, Math.max(from[0], to[0]) + LEADER_MARGIN];
    const [minY, maxY] = [Math.min(from[1], to[1]) - LEADER_MARGIN, Math.max(from[1], to[1]) + LEADER_MARGIN];
    this.near(minX, minY, maxX, maxY, (entry) => {
      if (entry.box && segmentInBox(from, to, entry.box, LEADER_MARGIN) > 0) labels++;
      if (entry.leader && crossingOf(entry.leader, leader)) leaders++;
      return false;
    });
    return { labels, leaders };
  }
}
