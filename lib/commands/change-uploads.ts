/** Sketches and photos attached to a line. */
import type { SentFile } from "@/lib/server/body";
import type { CommandContext } from "@/lib/server/command";
import { refuseConflict, refuseNotFound } from "@/lib/server/errors";
import { sketchKind } from "@/lib/server/file-kinds";
import { inShop } from "@/lib/server/scope";
import { putObject } from "@/lib/server/storage";
import { Line, Upload } from "@/models";

/** Most sketches and photos one line may hold. */
const MAX_PER_LINE = 60;

/** @throws Refusal 404, 415 when it is no picture or PDF, 409 when the line holds enough. */
export async function addUpload(context: CommandContext, lineId: string, file: SentFile): Promise<{ id: string }> {
  const { viewer, tx, now } = context;
  const shop = inShop(viewer);
  const line = await shop.locked(Line, lineId, tx);
  const type = await sketchKind(file.bytes);
  const held = await Upload.count({ where: { shopId: viewer.shopId, lineId, removedAt: null }, transaction: tx });
  if (held >= MAX_PER_LINE) throw refuseConflict(`A line holds ${MAX_PER_LINE} sketches and photos at most. Remove one first.`);
  const stored = await putObject(viewer.shopId, file.bytes, type);
  const values = { lineId, kind: "sketch", name: file.name, type, bytes: stored.bytes, sha256: stored.sha256, objectKey: stored.key, at: now, by: viewer.personId } as const;
  const upload = await shop.add(Upload, values, tx);
  context.audit({ type: "upload.added", data: { lineId, number: line.number, uploadId: upload.id, name: file.name, sha256: stored.sha256 } });
  return { id: upload.id };
}

/** Takes a sketch off its line. Logos are changed where they belong. @throws Refusal 404. */
export async function removeUpload(context: CommandContext, uploadId: string): Promise<void> {
  const { viewer, tx, now } = context;
  const shop = inShop(viewer);
  const upload = await shop.locked(Upload, uploadId, tx);
  if (upload.removedAt !== null || upload.lineId === null) throw refuseNotFound();
  const line = await shop.one(Line, upload.lineId, tx);
  await upload.update({ removedAt: now }, { transaction: tx });
  context.audit({ type: "upload.removed", data: { lineId: line.id, number: line.number, uploadId, name: upload.name } });
}
