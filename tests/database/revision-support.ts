/** Spools brought to a state through the routes, as people of the shop would. */
import * as sheetRoute from "@/app/api/revisions/[revisionId]/sheet/route";
import * as copiesRoute from "@/app/api/spools/[spoolId]/copies/route";
import * as signRoute from "@/app/api/revisions/[revisionId]/sign/route";
import * as submitRoute from "@/app/api/spools/[spoolId]/submit/route";
import { buildModel, type RunDocument } from "@/iso";
import { storedDocument, storedMarks } from "@/lib/queries/stored-line";
import { Line } from "@/models";
import { call, newLine, PASSWORD, type TestLine, type TestShop } from "./support";

export interface TestRevision extends TestLine {
  readonly spoolId: string;
  readonly revisionId: string;
}

/** Submits the first spool of a new line, as its detailer. */
export async function submitted(shop: TestShop, document?: RunDocument): Promise<TestRevision> {
  const line = await newLine(shop, document);
  const spoolId = line.spoolIds[0]!;
  const answer = await call(submitRoute.POST, { as: shop.detailer, method: "POST", params: { spoolId }, body: { description: "First issue", size: "letter" } });
  if (answer.status >= 300) throw new Error(`submit answered ${answer.status} ${answer.text}`);
  return { ...line, spoolId, revisionId: answer.json.revisionId as string };
}

export const signBody = { password: PASSWORD, accepted: [], verified: true };

/** Submits and signs the first spool of a new line. */
export async function signed(shop: TestShop, document?: RunDocument): Promise<TestRevision> {
  const revision = await submitted(shop, document);
  const answer = await call(signRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId: revision.revisionId }, body: signBody });
  if (answer.status >= 300) throw new Error(`sign answered ${answer.status} ${answer.text}`);
  return revision;
}

/** Prints the first spool's signed sheet as its owner. @returns the copy's id. */
export async function copyOf(shop: TestShop): Promise<string> {
  const { revisionId, spoolId } = await signed(shop);
  const printed = await call(sheetRoute.GET, { as: shop.owner, params: { revisionId }, query: "?copy=1" });
  if (printed.status !== 200) throw new Error(`print answered ${printed.status} ${printed.text}`);
  const copies = await call(copiesRoute.GET, { as: shop.owner, params: { spoolId } });
  return copies.json[0].id as string;
}

/** A piece of the line's first spool and a weld of it, as work entries name them. */
export async function marksOf(lineId: string): Promise<{ piece: { mark: string; key: string }; weld: { mark: string; key: string } }> {
  const line = await Line.findOne({ where: { id: lineId }, rejectOnEmpty: true });
  const model = buildModel(storedDocument(line), storedMarks(line), []);
  const piece = model.pieces[0]!;
  const weld = model.joints.find((joint) => joint.number !== null && joint.spool === piece.spool)!;
  return { piece: { mark: piece.mark, key: piece.key }, weld: { mark: weld.number!, key: weld.key } };
}
