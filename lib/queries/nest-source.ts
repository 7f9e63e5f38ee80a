/** What a cutting plan is made from: the spools' pieces as issued, or as they would be now, and the stock of the day. */
import { createHash } from "node:crypto";
import { Op, type Transaction } from "sequelize";
import { buildModel, formatLength, type Piece, type SheetInput } from "@/iso";
import { NESTING_START, unitMm, type NestGroup, type NestPiece, type NestSource, type NestSpool, type NestStockRow } from "@/lib/rules/nest-plans";
import type { NestNewForm } from "@/lib/rules/nest-forms";
import { isLive } from "@/lib/rules/revision-rules";
import { refuseInvalid, refuseNotFound } from "@/lib/server/errors";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Line, Nest, Offcut, Shop, Spool, WorkEntry, type Revision } from "@/models";
import { frozenInput, revisionsOf } from "./revision-facts";
import { storedDocument, storedMarks } from "./stored-line";
import { takeOutWords } from "./take-out-words";

type SpoolInput = Pick<SheetInput, "document" | "marks" | "takeOuts">;

/** @throws Refusal 404 for a spool that is not of the job, 400 when there is nothing to cut. */
export async function nestSource(member: ShopMember, jobId: string, form: NestNewForm, tx: Transaction): Promise<NestSource> {
  const shop = await Shop.findOne({ where: { id: member.shopId }, rejectOnEmpty: true, transaction: tx });
  const nesting = shop.settings.nesting ?? NESTING_START;
  const saw = nesting.saws.find((s) => s.name === form.saw);
  if (!saw) throw refuseInvalid("The shop has no such saw. Load the page again.", { saw: "Choose a saw." });
  const groups = new Map<string, NestGroup & { pieces: NestPiece[] }>();
  const spools: NestSpool[] = [];
  const leftOut: { mark: string; reason: string }[] = [];
  for (const spoolId of new Set(form.spoolIds)) {
    const found = await spoolPieces(member, jobId, spoolId, tx);
    spools.push(found.spool);
    const cut = await cutAlready(member, spoolId, tx);
    for (const piece of found.pieces) {
      const mark = `${found.spool.line} ${piece.mark}`;
      const why = reasonAgainst(piece, cut);
      if (why) leftOut.push({ mark, reason: why });
      else addPiece(groups, found, piece);
    }
  }
  if (groups.size === 0) throw refuseInvalid(leftOut.length > 0 ? `Nothing is left to cut: ${leftOut[0]!.mark} is ${leftOut[0]!.reason}.` : "These spools have no cut pieces.", { spoolIds: "Nothing to cut." });
  return {
    version: 1, saw, endTrimMm: nesting.endTrimMm, leastOffcutMm: nesting.leastOffcutMm, offcutShare: nesting.offcutShare,
    heat: form.heat || null, seconds: form.seconds, groups: [...groups.values()], stock: await stockOf(member, shop, tx), spools, leftOut,
  };
}

interface Found {
  readonly spool: NestSpool;
  readonly input: SpoolInput;
  readonly pieces: readonly Piece[];
}

async function spoolPieces(member: ShopMember, jobId: string, spoolId: string, tx: Transaction): Promise<Found> {
  const row = await inShop(member).one(Spool, spoolId, tx);
  const line = await inShop(member).one(Line, row.lineId, tx);
  if (line.jobId !== jobId) throw refuseNotFound();
  const { input, revision } = await currentSpool(member, row, line, tx);
  const model = buildModel(input.document, input.marks, input.takeOuts);
  const content = model.spools.find((s) => s.letter === row.letter)?.content ?? "";
  return {
    input, pieces: model.pieces.filter((p) => p.spool === row.letter),
    spool: { spoolId, line: line.number, letter: row.letter, revisionId: revision?.id ?? null, code: revision?.code ?? "", contentSha256: createHash("sha256").update(content).digest("hex") },
  };
}

/** A spool as issued, where it is, else as it would be now. */
async function currentSpool(member: ShopMember, spool: Spool, line: Line, tx: Transaction | null): Promise<{ readonly input: SpoolInput; readonly revision: Revision | null }> {
  const live = (await revisionsOf(member, spool.id, tx)).find((revision) => isLive(revision.state)) ?? null;
  if (live) return { input: (await frozenInput(member, live.id, tx)).input, revision: live };
  return { input: { document: storedDocument(line), marks: storedMarks(line), takeOuts: await takeOutWords(member, tx) }, revision: null };
}

/** Keys of pieces with a recorded cut, or in a plan that was locked. */
async function cutAlready(member: ShopMember, spoolId: string, tx: Transaction | null): Promise<ReadonlySet<string>> {
  const entries = await inShop(member).all(WorkEntry, { spoolId, kind: "cut" }, tx);
  const locked = await inShop(member).all(Nest, { state: "cut", source: { [Op.like]: `%${spoolId}%` } }, tx);
  const planned = locked.flatMap((nest) => placedIds(nest).filter((id) => id.startsWith(spoolId)).map((id) => id.slice(spoolId.length + 1)));
  return new Set([...entries.map((entry) => entry.key), ...planned]);
}

