/** Stores a logo under its hash and remembers whose it is. */
import type { TitleBlock } from "@/iso";
import type { SentFile } from "@/lib/server/body";
import type { CommandContext } from "@/lib/server/command";
import { logoKind } from "@/lib/server/file-kinds";
import { inShop } from "@/lib/server/scope";
import { putObject } from "@/lib/server/storage";
import { Upload } from "@/models";

/** @returns what a title block keeps of it. @throws Refusal 415 when the file is no PNG, JPEG or plain SVG. */
export async function storeLogo({ viewer, tx, now }: CommandContext, file: SentFile): Promise<NonNullable<TitleBlock["logo"]>> {
  const type = await logoKind(file.bytes);
  const stored = await putObject(viewer.shopId, file.bytes, type);
  const values = { kind: "logo", name: file.name, type, bytes: stored.bytes, sha256: stored.sha256, objectKey: stored.key, at: now, by: viewer.personId } as const;
  await inShop(viewer).add(Upload, values, tx);
  return { key: stored.sha256, type };
}
