/**
 * What a file is, by its content and never by its name. A picture that would break the painting of a sheet, or unpack
 * to more than a sheet can use, is refused when it comes in.
 */
import { inflateSync } from "node:zlib";
import { fileTypeFromBuffer } from "file-type";
import { refuseInvalid, refuseType } from "./errors";

export type LogoType = "image/png" | "image/jpeg" | "image/svg+xml";
export type SketchType = "image/png" | "image/jpeg" | "image/webp" | "application/pdf";

const SKETCH_TYPES: readonly string[] = ["image/png", "image/jpeg", "image/webp", "application/pdf"] satisfies SketchType[];
/** Longest side of a logo, in picture points; decoded it then takes 64 MB at most. */
const LOGO_MAX_SIDE = 4_000;
const BYTES_PER_POINT_MAX = 8;

const WRONG_LOGO = "A logo is a PNG, JPEG or SVG picture.";
const DAMAGED = "This picture is damaged and cannot be drawn.";

/** Type of a sketch or photo. @throws Refusal 415. */
export async function sketchKind(bytes: Uint8Array): Promise<SketchType> {
  const type = (await fileTypeFromBuffer(bytes))?.mime ?? "";
  if (!SKETCH_TYPES.includes(type)) throw refuseType("A sketch or photo is a PNG, JPEG or WebP picture, or a PDF.");
  return type as SketchType;
}

/** Type of a logo. @throws Refusal 415 when it is none, 400 when it cannot be drawn. */
export async function logoKind(bytes: Uint8Array): Promise<LogoType> {
  const type = (await fileTypeFromBuffer(bytes))?.mime;
  if (type === "image/png") assertPng(bytes);
  else if (type === "image/jpeg") assertJpeg(bytes);
  else {
    assertPlainSvg(bytes);
    return "image/svg+xml";
  }
  return type;
}

/** Elements and words by which an SVG could act, load or grow. None is needed in a logo. */
const SVG_REFUSED = /<!DOCTYPE|<!ENTITY|<script|<foreignObject|<iframe|<use\b|<animate|<set\b|\son[a-z]+\s*=|javascript:|@import/i;
/** Links and pictures: within the file, or pictures carried in it. */
const SVG_FAR_LINK = /(?:href|src)\s*=\s*["'](?!#|data:image\/(?:png|jpeg);base64,)|url\(\s*["']?(?!#)/i;

function assertPlainSvg(bytes: Uint8Array): void {
  const text = new TextDecoder("utf-8").decode(bytes);
  const head = text.replace(/^\uFEFF?\s*(?:<\?xml[^>]*\?>)?\s*(?:<!--[\s\S]*?-->\s*)*/, "");
  if (!/^<svg[\s>]/.test(head) || !/<\/svg>\s*$/.test(text)) throw refuseType(WRONG_LOGO);
  if (SVG_REFUSED.test(text) || SVG_FAR_LINK.test(text)) {
    throw refuseInvalid("This SVG holds scripts, links or other active parts. Save it as a plain drawing and try again.");
  }
}

function assertSides(width: number, height: number): void {
  if (width < 1 || height < 1) throw refuseInvalid(DAMAGED);
  if (width > LOGO_MAX_SIDE || height > LOGO_MAX_SIDE) throw refuseInvalid(`A logo may be ${LOGO_MAX_SIDE} by ${LOGO_MAX_SIDE} picture points at most.`);
}

const PNG_HEAD_BYTES = 8;
const CHUNK_ROOM = 12;

/** Walks the chunks of a PNG and unpacks its data within what its size allows. */
function assertPng(bytes: Uint8Array): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  const data: Uint8Array[] = [];
  let sides: readonly [number, number] | null = null;
  let at = PNG_HEAD_BYTES;
  for (let name = ""; name !== "IEND"; ) {
    if (at + CHUNK_ROOM > bytes.length) throw refuseInvalid(DAMAGED);
    const length = view.getUint32(at);
    name = String.fromCharCode(...bytes.subarray(at + 4, at + 8));
    if (at + CHUNK_ROOM + length > bytes.length) throw refuseInvalid(DAMAGED);
    if (name === "IHDR" && length >= 8) sides = [view.getUint32(at + 8), view.getUint32(at + 12)];
    if (name === "IDAT") data.push(bytes.subarray(at + 8, at + 8 + length));
    at += CHUNK_ROOM + length;
  }
  if (sides === null) throw refuseInvalid(DAMAGED);
  assertSides(...sides);
  assertUnpacks(data, sides);
}

function assertUnpacks(data: readonly Uint8Array[], [width, height]: readonly [number, number]): void {
  try {
    inflateSync(Buffer.concat(data), { maxOutputLength: (width * BYTES_PER_POINT_MAX + 2) * height + 64 });
  } catch {
    throw refuseInvalid(DAMAGED);
  }
}

/** Start-of-frame markers carry the size; C4, C8 and CC among them are tables. */
function isFrameMarker(marker: number): boolean {
  return marker >= 0xc0 && marker <= 0xcf && ![0xc4, 0xc8, 0xcc].includes(marker);
}

/** Walks the segments of a JPEG up to its frame header. */
function assertJpeg(bytes: Uint8Array): void {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  let at = 2;
  while (at + 9 <= bytes.length && bytes[at] === 0xff) {
    if (isFrameMarker(bytes[at + 1] ?? 0)) return assertSides(view.getUint16(at + 7), view.getUint16(at + 5));
    at += 2 + view.getUint16(at + 2);
  }
  throw refuseInvalid(DAMAGED);
}
