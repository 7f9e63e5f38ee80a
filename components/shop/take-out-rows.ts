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
  /** In the shop's units. */
  readonly value: string;
  readonly source: string;
  readonly fromMemory: boolean;
  readonly word: TakeOutWord | null;
}

/** Every take-out of the tables in the shop's units, in table order. */
export function takeOutRows(words: readonly TakeOutWord[], units: UnitSystem): readonly TakeOutRow[] {
  return catalogueKeys().flatMap((key) => {
    const value = catalogueValue(key, units, words);
    if (!value) return [];
    const word = words.findLast((one) => one.key === key) ?? null;
    return [
      {
        key,
        words: catalogueWords(key),
        value: formatTerm(value.mm, units),
        source: value.source,
        fromMemory: value.fromMemory === "yes",
        word,
      },
    ];
  });
}
