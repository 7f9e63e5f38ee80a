import { printableText, SUBSTITUTE } from "@/fonts/printable";

/** Says which characters of a text the faces on paper do not have, at most a few of them; undefined when all print. */
export function missingGlyphs(text: string): string | undefined {
  const { unknown } = printableText(text);
  if (unknown.length === 0) return undefined;
  const shown = unknown.slice(0, 6).join(" ");
  return `Paper cannot print ${shown}${unknown.length > 6 ? " and others" : ""}; each shows as ${SUBSTITUTE}. Use Latin, Greek or Cyrillic letters.`;
}
