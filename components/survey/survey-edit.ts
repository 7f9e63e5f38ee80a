/** Changes of a survey document, and empty rows to start from. Pure. */
import type { SurveyAxis, SurveyDocument, SurveyEnd, SurveyReading } from "@/iso";

export const READING_KINDS: readonly { readonly kind: SurveyReading["kind"]; readonly label: string }[] = [
  { kind: "tape", label: "Tape" },
  { kind: "offset", label: "Offsets" },
  { kind: "bearing", label: "Bearing" },
  { kind: "point", label: "Point" },
];

export const AXIS_KINDS: readonly { readonly value: SurveyAxis["kind"]; readonly label: string }[] = [
  { value: "bearing", label: "Direction it faces" },
  { value: "line", label: "Two marks on the pipe" },
  { value: "level", label: "Level on the face, two ways" },
  { value: "face", label: "Distances to a plane" },
  { value: "holes", label: "Bolt holes" },
];

export function newReading(id: string, kind: SurveyReading["kind"], before: SurveyReading | undefined): SurveyReading {
  const three = kind === "offset" || kind === "point";
  return {
    id, kind, from: kind === "tape" && before?.kind === "tape" ? before.from : "", to: "",
    first: three ? ["", "", ""] : [""], again: three ? ["", "", ""] : [""],
    tool: before?.kind === kind ? before.tool : kind === "bearing" ? "angle" : "tape",
    tolerance: "", leftOut: false, note: "",
  };
}

export function newAxis(kind: SurveyAxis["kind"], points = ""): SurveyAxis {
  switch (kind) {
    case "line": return { kind, back: "" };
    case "bearing": return { kind, points };
    case "level": return { kind, points, uprightLean: "", uprightSpan: "", levelLean: "", levelSpan: "" };
    case "face": return { kind, points, circle: "", distances: ["", "", "", ""] };
    case "holes": return { kind, points, marks: [] };
  }
}

export function newEnd(id: string, count: number): SurveyEnd {
  return { id, name: `End ${count + 1}`, centre: "", axis: newAxis("bearing"), tolerance: "" };
}

export function withReading(document: SurveyDocument, reading: SurveyReading): SurveyDocument {
  const known = document.readings.some((each) => each.id === reading.id);
  return { ...document, readings: known ? document.readings.map((each) => (each.id === reading.id ? reading : each)) : [...document.readings, reading] };
}

export function withEnd(document: SurveyDocument, end: SurveyEnd): SurveyDocument {
  const known = document.ends.some((each) => each.id === end.id);
  return { ...document, ends: known ? document.ends.map((each) => (each.id === end.id ? end : each)) : [...document.ends, end] };
}

export function withoutRow(document: SurveyDocument, id: string): SurveyDocument {
  return { ...document, readings: document.readings.filter((each) => each.id !== id), ends: document.ends.filter((each) => each.id !== id) };
}

/** One row in a line of words, for the choice between two of them. */
export function rowText(row: SurveyReading | SurveyEnd | string | null): string {
  if (row === null) return "taken away";
  if (typeof row === "string") return row || "blank";
  if ("axis" in row) return `${row.name}: centre ${row.centre || "none"}, ${AXIS_KINDS.find(({ value }) => value === row.axis.kind)?.label.toLowerCase()}, ${Object.values(row.axis).slice(1).flat().filter(Boolean).join(" · ") || "blank"}`;
  const values = [row.first, row.again].map((texts) => texts.filter(Boolean).join(", ")).filter(Boolean);
  return `${READING_KINDS.find(({ kind }) => kind === row.kind)?.label} ${row.from || "datum"}-${row.to || "?"}: ${values.join(" and again ") || "blank"}${row.leftOut ? " (left out)" : ""}`;
}
