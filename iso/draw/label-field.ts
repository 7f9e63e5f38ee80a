/**
 * What is written so far in places of its own (numbers, box words, slopes): turned boxes, asked before the next is written.
 * A sheet holds a hundred or two, so they stand in one flat list that is read from end to end: a grid of cells took longer.
 */
import { boxReach, type TurnedBox } from "./plane";

/** Clear paper kept between two labels, mm. */
export const LABEL_MARGIN = 0.6;

/** Numbers of a box in a list: its middle, half width and height, cosine and sine of its angle, half width and height of the upright box round it. */
export const BOX_STRIDE = 8;
const FIRST_ROOM = 128;
/** Owner of boxes that stay where they are. */
const NOBODY = -1;

/** Writes a box into a list at a place. */
export function writeBox(list: Float64Array, at: number, box: TurnedBox): void {
  const [reachX, reachY] = boxReach(box);
  list[at] = box.centre[0];
  list[at + 1] = box.centre[1];
  list[at + 2] = box.halfWidth;
  list[at + 3] = box.halfHeight;
  list[at + 4] = box.angle === 0 ? 1 : Math.cos(box.angle);
  list[at + 5] = box.angle === 0 ? 0 : Math.sin(box.angle);
  list[at + 6] = reachX;
  list[at + 7] = reachY;
}

export class LabelField {
  private boxes = new Float64Array(BOX_STRIDE * FIRST_ROOM);
  private owners = new Int32Array(FIRST_ROOM);
  private count = 0;
  private readonly probe = new Float64Array(BOX_STRIDE);

  add(box: TurnedBox): void {
    writeBox(this.probe, 0, box);
    this.hold(this.probe, 0, NOBODY);
  }

  /** Holds a box of a list until it is released: the last ones by `release`, those of an owner by `forget`. */
  hold(list: Float64Array, at: number, owner: number): void {
    if (this.count === this.owners.length) this.grow();
    const to = this.count * BOX_STRIDE;
    for (let i = 0; i < BOX_STRIDE; i++) this.boxes[to + i] = list[at + i]!;
    this.owners[this.count++] = owner;
  }

  release(last: number): void {
    this.count -= last;
  }

  forget(owner: number): void {
    let kept = 0;
    for (let i = 0; i < this.count; i++) {
      if (this.owners[i] === owner) continue;
      if (kept < i) this.boxes.copyWithin(kept * BOX_STRIDE, i * BOX_STRIDE, (i + 1) * BOX_STRIDE);
      this.owners[kept++] = this.owners[i]!;
    }
    this.count = kept;
  }

  /** True when the turned box comes within the margin of one already there. */
  overlapping(box: TurnedBox, margin = LABEL_MARGIN): boolean {
    writeBox(this.probe, 0, box);
    return this.meets(this.probe, 0, margin);
  }

  /** As overlapping, for a box of a list: separating axes; exactly at the margin they are apart. */
  meets(list: Float64Array, at: number, margin = LABEL_MARGIN): boolean {
    const { boxes } = this;
    const x = list[at]!;
    const y = list[at + 1]!;
    const w = list[at + 2]! + margin;
    const h = list[at + 3]! + margin;
    const c = list[at + 4]!;
    const s = list[at + 5]!;
    const reachX = list[at + 6]! + margin;
    const reachY = list[at + 7]! + margin;
    for (let p = 0, end = this.count * BOX_STRIDE; p < end; p += BOX_STRIDE) {
      const dx = x - boxes[p]!;
      if (Math.abs(dx) > reachX + boxes[p + 6]!) continue;
      const dy = y - boxes[p + 1]!;
      if (Math.abs(dy) > reachY + boxes[p + 7]!) continue;
      const otherW = boxes[p + 2]!;
      const otherH = boxes[p + 3]!;
      const otherC = boxes[p + 4]!;
      const otherS = boxes[p + 5]!;
      const tc = Math.abs(c * otherC + s * otherS);
      const ts = Math.abs(s * otherC - c * otherS);
      if (Math.abs(dx * c + dy * s) >= w + tc * otherW + ts * otherH || Math.abs(dy * c - dx * s) >= h + ts * otherW + tc * otherH) continue;
      if (Math.abs(dx * otherC + dy * otherS) >= otherW + margin + tc * (w - margin) + ts * (h - margin)) continue;
      if (Math.abs(dy * otherC - dx * otherS) >= otherH + margin + ts * (w - margin) + tc * (h - margin)) continue;
      return true;
    }
    return false;
  }

  private grow(): void {
    const boxes = new Float64Array(this.boxes.length * 2);
    const owners = new Int32Array(this.owners.length * 2);
    boxes.set(this.boxes);
    owners.set(this.owners);
    this.boxes = boxes;
    this.owners = owners;
  }
}
