/**
 * Fills an empty database with the demo shop: invented people, one job, lines of every kind and revisions in every
 * state. Everything goes through the same commands a page would call, so the log, the mails and the sheets are real.
 */
import { randomUUID } from "node:crypto";
import { buildModel, emptyMarks, type RunDocument, type SheetInput } from "@/iso";
import { addJob, changeJob } from "@/lib/commands/change-jobs";
import { addOffcut } from "@/lib/commands/change-offcuts";
import { changeShop, recordTakeOut, setShopLogo } from "@/lib/commands/change-shop";
import { closeAsBuilt, holdRevision, returnRevision, voidRevision } from "@/lib/commands/decide-revision";
import { storeLine } from "@/lib/commands/add-line";
import { addPerson, openShop } from "@/lib/commands/open-shop";
import { recordWork } from "@/lib/commands/record-work";
import { saveLine } from "@/lib/commands/save-line";
import { signRevision } from "@/lib/commands/sign-revision";
import { submitRevision } from "@/lib/commands/submit-revision";
import { frozenInput } from "@/lib/queries/revision-facts";
import type { Role } from "@/lib/rules/api-types";
import { DEMO_PASSWORD, DEMO_PEOPLE, DEMO_SHOP_NAME } from "@/lib/rules/demo-people";
import { unverifiedDimensions } from "@/lib/rules/unverified";
import { runCommand, type Actor, type CommandContext } from "@/lib/server/command";
import { closeDb } from "@/lib/server/database";
import { hashPassword } from "@/lib/server/passwords";
import { inShop } from "@/lib/server/scope";
import { Line, Membership, Revision, Spool } from "@/models";
import * as lines from "./demo/lines";
import { DEMO_LOGO } from "./demo/logo";

type People = Readonly<Record<Role, Actor>>;

const as = <R>(actor: Actor, work: (context: CommandContext) => Promise<R>): Promise<R> => runCommand(actor, "logged", work);

async function seed(): Promise<void> {
  const people = await seedPeople();
  await seedShop(people);
  const jobId = await seedJob(people);
  const ids = await seedLines(people, jobId);
  await seedRevisions(people, ids);
}

async function seedPeople(): Promise<People> {
  const [first, ...others] = DEMO_PEOPLE;
  if (first === undefined || first.role !== "owner") throw new Error("The demo's first person is its owner.");
  const form = { shopName: DEMO_SHOP_NAME, name: first.name, email: first.email, password: DEMO_PASSWORD };
  const { shopId, personId } = await runCommand(null, "logged", (context) => openShop(context, form));
  const owner: Actor = { shopId, personId, role: "owner", name: first.name };
  const people: Partial<Record<Role, Actor>> = { owner };
  const passwordHash = await hashPassword(DEMO_PASSWORD);
  for (const { name, email, role } of others) {
    people[role] = await as(owner, (context) => join(context, { name, email, role, passwordHash }));
  }
  return people as People;
}

async function join(context: CommandContext, person: { name: string; email: string; role: Role; passwordHash: string }): Promise<Actor> {
  const { tx, now, viewer } = context;
  const { name, email, role, passwordHash } = person;
  const personId = await addPerson({ email, name, passwordHash, createdAt: now }, tx);
  const membershipId = randomUUID();
  await Membership.create({ shopId: viewer.shopId, id: membershipId, personId, role, joinedAt: now }, { transaction: tx });
  context.audit({ type: "person.joined", data: { membershipId, personId, name, role } }, { shopId: viewer.shopId, actor: personId });
  return { shopId: viewer.shopId, personId, role, name };
}

const STOCK = [
  { nps: "3", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 6401, quantity: 6, cost: 262 },
  { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 6401, quantity: 9, cost: 370 },
  { nps: "6", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 6401, quantity: 4, cost: 655 },
  { nps: "8", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 12802, quantity: 2, cost: 1940 },
] as const;
const OFFCUTS = [
  { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 1842, heat: "K40217" },
  { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 965, heat: "K40217" },
  { nps: "6", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 2310, heat: "M11873" },
] as const;

async function seedShop({ owner }: People): Promise<void> {
  await as(owner, (context) => changeShop(context, { fields: [{ label: "SHOP ORDER", value: "CB-2614" }], stock: [...STOCK] }));
  for (const offcut of OFFCUTS) await as(owner, (context) => addOffcut(context, offcut));
  await as(owner, (context) => setShopLogo(context, { name: "copper-bay.svg", bytes: new TextEncoder().encode(DEMO_LOGO) }));
  for (const key of unconfirmedKeys()) await as(owner, (context) => recordTakeOut(context, { key, valueMm: null }));
}

/** Take-outs of the demo lines that are from memory: the demo shop measured one of each and confirmed it. */
function unconfirmedKeys(): string[] {
  const models = documents().map((document) => buildModel(document, emptyMarks(), []));
  const keys = models.flatMap((model) => model.components.map((component) => component.unconfirmedKey));
  return [...new Set(keys.filter((key): key is string => key !== null))];
}

function documents(): RunDocument[] {
  return Object.values(lines).map((line) => (typeof line === "function" ? line() : line));
}

async function seedJob({ detailer }: People): Promise<string> {
  const { id } = await as(detailer, (context) =>
    addJob(context, { number: "2614", title: "Chilled water tie-ins", client: "Gull Rock Cannery", area: "Chiller house", units: "imperial" }),
  );
  await as(detailer, (context) => changeJob(context, id, { plantNorthDeg: 14, sheetSize: "tabloid" }));
  return id;
}

