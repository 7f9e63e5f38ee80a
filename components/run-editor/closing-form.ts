/** "Close between ends" as typed: texts to the solver's question, or a sentence per field. Pure. */
import {
  elbowRadiusMm, formatDecimal, formatTerm, INCH_MM, parseDirection, parseLength, pipeOdMm,
  type CloseBetweenInput, type Model, type Nps, type TakeOutWord, type UnitSystem, type Vec3,
} from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";

export interface EndForm {
  /** Row the end was taken from; "" = typed. */
  readonly pointId: string;
  readonly e: string;
  readonly n: string;
  readonly u: string;
  /** Out of the end, towards the gap. */
  readonly direction: string;
  /** Straight pipe between the end and its elbow; "" = none. */
  readonly straight: string;
  readonly radius: "LR" | "SR" | "own";
  readonly ownRadius: string;
  /** The end of the survey it was taken from and how well that is known; absent when it was not. */
  readonly surveyed?: SurveyedEnd | undefined;
}

/** What is known of a surveyed end. Covariances: position E, N, U in mm, then axis E, N, U. */
export interface SurveyedEnd {
  readonly endId: string;
  /** Radius of its position, two deviations. */
  readonly withinMm: number;
  readonly covariance: readonly (readonly number[])[];
  /** With each other end of the same survey, by its id: rows this end, columns the other. */
  readonly across: Readonly<Record<string, readonly (readonly number[])[]>>;
}

export interface ClosingForm {
  readonly nps: Nps;
  readonly end0: EndForm;
  readonly end1: EndForm;
  readonly rootGap: string;
}

export const EMPTY_END: EndForm = { pointId: "", e: "", n: "", u: "", direction: "", straight: "", radius: "LR", ownRadius: "" };

export type FieldMessages = Readonly<Record<string, string>>;
export type ReadClosing =
  | { readonly ok: true; readonly input: CloseBetweenInput }
  | { readonly ok: false; readonly messages: FieldMessages; readonly blank: boolean };

/** Reads the form. `blank` is true while an end is still empty; what is not typed yet is not called wrong. */
export function readClosingForm(form: ClosingForm, units: UnitSystem, takeOuts: readonly TakeOutWord[]): ReadClosing {
  const messages: Record<string, string> = {};
  const length = (field: string, text: string, whenBlank: number | null): number => {
    if (text.trim() === "" && whenBlank !== null) return whenBlank;
    const parsed = parseLength(text, units);
    if (parsed.ok) return parsed.mm;
    messages[field] = parsed.message;
    return 0;
  };
  const end = (name: "end0" | "end1") => readEnd(form[name], name, form.nps, units, takeOuts, length, messages);
  const [first, second] = [end("end0"), end("end1")];
  const rootGapMm = length("rootGap", form.rootGap, 0);
  const odMm = pipeOdMm(form.nps, units);
  if (odMm === null) messages.nps = "The pipe table has no such size.";
  const blank = [form.end0, form.end1].some((each) => each.direction.trim() === "" && each.e.trim() === "" && each.n.trim() === "" && each.u.trim() === "");
  const waiting = form.end0.direction.trim() === "" || form.end1.direction.trim() === "";
  if (Object.keys(messages).length > 0 || odMm === null || waiting) return { ok: false, messages, blank };
  const input: CloseBetweenInput = {
    end0: { position: first.position, direction: first.direction },
    end1: { position: second.position, direction: second.direction },
    radius0Mm: first.radiusMm, radius1Mm: second.radiusMm,
    tangents: { end0Mm: first.straightMm, end1Mm: second.straightMm },
    rootGapMm, thetaMaxRad: Math.PI / 2, units, odMm,
  };
  const withinMm = Math.hypot(form.end0.surveyed?.withinMm ?? 0, form.end1.surveyed?.withinMm ?? 0);
  return { ok: true, input: withinMm > 0 ? { ...input, toleranceMm: withinMm, ...jointCovariance(form) } : input };
}

/** Twelve by twelve, of both ends together; of one alone nothing is said, its tolerance serves. */
function jointCovariance({ end0, end1 }: ClosingForm): Pick<CloseBetweenInput, "endsCovariance"> {
  const [a, b] = [end0.surveyed, end1.surveyed];
  if (!a || !b || a.endId === b.endId) return {};
  const cross = a.across[b.endId];
  const at = (i: number, j: number): number => {
    if (i < 6 === j < 6) return (i < 6 ? a : b).covariance[i % 6]?.[j % 6] ?? 0;
    return (i < 6 ? cross?.[i]?.[j - 6] : cross?.[j]?.[i - 6]) ?? 0;
  };
  return { endsCovariance: Array.from({ length: 12 }, (_, i) => Array.from({ length: 12 }, (__, j) => at(i, j))) };
}

interface ReadEnd {
  readonly position: Vec3;
  readonly direction: Vec3;
  readonly straightMm: number;
  readonly radiusMm: number;
}

