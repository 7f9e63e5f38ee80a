/** The issued sheets, for the bench: each spool's live revision with how far the work is. */
import { Op } from "sequelize";
import { buildModel, type SheetInput } from "@/iso";
import type { BenchRow } from "@/lib/rules/api-types";
import { sheetNumberText } from "@/lib/rules/sheet-number";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Job, Line, Revision, RevisionInput, Spool, WorkEntry } from "@/models";

export async function benchRows(member: ShopMember): Promise<BenchRow[]> {
  const shop = inShop(member);
  const live = await shop.all(Revision, { state: { [Op.in]: ["for-fabrication", "as-built"] } }, null, { order: [["signedAt", "DESC"]] });
  const ids = live.map((revision) => revision.id);
  const spools = byId(await shop.all(Spool, { id: { [Op.in]: live.map((revision) => revision.spoolId) } }));
  const lines = byId(await shop.all(Line, { id: { [Op.in]: [...spools.values()].map((spool) => spool.lineId) } }));
  const jobs = byId(await shop.all(Job, { id: { [Op.in]: [...lines.values()].map((line) => line.jobId) } }));
  const inputs = await shop.all(RevisionInput, { revisionId: { [Op.in]: ids }, kind: "fabrication" });
  const work = await shop.all(WorkEntry, { spoolId: { [Op.in]: [...spools.keys()] } });
  return live.flatMap((revision) => {
    const spool = spools.get(revision.spoolId);
    const line = spool === undefined ? undefined : lines.get(spool.lineId);
    const stored = inputs.find((input) => input.revisionId === revision.id);
    if (spool === undefined || line === undefined || stored === undefined) return [];
    const entries = work.filter((entry) => entry.spoolId === spool.id);
    return [{
      spoolId: spool.id,
      revisionId: revision.id,
      sheetNumber: sheetNumberText(spool.sheetNumber),
      letter: spool.letter,
      line: line.number,
      job: jobs.get(line.jobId)?.number ?? "",
      code: revision.code,
      hold: revision.hold,
      state: revision.state,
      issuedAt: (revision.signedAt ?? revision.submittedAt).toISOString(),
      ...progress(JSON.parse(stored.input) as SheetInput, entries),
    }];
  });
}

function byId<Row extends { id: string }>(rows: readonly Row[]): Map<string, Row> {
  return new Map(rows.map((row) => [row.id, row]));
}

/** Pieces cut and welds made, of those on the sheet. */
function progress(input: SheetInput, entries: readonly WorkEntry[]): Pick<BenchRow, "cut" | "pieces" | "welded" | "welds"> {
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const pieces = model.pieces.filter((piece) => piece.spool === input.spool);
  const welds = model.joints.filter((joint) => joint.spool === input.spool && joint.number !== null);
  const done = (kind: WorkEntry["kind"]) => new Set(entries.filter((entry) => entry.kind === kind).map((entry) => entry.key));
  const cut = done("cut");
  const welded = done("weld");
  return {
    pieces: pieces.length,
    cut: pieces.filter((piece) => cut.has(piece.key)).length,
    welds: welds.length,
    welded: welds.filter((joint) => welded.has(joint.key)).length,
  };
}
