/** Frames are told apart by their shape: a model point has three numbers, a paper point two. */

/** A point or vector in the model frame: millimetres (or unit-less for directions), x east, y north, z up. */
export type Vec3 = readonly [number, number, number];

/** A point on paper: millimetres from the top left corner of its drawing or page, x right, y DOWN. */
export type PaperPoint = readonly [number, number];

/** An axis-parallel box on paper, millimetres. */
export interface PaperBox {
  readonly minX: number;
  readonly minY: number;
  readonly maxX: number;
  readonly maxY: number;
}
