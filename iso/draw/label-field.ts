/** The labels placed so far: boxes and leaders, each in a grid of cells, asked before the next one is placed. */
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

/** Something in the grid with the axis-parallel box around it, and the last query that met it (so that none counts twice). */
interface Held<T> {
  readonly shape: T;
  readonly id: string;
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
  query: number;
}

class Grid<T> {
  protected readonly cells = new Map<number, Held<T>[]>();
  private query = 0;

  add(held: Held<T>): void {
    this.eachCell(held, (key) => {
      const cell = this.cells.get(key);
      if (cell) cell.push(held);
      else this.cells.set(key, [held]);
    });
  }

  remove(held: Held<T>): void {
    this.eachCell(held, (key) => {
      const cell = this.cells.get(key);
      const at = cell ? cell.indexOf(held) : -1;
      if (cell && at >= 0) cell.splice(at, 1);
    });
  }

  private eachCell({ minX, minY, maxX, maxY }: Held<T>, visit: (key: number) => void): void {
    const [x0, x1] = [Math.floor(minX / CELL), Math.floor(maxX / CELL)];
    const [y0, y1] = [Math.floor(minY / CELL), Math.floor(maxY / CELL)];
    for (let y = y0; y <= y1; y++) for (let x = x0; x <= x1; x++) visit(y * SPAN + x);
  }

  /** Counts what comes within a box and passes the test, each once; stops at `most`. */
  count(minX: number, minY: number, maxX: number, maxY: number, most: number, test: (held: Held<T>) => boolean): number {
    const query = ++this.query;
    const x0 = Math.floor(minX / CELL);
    const x1 = Math.floor(maxX / CELL);
    const y1 = Math.floor(maxY / CELL);
    let count = 0;
    for (let y = Math.floor(minY / CELL); y <= y1; y++) {
      for (let x = x0; x <= x1; x++) {
        const cell = this.cells.get(y * SPAN + x);
        if (!cell) continue;
        for (const held of cell) {
          if (held.query === query || held.minX > maxX || held.maxX < minX || held.minY > maxY || held.maxY < minY) continue;
          held.query = query;
          if (test(held) && ++count >= most) return count;
        }
      }
    }
    return count;
  }
}

class BoxGrid extends Grid<TurnedBox> {
  /** True when a level box reaches any of those held; asked more than anything else, so without a test handed in. */
  meetsLevel(x: number, y: number, halfWidth: number, halfHeight: number, margin: number): boolean {
    const [minX, maxX] = [x - halfWidth - margin, x + halfWidth + margin];
    const [minY, maxY] = [y - halfHeight - margin, y + halfHeight + margin];
    const x1 = Math.floor(maxX / CELL);
    const y1 = Math.floor(maxY / CELL);
    for (let row = Math.floor(minY / CELL); row <= y1; row++) {
      for (let column = Math.floor(minX / CELL); column <= x1; column++) {
        for (const held of this.cells.get(row * SPAN + column) ?? NOTHING) {
          if (held.minX >= maxX || held.maxX <= minX || held.minY >= maxY || held.maxY <= minY) continue;
          if (held.shape.angle === 0 || boxesMeet(held.shape, { centre: [x, y], halfWidth, halfHeight, angle: 0 }, margin)) return true;
        }
      }
    }
    return false;
  }
}

const NOTHING: readonly Held<TurnedBox>[] = [];

export class LabelField {
  private readonly boxes = new BoxGrid();
  private readonly leaders = new Grid<Segment>();
  private readonly heldBoxes = new Map<FieldEntry, Held<TurnedBox>>();
  private readonly heldLeaders = new Map<FieldEntry, Held<Segment>>();

