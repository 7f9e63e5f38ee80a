/** What pdf-parse, a reader that shares nothing with our writer, finds on each page. */
import { PDFParse } from "pdf-parse";

/** The text of each page, in order. */
export async function pagesText(bytes: Uint8Array): Promise<string[]> {
  const parser = new PDFParse({ data: new Uint8Array(bytes) });
  try {
    return (await parser.getText()).pages.map((page) => page.text);
  } finally {
    await parser.destroy();
  }
}
