/**
 * Where labels sit now: their boxes and leaders in a grid of cells with linked lists in flat arrays, asked a hundred
 * thousand times a sheet. A label never lies on another; leaders on labels and leaders across leaders have their price.
 * Long because its loops are written out: a call with fractions as arguments costs more than what they do.
 */
import type { PaperBox } from "../geometry/types";
import { CellLists, NONE } from "./cell-lists";
import { fractionsOf } from "./flat-lists";
import { FROM_X, FROM_Y, LED, STRIDE, TO_X, TO_Y, X, Y, type Candidates, type Label } from "./label-candidates";
import { PRICE } from "./label-rings";

/** Clear paper kept between two labels, and between a leader and a label that is not its own, mm. */
const MARGIN = 0.35;
const LEADER_MARGIN = 0.25;
const COST_OF_LEADER_ON_LABEL = 68 * PRICE;
const COST_OF_LEADER_CROSSING = 14 * PRICE;
/** Dearer than anything. */
const MOST = 1 << 30;
const CELL = 10;
/** Cells beyond the room on every side; what lies farther out is held in the outermost. */
const RIM_CELLS = 4;

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
  private readonly one = new Int32Array(1);
  private readonly w: Float64Array;
  private readonly h: Float64Array;

  constructor(labels: readonly Label[], private readonly candidates: Candidates, room: PaperBox) {
    this.seats = new Int32Array(labels.length).fill(NONE);
    this.stamps = new Int32Array(labels.length);
    this.w = fractionsOf(labels, (label) => label.halfWidth);
    this.h = fractionsOf(labels, (label) => label.halfHeight);
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
    this.inCells(this.boxes, label, this.column(x - w), this.row(y - h), this.column(x + w), this.row(y + h), add);
    if ((flags[candidate]! & LED) === 0) return;
    const fx = at[o + FROM_X]!;
    const fy = at[o + FROM_Y]!;
    const tx = at[o + TO_X]!;
    const ty = at[o + TO_Y]!;
    this.inCells(this.leaders, label, this.column(Math.min(fx, tx)), this.row(Math.min(fy, ty)), this.column(Math.max(fx, tx)), this.row(Math.max(fy, ty)), add);
  }

  /** Whole numbers only: fractions as arguments would be made on the heap. */
  private inCells(lists: CellLists, label: number, x0: number, y0: number, x1: number, y1: number, add: boolean): void {
    for (let y = y0; y <= y1; y++) {
      for (let x = x0; x <= x1; x++) {
        if (add) lists.add(y * this.columns + x, label);
        else lists.remove(y * this.columns + x, label);
      }
    }
  }

  /** True when a label stands where a candidate of a lifted one would; asks first for the one that stood there last. */
  taken(label: number, candidate: number): boolean {
    const { blocker, blockedBy } = this.candidates;
    const known = blocker[candidate]!;
    if (known !== NONE && this.seats[known] === blockedBy[candidate]) return true;
    const other = this.boxUnder(label, candidate);
    blocker[candidate] = other;
    if (other === NONE) return false;
    blockedBy[candidate] = this.seats[other]!;
    return true;
  }

  /** True when it is known without a look that a label that may not move stands on a candidate. */
  heldBy(candidate: number, locked: Uint8Array): boolean {
    const { blocker, blockedBy } = this.candidates;
    const known = blocker[candidate]!;
    return known !== NONE && locked[known] === 1 && this.seats[known] === blockedBy[candidate];
  }

  /** Price of the leaders and labels a label meets where it sits, or would meet on a free candidate; nobody asks how much more than the limit it is. */
  meets(label: number, candidate: number, limit = MOST): number {
    return this.weigh(label, candidate, null, limit);
  }

  /** Writes which labels a lifted label would meet on a candidate, each once; counts no further than the list is long and one. */
  metLabels(label: number, candidate: number, met: Int32Array): number {
    this.met = 0;
    this.boxUnder(label, candidate, met);
    if (this.met <= met.length) this.weigh(label, candidate, met, MOST);
    return this.met;
  }

  private note(list: Int32Array, other: number): void {
    for (let i = 0; i < this.met && i < list.length; i++) if (list[i] === other) return;
    if (this.met < list.length) list[this.met] = other;
    this.met++;
  }

  /** A label whose box a lifted one's would meet on a candidate; with a list it goes on and writes every one. */
  private boxUnder(label: number, candidate: number, list: Int32Array | null = null): number {
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
          if (list === null) return other;
          this.note(list, other);
        }
      }
    }
    return NONE;
  }

  /** Price of foreign leaders under the box, then of what its own leader meets. */
  private weigh(label: number, candidate: number, list: Int32Array | null, limit: number): number {
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
          if (other === label || stamps[other] === stamp) continue;
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
          else if (cost >= limit) return cost;
        }
      }
    }
    if ((flags[candidate]! & LED) === 0) return cost;
    return cost >= limit ? cost : cost + this.weighLeader(label, o, list, limit - cost);
  }

  /** Price of the labels under a candidate's leader and of the leaders across it. */
  private weighLeader(label: number, o: number, list: Int32Array | null, limit: number): number {
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
    let cost = 0;
    for (let row = y0; row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = boxes.first(row * columns + column); node !== NONE; node = boxes.after(node)) {
          const other = boxes.label(node);
          if (other === label || stamps[other] === onBox) continue;
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
          else if (cost >= limit) return cost;
        }
      }
    }
    if (cost >= limit) return cost;
    const onLeader = ++this.stamp;
    for (let row = y0; row <= y1; row++) {
      for (let column = x0; column <= x1; column++) {
        for (let node = leaders.first(row * columns + column); node !== NONE; node = leaders.after(node)) {
          const other = leaders.label(node);
          if (other === label || stamps[other] === onLeader) continue;
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
    this.met = 0;
    this.weigh(label, candidate, this.one, MOST);
    return this.met > 0;
  }
}
