/**
 * Where labels sit now: their boxes and leaders in a grid of cells with linked lists in flat arrays, asked a hundred
 * thousand times a sheet. A label never lies on another; leaders on labels and leaders across leaders have their price.
 * Long because its loops are written out: a call with fractions as arguments costs more than what they do.
 */
import type { PaperBox } from "../geometry/types";
import { FROM_X, FROM_Y, LED, STRIDE, TO_X, TO_Y, X, Y, type Candidates, type Label } from "./label-candidates";
import { PRICE } from "./label-rings";

/** Clear paper kept between two labels, and between a leader and a label that is not its own, mm. */
const MARGIN = 0.35;
const LEADER_MARGIN = 0.25;
const COST_OF_LEADER_ON_LABEL = 68 * PRICE;
const COST_OF_LEADER_CROSSING = 14 * PRICE;
const CELL = 10;
/** Cells beyond the room on every side; what lies farther out is held in the outermost. */
const RIM_CELLS = 4;
const NONE = -1;

/** Lists of labels by cell. */
class CellLists {
  private readonly head: Int32Array;
  private item: Int32Array = new Int32Array(4096);
  private next: Int32Array = new Int32Array(4096);
  private free = NONE;
  private used = 0;

  constructor(cells: number) {
    this.head = new Int32Array(cells).fill(NONE);
  }

  first(cell: number): number {
    return this.head[cell]!;
  }

  after(node: number): number {
    return this.next[node]!;
  }

  label(node: number): number {
    return this.item[node]!;
  }

  add(cell: number, label: number): void {
    let node = this.free;
    if (node !== NONE) this.free = this.next[node]!;
    else {
      node = this.used++;
      if (node >= this.item.length) [this.item, this.next] = [doubled(this.item), doubled(this.next)];
    }
    this.item[node] = label;
    this.next[node] = this.head[cell]!;
    this.head[cell] = node;
  }

  remove(cell: number, label: number): void {
    let before = NONE;
    for (let node = this.head[cell]!; node !== NONE; before = node, node = this.next[node]!) {
      if (this.item[node] !== label) continue;
      if (before === NONE) this.head[cell] = this.next[node]!;
      else this.next[before] = this.next[node]!;
      this.next[node] = this.free;
      this.free = node;
      return;
    }
  }
}

function doubled(list: Int32Array): Int32Array {
  const longer = new Int32Array(list.length * 2);
  longer.set(list);
  return longer;
}

export class LabelGrid {
  /** Candidate each label sits on; NONE while it is lifted. */
  readonly seats: Int32Array;
  private readonly columns: number;
  private readonly rows: number;
  private readonly originX: number;
  private readonly originY: number;
  private readonly boxes: CellLists;
  private readonly leaders: CellLists;
  private readonly stamps: Int32Array;
  private stamp = 0;
  private met = 0;
  private readonly w: Float64Array;
  private readonly h: Float64Array;

  constructor(labels: readonly Label[], private readonly candidates: Candidates, room: PaperBox) {
    this.seats = new Int32Array(labels.length).fill(NONE);
    this.stamps = new Int32Array(labels.length);
    this.w = Float64Array.from(labels, (label) => label.halfWidth);
    this.h = Float64Array.from(labels, (label) => label.halfHeight);
    this.columns = Math.max(1, Math.ceil((room.maxX - room.minX) / CELL)) + 2 * RIM_CELLS;
    this.rows = Math.max(1, Math.ceil((room.maxY - room.minY) / CELL)) + 2 * RIM_CELLS;
    this.originX = room.minX - RIM_CELLS * CELL;
    this.originY = room.minY - RIM_CELLS * CELL;
    this.boxes = new CellLists(this.columns * this.rows);
    this.leaders = new CellLists(this.columns * this.rows);
  }

  private column(x: number): number {
    return Math.max(0, Math.min(this.columns - 1, Math.floor((x - this.originX) / CELL)));
  }

  private row(y: number): number {
    return Math.max(0, Math.min(this.rows - 1, Math.floor((y - this.originY) / CELL)));
  }

