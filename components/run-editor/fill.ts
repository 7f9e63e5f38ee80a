/** What fills the cells below: the same again, or a series that goes on (N1, N2, N3; e 1-0, e 2-0, e 3-0). Pure. */
import { parseLength, type UnitSystem } from "@/iso";
import { lengthEntryText } from "@/components/jobs/settings-text";
import type { Column } from "./cell-commit";

/** Equal steps agree within this, mm: float noise of lengths typed to a fraction of an inch. */
const STEP_AGREES_MM = 0.001;

/** The texts below `seeds` (the cells at the top, in order). Copies them in turn. */
export function filledDown(seeds: readonly string[], count: number): readonly string[] {
  return Array.from({ length: count }, (_, n) => seeds[n % seeds.length] ?? "");
}

/**
 * The texts that go on from `seeds`: a number at the end of a name counts on, lengths with one direction and equal steps
 * go on by that step; what is neither is copied.
 */
export function filledSeries(seeds: readonly string[], count: number, column: Column, units: UnitSystem): readonly string[] {
  const series = column === "move" ? lengthSeries(seeds, units) : nameSeries(seeds);
  return series ? Array.from({ length: count }, (_, n) => series(n + 1)) : filledDown(seeds, count);
}

type Series = (beyond: number) => string;

/** "nozzle N1", "PS-07": the letters stay, the number counts on and keeps its width. */
function nameSeries(seeds: readonly string[]): Series | null {
  const parts = seeds.map((seed) => /^(.*?[A-Za-z][-_ ]?)(\d{1,6})$/.exec(seed.trim()));
  const last = parts[parts.length - 1];
  const numbers = parts.map((part) => Number(part?.[2]));
  if (!last || parts.some((part) => part?.[1] !== last[1]) || /^(?:wn|so|swf|thf|lj|blind|gate|globe|check|ball|bfly|tee|cross|outlet|stub|red|ecc|meet|miter|bend) $/i.test(last[1] ?? "")) return null;
  const step = numbers.length > 1 ? (numbers[1] ?? 0) - (numbers[0] ?? 0) : 1;
  if (numbers.some((value, i) => i > 0 && value - (numbers[i - 1] ?? 0) !== step)) return null;
  const end = numbers[numbers.length - 1] ?? 0;
  return (beyond) => `${last[1]}${String(Math.max(0, end + step * beyond)).padStart(last[2]?.length ?? 1, "0")}`;
}

/** "e 1-0", "e 2-0": one direction, lengths in equal steps. A single length is copied, since no step is known. */
function lengthSeries(seeds: readonly string[], units: UnitSystem): Series | null {
  const parts = seeds.map((seed) => /^([a-z]+|[a-z]\d+[a-z])\s*(-?[\d.].*)$/i.exec(seed.trim()));
  const lengths = parts.map((part) => parseLength(part?.[2] ?? "", units));
  const direction = parts[0]?.[1]?.toLowerCase();
  if (seeds.length < 2 || !direction || parts.some((part) => part?.[1]?.toLowerCase() !== direction)) return null;
  const mm = lengths.map((length) => (length.ok ? length.mm : NaN));
  const step = (mm[1] ?? NaN) - (mm[0] ?? NaN);
  if (mm.some((value, i) => i > 0 && !(Math.abs(value - (mm[i - 1] ?? NaN) - step) < STEP_AGREES_MM))) return null;
  const end = mm[mm.length - 1] ?? 0;
  return (beyond) => `${direction} ${lengthEntryText(end + step * beyond, units)}`;
}
