/** A line's other unit system: typed texts are never converted; either the lengths stay or the numbers do. Pure. */
import { formatDecimal, INCH_MM, parseLength, type Entry, type Offset, type Point, type RunDocument, type UnitSystem } from "@/iso";
import { refused, understood, type EntryResult } from "./entry-result";

/** same-lengths: the pipe does not change, texts get their unit. same-numbers: the texts are read again in the new unit. */
export type UnitMeaning = "same-lengths" | "same-numbers";

/** Two lengths agree within this, mm: float noise only. */
const EXACT_MM = 0.000_05;

class Unreadable extends Error {}

/** The document with its settings' units changed and every entry dealt with; a text that has no meaning there is named. */
export function withUnits(document: RunDocument, units: UnitSystem, meaning: UnitMeaning): EntryResult<RunDocument> {
  const from = document.settings.units;
  const entry = (value: Entry, row: number): Entry => (meaning === "same-lengths" ? named(value, from, units) : readAgain(value, units, row));
  try {
    const runs = document.runs.map((run) => ({ ...run, points: run.points.map((point, i) => withEntries(point, (each) => entry(each, i + 1))) }));
    return understood({ ...document, runs, settings: { ...document.settings, units } }, "");
  } catch (error) {
    if (error instanceof Unreadable) return refused(error.message);
    throw error;
  }
}

function withEntries(point: Point, entry: (value: Entry) => Entry): Point {
  const { offset, provenance } = point;
  const next: Offset = offset.kind === "polar" || offset.kind === "slope" ? { ...offset, length: entry(offset.length) } : { ...offset, e: entry(offset.e), n: entry(offset.n), u: entry(offset.u) };
  return { ...point, offset: next, provenance: { ...provenance, second: provenance.second ? entry(provenance.second) : null } };
}

/** Keeps the length and gives the text its unit where the new system would read it otherwise. */
function named({ text, mm }: Entry, from: UnitSystem, to: UnitSystem): Entry {
  if (text.trim() === "" || mm === 0) return { text, mm };
  const spoken = from === "imperial" ? [text, `${text}"`, `${formatDecimal(mm / INCH_MM, 6)}"`] : [text, `${text}mm`];
  const kept = [...spoken, `${formatDecimal(mm, 4)}mm`].find((words) => {
    const read = parseLength(words, to);
    return read.ok && Math.abs(read.mm - mm) < EXACT_MM;
  });
  return { text: kept ?? text, mm };
}

function readAgain({ text, mm }: Entry, units: UnitSystem, row: number): Entry {
  if (text.trim() === "") return { text, mm };
  const read = parseLength(text, units);
  if (!read.ok) throw new Unreadable(`Row ${row}: ${read.message} Nothing was changed.`);
  return { text, mm: read.mm };
}
