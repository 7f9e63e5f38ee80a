/** The catalogue's take-outs as the shop reads them, each with the shop's own word. */
import {
  catalogueKeys,
  catalogueValue,
  catalogueWords,
  formatTerm,
  type TakeOutWord,
  type UnitSystem,
} from "@/iso";

export interface TakeOutRow {
  readonly key: string;
  readonly words: string;
  /** What cut lists take, in the shop's units. */
  readonly value: string;
  /** What the table says, in the shop's units. */
  readonly tableValue: string;
  /** The standard, and whether its number is from memory. */
  readonly standard: string;
  /** Where the table's number was read. */
  readonly source: string;
  readonly fromMemory: boolean;
  readonly word: TakeOutWord | null;
}

/** Every take-out of the tables in the shop's units, in table order. */
export function takeOutRows(words: readonly TakeOutWord[], units: UnitSystem): readonly TakeOutRow[] {
  return catalogueKeys().flatMap((key) => {
    const value = catalogueValue(key, units, words);
    if (!value) return [];
    const table = catalogueValue(key, units, []) ?? value;
    const word = words.findLast((one) => one.key === key) ?? null;
    return [
      {
        key,
        words: catalogueWords(key),
        value: formatTerm(value.mm, units),
        tableValue: formatTerm(table.mm, units),
        standard: standardOf(table.source),
        source: table.source,
        fromMemory: value.fromMemory === "yes",
        word,
      },
    ];
  });
}

/** "ASME B16.9" of "ASME B16.9 (two catalogs)"; a remark about memory stays. */
function standardOf(source: string): string {
  return /from memory/.test(source) ? source : source.replace(/ *\(.*$/, "");
}
