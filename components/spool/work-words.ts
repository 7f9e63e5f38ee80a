import type { WorkKind } from "@/lib/rules/api-types";

/** Kinds of work-log entries in words. */
export const WORK_WORDS: Readonly<Record<WorkKind, string>> = {
  cut: "Cut",
  "fit-up": "Fit-up",
  weld: "Weld",
  visual: "Visual",
  actual: "Actual",
};

export interface WorkField {
  readonly label: string;
  readonly hint?: string;
  readonly caution?: string;
  readonly figure?: boolean;
}

const HEAT_CAUTION = "Confirm the heat number or PMI on the part itself: look-alike elbows get swapped.";

/** Every field an entry may have. */
export const FIELD_WORDS: Readonly<Record<string, WorkField>> = {
  heat: { label: "Heat no.", caution: HEAT_CAUTION, figure: true },
  length: { label: "Length as cut", hint: "As read on the tape.", figure: true },
  gap: { label: "Gap as fitted", figure: true },
  welder: { label: "Welder", hint: "Stamp or name." },
  procedure: { label: "WPS and its revision", figure: true },
  heatA: { label: "Heat no., side A", caution: HEAT_CAUTION, figure: true },
  heatB: { label: "Heat no., side B", figure: true },
  result: { label: "Result" },
  actual: { label: "Actual", hint: "As measured, with its unit.", figure: true },
  remarks: { label: "Remarks" },
};

export const RESULT_OPTIONS = [
  { value: "", label: "Choose" },
  { value: "accepted", label: "Accepted" },
  { value: "rejected", label: "Rejected" },
];

export const FIELD_WELD_CAUTION =
  "Field weld: hot-work permit, isolate, gas test, fire watch. Do not pull, jack or heat the pipe to fit.";