async function seedLines({ detailer }: People, jobId: string): Promise<ReadonlyMap<string, string>> {
  const ids = new Map<string, string>();
  for (const document of documents()) {
    const { id } = await as(detailer, (context) => storeLine(context, jobId, document, null));
    ids.set(document.number, id);
  }
  return ids;
}

async function seedRevisions(people: People, ids: ReadonlyMap<string, string>): Promise<void> {
  const { detailer, inspector, fitter } = people;
  const spool = (document: RunDocument, letter = "A") => spoolId(people.owner, ids.get(document.number) ?? "", letter);

  const supply = await spool(lines.coolingSupply);
  await issue(people, supply, "Issued for fabrication");
  await cutPieces(fitter, supply, 2);
  await as(detailer, (context) => lengthenSupply(context, ids.get(lines.coolingSupply.number) ?? ""));
  await issue(people, supply, "Inlet of CH-1 moved 3 in east after survey");
  await cutPieces(fitter, supply, 1);

  await submit(detailer, await spool(lines.coolingReturn), "Issued for review");

  const glycol = await submit(detailer, await spool(lines.glycolClosing()), "Closing piece after survey");
  await as(inspector, (context) => returnRevision(context, glycol, "Show the second reading of nozzle N4 as well before this is cut."));

  const header = await issue(people, await spool(lines.chillerHeader), "Issued for fabrication");
  await as(inspector, (context) => holdRevision(context, header, "CH-2 inlet is being re-drilled; wait for the new elevation."));

  const station = await spool(lines.valveStation);
  const stationRevision = await issue(people, station, "Issued for fabrication");
  await cutPieces(fitter, station, 99);
  await weldAll(fitter, inspector, station);
  await as(inspector, (context) => closeAsBuilt(context, stationRevision, "Dimensions checked within the shop's tolerance."));

  const drain = await submit(detailer, await spool(lines.slopedDrain), "Issued for review");
  await as(inspector, (context) => voidRevision(context, drain, "The sump was moved; the drain is routed anew."));

  await issue(people, await spool(lines.rackLine), "Issued for fabrication");
  await submit(detailer, await spool(lines.rackLine, "B"), "Issued for review");
}

async function spoolId(owner: Actor, lineId: string, letter: string): Promise<string> {
  const row = await inShop(owner).first(Spool, { lineId, letter });
  if (row === null) throw new Error(`The demo line has no spool ${letter}.`);
  return row.id;
}

async function submit(detailer: Actor, id: string, description: string): Promise<string> {
  const { revisionId } = await as(detailer, (context) => submitRevision(context, id, { description, size: "tabloid" }));
  return revisionId;
}

async function issue({ detailer, inspector }: People, id: string, description: string): Promise<string> {
  const revisionId = await submit(detailer, id, description);
  const { input } = await frozenInput(inspector, revisionId);
  const accepted = unverifiedDimensions(input).map((dimension) => dimension.pointId);
  await as(inspector, (context) => signRevision(context, revisionId, { accepted }));
  return revisionId;
}

/** The survey moved the end: one length changes, everything else stays. */
async function lengthenSupply(context: CommandContext, lineId: string): Promise<void> {
  const line = await inShop(context.viewer).one(Line, lineId, context.tx);
  const document = JSON.parse(line.document) as RunDocument;
  const point = document.runs[0]?.points[3];
  if (point?.offset.kind !== "polar") throw new Error("The demo line changed its shape.");
  point.offset.length = { text: "4-6", mm: 54 * 25.4 };
  await saveLine(context, lineId, { version: line.version, document });
}

/** The live revision's content, for marks and keys. */
async function liveModel(actor: Actor, id: string) {
  const revision = await inShop(actor).first(Revision, { spoolId: id, state: "for-fabrication" });
  if (revision === null) throw new Error("The demo spool is not issued.");
  const { input }: { input: SheetInput } = await frozenInput(actor, revision.id);
  const model = buildModel(input.document, input.marks, input.takeOuts);
  return {
    pieces: model.pieces.filter((piece) => piece.spool === input.spool),
    welds: model.joints.filter((joint) => joint.spool === input.spool && joint.number !== null),
  };
}

async function cutPieces(fitter: Actor, id: string, most: number): Promise<void> {
  const { pieces } = await liveModel(fitter, id);
  for (const { mark, key } of pieces.slice(0, most)) {
    await as(fitter, (context) => recordWork(context, id, { kind: "cut", mark, key, values: { heat: "H-77120", remarks: "" } }));
  }
}

async function weldAll(fitter: Actor, inspector: Actor, id: string): Promise<void> {
  const { welds } = await liveModel(fitter, id);
  for (const { number, key } of welds) {
    const mark = number ?? "";
    await as(fitter, (context) => recordWork(context, id, { kind: "fit-up", mark, key, values: { gap: "1/8", remarks: "" } }));
    const values = { welder: "W-07", procedure: "CB-W1", heatA: "H-77120", heatB: "H-80412", remarks: "" };
    await as(fitter, (context) => recordWork(context, id, { kind: "weld", mark, key, values }));
    await as(inspector, (context) => recordWork(context, id, { kind: "visual", mark, key, values: { result: "accepted", remarks: "" } }));
  }
}

seed()
  .finally(closeDb)
  .catch((error: unknown) => {
    console.error(error);
    process.exitCode = 1;
  });
