/** The dimension record of a spool as PDF: one measurement against the revision it was taken on, or the form to fill in. */
import { measureText } from "@/fonts/widths";
import { composeAsFittedPages, type SheetInput, type SheetSize } from "@/iso";
import { spoolExportInput } from "@/lib/queries/export-inputs";
import { frozenInput } from "@/lib/queries/revision-facts";
import { shownInput } from "@/lib/queries/spool-detail";
import { spoolMeasurement } from "@/lib/queries/spool-measurements";
import type { MeasurementRow } from "@/lib/rules/as-fitted-types";
import { exportFileName } from "@/lib/rules/exchange/file-names";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { getObject, objectKey } from "@/lib/server/storage";
import { Revision } from "@/models";
import { paintSheet } from "@/pdf/paint-sheet";
import { sheetTitle } from "./render-sheet";

/** @throws Refusal 404 for another's spool or record, or when nothing is issued that a form could be for. */
export async function renderDimensionRecord(viewer: SessionViewer, spoolId: string, asked: { readonly record: string | null; readonly size: SheetSize | null }): Promise<{ readonly name: string; readonly bytes: Uint8Array }> {
  const record = asked.record === null ? null : await spoolMeasurement(viewer, spoolId, asked.record);
  const found = record ? await measuredInput(viewer, record) : await spoolExportInput(viewer, spoolId, null, new Date(), asked.size);
  const input = asked.size === null ? found : { ...found, size: asked.size };
  const { logo } = input.titleBlock;
  const bytes = await paintSheet({
    pages: composeAsFittedPages(input, record, measureText),
    issuedAt: record?.at ?? input.revision.issuedAt,
    title: `${sheetTitle(input)}, dimension record`,
    subject: "dimension record",
    logo: logo === null ? null : await getObject(objectKey(viewer.shopId, logo.key)),
    author: input.titleBlock.shopName,
    keywords: input.revision.auditHead,
  });
  return { name: exportFileName([input], record ? "dimension-record" : "dimension-record-form", "pdf"), bytes };
}

/** The sheet as it was when measured, in the state it has today. */
async function measuredInput(viewer: SessionViewer, { revisionId }: MeasurementRow): Promise<SheetInput> {
  const revision = await inShop(viewer).one(Revision, revisionId);
  return shownInput((await frozenInput(viewer, revisionId)).input, revision);
}
