/**
 * The sheet input of a spool: everything its sheet is made from, gathered into the one value that is drawn, printed,
 * frozen and hashed.
 */
import type { Transaction } from "sequelize";
import type { MarksRegister, RunDocument, SheetInput, SheetSize, TakeOutWord, TitleBlock } from "@/iso";
import { inShop, type ShopMember } from "@/lib/server/scope";
import { Job, Shop, type Line } from "@/models";
import { storedDocument, storedMarks } from "./stored-line";
import { takeOutWords } from "./take-out-words";
import { titleBlockOf } from "./title-block";

/** What the sheets of a line's spools come from, as it is now. */
export interface SheetSource {
  readonly job: Job;
  readonly document: RunDocument;
  readonly marks: MarksRegister;
  readonly takeOuts: readonly TakeOutWord[];
  readonly titleBlock: TitleBlock;
}

/** Reads what surrounds a line. */
export async function sheetSourceOf(member: ShopMember, line: Line, tx: Transaction | null = null): Promise<SheetSource> {
  const job = await inShop(member).one(Job, line.jobId, tx);
  const shop = await Shop.findOne({ where: { id: member.shopId }, rejectOnEmpty: true, transaction: tx });
  return {
    job,
    document: storedDocument(line),
    marks: storedMarks(line),
    takeOuts: await takeOutWords(member, tx),
    titleBlock: titleBlockOf(shop, job),
  };
}

/** Puts a spool, a size (null takes the job's) and revision facts to a source. */
export function sheetInputOf(source: SheetSource, spool: string, size: SheetSize | null, revision: SheetInput["revision"]): SheetInput {
  const { document, marks, takeOuts, titleBlock, job } = source;
  return { version: 1, document, marks, takeOuts, spool, size: size ?? job.settings.sheetSize, units: document.settings.units, titleBlock, revision };
}
