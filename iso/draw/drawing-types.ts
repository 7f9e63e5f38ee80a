/**
 * The display list: what both painters (SVG, PDF) understand. Paper millimetres, y down. Lines, cubic paths and text
 * only, so that nothing depends on a painter's arcs or quadratics.
 */
import type { PaperBox, PaperPoint } from "../geometry/types";
import type { View } from "../run/document";

/** ink black; dye the one blue (layout dye); grey for what is outside the spool; paper for knock-outs; alert for state words;
 * pale for what lies across a page and must not hide it. */
export type Ink = "ink" | "dye" | "grey" | "paper" | "alert" | "pale";

export type Layer =
  | "hatch" | "box" | "halo" | "pipe" | "symbol" | "weld" | "dimension" | "dimension-text" | "leader" | "balloon"
  | "label" | "north" | "flow" | "frame" | "table" | "title" | "state" | "caution" | "qr" | "logo";

/** What an item shows: lets the screen find the row for a leg and the other way round. */
export interface Ref {
  readonly kind: "leg" | "point" | "component" | "joint" | "piece" | "material" | "dimension" | "spool";
  readonly id: string;
}

export type Face = "regular" | "bold" | "mono";

export interface LineItem {
  readonly type: "line";
  readonly layer: Layer;
  readonly ref: Ref | null;
  readonly from: PaperPoint;
  readonly to: PaperPoint;
  readonly widthMm: number;
  readonly ink: Ink;
  /** Dash pattern in mm; absent = solid. */
  readonly dash?: readonly number[];
}

export type PathSegment =
  | { readonly op: "M" | "L"; readonly to: PaperPoint }
  | { readonly op: "C"; readonly c1: PaperPoint; readonly c2: PaperPoint; readonly to: PaperPoint }
  | { readonly op: "Z" };

export interface PathItem {
  readonly type: "path";
  readonly layer: Layer;
  readonly ref: Ref | null;
  readonly segments: readonly PathSegment[];
  readonly stroke: Ink | null;
  readonly widthMm: number;
  readonly fill: Ink | null;
  readonly dash?: readonly number[];
}

export interface TextItem {
  readonly type: "text";
  readonly layer: Layer;
  readonly ref: Ref | null;
  /** On the baseline: its start, middle or end according to anchor, before rotation about this point. */
  readonly at: PaperPoint;
  readonly anchor: "start" | "middle" | "end";
  readonly text: string;
  /** Capital height in mm (Roboto's font size is 1.41 times it). Never under 2.5. */
  readonly capMm: number;
  readonly face: Face;
  /** Clockwise on paper (y down), radians. */
  readonly rotateRad: number;
  readonly ink: Ink;
}

export type DisplayItem = LineItem | PathItem | TextItem;

/** Advance width in mm of a text set at a capital height, from the generated font width table. */
export type MeasureText = (text: string, capMm: number, face: Face) => number;

export interface LabelReport {
  readonly labels: number;
  /** Labels touching no label, pipe or foreign leader. */
  readonly clean: number;
  readonly overlaps: number;
  readonly touches: number;
  readonly meanLeaderMm: number;
  readonly p95LeaderMm: number;
}

export type LegendKey =
  | "shop-weld" | "field-weld" | "field-fit-weld" | "typical-butt" | "typical-fillet" | "field-symbol" | "threaded-joint"
  | "material-item" | "weld-number" | "cut-piece" | "spool" | "flow" | "support" | "revision" | "reference-dimension" | "unverified"
  | "weld-neck" | "slip-on" | "socket-flange" | "threaded-flange" | "lap-joint" | "blind" | "bolt-turn"
  | "gate" | "globe" | "check" | "ball" | "butterfly" | "instrument"
  | "reducer" | "eccentric-reducer" | "socket-end" | "threaded-end" | "coupling" | "union" | "cap" | "socket-cap"
  | "outlet" | "stub-in" | "pad" | "set-in" | "mitre" | "bend" | "vent" | "drain" | "goes-on" | "break" | "slope" | "offset";

export interface Drawing {
  readonly view: View;
  readonly widthMm: number;
  readonly heightMm: number;
  readonly items: readonly DisplayItem[];
  /** What is really inked. */
  readonly bounds: PaperBox;
  readonly legend: readonly LegendKey[];
  readonly report: LabelReport;
  /** Every dimension, weld, piece and item of the model that the drawing shows, to be counted by tests. */
  readonly shown: readonly Ref[];
}

export interface DrawOptions {
  /** Room for the drawing, mm. */
  readonly widthMm: number;
  readonly heightMm: number;
  readonly measure: MeasureText;
  /** null = the document's view, or the proposed one when that is null. */
  readonly view: View | null;
  /** Draw only this spool (its neighbours as dashed stubs with where they go); null = the whole line. */
  readonly spool: string | null;
  /** Which marks to show. Spool sheet: all true. */
  readonly show: { readonly items: boolean; readonly welds: boolean; readonly pieces: boolean; readonly dimensions: boolean };
  /** Points touched by the latest revision, to be marked with its triangle. */
  readonly changed?: { readonly code: string; readonly pointIds: readonly string[] } | null;
}
