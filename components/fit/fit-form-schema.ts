/** The panel's form: how the ends are known and joined, what is wanted, tolerances and limits. Texts in, numbers out. */
import { z } from "zod";
import { parseLength, type FitSettings, type FitUp, type UnitSystem } from "@/iso";
import { fitSettingsToText, fitTextShape, readFitTexts } from "./fit-text";
import type { TypedTolerance } from "./known-ends";
import { tapeEntryText } from "./length-text";

const shape = z.object({
  ...fitTextShape,
  endPosition: z.string(),
  endAxis: z.string(),
  face0: z.enum(["butt", "flange"]),
  face1: z.enum(["butt", "flange"]),
  fitUp: z.enum(["shared", "set-true"]),
  target: z.enum(["0.8", "0.9", "0.95", "0.99"]),
});
export type FitFormTexts = z.infer<typeof shape>;

export interface FitFormValues {
  readonly settings: FitSettings;
  readonly typed: TypedTolerance;
  readonly faces: readonly ["butt" | "flange", "butt" | "flange"];
  readonly fitUp: FitUp;
  readonly target: number;
}

const RAD = Math.PI / 180;
/** An end nobody surveyed: a tape's ± and an angle finder's (common practice). */
const TYPED_MM: Readonly<Record<UnitSystem, number>> = { imperial: 25.4 / 16, metric: 1.5 };
const TYPED_DEG = 0.5;

export function fitFormStart(fit: FitSettings | undefined, units: UnitSystem): FitFormTexts {
  return { ...fitSettingsToText(fit, units), endPosition: tapeEntryText(TYPED_MM[units], units), endAxis: String(TYPED_DEG), face0: "butt", face1: "butt", fitUp: "shared", target: "0.95" };
}

export function fitFormSchema(units: UnitSystem) {
  return shape.transform((values, context): FitFormValues => {
    const position = parseLength(values.endPosition, units);
    if (!position.ok || position.mm < 0) context.addIssue({ code: "custom", path: ["endPosition"], message: position.ok ? "Not under zero." : position.message });
    const axis = Number(values.endAxis.trim());
    const axisRead = values.endAxis.trim() !== "" && axis >= 0 && axis <= 20;
    if (!axisRead) context.addIssue({ code: "custom", path: ["endAxis"], message: "Enter degrees, 0 to 20." });
    const settings = readFitTexts(values, units, context);
    if (context.issues.length > 0) return z.NEVER;
    return { settings, typed: { positionMm: position.ok ? position.mm : 0, axisRad: axis * RAD }, faces: [values.face0, values.face1], fitUp: values.fitUp, target: Number(values.target) };
  });
}
