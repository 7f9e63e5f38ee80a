/** Pipe by size and schedule, its weight per metre, and the weights of fittings that a table gives. */
import { NPS_SIZES, type Nps, type UnitSystem } from "../run/document";
import { inchesMm } from "../units/length";
import { PIPE_DIAMETERS, PIPE_MEMORY, PIPE_SOURCE, PIPE_WALLS } from "./b36-pipe";
import { REMEMBERED_DIAMETERS, REMEMBERED_WALLS } from "./b36-remembered";
import type { Memory } from "./row";
import { ELBOW_POUNDS, ELBOW_WEIGHT_SOURCE } from "./weights";

/** Density of carbon steel, kg/mm³ (7.85 g/cm³, as the pipe standards use for every steel). */
export const STEEL_KG_PER_MM3 = 7.85e-6;
const KG_PER_POUND = 0.45359237;
const SCHEDULE_ORDER = ["5S", "10S", "10", "20", "30", "STD", "40S", "40", "60", "XS", "80S", "80", "100", "120", "140", "160", "XXS"];

export interface PipeSize {
  readonly nps: Nps;
  readonly dn: number;
  /** Outside diameter by the inch table, mm. */
  readonly odInchMm: number;
  /** Outside diameter by the millimetre table, mm. */
  readonly odMetricMm: number;
  readonly source: string;
}

export interface PipeWall {
  readonly odMm: number;
  readonly wallMm: number;
  readonly kgPerM: number;
  readonly source: string;
  readonly fromMemory: Memory;
}

/** Diameters of a pipe size (ASME B36.10M), or null for a size no table has. */
export function pipeSize(nps: Nps): PipeSize | null {
  return SIZES.get(nps) ?? null;
}

function tabulatedSize(nps: Nps): PipeSize | null {
  const read = PIPE_DIAMETERS.find(([size]) => size === nps);
  const row = read ?? REMEMBERED_DIAMETERS.find(([size]) => size === nps);
  if (!row) return null;
  return { nps, dn: row[1], odInchMm: inchesMm(row[2]), odMetricMm: row[3], source: read ? `ASME B36.10M, ${PIPE_SOURCE}` : "ASME B36.10M (from memory)" };
}

/** Looked up for every end of every part of a line, so found once. */
const SIZES: ReadonlyMap<string, PipeSize> = new Map(NPS_SIZES.flatMap((nps) => {
  const size = tabulatedSize(nps);
  return size ? [[nps, size]] : [];
}));

/** Outside diameter on a line of these units, mm, or null. */
export function pipeOdMm(nps: Nps, units: UnitSystem): number | null {
  const size = pipeSize(nps);
  return size && (units === "metric" ? size.odMetricMm : size.odInchMm);
}

/**
 * Wall and weight of a pipe: plain-end steel, π(D - t)t times the density (ASME B36.10M clause on weights, the constant
 * 10.69 in pounds and inches). Null when the schedule does not exist in that size.
 */
export function pipeWall(nps: Nps, schedule: string, units: UnitSystem): PipeWall | null {
  const known = WALLS[units].get(schedule)?.get(nps);
  if (known) return known;
  const name = schedule.trim().toUpperCase();
  const found = tabulatedWall(nps, name, units);
  if (!found) return null;
  const bySize = WALLS[units].get(name) ?? new Map<Nps, PipeWall>();
  WALLS[units].set(name, bySize.set(nps, found));
  return found;
}

/** Walls asked for so far, by schedule and size; only what a table has is kept, so it cannot outgrow the tables. */
const WALLS: Readonly<Record<UnitSystem, Map<string, Map<Nps, PipeWall>>>> = { imperial: new Map(), metric: new Map() };

function tabulatedWall(nps: Nps, schedule: string, units: UnitSystem): PipeWall | null {
  const odMm = pipeOdMm(nps, units);
  const row = wallRow(nps, schedule);
  if (odMm === null || !row) return null;
  const wallMm = units === "metric" ? row.mm : inchesMm(row.inches);
  const kgPerM = Math.PI * (odMm - wallMm) * wallMm * STEEL_KG_PER_MM3 * 1000;
  return { odMm, wallMm, kgPerM, source: row.source, fromMemory: row.fromMemory };
}

interface WallRow {
  readonly inches: number;
  readonly mm: number;
  readonly source: string;
  readonly fromMemory: Memory;
}

function wallRow(nps: Nps, schedule: string): WallRow | null {
  const column = PIPE_WALLS.find((c) => c.schedule === schedule);
  const read = column?.walls.find(([size]) => size === nps);
  if (column && read) return { inches: read[1], mm: read[2], source: `${column.standard}, ${PIPE_SOURCE}`, fromMemory: PIPE_MEMORY };
  const row = REMEMBERED_WALLS.find((r) => r[1] === schedule && r[2] === nps);
  return row ? { inches: row[3], mm: row[4], source: `${row[0]} (from memory)`, fromMemory: "yes" } : null;
}

/** Schedules a size comes in, thin to thick by name. */
export function schedulesFor(nps: Nps): readonly string[] {
  return SCHEDULE_ORDER.filter((schedule) => wallRow(nps, schedule) !== null);
}

/** Pipe sizes the tables hold, small to large. */
export function pipeSizes(): readonly Nps[] {
  return NPS_SIZES.filter((nps) => pipeSize(nps) !== null);
}

/** How far an eccentric reducer shifts the centre line, mm: half the difference of the outside diameters. Null when a size is unknown. */
export function reducerShiftMm(largeNps: Nps, smallNps: Nps, units: UnitSystem): number | null {
  const large = pipeOdMm(largeNps, units);
  const small = pipeOdMm(smallNps, units);
  return large === null || small === null ? null : (large - small) / 2;
}

/**
 * Weight of a long-radius 90 where a table gives one (walls equal to STD or XS), kg; null for everything else, which the
 * sheet then counts as unweighed.
 */
export function elbowWeightKg(elbow: string, nps: Nps, schedule: string): { readonly kg: number; readonly source: string } | null {
  if (elbow !== "lr-90") return null;
  const wall = pipeWall(nps, schedule, "imperial")?.wallMm;
  if (wall === undefined) return null;
  for (const name of ["STD", "XS"] as const) {
    if (pipeWall(nps, name, "imperial")?.wallMm !== wall) continue;
    const row = ELBOW_POUNDS[name].find(([size]) => size === nps);
    if (row) return { kg: row[1] * KG_PER_POUND, source: ELBOW_WEIGHT_SOURCE };
  }
  return null;
}
