/** Which characters of a sheet paper cannot print: they show as a black diamond there. */
import type { SheetPage } from "@/iso";
import { printableText } from "@/fonts/printable";

/** Each replaced character once, in order of appearance; none when everything prints. */
export function unprintableCharacters(pages: readonly SheetPage[]): readonly string[] {
  const texts = pages.flatMap((page) => page.items.map((item) => (item.type === "text" ? item.text : "")));
  return [...new Set(texts.flatMap((text) => printableText(text).unknown))];
}
