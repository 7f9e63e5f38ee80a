/** The templates a spool needs: every mitred and saddled pipe end, the holes of its stub-ins, and its trimmed elbows. */
import { SAME_POINT_MM } from "../geometry/tolerances";
import type { Vec3 } from "../geometry/types";
import { vecAddScaled, vecAngle, vecCross, vecDistance, vecDot, vecNegate, vecPerpendicular, vecReject, vecScale, vecUnit } from "../geometry/vec3";
import { pipeOdMm, pipeWall } from "../catalogue/pipe";
import type { UnitSystem } from "../run/document";
import type { Component, Joint, Model, Piece, Spool } from "../run/model-types";
import { formatAngleDeg, formatTerm } from "../units/format";
import type { SaddleInput } from "./saddle";
import { elbowTemplate, holeTemplate, mitreTemplate, saddleTemplate, skirtMm, type Template } from "./template";
import { wrapRadiusMm } from "./wrap";

export interface SpoolTemplates {
  readonly templates: readonly Template[];
  /** Sentences for what could not be drawn, and what the shop must know. */
  readonly notes: readonly string[];
}

interface Scene {
  readonly model: Model;
  readonly units: UnitSystem;
  readonly paperMm: number;
  readonly length: (mm: number) => string;
}

/** @param paperMm thickness of the paper printed on. Never throws on user data. */
export function spoolTemplates(model: Model, spool: Spool, paperMm: number): SpoolTemplates {
  const { units } = model.document.settings;
  const scene: Scene = { model, units, paperMm, length: (mm) => `${formatTerm(mm, units)} ${units === "metric" ? "mm" : "in"}` };
  const pieces = model.pieces.filter((piece) => spool.pieceKeys.includes(piece.key));
  const components = model.components.filter((component) => spool.componentIds.includes(component.id));
  const made: (Template | string)[] = [
    ...pieces.flatMap((piece) => pieceTemplates(scene, piece)),
    ...components.filter((c) => c.kind === "stub-in").flatMap((stub) => stubTemplates(scene, stub)),
    ...components.filter((c) => c.kind === "trimmed-elbow").flatMap((elbow) => trimmedTemplate(scene, elbow)),
  ];
  return { templates: made.filter((one) => typeof one !== "string"), notes: made.filter((one) => typeof one === "string") };
}

function wrapFact({ paperMm, length }: Scene, odMm: number): string {
  return `Wrap: pi x (OD ${length(odMm)} + paper ${paperMm} mm) = ${length(2 * Math.PI * wrapRadiusMm(odMm, paperMm))}; lines 0 and 16 meet.`;
}

function weldName(joint: Joint | undefined): string {
  return joint?.number ? `WELD ${joint.number}` : "ITS WELD";
}

/** Mitred ends of a piece. */
function pieceTemplates(scene: Scene, piece: Piece): (Template | string)[] {
  return ([0, 1] as const).flatMap((side) => {
    const end = piece.ends[side];
    if (end.prep !== "mitre" || end.cutAngleDeg === undefined) return [];
    const joint = scene.model.joints.find((one) => one.key === end.jointKey);
    const axis = side === 0 ? vecNegate(piece.direction) : piece.direction;
    const cutAngleRad = (end.cutAngleDeg * Math.PI) / 180;
    const back = joint ? backOf(scene, joint, axis) : null;
    const half = (piece.odMm / 2) * Math.tan(cutAngleRad);
    const both = piece.ends.every((one) => one.prep === "mitre");
    const skirt = skirtMm(both ? piece.cutLengthMm / 2 - half : piece.cutLengthMm - half);
    const toBase = piece.cutLengthMm - skirt - half;
    return [mitreTemplate({
      title: `${piece.mark} AT ${weldName(joint)}: MITRE CUT ${formatAngleDeg(cutAngleRad)} OFF SQUARE`,
      facts: [
        wrapFact(scene, piece.odMm),
        both && Math.abs(toBase - piece.cutLengthMm / 2) < SAME_POINT_MM
          ? `Base line: the middle of the segment, ${scene.length(toBase)} from the other cut along a SIDE line.`
          : `Base line: ${scene.length(toBase)} from the piece's other end along a SIDE line (cut length ${scene.length(piece.cutLengthMm)}).`,
      ],
      keep: `${piece.mark} BELOW THE CUT, ${weldName(joint)}`, odMm: piece.odMm, paperMm: scene.paperMm, axis, zero: back ?? vecPerpendicular(axis), cutAngleRad, skirtMm: skirt,
    })];
  });
}

/** The outside of the turn at a mitre weld, square to a pipe's axis: away from where the other side goes. */
function backOf({ model }: Scene, joint: Joint, axis: Vec3): Vec3 | null {
  const node = model.nodes.find((one) => one.pointId === joint.pointId && one.arriving !== null && one.leaving !== null);
  if (!node?.arriving || !node.leaving) return null;
  // Inside the turn lies the way from the arriving to the leaving direction.
  const inside = vecUnit(vecReject(vecUnit([node.leaving[0] - node.arriving[0], node.leaving[1] - node.arriving[1], node.leaving[2] - node.arriving[2]]) ?? node.leaving, axis));
  return inside ? vecNegate(inside) : null;
}

