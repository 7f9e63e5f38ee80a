/** What leaves the house is made from: the sheet inputs of a spool or of a whole line, issued or as they would be now. */
import { buildModel, type SheetInput, type SheetSize } from "@/iso";
import { canDo, refusalOf } from "@/lib/rules/permissions";
import { isLive } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { refuseForbidden, refuseNotFound, refuseInvalid } from "@/lib/server/errors";
import { inShop } from "@/lib/server/scope";
import type { SessionViewer } from "@/lib/server/session";
import { Line, Spool } from "@/models";
import { draftSheetInput, spoolCase } from "./draft-sheet";
import { peopleNames } from "./people-names";
import { frozenInput, revisionsOf } from "./revision-facts";
import { sheetInputOf, sheetSourceOf } from "./sheet-input";
import { shownInput } from "./spool-detail";

/** Issued: the live revision. Draft: as it would be now. null takes what is issued where there is such, else the draft. */
export type Issue = "issued" | "draft" | null;

/**
 * The sheet input of a spool. Those who see issued sheets only never get a draft.
 * @param size of a draft; null takes the job's.
 * @throws Refusal 404 when the shop has no such spool or nothing of it is issued, 403 for a draft they may not see.
 */
export async function spoolExportInput(viewer: SessionViewer, spoolId: string, of: Issue, now: Date, size: SheetSize | null = null): Promise<SheetInput> {
  const spool = await spoolCase(viewer, spoolId);
  const seesDrafts = canDo(viewer.role, "lines.read");
  const live = spool.revisions.find((revision) => isLive(revision.state));
  if (of === "draft" && !seesDrafts) throw refuseForbidden(refusalOf("lines.read"));
  if (of !== "draft" && live) return shownInput((await frozenInput(viewer, live.id)).input, live);
  if (of === "issued" || !seesDrafts) throw refuseNotFound();
  return draftSheetInput(viewer, spool, size, now);
}

/** The sheet inputs of a line's spools, by letter. @throws Refusal 404; 400 when nothing of the line is issued. */
export async function lineExportInputs(viewer: SessionViewer, lineId: string, of: Issue, now: Date): Promise<SheetInput[]> {
  const line = await inShop(viewer).one(Line, lineId);
  const rows = await inShop(viewer).all(Spool, { lineId }, null, { order: [["letter", "ASC"]] });
  return of === "issued" ? issuedInputs(viewer, rows) : draftInputs(viewer, line, rows, now);
}

async function issuedInputs(viewer: SessionViewer, spools: readonly Spool[]): Promise<SheetInput[]> {
  const inputs: SheetInput[] = [];
  for (const spool of spools) {
    const live = (await revisionsOf(viewer, spool.id)).find((revision) => isLive(revision.state));
    if (live) inputs.push(shownInput((await frozenInput(viewer, live.id)).input, live));
  }
  if (inputs.length === 0) throw refuseInvalid("Nothing of this line is issued yet. Take the list as it is now; it says DRAFT.");
  return inputs;
}

/** The line is read once and its model built once: spools share the document. */
async function draftInputs(viewer: SessionViewer, line: Line, spools: readonly Spool[], now: Date): Promise<SheetInput[]> {
  const source = await sheetSourceOf(viewer, line);
  const drawnBy = (await peopleNames([line.updatedBy]))(line.updatedBy);
  const numbers = new Map(spools.map((spool) => [spool.letter, sheetNumberText(spool.sheetNumber)]));
  return buildModel(source.document, source.marks, source.takeOuts).spools.map(({ letter }) =>
    sheetInputOf(source, letter, null, {
      sheetNumber: numbers.get(letter) ?? "", code: "", state: "draft", hold: false, rows: [], drawnBy, checkedBy: "", issuedAt: now.toISOString(),
      statusUrl: "", auditHead: "", changedPointIds: [], accepted: [],
    }),
  );
}