function readEnd(
  form: EndForm, name: string, nps: Nps, units: UnitSystem, takeOuts: readonly TakeOutWord[],
  length: (field: string, text: string, whenBlank: number | null) => number, messages: Record<string, string>,
): ReadEnd {
  const position: Vec3 = [length(`${name}.e`, form.e, 0), length(`${name}.n`, form.n, 0), length(`${name}.u`, form.u, 0)];
  const direction = parseDirection(form.direction);
  if (!direction.ok && form.direction.trim() !== "") messages[`${name}.direction`] = direction.message;
  const straightMm = length(`${name}.straight`, form.straight, 0);
  if (straightMm < 0) messages[`${name}.straight`] = "A straight is not under zero.";
  const radiusMm = form.radius === "own" ? length(`${name}.ownRadius`, form.ownRadius, null) : elbowRadiusMm(form.radius, nps, units, takeOuts);
  if (radiusMm === null) messages[`${name}.radius`] = `The tables have no ${form.radius} elbow in NPS ${nps}; type your own radius.`;
  else if (radiusMm <= 0) messages[`${name}.ownRadius`] ??= "Type a bend radius over zero.";
  return { position, direction: direction.ok ? [direction.e, direction.n, direction.u] : [0, 0, 0], straightMm, radiusMm: radiusMm ?? 0 };
}

/** Ends a row of the run gives: where its pipe or fitting ends, and the way out of it. */
export function endFromPoint(model: Model, pointId: string, side: 0 | 1): Pick<EndForm, "pointId" | "e" | "n" | "u" | "direction"> | null {
  const node = model.nodes.find((each) => each.pointId === pointId);
  if (!node) return null;
  const ports = model.components.filter((component) => component.pointId === pointId).flatMap((component) => component.ports);
  const wanted = ports.filter((port) => port.id === (side === 0 ? "out" : "in"));
  // Of a valve with its flanges and gaskets the outermost face is what a pipe is welded to.
  const reach = (port: (typeof wanted)[number]) => port.direction.reduce((sum, d, i) => sum + d * ((port.position[i] ?? 0) - (node.position[i] ?? 0)), 0);
  const port = isBareEnd(model, pointId) ? undefined : [...wanted].sort((a, b) => reach(b) - reach(a))[0];
  const away = node.arriving ?? node.leaving;
  const back = node.leaving ?? node.arriving;
  const along = side === 0 ? away : back && ([-back[0], -back[1], -back[2]] as Vec3);
  const direction = port?.direction ?? along;
  const position = port?.position ?? node.position;
  const { units } = model.document.settings;
  const [e, n, u] = position.map((mm) => lengthEntryText(mm, units));
  return { pointId, e: e ?? "", n: n ?? "", u: u ?? "", direction: direction ? directionText(direction) : "" };
}

/** Size of the pipe that leaves a point; null for none. */
export function sizeAfter(model: Model, pointId: string): Nps | null {
  const ports = model.components.filter((component) => component.pointId === pointId).flatMap((component) => component.ports);
  const out = ports.findLast((port) => port.id === "out");
  const leg = model.legs.find((each) => each.fromPointId === pointId) ?? model.legs.find((each) => each.toPointId === pointId);
  return out?.nps ?? leg?.nps ?? null;
}

/** Bare pipe: the elbow takes the place of the point; a fitting stays and the elbow is welded to it. */
export function isBareEnd(model: Model, pointId: string): boolean {
  const point = model.document.runs.flatMap((run) => run.points).find((each) => each.id === pointId);
  return point !== undefined && ["none", "joint", "end"].includes(point.item.kind);
}

const AXIS_WITHIN = 1e-6;
const DEG = 180 / Math.PI;

/** A direction as the fields take it: letters on an axis or at 45°, else azimuth/elevation. */
export function directionText([e, n, u]: Vec3): string {
  const letters = `${u > AXIS_WITHIN ? "U" : u < -AXIS_WITHIN ? "D" : ""}${n > AXIS_WITHIN ? "N" : n < -AXIS_WITHIN ? "S" : ""}${e > AXIS_WITHIN ? "E" : e < -AXIS_WITHIN ? "W" : ""}`;
  const sizes = [e, n, u].map(Math.abs).filter((value) => value > AXIS_WITHIN);
  if (sizes.every((value) => Math.abs(value - (sizes[0] ?? 0)) < AXIS_WITHIN)) return letters;
  const azimuth = (Math.atan2(e, n) * DEG + 360) % 360;
  const elevation = Math.atan2(u, Math.hypot(e, n)) * DEG;
  return `${formatDecimal(azimuth, 6).replace(/^\d+/, (whole) => whole.padStart(3, "0"))}/${formatDecimal(elevation, 6)}`;
}

/** What a bend's own radius looks like beside the choice. */
export function radiusHint(radius: "LR" | "SR", nps: Nps, units: UnitSystem, takeOuts: readonly TakeOutWord[]): string {
  const mm = elbowRadiusMm(radius, nps, units, takeOuts);
  if (mm === null) return "not in the tables";
  return units === "metric" ? `${formatTerm(mm, units)} mm` : `${formatDecimal(mm / INCH_MM, 3)} in`;
}
