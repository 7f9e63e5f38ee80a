/** Measurements of a spool, newest first. */
import { Op } from "sequelize";
import { parseAsFitted } from "@/iso";
import type { MeasurementRow } from "@/lib/rules/as-fitted-types";
import { refuseNotFound } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Revision, Spool, SpoolMeasurement } from "@/models";
import { peopleNames } from "./people-names";

/** @throws Refusal 404 when the shop has no such spool. */
export async function spoolMeasurements(viewer: SessionViewer, spoolId: string): Promise<MeasurementRow[]> {
  const shop = inShop(viewer);
  await shop.one(Spool, spoolId);
  const rows = await shop.all(SpoolMeasurement, { spoolId }, null, { order: [["at", "DESC"], ["id", "DESC"]] });
  return measurementRows(viewer, rows);
}

/** One of a spool's measurements. @throws Refusal 404. */
export async function spoolMeasurement(viewer: SessionViewer, spoolId: string, id: string): Promise<MeasurementRow> {
  const row = await inShop(viewer).one(SpoolMeasurement, id);
  const [found] = row.spoolId === spoolId ? await measurementRows(viewer, [row]) : [];
  if (!found) throw refuseNotFound();
  return found;
}

async function measurementRows(viewer: SessionViewer, rows: readonly SpoolMeasurement[]): Promise<MeasurementRow[]> {
  const name = await peopleNames(rows.map((row) => row.by));
  const revisions = await inShop(viewer).all(Revision, { id: { [Op.in]: [...new Set(rows.map((row) => row.revisionId))] } });
  const codes = new Map(revisions.map((revision) => [revision.id, revision.code]));
  return rows.flatMap(({ id, revisionId, document, verdict, headline, by, at }) => {
    const read = parseAsFitted(JSON.parse(document));
    return read ? [{ id, revisionId, revisionCode: codes.get(revisionId) ?? "", document: read, verdict, headline, by: name(by), at: at.toISOString() }] : [];
  });
}
