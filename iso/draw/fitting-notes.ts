/**
 * Words that stand at a fitting: tags, the flat side of an eccentric reducer with its shift, the roll of a fitting that does
 * not stand square to the one before, bolt holes that do not straddle, bends, mitres, trimmed elbows, pads, supports with the
 * level under the pipe. Each is a led label; numbers print as everywhere else on the sheet.
 */
import { pipeOdMm } from "../catalogue/pipe";
import type { UnitSystem } from "../run/document";
import type { Component } from "../run/model-types";
import { formatLength } from "../units/format";
import { componentAnchor } from "./component-anchor";
import type { DrawnEdge } from "./drawn";
import type { MeasureText } from "./drawing-types";
import { bubbleLabel } from "./instrument-bubble";
import type { Label } from "./label-candidates";
import { blockLabel, type BlockLine } from "./mark-labels";
import { isBend } from "./paper-model";
import { partFrames, type PartFrame } from "./part-frames";
import type { Placed } from "./place";
import * as size from "./sizes";
import { groupBy } from "./sketch";
import { mitrePieces } from "./turns";
import { shortAngle } from "./words";

export function fittingLabels(placed: Placed, drawn: readonly DrawnEdge[], measure: MeasureText): readonly Label[] {
  const frames = groupBy(partFrames(placed, drawn), (frame) => frame.component.id);
  const pipeAt = (id: string) => drawn.filter((d) => d.edge.from === id || d.edge.to === id).map((d) => d.direction);
  return placed.sketch.components.flatMap((component): Label[] => {
    const own = frames.get(component.id) ?? [];
    const anchor = componentAnchor(placed, component.kind, component.pointId, own);
    if (!anchor) return [];
    const place = { ...anchor, along: own.length > 0 ? anchor.along : pipeAt(component.pointId) };
    if (component.kind === "instrument") return component.text.trim() === "" ? [] : [bubbleLabel(component.text, { id: `bubble ${component.id}`, ...place }, { kind: "component", id: component.id }, measure)];
    const lines = fittingLines(placed, component, own);
    return lines.length === 0 ? [] : [blockLabel(lines, { id: `tag ${component.id}`, ...place }, { kind: "component", id: component.id }, measure)];
  });
}

const plain = (text: string): BlockLine => ({ text, bold: false });

function fittingLines(placed: Placed, component: Component, frames: readonly PartFrame[]): BlockLine[] {
  const { units } = placed.sketch.model.document.settings;
  // At the end of a run the holes stand with the end's own words; a turned flange needs no roll beside them.
  if (component.boltTurn) return isEndFlange(placed, component) ? [] : boltLines(component);
  return [...kindLines(placed, component, frames, units), ...rollLines(component, units)];
}

function kindLines(placed: Placed, component: Component, frames: readonly PartFrame[], units: UnitSystem): BlockLine[] {
  if (isBend(component)) return [plain(`BEND R ${formatLength(component.radiusMm ?? 0, units)}${bendAngle(component)}`)];
  switch (component.kind) {
    case "reducer-eccentric": return eccentricLines(component, units);
    case "valve": return component.text.trim() === "" ? [] : [{ text: component.text.toUpperCase(), bold: true }];
    case "support": return supportLines(placed, component, units);
    case "mitre": return [plain(`MITRE, ${mitrePieces(placed, component.pointId)} PIECES`)];
    case "trimmed-elbow": return [plain(`TRIMMED TO ${shortAngle(component.angleRad ?? 0)}`), plain("CONFIRM PERMITTED")];
    case "stub-in": return padLines(frames, units);
    default: return [];
  }
}

function bendAngle(component: Component): string {
  const angle = component.angleRad ?? 0;
  return Math.abs(angle - Math.PI / 2) < size.ROLL_SQUARE_RAD ? "" : `, ${shortAngle(angle)}`;
}

const SIDE_WORDS = { U: "ON TOP", D: "ON BOTTOM", N: "NORTH", S: "SOUTH", E: "EAST", W: "WEST" } as const;

function eccentricLines(component: Component, units: UnitSystem): BlockLine[] {
  const { asideName, nps, nps2 } = component;
  if (!asideName) return [];
  const [large, small] = [pipeOdMm(nps, units), nps2 === null ? null : pipeOdMm(nps2, units)];
  const shift = large === null || small === null ? [] : [plain(`CL SHIFT ${formatLength(Math.abs(large - small) / 2, units)}`)];
  return [plain(`FLAT ${SIDE_WORDS[asideName]}`), ...shift];
}

/** Name, and under a level pipe the level of its underside, which is where the steel meets it. */
function supportLines(placed: Placed, component: Component, units: UnitSystem): BlockLine[] {
  const name = component.text.trim() === "" ? [] : [plain(component.text.toUpperCase())];
  const node = placed.sketch.model.nodes.find((one) => one.pointId === component.pointId);
  const flow = node?.arriving ?? node?.leaving ?? null;
  const od = pipeOdMm(component.nps, units);
  if (!node || !flow || od === null || Math.abs(flow[2]) > size.LEVEL_SINE) return name;
  return [...name, plain(`BOP EL ${formatLength(node.position[2] - od / 2, units)}`)];
}

function padLines(frames: readonly PartFrame[], units: UnitSystem): BlockLine[] {
  const item = frames[0]?.item;
  return item?.kind === "stub-in" && item.padMm !== undefined ? [plain(`PAD Ø ${formatLength(item.padMm, units)}`)] : [];
}

function rollLines(component: Component, units: UnitSystem): BlockLine[] {
  const { roll } = component;
  if (!roll || isSquareRoll(roll.angleRad)) return [];
  return [plain(`ROLL ${shortAngle(Math.abs(roll.angleRad))} ${roll.angleRad < 0 ? "CCW" : "CW"}`), plain(`ARC ${formatLength(roll.arcMm < 0 ? -roll.arcMm : roll.arcMm, units)}`)];
}

/** 0, 90, 180 or 270 degrees: what anybody takes a fitting to stand at. */
export function isSquareRoll(angleRad: number): boolean {
  const quarter = Math.PI / 2;
  return Math.abs(angleRad - Math.round(angleRad / quarter) * quarter) < size.ROLL_SQUARE_RAD;
}

function isEndFlange(placed: Placed, component: Component): boolean {
  return (placed.sketch.edgesAt.get(placed.sketch.vertexOf(component.pointId)) ?? []).length === 1;
}

export function boltLines(component: Component): BlockLine[] {
  const turn = component.boltTurn;
  return turn ? [plain(`HOLES ${String(Math.round(turn.turnDeg * 100) / 100)}° CW FROM ${turn.from}`)] : [];
}