  /** Seats a label (or lifts it, with a candidate below nothing). */
  seat(label: number, candidate: number): void {
    const before = this.seats[label]!;
    if (before >= 0) this.hold(label, before, false);
    this.seats[label] = candidate;
    if (candidate >= 0) this.hold(label, candidate, true);
  }

  private hold(label: number, candidate: number, add: boolean): void {
    const { at, flags } = this.candidates;
    const o = candidate * STRIDE;
    const x = at[o + X]!;
    const y = at[o + Y]!;
    const w = this.w[label]!;
    const h = this.h[label]!;
    this.inCells(this.boxes, label, x - w, y - h, x + w, y + h, add);
    if ((flags[candidate]! & LED) === 0) return;
    const fx = at[o + FROM_X]!;
    const fy = at[o + FROM_Y]!;
    const tx = at[o + TO_X]!;
    const ty = at[o + TO_Y]!;
    this.inCells(this.leaders, label, Math.min(fx, tx), Math.min(fy, ty), Math.max(fx, tx), Math.max(fy, ty), add);
  }

  private inCells(lists: CellLists, label: number, minX: number, minY: number, maxX: number, maxY: number, add: boolean): void {
    const x1 = this.column(maxX);
    const y1 = this.row(maxY);
    for (let y = this.row(minY); y <= y1; y++) {
      for (let x = this.column(minX); x <= x1; x++) {
        if (add) lists.add(y * this.columns + x, label);
        else lists.remove(y * this.columns + x, label);
      }
    }
  }

  /** True when a label stands where a candidate of a lifted one would. */
  taken(label: number, candidate: number): boolean {
    return this.boxesUnder(label, candidate, null) > 0;
  }

  /** Price of the leaders and labels a lifted label would meet on a free candidate. */
  meets(label: number, candidate: number): number {
    return this.weigh(label, candidate, null);
  }

  /** Writes which labels a lifted label would meet on a candidate, each once; counts no further than the list is long and one. */
  metLabels(label: number, candidate: number, met: Int32Array): number {
    this.met = 0;
    this.boxesUnder(label, candidate, met);
    if (this.met <= met.length) this.weigh(label, candidate, met);
    return this.met;
  }

  private note(list: Int32Array, other: number): void {
    for (let i = 0; i < this.met && i < list.length; i++) if (list[i] === other) return;
    if (this.met < list.length) list[this.met] = other;
    this.met++;
  }

