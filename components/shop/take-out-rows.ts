/** The catalogue's take-outs as the shop reads them, each with the shop's own word; and what no table has. */
import {
  catalogueKeys,
  catalogueValue,
  catalogueWords,
  formatTerm,
  formatWeight,
  isWeightKey,
  missingKeys,
  weightKeys,
  type TakeOutWord,
  type UnitSystem,
} from "@/iso";

export interface TakeOutRow {
  readonly key: string;
  readonly words: string;
  /** What cut lists take, in the shop's units; "" when nobody has it yet. */
  readonly value: string;
  /** What the table says, in the shop's units; "" when no table has it. */
  readonly tableValue: string;
  /** The standard, and whether its number is from memory. */
  readonly standard: string;
  /** Where the table's number was read. */
  readonly source: string;
  readonly fromMemory: boolean;
  /** A length in no table, or a part's weight, which only the shop can tell. */
  readonly kind: "table" | "missing" | "weight";
  readonly word: TakeOutWord | null;
}

/** Every take-out in the shop's units: the tables' in table order, then what they lack, then weights. */
export function takeOutRows(words: readonly TakeOutWord[], units: UnitSystem): readonly TakeOutRow[] {
  const listed = [...missingKeys(), ...weightKeys()];
  const known = new Set([...catalogueKeys(), ...listed]);
  const others = [...new Set(words.map((word) => word.key))].filter((key) => !known.has(key));
  return [
    ...catalogueKeys().flatMap((key) => tableRow(key, words, units)),
    ...[...listed, ...others].map((key) => openRow(key, words, units)),
  ];
}

function wordOn(key: string, words: readonly TakeOutWord[]): TakeOutWord | null {
  return words.findLast((one) => one.key === key) ?? null;
}

function tableRow(key: string, words: readonly TakeOutWord[], units: UnitSystem): TakeOutRow[] {
  const value = catalogueValue(key, units, words);
  if (!value) return [];
  const table = catalogueValue(key, units, []) ?? value;
  return [
    {
      key,
      words: catalogueWords(key),
      value: formatTerm(value.mm, units),
      tableValue: formatTerm(table.mm, units),
      standard: standardOf(table.source),
      source: table.source,
      fromMemory: value.fromMemory === "yes",
      kind: "table",
      word: wordOn(key, words),
    },
  ];
}

/** A row no table fills: what the shop said, or nothing yet. */
function openRow(key: string, words: readonly TakeOutWord[], units: UnitSystem): TakeOutRow {
  const word = wordOn(key, words);
  const own = word?.valueMm ?? null;
  return {
    key,
    words: catalogueWords(key),
    value: own === null ? "" : isWeightKey(key) ? formatWeight(own, units) : formatTerm(own, units),
    tableValue: "",
    standard: "no table",
    source: "",
    fromMemory: false,
    kind: isWeightKey(key) ? "weight" : "missing",
    word,
  };
}

/** "ASME B16.9" of "ASME B16.9 (two catalogs)"; a remark about memory stays. */
function standardOf(source: string): string {
  return /from memory/.test(source) ? source : source.replace(/ *\(.*$/, "");
}

/**
 * A typed weight in kilograms: a bare number is in the shop's own unit (pounds or kilograms), "12 kg" and "12 lb" say so.
 * Null when it is none.
 */
export function parseWeightKg(text: string, units: UnitSystem): number | null {
  const parts = /^(\d+(?:\.\d+)?) *(kg|lb|lbs)?$/i.exec(text.trim());
  if (!parts) return null;
  const unit = (parts[2] ?? (units === "metric" ? "kg" : "lb")).toLowerCase();
  const kg = Number(parts[1]) * (unit === "kg" ? 1 : KG_PER_POUND);
  return kg > 0 ? kg : null;
}

const KG_PER_POUND = 0.45359237;
