/** What is written so far in places of its own (numbers, box words, slopes): turned boxes in a grid of cells, asked before the next is written. */
import { boxesMeet, boxReach, type Segment, type TurnedBox } from "./plane";

/** Clear paper kept between two labels, mm. */
export const LABEL_MARGIN = 0.6;
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
  private readonly cells = new Map<number, Held<T>[]>();
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

export class LabelField {
  private readonly boxes = new Grid<TurnedBox>();
  private readonly held = new Map<FieldEntry, Held<TurnedBox>>();

  add(entry: FieldEntry): void {
    const { id, box } = entry;
    if (!box) return;
    const [w, h] = boxReach(box);
    const held = { shape: box, id, minX: box.centre[0] - w, minY: box.centre[1] - h, maxX: box.centre[0] + w, maxY: box.centre[1] + h, query: 0 };
    this.held.set(entry, held);
    this.boxes.add(held);
  }

  remove(entry: FieldEntry): void {
    const box = this.held.get(entry);
    if (box) this.boxes.remove(box);
    this.held.delete(entry);
  }

  /** True when the turned box comes within the margin of one already there. */
  overlapping(box: TurnedBox, margin = LABEL_MARGIN): boolean {
    const [w, h] = boxReach(box);
    const [x, y] = box.centre;
    return this.boxes.count(x - w - margin, y - h - margin, x + w + margin, y + h + margin, 1, ({ shape }) => boxesMeet(shape, box, margin)) > 0;
  }
}
