/** Every take-out of the tables under its key, put together once from the tables of the standards. */
import { buttWeldEntries } from "./entries-butt-weld";
import { flangeEntries, valveEntries } from "./entries-bolted";
import { forgedEntries } from "./entries-forged";
import type { Entry } from "./entry";

let cached: ReadonlyMap<string, Entry> | null = null;

/** The table of tables; the same object on every call. */
export function catalogueEntries(): ReadonlyMap<string, Entry> {
  cached ??= new Map([...buttWeldEntries(), ...flangeEntries(), ...valveEntries(), ...forgedEntries()].map((e) => [e.key, e]));
  return cached;
}
