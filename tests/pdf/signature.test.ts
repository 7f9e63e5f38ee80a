/** The shop's signature on a sheet, as other programs read it. */
import { createHash } from "node:crypto";
import { PDFParse } from "pdf-parse";
import { PDFDocument } from "pdf-lib";
import { beforeAll, describe, expect, it } from "vitest";
import { buildModel, composeSheet, formatInches, type SheetPage } from "@/iso";
import { measureText } from "@/fonts/widths";
import { certificateFacts } from "@/lib/server/certificate-facts";
import { makeP12, openP12 } from "@/lib/server/p12";
import { markCopy } from "@/pdf/mark-copy";
import { paintSheet } from "@/pdf/paint-sheet";
import { isIssuerKept, signatureRoom, signSheet, type SigningKey } from "@/pdf/sign-sheet";
import { uploadedP12 } from "../p12-files";
import { pdfsig, qpdfFindings } from "./pdf-tools";
import { pdfText } from "./poppler";
import { sampleInput } from "./sheet-inputs";
import { xmlDocument } from "../database/xml-check";

const SIGNED_AT = new Date("2025-04-14T15:20:00Z");
const HEAD = `41:${"c0de".repeat(16)}`;
let key: SigningKey;

beforeAll(async () => {
  const { p12, password } = await makeP12("Łódź Rohrbau & Söhne", SIGNED_AT);
  key = openP12(p12, password);
});

function signedInput(name: string) {
  const input = sampleInput(name, "letter", "for-fabrication");
  return { ...input, revision: { ...input.revision, checkedBy: "Łucja Öberg", checkedRole: "inspector", auditHead: HEAD, issuedAt: SIGNED_AT.toISOString() } };
}

/** Pages of a sample, composed once: what is tested here is done to them afterwards. */
function signedPages(name: string): readonly SheetPage[] {
  const known = composed.get(name) ?? composeSheet(signedInput(name), measureText);
  composed.set(name, known);
  return known;
}

const composed = new Map<string, readonly SheetPage[]>();

async function signedSheet(name = "firstRun", by: SigningKey = key): Promise<Uint8Array> {
  const input = signedInput(name);
  const signature = { name: certificateFacts(by.certificates).subject, reason: "Sheet 0007 revision B approved by Łucja Öberg (inspector)", signedAt: SIGNED_AT, roomBytes: signatureRoom(by) };
  const painted = await paintSheet({ pages: signedPages(name), issuedAt: input.revision.issuedAt, title: "0007 <A & B>", author: "A & B Piping", logo: null, keywords: HEAD, signature });
  return signSheet(painted, by, SIGNED_AT);
}