/** The branch's saddle and the hole it stands on. */
function stubTemplates(scene: Scene, stub: Component): (Template | string)[] {
  const { model, length } = scene;
  const branchEnd = stub.ports.find((port) => port.id === "branch");
  const joint = model.joints.find((one) => one.kind === "branch" && one.pointId === stub.pointId);
  const piece = model.pieces.find((one) => one.ends.some((end) => end.jointKey === joint?.key));
  const along = model.nodes.find((one) => one.pointId === stub.pointId);
  const flow = along?.leaving ?? along?.arriving;
  const runOd = pipeOdMm(stub.nps, scene.units);
  if (!branchEnd || !joint || !piece || !flow || runOd === null) return [`${stub.description}: no template, since its branch has no pipe yet.`];
  const isIn = / set in/.test(stub.description);
  const wall = pipeWall(piece.nps, piece.schedule, scene.units)?.wallMm ?? piece.wallMm;
  const out = branchEnd.direction;
  const isWith = vecDot(out, flow) > -SAME_POINT_MM;
  const run = isWith ? flow : vecNegate(flow);
  const axis = vecNegate(out);
  const acute = vecUnit(vecReject(run, out)) ?? vecPerpendicular(out);
  const saddle: SaddleInput = {
    runRadiusMm: runOd / 2, branchRadiusMm: isIn ? piece.odMm / 2 : piece.odMm / 2 - wall, branchOdMm: piece.odMm, angleRad: Math.min(vecAngle(out, run), Math.PI / 2), offsetMm: 0,
  };
  const whose = `${piece.mark} AT ${weldName(joint)}`;
  const kind = isIn ? "SET IN, cut to the OUTSIDE radius of the branch" : "SET ON, cut to the INSIDE radius of the branch";
  const far = Math.max(vecDistance(piece.start, stub.centre), vecDistance(piece.end, stub.centre));
  const skirt = skirtMm(piece.cutLengthMm / 2);
  const reach = saddleLongest(saddle);
  const facts = [
    wrapFact(scene, piece.odMm),
    `${kind}, ${formatAngleDeg(saddle.angleRad)} to the run of OD ${length(runOd)}.`,
    `Base line: ${length(far - reach - skirt - joint.gapMm)} from the piece's other end; line 0 looks ${isWith ? "along" : "against"} flow.`,
  ];
  const hole = holeTemplate({
    title: `HOLE IN THE RUN FOR ${piece.mark}, ${weldName(joint)}`, saddle, paperMm: scene.paperMm,
    facts: [
      `Wrap on the run, OD ${length(runOd)} (paper ${scene.paperMm} mm counted in). Up on the paper is ${isWith ? "along" : "against"} flow.`,
      `${kind}. Working point on the crossing of the two lines; the hole as given has no gap added.`,
    ],
  });
  return [
    saddleTemplate({ title: `${whose}: SADDLE ${isIn ? "SET IN" : "SET ON"}`, facts, keep: `${whose}, BELOW THE CUT`, odMm: piece.odMm, paperMm: scene.paperMm, axis, zero: acute, saddle, skirtMm: skirt }),
    hole,
  ];
}

function saddleLongest({ runRadiusMm, branchRadiusMm, angleRad }: SaddleInput): number {
  return (runRadiusMm + branchRadiusMm * Math.abs(Math.cos(angleRad))) / Math.sin(angleRad);
}

/** Which end is cut: the one downstream; the uncut face of the 90 stays upstream. */
function trimmedTemplate(scene: Scene, elbow: Component): (Template | string)[] {
  const { angleRad, radiusMm } = elbow;
  const odMm = pipeOdMm(elbow.nps, scene.units);
  const [from, to] = [elbow.ports.find((port) => port.id === "in"), elbow.ports.find((port) => port.id === "out")];
  if (angleRad === null || radiusMm === null || odMm === null || !from || !to) return [`${elbow.description}: no template, since its radius or angle is not known.`];
  const axis = vecNegate(from.direction);
  const weld = (id: "in" | "out") => weldName(scene.model.joints.find((joint) => (joint.a === elbow.id || joint.b === elbow.id) && joint.key.endsWith(`:${id}`)));
  const inside = vecUnit(vecReject(to.direction, axis)) ?? vecPerpendicular(axis);
  const share = (shift: number) => scene.length((radiusMm + shift) * angleRad);
  return [elbowTemplate({
    title: `ELBOW BETWEEN ${weld("in")} AND ${weld("out")}, TRIMMED TO ${formatAngleDeg(angleRad)}`,
    facts: [
      wrapFact(scene, odMm),
      `Along the surface from the uncut face at ${weld("in")}: throat ${share(-odMm / 2)}, sides ${share(0)}, back ${share(odMm / 2)}.`,
      "Slit the dashed lines and lay each strip along the bend. Trimmed fitting: confirm it is permitted (engineer).",
    ],
    keep: "BELOW THE CUT", odMm, paperMm: scene.paperMm, axis, zero: vecScale(inside, -1), radiusMm, angleRad,
    face: `UNCUT FACE, ${weld("in")}: cut the paper off on this line and lay it on the face`,
  })];
}

/** Unused by a template but by its tests: where a wrapped paper point lies on its pipe. */
export function wrapPoint(odMm: number, paperMm: number, axis: Vec3, zero: Vec3, at: Vec3, xMm: number, upMm: number): Vec3 {
  const phi = xMm / wrapRadiusMm(odMm, paperMm);
  const side = vecAddScaled(vecScale(zero, Math.cos(phi)), vecCross(axis, zero), Math.sin(phi));
  return vecAddScaled(vecAddScaled(at, side, odMm / 2), axis, upMm);
}
