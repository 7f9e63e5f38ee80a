/** A document's metadata as XML (XMP), beside its information dictionary: the same facts twice, for archives. */

interface WithMetadata {
  info: Record<string, unknown>;
  appendXML(xml: string, newline?: boolean): void;
  _addInfo(): void;
}

/** pdfkit writes names into the XML as they come, so that a shop called "A & B" breaks it; ours are escaped. */
export function escapeMetadata(document: PDFKit.PDFDocument): void {
  const raw = document as unknown as WithMetadata;
  raw._addInfo = () => raw.appendXML(metadataXml(raw.info));
}

function metadataXml(info: Readonly<Record<string, unknown>>): string {
  const of = (name: string) => escaped(String(info[name] ?? ""));
  const date = (name: string) => `${(info[name] as Date).toISOString().slice(0, 19)}Z`;
  const one = (tag: string, value: string) => (value === "" ? "" : `<${tag}>${value}</${tag}>`);
  const alternative = (tag: string, value: string) => (value === "" ? "" : `<${tag}><rdf:Alt><rdf:li xml:lang="x-default">${value}</rdf:li></rdf:Alt></${tag}>`);
  const creator = of("Author") === "" ? "" : `<dc:creator><rdf:Seq><rdf:li>${of("Author")}</rdf:li></rdf:Seq></dc:creator>`;
  return [
    `<rdf:Description rdf:about="" xmlns:xmp="http://ns.adobe.com/xap/1.0/" xmlns:dc="http://purl.org/dc/elements/1.1/" xmlns:pdf="http://ns.adobe.com/pdf/1.3/">`,
    one("xmp:CreateDate", date("CreationDate")), one("xmp:ModifyDate", date("ModDate")), one("xmp:CreatorTool", of("Creator")),
    alternative("dc:title", of("Title")), creator, alternative("dc:description", of("Subject")),
    one("pdf:Producer", of("Producer")), one("pdf:Keywords", of("Keywords")),
    "</rdf:Description>",
  ].join("");
}

const ENTITIES: Readonly<Record<string, string>> = { "&": "&amp;", "<": "&lt;", ">": "&gt;", '"': "&quot;" };

/** Characters XML cannot carry at all are left out. */
function escaped(text: string): string {
  return text.replace(/[\u0000-\u0008\u000b\u000c\u000e-\u001f\ufffe\uffff]/g, "").replace(/[&<>"]/g, (one) => ENTITIES[one] ?? one);
}