function placedIds(nest: Nest): string[] {
  const result = JSON.parse(nest.result ?? '{"groups":[]}') as { groups: { bars: { pieces: { mark: string }[] }[] }[] };
  return result.groups.flatMap((group) => group.bars.flatMap((bar) => bar.pieces.map((piece) => piece.mark)));
}

function reasonAgainst(piece: Piece, cut: ReadonlySet<string>): string | null {
  if (cut.has(piece.key)) return "cut already";
  return piece.cutLengthMm > 0 ? null : "of no length: it does not fit";
}

function addPiece(groups: Map<string, NestGroup & { pieces: NestPiece[] }>, { spool, input }: Found, piece: Piece): void {
  const { units, pipe } = input.document.settings;
  const { nps, schedule, material } = piece;
  const key = JSON.stringify([nps, schedule, material, pipe.specification, units]);
  const group = groups.get(key) ?? { nps, schedule, material, specification: pipe.specification, units, pieces: [] };
  groups.set(key, group);
  group.pieces.push({ id: `${spool.spoolId}|${piece.key}`, mark: piece.mark, line: spool.line, spool: spool.letter, length: Math.max(1, Math.round(piece.cutLengthMm / unitMm(units))) });
}

async function stockOf(member: ShopMember, shop: Shop, tx: Transaction): Promise<NestStockRow[]> {
  const lengths = shop.settings.stock.map((row, n): NestStockRow => ({ ...row, id: `length-${n + 1}`, kind: "length", cost: row.cost ?? null, heat: row.heat ?? "" }));
  const offcuts = await inShop(member).all(Offcut, { goneAt: null }, tx, { order: [["addedAt", "ASC"], ["id", "ASC"]] });
  return [...lengths, ...offcuts.map(({ id, nps, schedule, material, lengthMm, heat }): NestStockRow => ({ id, kind: "offcut", nps, schedule, material, lengthMm, quantity: 1, cost: null, heat }))];
}

/** Pieces named in one sentence. */
const MOST_NAMED = 6;

/** What is no longer as the plan saw it, in words; empty when it still is. */
export async function nestChanges(member: ShopMember, source: NestSource, used: ReadonlyMap<string, number>, tx: Transaction | null = null): Promise<string[]> {
  const words: string[] = [];
  for (const planned of source.spools) {
    const name = `Spool ${planned.letter} of line ${planned.line}`;
    const row = await inShop(member).one(Spool, planned.spoolId, tx);
    const line = await inShop(member).one(Line, row.lineId, tx);
    const { input, revision } = await currentSpool(member, row, line, tx);
    const content = buildModel(input.document, input.marks, input.takeOuts).spools.find((s) => s.letter === row.letter)?.content ?? "";
    if (createHash("sha256").update(content).digest("hex") !== planned.contentSha256) words.push(`${name} has changed since.`);
    else if (revision?.hold) words.push(`${name} is on HOLD.`);
    const cut = await cutAlready(member, planned.spoolId, tx);
    const marks = source.groups.flatMap((group) => group.pieces.filter((p) => p.id.startsWith(`${planned.spoolId}|`) && cut.has(p.id.slice(planned.spoolId.length + 1))).map((p) => p.mark));
    if (marks.length > 0) words.push(`${marks.slice(0, MOST_NAMED).join(", ")}${marks.length > MOST_NAMED ? " and more" : ""} of line ${planned.line}: cut already, or in a plan that was locked.`);
  }
  return [...words, ...(await stockChanges(member, source, used, tx))];
}

async function stockChanges(member: ShopMember, source: NestSource, used: ReadonlyMap<string, number>, tx: Transaction | null): Promise<string[]> {
  const shop = await Shop.findOne({ where: { id: member.shopId }, rejectOnEmpty: true, transaction: tx });
  const wanted = source.stock.filter((s) => used.has(s.id));
  const offcuts = wanted.filter((s) => s.kind === "offcut").map((s) => s.id);
  const onRack = new Set((offcuts.length === 0 ? [] : await inShop(member).all(Offcut, { id: { [Op.in]: offcuts }, goneAt: null }, tx)).map((o) => o.id));
  return wanted.flatMap((s) => {
    const what = formatLength(s.lengthMm, shop.settings.defaults.units);
    if (s.kind === "offcut") return onRack.has(s.id) ? [] : [`The offcut of ${what}${s.heat ? `, heat ${s.heat},` : ""} is no longer on the rack.`];
    if (s.quantity === null) return [];
    const row = shop.settings.stock.find((r) => isRow(r, s));
    return row && (row.quantity === null || row.quantity >= used.get(s.id)!) ? [] : [`The rack has fewer lengths of ${what} than the plan takes (${used.get(s.id)}).`];
  });
}

/** Whether a row of the rack is the one the plan saw. */
export function isRow(row: Shop["settings"]["stock"][number], seen: NestStockRow): boolean {
  return row.nps === seen.nps && row.schedule === seen.schedule && row.material === seen.material && row.lengthMm === seen.lengthMm && (row.heat ?? "") === seen.heat;
}
