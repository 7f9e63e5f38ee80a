/** Which characters of a sheet paper cannot print: they show as a black diamond there, and the page says so above its frame. */
import type { SheetPage, TextItem } from "@/iso";
import { printableText, SUBSTITUTE } from "@/fonts/printable";

/** Each replaced character once, in order of appearance; none when everything prints. */
export function unprintableCharacters(pages: readonly SheetPage[]): readonly string[] {
  const texts = pages.flatMap((page) => page.items.map((item) => (item.type === "text" ? item.text : "")));
  return [...new Set(texts.flatMap((text) => printableText(text).unknown))];
}

/** In the margin above the frame, where nothing else stands and printers reach, mm. */
const NOTE_AT = [20, 7.6] as const;
const NOTE_CAP_MM = 2.5;
/** More of them are counted, not named. */
const MOST_NAMED = 8;

/** What a page says of characters it could not print, by their Unicode numbers; null when all of them print. */
export function unprintableNote(page: SheetPage): TextItem | null {
  const unknown = unprintableCharacters([page]);
  if (unknown.length === 0) return null;
  const named = unknown.slice(0, MOST_NAMED).map((character) => `U+${character.codePointAt(0)!.toString(16).toUpperCase().padStart(4, "0")}`);
  const more = unknown.length > MOST_NAMED ? ` and ${unknown.length - MOST_NAMED} more` : "";
  const text = `NOT PRINTED HERE, shown as ${SUBSTITUTE}: ${named.join(", ")}${more}. These letters are not in the sheet's typeface.`;
  return { type: "text", layer: "caution", ref: null, at: NOTE_AT, text, anchor: "start", capMm: NOTE_CAP_MM, face: "bold", rotateRad: 0, ink: "ink" };
}