  private boxesUnder(label: number, candidate: number, list: Int32Array | null): number {
    const { boxes, seats, columns } = this;
    const { at } = this.candidates;
    const o = candidate * STRIDE;
    const x = at[o + X]!;
    const y = at[o + Y]!;
    const w = this.w[label]! + MARGIN;
    const h = this.h[label]! + MARGIN;
    const x0 = this.column(x - w);
    const x1 = this.column(x + w);
    const y1 = this.row(y + h);
    for (let row = this.row(y - h); row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = boxes.first(row * columns + column); node !== NONE; node = boxes.after(node)) {
          const other = boxes.label(node);
          const p = seats[other]! * STRIDE;
          if (Math.abs(at[p + X]! - x) >= w + this.w[other]! || Math.abs(at[p + Y]! - y) >= h + this.h[other]!) continue;
          if (!list) return 1;
          this.note(list, other);
        }
      }
    }
    return 0;
  }

  /** Price of foreign leaders under the box, then of what its own leader meets. */
  private weigh(label: number, candidate: number, list: Int32Array | null): number {
    const { leaders, seats, columns, stamps } = this;
    const { at, flags } = this.candidates;
    const o = candidate * STRIDE;
    const x = at[o + X]!;
    const y = at[o + Y]!;
    const w = this.w[label]! + LEADER_MARGIN;
    const h = this.h[label]! + LEADER_MARGIN;
    const x0 = this.column(x - w);
    const x1 = this.column(x + w);
    const y1 = this.row(y + h);
    const stamp = ++this.stamp;
    let cost = 0;
    for (let row = this.row(y - h); row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = leaders.first(row * columns + column); node !== NONE; node = leaders.after(node)) {
          const other = leaders.label(node);
          if (stamps[other] === stamp) continue;
          stamps[other] = stamp;
          const p = seats[other]! * STRIDE;
          // The segment reaches the box when neither the axes nor its own normal part them.
          const ax = at[p + FROM_X]! - x;
          const ay = at[p + FROM_Y]! - y;
          const bx = at[p + TO_X]! - x;
          const by = at[p + TO_Y]! - y;
          if ((ax <= -w && bx <= -w) || (ax >= w && bx >= w) || (ay <= -h && by <= -h) || (ay >= h && by >= h)) continue;
          if (Math.abs(ax * by - ay * bx) >= Math.abs(bx - ax) * h + Math.abs(by - ay) * w) continue;
          cost += COST_OF_LEADER_ON_LABEL;
          if (list) this.note(list, other);
        }
      }
    }
    if ((flags[candidate]! & LED) === 0) return cost;
    return cost + this.weighLeader(o, list);
  }

  /** Price of the labels under a candidate's leader and of the leaders across it. */
  private weighLeader(o: number, list: Int32Array | null): number {
    const { boxes, leaders, seats, stamps, columns } = this;
    const { at } = this.candidates;
    const fx = at[o + FROM_X]!;
    const fy = at[o + FROM_Y]!;
    const tx = at[o + TO_X]!;
    const ty = at[o + TO_Y]!;
    const wx = tx - fx;
    const wy = ty - fy;
    const x0 = this.column(Math.min(fx, tx));
    const x1 = this.column(Math.max(fx, tx));
    const y0 = this.row(Math.min(fy, ty));
    const y1 = this.row(Math.max(fy, ty));
    const onBox = ++this.stamp;
    const onLeader = ++this.stamp;
    let cost = 0;
    for (let row = y0; row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = boxes.first(row * columns + column); node !== NONE; node = boxes.after(node)) {
          const other = boxes.label(node);
          if (stamps[other] === onBox) continue;
          stamps[other] = onBox;
          const p = seats[other]! * STRIDE;
          const ax = fx - at[p + X]!;
          const ay = fy - at[p + Y]!;
          const w = this.w[other]! + LEADER_MARGIN;
          const h = this.h[other]! + LEADER_MARGIN;
          if ((ax <= -w && ax + wx <= -w) || (ax >= w && ax + wx >= w) || (ay <= -h && ay + wy <= -h) || (ay >= h && ay + wy >= h)) continue;
          if (Math.abs(ax * wy - ay * wx) >= Math.abs(wx) * h + Math.abs(wy) * w) continue;
          cost += COST_OF_LEADER_ON_LABEL;
          if (list) this.note(list, other);
        }
      }
    }
    for (let row = y0; row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = leaders.first(row * columns + column); node !== NONE; node = leaders.after(node)) {
          const other = leaders.label(node);
          if (stamps[other] === onLeader) continue;
          stamps[other] = onLeader;
          const p = seats[other]! * STRIDE;
          const px = at[p + FROM_X]! - fx;
          const py = at[p + FROM_Y]! - fy;
          const qx = at[p + TO_X]! - fx;
          const qy = at[p + TO_Y]! - fy;
          if ((wx * py - wy * px) * (wx * qy - wy * qx) >= 0) continue;
          const ux = qx - px;
          const uy = qy - py;
          if ((uy * px - ux * py) * (ux * (wy - py) - uy * (wx - px)) < 0) cost += COST_OF_LEADER_CROSSING;
        }
      }
    }
    return cost;
  }

  /** True when another label's leader runs through this label's box, or its leader through another's. */
  touched(label: number): boolean {
    const candidate = this.seats[label]!;
    if (candidate < 0) return false;
    this.seat(label, NONE);
    const list = new Int32Array(1);
    const met = this.metLabels(label, candidate, list);
    this.seat(label, candidate);
    return met > 0;
  }
}
