/** A large stored file as an answer: streamed, in whole or in part, never in memory. */
import { refuseNotFound } from "./errors";
import { openStored } from "./storage-files";

interface Stored {
  readonly objectKey: string;
  readonly bytes: number;
  readonly sha256: string;
  readonly fileName: string;
  readonly type: string;
}

/** One range, from a byte on or the last so many (RFC 9110, 14.1.2). Anything else is answered with the whole file, as the RFC allows. */
const ONE_RANGE = /^bytes=(\d+-\d*|-\d+)$/;

/** Name, size and hash without the file. */
export function packageHead(stored: Stored): Response {
  return new Response(null, { headers: { ...headersOf(stored), "content-length": String(stored.bytes) } });
}

/**
 * The file, or the part of it that is asked for.
 * @param taken notes that it is taken, before the first byte goes out; told whether this is a beginning or goes on from an earlier part.
 */
export async function openPackage(stored: Stored, request: Request, taken: (isBeginning: boolean) => Promise<void>): Promise<Response> {
  const asked = request.headers.get("range");
  const isSame = [null, `"${stored.sha256}"`].includes(request.headers.get("if-range"));
  const range = asked !== null && isSame && ONE_RANGE.test(asked) ? asked : null;
  const opened = await openStored(stored.objectKey, range, request.signal);
  if (opened === null) throw refuseNotFound();
  if (opened === "unsatisfiable") return new Response(null, { status: 416, headers: { ...headersOf(stored), "content-range": `bytes */${stored.bytes}` } });
  try {
    await taken(opened.range === null || opened.range.startsWith("bytes 0-"));
  } catch (error) {
    await opened.body.cancel();
    throw error;
  }
  const part: Record<string, string> = opened.range === null ? {} : { "content-range": opened.range };
  return new Response(opened.body, { status: opened.range === null ? 200 : 206, headers: { ...headersOf(stored), ...part, "content-length": String(opened.bytes) } });
}

function headersOf({ fileName, type, sha256 }: Stored): Record<string, string> {
  const plain = fileName.replace(/[^A-Za-z0-9._ -]/g, "-");
  return {
    "content-type": type,
    "content-disposition": `attachment; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(fileName)}`,
    "accept-ranges": "bytes",
    etag: `"${sha256}"`,
    "cache-control": "private, no-store",
    "x-content-type-options": "nosniff",
  };
}
