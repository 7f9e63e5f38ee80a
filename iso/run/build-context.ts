/** What every pass of buildModel() shares: settings, looked-up take-outs, and the list of findings. */
import { catalogueValue, elbowRadiusMm } from "../catalogue/catalogue";
import type { LineSettings, Nps, UnitSystem } from "./document";
import type { CutTerm, Problem, Severity, TakeOutWord } from "./model-types";
import type { PlacedPoint } from "./build-types";

/** A take-out as used: 0 with no source when neither the tables nor the shop have it (a problem says so). */
export interface TakeOut {
  readonly key: string;
  readonly mm: number;
  readonly source: string;
  readonly unconfirmed: boolean;
  readonly missing: boolean;
}

export interface BuildContext {
  readonly settings: LineSettings;
  readonly units: UnitSystem;
  /** Looks a take-out up; what is missing or unconfirmed is reported at the point it is used for. */
  takeOut(key: string, what: string, at: PlacedPoint): TakeOut;
  /** Bend radius of a butt-welding elbow, mm; null when no table has it. */
  bendRadius(radius: "LR" | "SR", nps: Nps): number | null;
  /** A take-out without any finding about it; null when nobody has it. */
  peek(key: string): number | null;
  report(code: string, severity: Severity, text: string, at: { pointId: string | null; runId: string | null }, catalogueKey?: string): void;
  readonly problems: readonly Problem[];
}

type Found = Omit<TakeOut, "key">;
const NOT_FOUND: Found = { mm: 0, source: "", unconfirmed: false, missing: true };

/** A fresh context for one document. Take-outs are looked up once per key. */
export function buildContext(settings: LineSettings, takeOuts: readonly TakeOutWord[]): BuildContext {
  const problems: Problem[] = [];
  const found = new Map<string, Found>();
  const told = new Set<string>();
  const words = [...takeOuts];
  const report: BuildContext["report"] = (code, severity, text, at, catalogueKey) => {
    problems.push({ code, severity, text, pointId: at.pointId, runId: at.runId, ...(catalogueKey === undefined ? {} : { catalogueKey }) });
  };
  return {
    settings,
    units: settings.units,
    problems,
    report,
    bendRadius: (radius, nps) => elbowRadiusMm(radius, nps, settings.units, words),
    peek: (key) => {
      const value = found.get(key) ?? look(key, settings.units, words);
      found.set(key, value);
      return value.missing ? null : value.mm;
    },
    takeOut(key, what, at) {
      const known = found.get(key);
      const value = known ?? look(key, settings.units, words);
      if (!known) found.set(key, value);
      const where = { pointId: at.point.id, runId: at.runId };
      if (value.missing) {
        report("take-out-missing", "stop", `The tables have no ${what} (${at.label}). Measure the part and enter the shop's own value.`, where, key);
      } else if (value.unconfirmed && !told.has(key)) {
        told.add(key);
        report("take-out-unconfirmed", "warning", `The ${what} (${at.label}) is from memory: measure one and confirm it, or enter the shop's own value.`, where, key);
      }
      return { key, ...value };
    },
  };
}

function look(key: string, units: UnitSystem, words: TakeOutWord[]): Found {
  const value = catalogueValue(key, units, words);
  if (!value || !Number.isFinite(value.mm)) return NOT_FOUND;
  return { mm: value.mm, source: value.source, unconfirmed: value.unverified, missing: false };
}

/** The (negative) take-out term of a component, for the arithmetic of the pipe next to it. */
export function takeOutTerm(label: string, value: TakeOut, componentId: string, factor = 1): CutTerm {
  return {
    kind: "take-out", label, valueMm: -value.mm * factor, componentId,
    source: value.source === "" ? null : value.source, unconfirmed: value.unconfirmed,
  };
}

/** A (negative) term whose length comes from the line's settings or from geometry rather than from a table. */
export function plainTerm(kind: CutTerm["kind"], label: string, mm: number, componentId: string | null = null, source: string | null = null): CutTerm {
  return { kind, label, valueMm: -mm, componentId, source, unconfirmed: false };
}

/** "point 4" with a capital, for the start of a sentence. */
export function sentenceStart(label: string): string {
  return label.charAt(0).toUpperCase() + label.slice(1);
}
