/** Match lines: where the drawing goes on, on another sheet. Both sides carry the same mark and say each other's sheet. */
import type { PaperPoint } from "../geometry/types";
import { formatLength } from "../units/format";
import type { DrawnEdge, DrawnJoint, PassInk } from "./drawn";
import type { DisplayItem, MeasureText, Ref } from "./drawing-types";
import type { Label } from "./label-candidates";
import { blockLabel, type BlockLine } from "./mark-labels";
import { lineItem } from "./paths";
import type { Placed } from "./place";
import type { Segment } from "./plane";
import type { Match } from "./sheet-split";
import * as size from "./sizes";

export interface MatchInk extends PassInk {
  readonly labels: readonly Label[];
}

export const NO_MATCHES: MatchInk = { items: [], heavy: [], light: [], labels: [] };

const DASH_DOT: readonly number[] = [4, 1.2, 0.8, 1.2];
/** The match line reaches this far to each side of the pipe. */
const HALF_LENGTH = 8;
/** It stands this far beyond the weld dot, on the pipe that goes on. */
const BEYOND = size.WELD_DOT / 2 + 1.6;

/** @param sheet number of the sheet being drawn */
export function matchPass(placed: Placed, drawn: readonly DrawnEdge[], joints: readonly DrawnJoint[], matches: readonly Match[], sheet: number, measure: MeasureText): MatchInk {
  const items: DisplayItem[] = [];
  const heavy: Segment[] = [];
  const labels: Label[] = [];
  for (const match of matches) {
    if (match.fromSheet !== sheet && match.toSheet !== sheet) continue;
    const place = matchPlace(placed, drawn, joints, match);
    if (!place) continue;
    const goesOn = match.fromSheet === sheet;
    const ref: Ref = { kind: "leg", id: match.legId };
    const { at, direction } = place;
    const out = goesOn ? place.onward : -place.onward;
    const middle: PaperPoint = [at[0] + direction[0] * BEYOND * out, at[1] + direction[1] * BEYOND * out];
    const line = acrossLine(middle, direction);
    items.push(lineItem("symbol", ref, line.from, line.to, size.SYMBOL_WIDTH, "ink", DASH_DOT));
    heavy.push(line);
    const lines: BlockLine[] = [{ text: matchWords(match, sheet), bold: true }, ...coordinates(placed, match)];
    labels.push(blockLabel(lines, { id: `match ${match.mark}`, anchors: [line.from, line.to], clear: 0.6, along: [direction] }, ref, measure));
  }
  return { items, heavy, light: [], labels };
}

/** What a match line says on one of its two sheets. */
export function matchWords(match: Match, sheet: number): string {
  return match.fromSheet === sheet ? `CONTINUED ON SHEET ${match.toSheet} AT ${match.mark}` : `FROM SHEET ${match.fromSheet} AT ${match.mark}`;
}

interface MatchPlace {
  readonly at: PaperPoint;
  readonly direction: PaperPoint;
  /** 1 where the drawn direction of the leg leads to the sheet that goes on. */
  readonly onward: 1 | -1;
}

function matchPlace(placed: Placed, drawn: readonly DrawnEdge[], joints: readonly DrawnJoint[], match: Match): MatchPlace | null {
  const edge = drawn.find((d) => d.edge.id === match.legId);
  if (!edge) return null;
  const onward = placed.sketch.vertexOf(edge.edge.leg.toPointId) === match.pointId ? 1 : -1;
  const joint = joints.find(({ joint: { key } }) => key === match.jointKey);
  const at = joint?.at ?? placed.paper.get(match.pointId) ?? edge.to;
  return { at, direction: edge.direction, onward };
}

/** Upright across level pipe, level across a riser: never lying along a flange's stroke on purpose drawn longer than one. */
function acrossLine(at: PaperPoint, direction: PaperPoint): Segment {
  const across: PaperPoint = [-direction[1], direction[0]];
  return {
    from: [at[0] - across[0] * HALF_LENGTH, at[1] - across[1] * HALF_LENGTH],
    to: [at[0] + across[0] * HALF_LENGTH, at[1] + across[1] * HALF_LENGTH],
  };
}

/** Coordinates of the working point both sheets share. */
function coordinates(placed: Placed, match: Match): readonly BlockLine[] {
  const node = placed.sketch.vertices.get(match.pointId)?.node;
  if (!node) return [];
  const { units } = placed.sketch.model.document.settings;
  const [e, n, u] = node.position;
  const side = (value: number, plus: string, minus: string): string => `${value < 0 ? minus : plus} ${formatLength(Math.abs(value), units)}`;
  return [side(e, "E", "W"), side(n, "N", "S"), `CL EL ${formatLength(u, units)}`].map((text) => ({ text, bold: false }));
}
