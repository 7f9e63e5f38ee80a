/** The mark of a copy as drawing in a package's faces: the same words at the same places as on a sheet that is marked by itself. */
import { EM_PER_CAPITAL, measureText } from "@/fonts/widths";
import { printableText } from "@/fonts/printable";
import { FACE_KEYS, sharedCode, type FaceUse } from "./join-faces";
import { ACROSS, acrossPlaces, FOOT_BASELINE, FOOT_CAP, FOOT_LEFT, footLine, MARGIN_BASELINES, MARGIN_BOTTOM, marginLines, type CopyMark } from "./mark-copy";

const POINTS_PER_MM = 72 / 25.4;
const INK = "0.07 0.07 0.07";
const CAPITAL_OF_EM = 1 / EM_PER_CAPITAL;

/** What see-through drawing is called among a page's resources, with how much it covers. */
export const VEILS: Readonly<Record<string, number>> = { VT: ACROSS.text, VL: ACROSS.line };

/** Operators that draw the mark on a page of this size, points. */
export function stampText(mark: CopyMark, width: number, height: number, use: FaceUse): string {
  const size = FOOT_CAP * EM_PER_CAPITAL * POINTS_PER_MM;
  const foot = footLine(mark, width / POINTS_PER_MM, (line) => measureText(line, FOOT_CAP, "bold"));
  const [head, hash] = marginLines(mark.original);
  const up = MARGIN_BASELINES.map((mm) => [mm * POINTS_PER_MM, MARGIN_BOTTOM * POINTS_PER_MM] as const);
  return [
    "/Artifact BMC q",
    `${INK} rg ${INK} RG`,
    mark.word === null ? "" : across(mark.word, width, height, use),
    setText(foot, size, 0, [FOOT_LEFT * POINTS_PER_MM, FOOT_BASELINE * POINTS_PER_MM], use),
    setText(head, size, Math.PI / 2, up[0]!, use),
    setText(hash, size, Math.PI / 2, up[1]!, use),
    "Q EMC",
  ].join("\n");
}

function across(word: string, width: number, height: number, use: FaceUse): string {
  const { size, slope, text, lines } = acrossPlaces(width, height, measureText(word, CAPITAL_OF_EM, "bold"));
  const drawn = lines.map(([from, to]) => `${short(from[0])} ${short(from[1])} m ${short(to[0])} ${short(to[1])} l S`);
  return ["q /VT gs", setText(word, size, slope, text, use), "Q", `q /VL gs ${ACROSS.thickness} w`, ...drawn, "Q"].join("\n");
}

function setText(text: string, size: number, slope: number, at: readonly [number, number], use: FaceUse): string {
  const codes = [...printableText(text).text].map((character) => sharedCode("bold", character.codePointAt(0)!, use)).join("");
  const matrix = [Math.cos(slope), Math.sin(slope), -Math.sin(slope), Math.cos(slope), ...at].map(short).join(" ");
  return `BT /${FACE_KEYS.bold} ${short(size)} Tf ${matrix} Tm <${codes}> Tj ET`;
}

/** Four decimals of a point are far below what a printer shows. */
function short(value: number): string {
  return String(Math.round(value * 1e4) / 1e4);
}