  add(entry: FieldEntry): void {
    const { id, box, leader } = entry;
    if (box) {
      const [w, h] = boxReach(box);
      const held = { shape: box, id, minX: box.centre[0] - w, minY: box.centre[1] - h, maxX: box.centre[0] + w, maxY: box.centre[1] + h, query: 0 };
      this.heldBoxes.set(entry, held);
      this.boxes.add(held);
    }
    if (leader) {
      const [p, q] = [leader.from, leader.to];
      const held = { shape: leader, id, minX: Math.min(p[0], q[0]), minY: Math.min(p[1], q[1]), maxX: Math.max(p[0], q[0]), maxY: Math.max(p[1], q[1]), query: 0 };
      this.heldLeaders.set(entry, held);
      this.leaders.add(held);
    }
  }

  remove(entry: FieldEntry): void {
    const box = this.heldBoxes.get(entry);
    if (box) this.boxes.remove(box);
    this.heldBoxes.delete(entry);
    const leader = this.heldLeaders.get(entry);
    if (leader) this.leaders.remove(leader);
    this.heldLeaders.delete(entry);
  }

  /** True when the turned box comes within the margin of a label already placed. */
  overlapping(box: TurnedBox, margin = LABEL_MARGIN): boolean {
    const [w, h] = boxReach(box);
    const [x, y] = box.centre;
    return this.boxes.count(x - w - margin, y - h - margin, x + w + margin, y + h + margin, 1, ({ shape }) => boxesMeet(shape, box, margin)) > 0;
  }

  /** True when a level box about (x, y) comes within the usual margin of a label already placed. */
  isTaken(x: number, y: number, halfWidth: number, halfHeight: number): boolean {
    return this.boxes.meetsLevel(x, y, halfWidth, halfHeight, LABEL_MARGIN);
  }

  /** The ids of every label whose box comes within the margin of this level one. */
  takers(x: number, y: number, halfWidth: number, halfHeight: number): readonly string[] {
    const found: string[] = [];
    const box: TurnedBox = { centre: [x, y], halfWidth, halfHeight, angle: 0 };
    const [w, h] = [halfWidth + LABEL_MARGIN, halfHeight + LABEL_MARGIN];
    this.boxes.count(x - w, y - h, x + w, y + h, Infinity, ({ shape, id }) => {
      if (boxesMeet(shape, box, LABEL_MARGIN)) found.push(id);
      return false;
    });
    return found;
  }

  /** How many leaders run through a turned box. */
  leadersIn(box: TurnedBox): number {
    const [w, h] = boxReach(box);
    const [x, y] = box.centre;
    const m = LEADER_MARGIN;
    return this.leaders.count(x - w - m, y - h - m, x + w + m, y + h + m, Infinity, ({ shape }) => segmentInBox(shape.from, shape.to, box, m) > 0);
  }

  /** How many leaders run under a level box about (x, y). */
  leadersUnder(x: number, y: number, halfWidth: number, halfHeight: number): number {
    let box: TurnedBox | null = null;
    const [w, h] = [halfWidth + LEADER_MARGIN, halfHeight + LEADER_MARGIN];
    return this.leaders.count(x - w, y - h, x + w, y + h, Infinity, ({ shape }) =>
      segmentInBox(shape.from, shape.to, (box ??= { centre: [x, y], halfWidth, halfHeight, angle: 0 }), LEADER_MARGIN) > 0);
  }

  /** How many labels a leader runs through. */
  labelsOn(fromX: number, fromY: number, toX: number, toY: number): number {
    const from: PaperPoint = [fromX, fromY];
    const to: PaperPoint = [toX, toY];
    const m = LEADER_MARGIN;
    return this.boxes.count(Math.min(fromX, toX) - m, Math.min(fromY, toY) - m, Math.max(fromX, toX) + m, Math.max(fromY, toY) + m, Infinity, ({ shape }) => segmentInBox(from, to, shape, m) > 0);
  }

  /** How many leaders another one crosses. */
  leadersAcross(fromX: number, fromY: number, toX: number, toY: number): number {
    const leader: Segment = { from: [fromX, fromY], to: [toX, toY] };
    return this.leaders.count(Math.min(fromX, toX), Math.min(fromY, toY), Math.max(fromX, toX), Math.max(fromY, toY), Infinity, ({ shape }) => crossingOf(shape, leader) !== null);
  }
}
