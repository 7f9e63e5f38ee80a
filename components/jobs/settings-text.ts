/** Line settings as a form holds them (texts, lengths as typed) and back. */
import { z } from "zod";
import {
  NPS_SIZES,
  formatDecimal,
  formatLength,
  formatTerm,
  lineSettingsSchema,
  npsSchema,
  parseLength,
  unitSystemSchema,
  type LineSettings,
  type UnitSystem,
} from "@/iso";
import { fitSettingOf, fitSettingsToText, fitTextShape } from "@/components/fit/fit-text";
import { markRules, markRulesToText, markTextShape } from "./mark-rules-text";

const name = (what: string, max: number) =>
  z.string().trim().min(1, `Enter ${what}.`).max(max, `At most ${max} characters.`);
const free = z.string().trim().max(120, "At most 120 characters.");

const shape = z.object({
  units: unitSystemSchema,
  nps: npsSchema,
  schedule: name("a schedule", 12),
  material: name("a material", 120),
  specification: free,
  elbow: z.enum(["LR", "SR"]),
  ratingClass: z.enum(["150", "300", "600", "900", "1500"]),
  rootGap: z.string(),
  socketPullBack: z.string(),
  gasket: z.string(),
  slipOnSetting: z.string(),
  withinDeg: z.string(),
  minimumPup: z.string(),
  fieldTrim: z.string(),
  faceIncludesGasket: z.boolean(),
  boxLength: z.string(),
  boxWidth: z.string(),
  boxHeight: z.string(),
  stockLength: z.string(),
  loopTolerance: z.string(),
  threadMakeUp: z.string(),
  forgedClass: z.enum(["", "2000", "3000", "6000"]),
  ...markTextShape,
  ...fitTextShape,
  insulation: free,
  pwht: free,
  nde: free,
  test: free,
  paint: free,
});

export type SettingsText = z.infer<typeof shape>;

const LENGTHS = [
  "rootGap",
  "socketPullBack",
  "gasket",
  "slipOnSetting",
  "fieldTrim",
  "boxLength",
  "boxWidth",
  "boxHeight",
] as const;
type LengthField = (typeof LENGTHS)[number];

/** The form's own check: every length is read in the chosen unit system; what comes out is LineSettings. */
export const settingsTextSchema = shape.transform((values, context): LineSettings => {
  const lengths = {} as Record<LengthField, number>;
  for (const field of LENGTHS) lengths[field] = lengthOf(values[field], values.units, field, context);
  const minimumPupMm =
    values.minimumPup.trim() === "" ? null : lengthOf(values.minimumPup, values.units, "minimumPup", context);
  const settings: LineSettings = {
    units: values.units,
    pipe: {
      nps: values.nps,
      schedule: values.schedule,
      material: values.material,
      specification: values.specification,
    },
    elbow: values.elbow,
    ratingClass: Number(values.ratingClass) as LineSettings["ratingClass"],
    allowances: {
      rootGapMm: lengths.rootGap,
      socketPullBackMm: lengths.socketPullBack,
      gasketMm: lengths.gasket,
      slipOnSettingMm: lengths.slipOnSetting,
      ...optionalLength("threadMakeUpMm", values.threadMakeUp, values.units, "threadMakeUp", context),
    },
    standardElbowWithinDeg: degreesOf(values.withinDeg, context),
    minimumPupMm,
    fieldTrimMm: lengths.fieldTrim,
    faceIncludesGasket: values.faceIncludesGasket,
    shippingBoxMm: [lengths.boxLength, lengths.boxWidth, lengths.boxHeight],
    ...optionalLength("stockLengthMm", values.stockLength, values.units, "stockLength", context),
    ...optionalLength("loopToleranceMm", values.loopTolerance, values.units, "loopTolerance", context),
    ...(values.forgedClass === "" ? {} : { forgedClass: Number(values.forgedClass) as LineSettings["forgedClass"] }),
    ...markRules(values, context),
    ...fitSettingOf(values, values.units, context),
    asEntered: {
      insulation: values.insulation,
      pwht: values.pwht,
      nde: values.nde,
      test: values.test,
      paint: values.paint,
    },
  };
  return context.issues.length > 0 ? z.NEVER : lineSettingsSchema.parse(settings);
});

function lengthOf(text: string, units: UnitSystem, field: string, context: z.RefinementCtx): number {
  const parsed = parseLength(text, units);
  if (parsed.ok && parsed.mm >= 0) return parsed.mm;
  context.addIssue({
    code: "custom",
    path: [field],
    message: parsed.ok ? "Not under zero." : parsed.message,
  });
  return 0;
}

/** A length that may be left empty: then the setting is absent and its own default holds. */
function optionalLength<K extends string>(key: K, text: string, units: UnitSystem, field: string, context: z.RefinementCtx): Partial<Record<K, number>> {
  if (text.trim() === "") return {};
  return { [key]: lengthOf(text, units, field, context) } as Record<K, number>;
}

function degreesOf(text: string, context: z.RefinementCtx): number {
  const value = Number(text.trim());
  if (text.trim() !== "" && value >= 0 && value <= 3) return value;
  context.addIssue({ code: "custom", path: ["withinDeg"], message: "Enter degrees, 0 to 3." });
  return 0;
}

/** A length for an entry: a tape reading where it says exactly the same, else millimetres. */
export function lengthEntryText(mm: number, units: UnitSystem): string {
  const exact = [formatLength(mm, units), formatTerm(mm, units)].find((text) => {
    const read = parseLength(text, units);
    return read.ok && Math.abs(read.mm - mm) < EXACT_MM;
  });
  return exact ?? `${formatDecimal(mm, 4)}mm`;
}

/** Two texts of one length agree within this, mm: float noise only. */
const EXACT_MM = 0.000_05;

/** What the form starts with. */
export function settingsToText(settings: LineSettings): SettingsText {
  const length = (mm: number) => lengthEntryText(mm, settings.units);
  const optional = (mm: number | undefined) => (mm === undefined ? "" : length(mm));
  const [boxLength, boxWidth, boxHeight] = settings.shippingBoxMm;
  return {
    units: settings.units,
    nps: settings.pipe.nps,
    schedule: settings.pipe.schedule,
    material: settings.pipe.material,
    specification: settings.pipe.specification,
    elbow: settings.elbow,
    ratingClass: String(settings.ratingClass) as SettingsText["ratingClass"],
    rootGap: length(settings.allowances.rootGapMm),
    socketPullBack: length(settings.allowances.socketPullBackMm),
    gasket: length(settings.allowances.gasketMm),
    slipOnSetting: length(settings.allowances.slipOnSettingMm),
    withinDeg: String(settings.standardElbowWithinDeg),
    minimumPup: settings.minimumPupMm === null ? "" : length(settings.minimumPupMm),
    fieldTrim: length(settings.fieldTrimMm),
    faceIncludesGasket: settings.faceIncludesGasket,
    boxLength: length(boxLength),
    boxWidth: length(boxWidth),
    boxHeight: length(boxHeight),
    stockLength: optional(settings.stockLengthMm),
    loopTolerance: optional(settings.loopToleranceMm),
    threadMakeUp: optional(settings.allowances.threadMakeUpMm),
    forgedClass: settings.forgedClass === undefined ? "" : (String(settings.forgedClass) as SettingsText["forgedClass"]),
    ...markRulesToText(settings.marks),
    ...fitSettingsToText(settings.fit, settings.units),
    ...settings.asEntered,
  };
}

export const NPS_OPTIONS = NPS_SIZES.map((nps) => ({ value: nps, label: `NPS ${nps}` }));
