import type { SheetSize } from "@/iso";

/** Sheet sizes in words, in the order they are offered. */
export const SHEET_WORDS: Readonly<Record<SheetSize, string>> = {
  letter: "Letter 8 1/2 x 11 in",
  tabloid: "Tabloid 11 x 17 in",
  A4: "A4",
  A3: "A3",
};

export const SHEET_OPTIONS = (Object.keys(SHEET_WORDS) as SheetSize[]).map((value) => ({
  value,
  label: SHEET_WORDS[value],
}));
