/** Bench lay-out and templates of a spool as PDF, made when asked for. Nothing is kept of them: they follow from the sheet's own input. */
import { measureText } from "@/fonts/widths";
import { composeBenchPages, composeTemplatePages, type SheetSize } from "@/iso";
import { spoolExportInput, type Issue } from "@/lib/queries/export-inputs";
import { exportFileName } from "@/lib/rules/exchange/file-names";
import type { SessionViewer } from "@/lib/server/session";
import { getObject, objectKey } from "@/lib/server/storage";
import { paintSheet } from "@/pdf/paint-sheet";
import { sheetTitle } from "./render-sheet";

export interface BenchAsked {
  readonly kind: "layout" | "templates";
  readonly of: Issue;
  readonly size: SheetSize | null;
  /** Thickness of the paper printed on, mm; null = ordinary printing paper. */
  readonly paper: number | null;
}

const TITLES = { layout: "bench lay-out", templates: "templates, print at 100 %" } as const;

/** Paper of any size carries them: true scale is kept by tiling. @throws Refusal as spoolExportInput does. */
export async function renderBench(viewer: SessionViewer, spoolId: string, { kind, of, size, paper }: BenchAsked): Promise<{ readonly name: string; readonly bytes: Uint8Array }> {
  const found = await spoolExportInput(viewer, spoolId, of, new Date(), size);
  const input = size === null ? found : { ...found, size };
  const { logo } = input.titleBlock;
  const bytes = await paintSheet({
    pages: kind === "layout" ? composeBenchPages(input, measureText) : composeTemplatePages(input, measureText, paper ?? undefined),
    issuedAt: input.revision.issuedAt,
    title: `${sheetTitle(input)}, ${TITLES[kind]}`,
    subject: TITLES[kind],
    logo: logo === null ? null : await getObject(objectKey(viewer.shopId, logo.key)),
    author: input.titleBlock.shopName,
    keywords: input.revision.auditHead,
  });
  return { name: exportFileName([input], kind === "layout" ? "bench" : "templates", "pdf"), bytes };
}
