/**
 * Which characters paper can print. Text on a sheet is set one glyph per character at the advances of the width table:
 * no kerning, no ligatures, no shaping, so that measuring and painting agree to the last unit. Fractions are therefore
 * printed plain, as 1/2, and a fraction slash (U+2044) becomes a slash: shaped, it would be 27 % narrower than measured.
 * What has no glyph is replaced by something a reader notices, and reported.
 */
import { REGULAR_RUNS } from "./width-table";

/** Stands for a character that no face has: a black diamond with a question mark. */
export const SUBSTITUTE = "\uFFFD";

/** Same meaning in characters the faces have. "" = leaves no trace on paper (joiners, direction marks, soft hyphens). */
const EQUIVALENTS: Readonly<Record<string, string>> = {
  "\u00A0": " ", "\u202F": " ", "\u3000": " ", "\t": " ", "\n": " ", "\r": " ", "\u2028": " ", "\u2029": " ",
  "\u2044": "/", "\u2215": "/", "\u2300": "Ø", "\u2205": "Ø", "\u2220": "angle ", "\u2010": "-", "\u2011": "-", "\u2012": "-",
  "\u02C9": "\u00AF", "\u2206": "\u0394", "\u2126": "\u03A9", "\u2153": "1/3", "\u2154": "2/3", "\u2192": "->", "\u2190": "<-", "\u2191": "^", "\u2193": "v", "\u2194": "<->",
  "\u00AD": "", "\uFEFF": "", "\u200B": "", "\u200C": "", "\u200D": "", "\u200E": "", "\u200F": "", "\u2060": "",
  "\uFE0E": "", "\uFE0F": "", "\u02BA": '"', "\u02B9": "'", "\u301D": '"', "\u301E": '"', "\uFF02": '"', "\uFF07": "'",
};

const PRINTABLE: ReadonlySet<string> = new Set(
  REGULAR_RUNS.flatMap((run) => run.slice(1).map((_, index) => String.fromCodePoint(run[0]! + index))),
);

export interface PrintableText {
  readonly text: string;
  /** Characters that were replaced by the substitute, each once, in order of appearance. */
  readonly unknown: readonly string[];
}

/** True for one character (code point) that every face on paper has. */
export function isPrintable(character: string): boolean {
  return PRINTABLE.has(character);
}

/** Every character that every face on paper has, for tests that try them all. */
export function printableCharacters(): readonly string[] {
  return [...PRINTABLE];
}

/**
 * Text as paper can print it: composed (NFC), look-alikes and spaces made plain, the rest of what has no glyph replaced
 * by the substitute and listed. Line breaks become spaces: whoever sets lines splits them before. Never throws.
 */
export function printableText(text: string): PrintableText {
  if (/^[ -~]*$/.test(text)) return { text, unknown: [] };
  const unknown = new Set<string>();
  let result = "";
  for (const character of text.normalize("NFC")) {
    if (PRINTABLE.has(character)) result += character;
    else result += EQUIVALENTS[character] ?? spaceOrSubstitute(character, unknown);
  }
  return { text: result, unknown: [...unknown] };
}

/** Typographic spaces of any width print as one space; controls print nothing. */
function spaceOrSubstitute(character: string, unknown: Set<string>): string {
  if (/^[\u2000-\u200A]$/.test(character)) return " ";
  if (/^\p{Cc}$/u.test(character)) return "";
  unknown.add(character);
  return SUBSTITUTE;
}
