/**
 * An invisible signature field with room for a signature that is put in afterwards. It is written with the rest of the
 * document, in one part: a field appended to a finished file leaves a cross-reference that checkers complain of.
 */

export interface SignatureFacts {
  /** Whose certificate it is: the shop's. */
  readonly name: string;
  /** Who signed what, in one sentence. */
  readonly reason: string;
  readonly signedAt: Date;
  /** Bytes kept free for the signature with its certificates. */
  readonly roomBytes: number;
}

interface Dictionaries {
  readonly _root: { readonly data: Record<string, unknown> };
  readonly page: { readonly dictionary: PDFKit.PDFKitReference };
  endAcroForm: () => void;
  ref(data: object): { end(): void };
}

/** What stands for each number until the finished bytes are known; ten digits are room enough. */
const UNKNOWN = "**********";
/** Annotation flags (ISO 32000-1, 12.5.3): bit 3 print, bit 8 locked. */
const PRINT_AND_LOCKED = 4 | 128;
/** Form flags (ISO 32000-1, 12.7.2): signatures exist, and the file is only to be appended to. */
const SIGNED_APPEND_ONLY = 3;

/** Adds the field to the document's present page. */
export function addSignatureField(document: PDFKit.PDFDocument, { name, reason, signedAt, roomBytes }: SignatureFacts): void {
  const raw = document as unknown as Dictionaries;
  const signature = raw.ref({
    Type: "Sig", Filter: "Adobe.PPKLite", SubFilter: "adbe.pkcs7.detached",
    ByteRange: [0, UNKNOWN, UNKNOWN, UNKNOWN],
    Contents: Buffer.alloc(roomBytes),
    Name: text(name), Reason: text(reason), M: signedAt,
  });
  signature.end();
  const widget = raw.ref({
    Type: "Annot", Subtype: "Widget", FT: "Sig", T: text("Shop signature"), V: signature, Rect: [0, 0, 0, 0], F: PRINT_AND_LOCKED, P: raw.page.dictionary,
  });
  widget.end();
  (raw.page as unknown as { annotations: unknown[] }).annotations.push(widget);
  const form = raw.ref({ SigFlags: SIGNED_APPEND_ONLY, Fields: [widget] });
  form.end();
  raw._root.data.AcroForm = form;
  // The form is complete; pdfkit's own finish would want a font for fields to type into.
  raw.endAcroForm = () => undefined;
}

/** pdfkit writes objects of String as text, plain strings as names. */
function text(value: string): object {
  return new String(withoutRoomWord(value));
}

/** The signer looks for its room by this word; nobody's title or name may pretend to be it. */
export function withoutRoomWord(value: string): string {
  return value.replaceAll("/ByteRange", "ByteRange");
}
