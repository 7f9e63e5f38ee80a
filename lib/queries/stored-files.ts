/** Stored bytes handed to the shop they belong to, with headers that keep a browser from doing more than showing them. */
import { refuseNotFound } from "@/lib/server/errors";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { getObject } from "@/lib/server/storage";
import { Upload } from "@/models";

const SHOWN_INLINE = ["image/png", "image/jpeg", "image/webp"];
const LOCKED_DOWN = "default-src 'none'; style-src 'unsafe-inline'; sandbox";

export interface FileFacts {
  readonly name: string;
  readonly type: string;
  readonly inline: boolean;
}

/** An answer that carries a file. The type is the one found by content when it came in. */
export function fileAnswer(bytes: Uint8Array, facts: FileFacts): Response {
  const plain = facts.name.replace(/[^A-Za-z0-9._-]/g, "_");
  const disposition = `${facts.inline ? "inline" : "attachment"}; filename="${plain}"; filename*=UTF-8''${encodeURIComponent(facts.name)}`;
  return new Response(bytes.slice().buffer, {
    headers: {
      "content-type": facts.type,
      "content-length": String(bytes.length),
      "content-disposition": disposition,
      "content-security-policy": LOCKED_DOWN,
      "x-content-type-options": "nosniff",
      "cache-control": "private, no-store",
    },
  });
}

/** A sketch or photo. Pictures may show in the page; an SVG or a PDF is only ever saved. @throws Refusal 404. */
export async function uploadFile(member: ShopMember, uploadId: string): Promise<Response> {
  const upload = await inShop(member).one(Upload, uploadId);
  if (upload.removedAt !== null || upload.kind !== "sketch") throw refuseNotFound();
  return storedAnswer(upload);
}

/** A logo of the shop by the SHA-256 of its bytes. @throws Refusal 404. */
export async function logoFile(member: ShopMember, sha256: string): Promise<Response> {
  const upload = await inShop(member).first(Upload, { kind: "logo", sha256 });
  if (upload === null) throw refuseNotFound();
  return storedAnswer(upload);
}

async function storedAnswer(upload: Upload): Promise<Response> {
  const bytes = await getObject(upload.objectKey);
  if (bytes === null) throw refuseNotFound();
  return fileAnswer(bytes, { name: upload.name, type: upload.type, inline: SHOWN_INLINE.includes(upload.type) });
}
