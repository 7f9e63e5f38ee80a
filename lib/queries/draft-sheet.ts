/** What a spool's sheet would be if it were submitted now. */
import type { SheetInput, SheetSize } from "@/iso";
import { changedPointIds, sheetChanges } from "@/lib/rules/document-diff";
import { isLive, revisionCodeNext } from "@/lib/rules/revision-rules";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Line, Spool, type Revision } from "@/models";
import { peopleNames } from "./people-names";
import { dateOf, frozenInput, revisionBlock, revisionsOf } from "./revision-facts";
import { sheetInputOf, sheetSourceOf } from "./sheet-input";

export interface SpoolCase {
  readonly spool: Spool;
  readonly line: Line;
  /** The oldest first. */
  readonly revisions: readonly Revision[];
}

/** A spool with its line and revisions. @throws Refusal 404 when the shop has none. */
export async function spoolCase(member: ShopMember, spoolId: string): Promise<SpoolCase> {
  const spool = await inShop(member).one(Spool, spoolId);
  return { spool, line: await inShop(member).one(Line, spool.lineId), revisions: await revisionsOf(member, spoolId) };
}

/** @param size null takes the job's. @param now handed in, printed as the time of rendering. */
export async function draftSheetInput(member: ShopMember, { spool, line, revisions }: SpoolCase, size: SheetSize | null, now: Date): Promise<SheetInput> {
  const drawnBy = (await peopleNames([line.updatedBy]))(line.updatedBy);
  const code = revisionCodeNext(revisions[revisions.length - 1]?.code ?? null);
  const facts: SheetInput["revision"] = {
    sheetNumber: sheetNumberText(spool.sheetNumber),
    code,
    state: "draft",
    hold: false,
    rows: [...(await revisionBlock(revisions)), { code, description: "Draft", date: dateOf(now), by: drawnBy, checked: "", approved: "" }],
    drawnBy,
    checkedBy: "",
    issuedAt: now.toISOString(),
    statusUrl: "",
    auditHead: "",
    changedPointIds: [],
    accepted: [],
  };
  const draft = sheetInputOf(await sheetSourceOf(member, line), spool.letter, size, facts);
  const live = revisions.find((revision) => isLive(revision.state));
  if (live === undefined) return draft;
  const { input: before } = await frozenInput(member, live.id);
  return { ...draft, revision: { ...facts, changedPointIds: changedPointIds(sheetChanges(before, draft)) } };
}
