/** Whether a text is well-formed XML, asked of a parser that is not ours. */

interface Parser {
  readonly JSDOM: new (text: string, options: { readonly contentType: string }) => { readonly window: { readonly document: Document } };
}

/** A document read as XML. @throws when it is not well-formed. */
export async function xmlDocument(text: string): Promise<Document> {
  const name: string = "jsdom";
  const { JSDOM } = (await import(name)) as Parser;
  return new JSDOM(text, { contentType: "application/xml" }).window.document;
}

/** @returns null when it is a well-formed SVG, else the parser's words. */
export async function svgFault(text: string): Promise<string | null> {
  // The package brings no types of its own.
  const name: string = "jsdom";
  const { JSDOM } = (await import(name)) as Parser;
  try {
    const { documentElement } = new JSDOM(text, { contentType: "image/svg+xml" }).window.document;
    return documentElement.nodeName === "svg" ? null : documentElement.nodeName;
  } catch (error) {
    return error instanceof Error ? error.message : "not XML";
  }
}
