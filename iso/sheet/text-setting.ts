/** Breaking text into lines of a measured width. Text is never shrunk: it wraps, or is cut with an ellipsis and reported. */
import type { Face, MeasureText } from "../draw/drawing-types";
import { BASELINE_PER_CAP, PITCH_PER_CAP, TEXT_CAP } from "./sheet-size";

export interface Lettering {
  readonly capMm: number;
  readonly face: Face;
}

export const PLAIN: Lettering = { capMm: TEXT_CAP, face: "regular" };
export const BOLD: Lettering = { capMm: TEXT_CAP, face: "bold" };

/** Height of so many lines at a capital height, mm. */
export function linesHeight(lines: number, capMm: number = TEXT_CAP): number {
  return lines * capMm * PITCH_PER_CAP;
}

/** Baseline of a line (0 first) below the top of its block, mm. */
export function baselineOf(line: number, capMm: number = TEXT_CAP): number {
  return capMm * (BASELINE_PER_CAP + line * PITCH_PER_CAP);
}

/** Spaces and controls as single spaces; line breaks kept where asked. */
export function cleanText(text: string): string {
  return text.normalize("NFC").replace(/[\p{Cc}\p{Zl}\p{Zp}\s]+/gu, " ").trim();
}

/**
 * Lines no wider than the width, broken at spaces, or within a word that is wider than a whole line. Line breaks in the
 * text are kept. A width smaller than one character still gives one character a line.
 */
export function wrapText(text: string, widthMm: number, lettering: Lettering, measure: MeasureText): string[] {
  return text.split(/\r\n|\r|\n/).flatMap((paragraph) => wrapParagraph(cleanText(paragraph), widthMm, lettering, measure));
}

function wrapParagraph(text: string, widthMm: number, lettering: Lettering, measure: MeasureText): string[] {
  const fits = (line: string) => measure(line, lettering.capMm, lettering.face) <= widthMm;
  const lines: string[] = [];
  let line = "";
  for (const word of wordsOf(text)) {
    const longer = line === "" ? word : `${line} ${word}`;
    if (fits(longer)) {
      line = longer;
      continue;
    }
    if (line !== "") lines.push(line);
    const parts = breakWord(word, fits);
    lines.push(...parts.slice(0, -1));
    line = parts.at(-1) ?? "";
  }
  return [...lines, line];
}

/** Words that stay whole on a line: a fraction stays with its inches, since "35" at a line's end reads as a length of its own. */
function wordsOf(text: string): string[] {
  const words: string[] = [];
  for (const word of text.split(" ")) {
    const before = words.at(-1);
    if (before !== undefined && FRACTION.test(word) && /\d$/.test(before)) words.splice(-1, 1, `${before} ${word}`);
    else words.push(word);
  }
  return words;
}

const FRACTION = /^\d+\/\d/;

/** Parts of a word that each fit a line. */
function breakWord(word: string, fits: (line: string) => boolean): string[] {
  if (fits(word)) return [word];
  const parts: string[] = [];
  let part = "";
  for (const character of word) {
    if (part !== "" && !fits(part + character)) {
      parts.push(part);
      part = "";
    }
    part += character;
  }
  return [...parts, part];
}

export interface FittedText {
  readonly lines: readonly string[];
  /** True when the text was cut and must be shown whole elsewhere. */
  readonly cut: boolean;
}

/** At most so many lines; what does not fit ends in an ellipsis and is reported as cut. */
export function fitText(text: string, widthMm: number, maxLines: number, lettering: Lettering, measure: MeasureText): FittedText {
  const lines = wrapText(text, widthMm, lettering, measure);
  if (lines.length <= maxLines) return { lines, cut: false };
  const kept = lines.slice(0, maxLines);
  const characters = [...(kept.at(-1) ?? "")];
  while (characters.length > 0 && measure(`${characters.join("")}…`, lettering.capMm, lettering.face) > widthMm) characters.pop();
  return { lines: [...kept.slice(0, -1), `${characters.join("").trimEnd()}…`], cut: true };
}
