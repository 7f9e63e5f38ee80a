/** Each spool of the demo lines as the shop signs it: whole to pdfsig and qpdf, and every number of its lists there for pdf-parse. */
import { PDFParse } from "pdf-parse";
import { beforeAll, describe, expect, it } from "vitest";
import { measureText } from "@/fonts/widths";
import { buildModel, composeSheet, formatInches, formatTerm, type Piece, type SheetInput } from "@/iso";
import { makeP12, openP12 } from "@/lib/server/p12";
import { paintSheet } from "@/pdf/paint-sheet";
import { signatureRoom, signSheet, type SigningKey } from "@/pdf/sign-sheet";
import { demoSheetInput, demoSpools } from "@/scripts/gallery/demo-sheets";
import { pdfsig, qpdfFindings } from "./pdf-tools";

const SIGNED_AT = new Date("2026-11-16T15:20:00Z");
/** A key of 2 048 bits takes its time on a busy machine. */
const HOOK_MS = 120_000;
let key: SigningKey;

beforeAll(async () => {
  const { p12, password } = await makeP12("Demo shop", SIGNED_AT);
  key = openP12(p12, password);
}, HOOK_MS);

async function signedSheet(input: SheetInput): Promise<Uint8Array> {
  const signature = { name: "Demo shop", reason: "approved", signedAt: SIGNED_AT, roomBytes: signatureRoom(key) };
  const painted = await paintSheet({ pages: composeSheet(input, measureText), issuedAt: input.revision.issuedAt, title: input.document.number, logo: null, signature });
  return signSheet(painted, key, SIGNED_AT);
}

async function textOf(bytes: Uint8Array): Promise<string> {
  const parser = new PDFParse({ data: Uint8Array.from(bytes) });
  const { text } = await parser.getText();
  await parser.destroy();
  return text.replace(/\s+/g, " ");
}

/** The numbers of a piece's row: its cut length, rounded once, and each term of the sum. */
function rowNumbers({ units }: SheetInput, { cutLengthMm, terms }: Piece): string[] {
  const cut = units === "metric" ? String(Math.round(cutLengthMm)) : formatInches(cutLengthMm);
  return [cut, ...terms.map((term) => formatTerm(Math.abs(term.valueMm), units))];
}

/** Whether a number stands in a text by itself: "1/2" is not found in "37 1/2", nor "12" in "112" or "12 1/8". */
function says(text: string, number: string): boolean {
  const before = /^\d+\/\d+$/.test(number) ? "(?<![\\d.,/]|\\d )" : "(?<![\\d.,/])";
  return new RegExp(`${before}${number.replace(/[.*+?^${}()|[\]\\]/g, "\\$&")}(?![\\d/]|[.,]\\d| \\d+/\\d)`).test(text);
}

describe.each(demoSpools().map((spool) => [spool.name, spool] as const))("the signed sheet of %s", (_, spool) => {
  const input = demoSheetInput(spool, "tabloid", "for-fabrication");
  let bytes: Uint8Array;

  beforeAll(async () => {
    bytes = await signedSheet(input);
  }, HOOK_MS);

  it("is valid to pdfsig and clean to qpdf, and not valid with one byte changed", async () => {
    expect(pdfsig(bytes)).toContain("Signature Validation: Signature is Valid.");
    expect(qpdfFindings(bytes)).toBe("");
    const altered = Uint8Array.from(bytes);
    const at = Math.floor(bytes.length / 2);
    altered[at] = altered[at]! ^ 1;
    expect(pdfsig(altered)).not.toContain("Signature is Valid");
  });

  it("says every number of its cut list and weld list", async () => {
    const text = await textOf(bytes);
    const model = buildModel(input.document, input.marks, input.takeOuts);
    const pieces = model.pieces.filter((piece) => piece.spool === input.spool);
    const welds = model.joints.filter((joint) => joint.number !== null && joint.spool === input.spool);
    expect(pieces.length * welds.length).toBeGreaterThan(0);
    const owed = [...pieces.flatMap((piece) => [piece.mark, ...rowNumbers(input, piece)]), ...welds.map((weld) => weld.number!)];
    expect(owed.filter((number) => !says(text, number))).toEqual([]);
    for (const [numbers, number] of [["37 1/2", "1/2"], ["112", "12"], ["12 1/8", "12"], ["12.5", "12"]] as const) expect(says(`P1 ${numbers} in`, number), numbers).toBe(false);
  });
});
