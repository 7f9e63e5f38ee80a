/** Reads what a request carries, within limits, and checks it: a refusal names the field, never the parser. */
import type { z } from "zod";
import { refuseInvalid, refuseTooLarge, refuseType } from "./errors";

/** One uploaded file, in memory. */
export interface SentFile {
  readonly name: string;
  readonly bytes: Uint8Array;
}

/** What the parts of a multipart body add to the file itself. */
const MULTIPART_ROOM = 16 * 1024;
const NAME_MAX = 200;

/** JSON of a request, or an empty object when a DELETE carries nothing. @throws Refusal 400, 413, 415. */
export async function jsonBody(request: Request, maxBytes: number): Promise<unknown> {
  const type = request.headers.get("content-type");
  if (type === null && request.method === "DELETE") return {};
  if (type === null || !/^application\/json\s*(;|$)/i.test(type)) throw refuseType("Send JSON: content-type application/json.");
  const text = decodeText(await bytesWithin(request, maxBytes));
  if (text.includes("\\u0000") || text.includes("\u0000")) throw refuseInvalid("Leave out control characters.");
  return parseJson(text);
}

function decodeText(bytes: Uint8Array): string {
  try {
    return new TextDecoder("utf-8", { fatal: true }).decode(bytes);
  } catch {
    throw refuseInvalid("That is not readable text.");
  }
}

function parseJson(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    throw refuseInvalid("That is not readable JSON.");
  }
}

/** Reads a body up to a limit; what lies beyond is not read. @throws Refusal 413. */
export async function bytesWithin(request: Request, maxBytes: number): Promise<Uint8Array> {
  const said = Number(request.headers.get("content-length") ?? "0");
  if (said > maxBytes) throw tooLarge(maxBytes);
  if (request.body === null) return new Uint8Array();
  const reader = request.body.getReader();
  const parts: Uint8Array[] = [];
  let total = 0;
  for (;;) {
    const { done, value } = await reader.read();
    if (done) break;
    total += value.length;
    if (total > maxBytes) {
      void reader.cancel().catch(() => undefined);
      throw tooLarge(maxBytes);
    }
    parts.push(value);
  }
  return joined(parts, total);
}

function joined(parts: readonly Uint8Array[], total: number): Uint8Array {
  const bytes = new Uint8Array(total);
  let at = 0;
  for (const part of parts) {
    bytes.set(part, at);
    at += part.length;
  }
  return bytes;
}

function tooLarge(maxBytes: number) {
  const mb = maxBytes / (1024 * 1024);
  const limit = mb >= 1 ? `${Math.floor(mb)} MB` : `${Math.floor(maxBytes / 1024)} KB`;
  return refuseTooLarge(`That is too large to send: at most ${limit}.`);
}

/** The part named "file" of a multipart body. @throws Refusal 400, 413, 415. */
export async function fileBody(request: Request, maxBytes: number): Promise<SentFile> {
  const type = request.headers.get("content-type") ?? "";
  if (!/^multipart\/form-data\s*;/i.test(type)) throw refuseType("Send one file as a form: multipart/form-data, field file.");
  const bytes = await bytesWithin(request, maxBytes + MULTIPART_ROOM);
  const file = await filePart(bytes, type);
  if (file.size === 0) throw refuseInvalid("That file is empty.", { file: "That file is empty." });
  if (file.size > maxBytes) throw tooLarge(maxBytes);
  return { name: fileName(file.name), bytes: new Uint8Array(await file.arrayBuffer()) };
}

async function filePart(bytes: Uint8Array, type: string): Promise<File> {
  const form = await new Response(bytes.slice().buffer, { headers: { "content-type": type } }).formData().catch(() => null);
  const file = form?.get("file");
  if (!(file instanceof File)) throw refuseInvalid("Choose a file.", { file: "Choose a file." });
  return file;
}

/** A name fit for a list and a header: no path, no control characters, not empty. */
export function fileName(name: string): string {
  const last = name.split(/[\\/]/).pop() ?? "";
  const plain = last.replace(/[\u0000-\u001f\u007f"<>|:*?]/g, "").trim().slice(-NAME_MAX);
  return plain === "" ? "file" : plain;
}

/** Checks a value against a schema. @throws Refusal 400 with a sentence per field. */
export function checked<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const parsed = schema.safeParse(value);
  if (parsed.success) return parsed.data;
  if (value === null || typeof value !== "object" || Array.isArray(value)) throw refuseInvalid("Send the fields of the form as one JSON object.");
  const fields: Record<string, string> = {};
  for (const issue of parsed.error.issues.slice(0, 30)) fields[issue.path.join(".") || "body"] ??= plainIssue(issue.message);
  const [first] = Object.entries(fields);
  const sentence = first === undefined ? "Something in it is not right." : first[1];
  throw refuseInvalid(/[.?!]$/.test(sentence) ? sentence : `${sentence}.`, fields);
}

/** Schemas that name no sentence of their own leave the library's; a person is told what to do instead. */
function plainIssue(message: string): string {
  return /^(Invalid|Expected|Unrecognized|Required)/.test(message) ? "This is missing or not of the right kind." : message;
}
