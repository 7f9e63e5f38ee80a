"use client";
/** Fields of tolerances and limits, each with where its usual value comes from. */
import type { FieldValues, FieldErrors, Path, UseFormRegister } from "react-hook-form";
import { FIT_SOURCES } from "@/iso";
import { TextField } from "@/components/ui/field";
import type { FitTexts } from "./fit-text";

interface FitField {
  readonly field: keyof FitTexts;
  readonly label: string;
  readonly source: string;
}

export const SHOP_FIELDS: readonly FitField[] = [
  { field: "fitCutLength", label: "Cut length ±", source: FIT_SOURCES.cutLengthMm },
  { field: "fitElbowAngle", label: "Elbow angle ±, degrees", source: FIT_SOURCES.elbowAngleDeg },
  { field: "fitRoll", label: "Roll ±, degrees", source: FIT_SOURCES.rollDeg },
  { field: "fitWeldGap", label: "Root gap of shop welds ±", source: FIT_SOURCES.gapMm },
  { field: "fitWeldHiLo", label: "High-low of shop welds ±", source: FIT_SOURCES.hiLoMm },
  { field: "fitWeldSquare", label: "Squareness across the OD ±", source: FIT_SOURCES.squareMm },
];

export const LIMIT_FIELDS: readonly FitField[] = [
  { field: "fitGapLimit", label: "Root gap may be off by", source: FIT_SOURCES.gapMm },
  { field: "fitHiLoLimit", label: "High-low up to", source: FIT_SOURCES.hiLoMm },
  { field: "fitOpeningLimit", label: "Gap may differ across the OD by", source: FIT_SOURCES.openingMm },
  { field: "fitFlangeGap", label: "Flange gap may be off by", source: FIT_SOURCES.flangeGapMm },
  { field: "fitFlangeParallel", label: "Flange faces parallel, 1 in", source: FIT_SOURCES.flangeParallelPercent },
  { field: "fitBoltHole", label: "Bolt holes offset up to", source: FIT_SOURCES.boltHoleMm },
];

export interface FitFieldsProps<T extends FieldValues> {
  readonly fields: readonly FitField[];
  readonly register: UseFormRegister<T>;
  readonly errors: FieldErrors<T>;
}

/** The fields of one group, for any form that holds the texts of a fit. */
export function FitFields<T extends FitTexts & FieldValues>({ fields, register, errors }: FitFieldsProps<T>) {
  return fields.map(({ field, label, source }) => (
    <TextField key={field} label={label} hint={source} figure error={errors[field]?.message as string | undefined} {...register(field as unknown as Path<T>)} />
  ));
}
