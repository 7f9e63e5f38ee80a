/** All the editor needs of one line. */
import type { LineDetail, UploadRow } from "@/lib/rules/api-types";
import { canDo } from "@/lib/rules/permissions";
import { inShop, type ShopMember } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Job, Line, Shop, Upload } from "@/models";
import { peopleNames } from "./people-names";
import { spoolRowsByLine } from "./spool-rows";
import { storedDocument, storedMarks } from "./stored-line";
import { takeOutWords } from "./take-out-words";
import { titleBlockOf } from "./title-block";

/** @throws Refusal 404. */
export async function lineDetail(viewer: SessionViewer, lineId: string): Promise<LineDetail> {
  const line = await inShop(viewer).one(Line, lineId);
  const job = await inShop(viewer).one(Job, line.jobId);
  const shop = await Shop.findOne({ where: { id: viewer.shopId }, rejectOnEmpty: true });
  const [takeOuts, spools, uploads] = [await takeOutWords(viewer), await spoolRowsByLine(viewer, [lineId], false), await uploadRows(viewer, lineId)];
  const nameOf = await peopleNames([line.updatedBy]);
  return {
    id: line.id,
    job: { id: job.id, number: job.number, title: job.title },
    version: line.version,
    document: storedDocument(line),
    marks: storedMarks(line),
    takeOuts,
    titleBlock: titleBlockOf(shop, job),
    sheetSize: job.settings.sheetSize,
    spools: spools.get(lineId) ?? [],
    uploads,
    updatedAt: line.updatedAt.toISOString(),
    updatedBy: nameOf(line.updatedBy),
    editable: canDo(viewer.role, "lines.change") && line.archivedAt === null,
  };
}

/** Sketches and photos of a line, the oldest first. */
export async function uploadRows(member: ShopMember, lineId: string): Promise<UploadRow[]> {
  const rows = await inShop(member).all(Upload, { lineId, removedAt: null }, null, { order: [["at", "ASC"], ["id", "ASC"]] });
  const nameOf = await peopleNames(rows.map((row) => row.by));
  return rows.map(({ id, name, type, bytes, at, by }) => ({ id, name, type, bytes, at: at.toISOString(), by: nameOf(by) }));
}