describe("a signed sheet", () => {
  it("is valid to pdfsig, whole, by the shop's name at the time of issue, and clean to qpdf", async () => {
    const bytes = await signedSheet();
    const said = pdfsig(bytes);
    expect(said).toContain("Signature Validation: Signature is Valid.");
    expect(said).toContain("Total document signed");
    expect(said).toContain("Signer Certificate Common Name: Łódź Rohrbau & Söhne");
    expect(said).toContain("Signature Type: adbe.pkcs7.detached");
    expect(said).toContain("Apr 14 2025");
    expect(qpdfFindings(bytes)).toBe("");
  });

  it("is not valid any more when one byte anywhere is another", async () => {
    const bytes = await signedSheet();
    // The hexadecimal room of the signature itself is left out: what lies in it is checked by the next test.
    const text = Buffer.from(bytes).toString("latin1");
    const [, one = 0, two = 0, three = 0] = (/\/ByteRange \[(\d+) (\d+) (\d+) (\d+)\]/.exec(text) ?? []).slice(1).map(Number);
    expect(two + three).toBe(bytes.length);
    for (const at of [two + 500, two + Math.floor(three / 3), two + Math.floor(three / 2), text.lastIndexOf(HEAD) + 5, one - 9]) {
      const altered = Uint8Array.from(bytes);
      altered[at] = altered[at]! ^ 1;
      expect(pdfsig(altered), `byte ${at}`).not.toContain("Signature is Valid");
    }
  });

  it("is not valid with another signature in it", async () => {
    const bytes = await signedSheet();
    const altered = Uint8Array.from(bytes);
    const at = Buffer.from(bytes).indexOf("/Contents <") + 11 + 2 * 300;
    altered[at] = altered[at] === 0x30 ? 0x31 : 0x30;
    expect(pdfsig(altered)).not.toContain("Signature is Valid");
  });

  it("has the log's head, the metadata and the sign-off within what is signed", async () => {
    const bytes = await signedSheet();
    const text = Buffer.from(bytes).toString("latin1");
    const [start = 0, end = 0] = (/\/ByteRange \[0 (\d+) (\d+) /.exec(text) ?? []).slice(1).map(Number);
    for (const at of [text.indexOf(HEAD), text.lastIndexOf(HEAD)]) expect(at < start || at > end).toBe(true);
    const printed = pdfText(bytes);
    for (const word of ["CHECKED AND SIGNED", "Łucja Öberg", "inspector", "C, 2025-04-14"]) expect(printed).toContain(word);
  });

  it("gives equal bytes for equal sheets and another signature for another certificate", async () => {
    const [one, two, other] = [await signedSheet(), await signedSheet(), await signedSheet("firstRun", openP12(uploadedP12({ password: "x" }), "x"))];
    expect(Buffer.compare(one, two)).toBe(0);
    expect(Buffer.compare(one, other)).not.toBe(0);
    expect(pdfsig(other)).toContain("Signature is Valid");
  });

  it("holds with a long key too", async () => {
    const long = openP12(uploadedP12({ password: "x", bits: 4096, commonName: "Ö".repeat(60) }), "x");
    expect(isIssuerKept(long)).toBe(true);
    expect(pdfsig(await signedSheet("firstRun", long))).toContain("Signature is Valid");
  });

  it("costs under 6 KB, and 20 KB a page hold", async () => {
    const input = signedInput("firstRun");
    const pages = signedPages("firstRun");
    const plain = await paintSheet({ pages, issuedAt: input.revision.issuedAt, title: "0007", logo: null });
    const signed = await signedSheet();
    expect(signed.length - plain.length).toBeLessThan(6 * 1024);
    expect(plain.length / pages.length).toBeLessThan(20 * 1024);
  });

  it("says every number of the cut list and every weld to pdf-parse", async () => {
    for (const name of ["firstRun", "branchWithReducer", "valveStation"]) {
      const input = signedInput(name);
      const model = buildModel(input.document, input.marks, input.takeOuts);
      const parser = new PDFParse({ data: await signedSheet(name) });
      const { text } = await parser.getText();
      await parser.destroy();
      const pieces = model.pieces.filter((piece) => piece.spool === input.spool);
      const welds = model.joints.filter((joint) => joint.number !== null && joint.spool === input.spool);
      expect(pieces.length * welds.length, name).toBeGreaterThan(0);
      for (const piece of pieces) {
        expect(text, `${name} piece ${piece.mark}`).toContain(formatInches(piece.cutLengthMm));
        expect(text, `${name} piece ${piece.mark}`).toContain(piece.mark);
      }
      const tokens = new Set(text.split(/\s+/));
      for (const weld of welds) expect(tokens.has(weld.number!), `${name} weld ${weld.number}`).toBe(true);
    }
  });
});

describe("the document around it", () => {
  it("has title, author, subject and dates, a section a page, and an archive's metadata as well-formed XML", async () => {
    const bytes = await signedSheet();
    const text = Buffer.from(bytes).toString("latin1");
    const xml = Buffer.from(bytes).toString("utf8").match(/<x:xmpmeta[\s\S]*<\/x:xmpmeta>/)?.[0] ?? "";
    const metadata = await xmlDocument(xml);
    const value = (tag: string) => metadata.getElementsByTagName(tag)[0]?.textContent?.trim();
    expect([value("dc:title"), value("dc:creator"), value("xmp:ModifyDate"), value("pdf:Keywords")]).toEqual(["0007 <A & B>", "A & B Piping", "2025-04-14T15:20:00Z", HEAD]);
    expect([value("pdfaid:part"), value("pdfaid:conformance")]).toEqual(["2", "B"]);
    // ISO 19005-2 in outline: a colour profile, a file identifier, every face embedded, no encryption.
    expect(text).toContain("/GTS_PDFA1");
    expect(text).toMatch(/trailer[\s\S]*\/ID \[</);
    expect(text.match(/\/Type \/FontDescriptor/g)?.length).toBe(text.match(/\/FontFile2 /g)?.length);
    expect(text).not.toContain("/Encrypt");
    const document = await PDFDocument.load(bytes, { updateMetadata: false });
    expect(document.getTitle()).toBe("0007 <A & B>");
    expect(text.match(/\/S \/Sect/g)?.length).toBe(document.getPageCount());
    expect(text).toContain("/Marked true");
  });

  it("cannot be talked into signing elsewhere by a title", async () => {
    const input = signedInput("firstRun");
    const trap = "/ByteRange [0 /********** /********** /**********]";
    const signature = { name: trap, reason: trap, signedAt: SIGNED_AT, roomBytes: signatureRoom(key) };
    const painted = await paintSheet({ pages: signedPages("firstRun"), issuedAt: input.revision.issuedAt, title: trap, author: trap, logo: null, signature });
    expect(pdfsig(await signSheet(painted, key, SIGNED_AT))).toContain("Signature is Valid");
  });
});

describe("a marked copy of it", () => {
  it("carries no signature to break, and names the original by its SHA-256 on every page", async () => {
    const bytes = await signedSheet();
    const sha256 = createHash("sha256").update(bytes).digest("hex");
    const copy = await markCopy(bytes, { word: "SUPERSEDED", printedAt: "2025-06-02T14:10:31Z", printedBy: "Pat Ruiz", original: { sha256, signed: true } });
    expect(pdfsig(copy)).toContain("does not contain any signatures");
    expect(qpdfFindings(copy)).toBe("");
    expect(Buffer.from(copy).includes("adbe.pkcs7.detached")).toBe(false);
    const pages = (await PDFDocument.load(copy)).getPageCount();
    const text = pdfText(copy).replace(/\s+/g, "");
    expect(text.split(sha256).length - 1).toBe(pages);
    expect(text.split("theshop'ssignaturestayswiththesignedoriginal").length - 1).toBe(pages);
  });
});
