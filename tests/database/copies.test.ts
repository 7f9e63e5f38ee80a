/** Who holds which copy of a sheet, who is told when it is dead, and what has to come back until it is marked. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as ownRoute from "@/app/api/copies/route";
import * as withdrawRoute from "@/app/api/copies/withdraw/route";
import * as jobCopies from "@/app/api/jobs/[jobId]/copies/route";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as hold from "@/app/api/revisions/[revisionId]/hold/route";
import * as release from "@/app/api/revisions/[revisionId]/release/route";
import * as sheetRoute from "@/app/api/revisions/[revisionId]/sheet/route";
import * as signRoute from "@/app/api/revisions/[revisionId]/sign/route";
import * as voidRoute from "@/app/api/revisions/[revisionId]/void/route";
import * as spoolCopies from "@/app/api/spools/[spoolId]/copies/route";
import * as submitRoute from "@/app/api/spools/[spoolId]/submit/route";
import type { CopyRow } from "@/lib/rules/copies";
import { pointAt } from "../factories";
import { signBody, signed, submitted, type TestRevision } from "./revision-support";
import { addMember, call, endOfFile, newShop, type TestPerson, type TestShop, withClient } from "./support";

const reason = { body: { reason: "Wrong flange", verified: true } };
let shop: TestShop;
let revision: TestRevision;

beforeAll(async () => {
  shop = await newShop();
  revision = await signed(shop);
});
afterAll(endOfFile);

const take = (as: TestPerson, query = "?copy=1", revisionId = revision.revisionId) => call(sheetRoute.GET, { as, params: { revisionId }, query });
const copies = async (as: TestPerson, spoolId = revision.spoolId) => (await call(spoolCopies.GET, { as, params: { spoolId } })).json as CopyRow[];
const due = async (as: TestPerson) => (await call(jobCopies.GET, { as, params: { jobId: revision.jobId } })).json as CopyRow[];
const own = async (as: TestPerson) => (await call(ownRoute.GET, { as })).json as CopyRow[];
const withdraw = (as: TestPerson, copyIds: readonly string[]) => call(withdrawRoute.POST, { as, method: "POST", body: { copyIds } });
const act = (handler: unknown, revisionId = revision.revisionId) => call(handler, { as: shop.inspector, method: "POST", params: { revisionId }, ...reason });

/** Mails waiting to be sent to a person, newest first. */
async function mailsTo(person: TestPerson): Promise<{ subject: string; text: string }[]> {
  return withClient("super", async (client) => {
    const rows = await client.query<{ data: { subject: string; text: string } }>("SELECT data FROM pgboss.job WHERE name = 'mail' AND data->>'to' = $1 ORDER BY created_on DESC", [person.email]);
    return rows.rows.map((row) => row.data);
  });
}

describe("copies out", () => {
  test("lists who printed or downloaded which revision when, newest first", async () => {
    expect(await copies(shop.owner)).toEqual([]);
    expect((await take(shop.fitter)).status).toBe(200);
    expect((await take(shop.detailer, "?kind=fabrication")).status).toBe(200);
    expect((await take(shop.inspector, "?kind=review")).status).toBe(200);
    const rows = await copies(shop.owner);
    expect(rows.map(({ by, kind, marked, code, withdraw: comesBack, withdrawn }) => ({ by, kind, marked, code, comesBack, withdrawn }))).toEqual([
      { by: "Pat inspector", kind: "review", marked: "ORIGINAL", code: "A", comesBack: false, withdrawn: null },
      { by: "Pat detailer", kind: "fabrication", marked: "ORIGINAL", code: "A", comesBack: false, withdrawn: null },
      { by: "Pat fitter", kind: "fabrication", marked: "UNCONTROLLED COPY", code: "A", comesBack: false, withdrawn: null },
    ]);
    expect(rows[0]!.at >= rows[2]!.at).toBe(true);
    expect(await due(shop.owner)).toEqual([]);
  });

  test("shows a fitter copies of issued sheets only, and which are their own", async () => {
    const rows = await copies(shop.fitter);
    expect(rows.map((row) => [row.kind, row.mine])).toEqual([["fabrication", false], ["fabrication", true]]);
  });

  test("have to come back while their revision is on hold", async () => {
    expect((await act(hold.POST)).status).toBe(200);
    expect((await due(shop.owner)).map((row) => row.by)).toEqual(["Pat detailer", "Pat fitter"]);
    // A line on the pages of each who holds one, and of nobody else.
    expect((await own(shop.fitter)).map(({ by, code, hold: held, mine }) => ({ by, code, held, mine }))).toEqual([{ by: "Pat fitter", code: "A", held: true, mine: true }]);
    expect((await own(shop.detailer)).map((row) => row.marked)).toEqual(["ORIGINAL"]);
    expect(await own(shop.owner)).toEqual([]);
    expect((await act(release.POST)).status).toBe(200);
    expect(await due(shop.owner)).toEqual([]);
    expect(await own(shop.fitter)).toEqual([]);
  });

  test("are named to those who hold them when the revision dies, fitters or not; the list stays until each is marked", async () => {
    const second = await addMember(shop.shopId, "inspector");
    await take(second);
    const before = await mailsTo(second);
    expect((await act(voidRoute.POST)).status).toBe(200);
    const [mail, ...older] = await mailsTo(second);
    expect(older).toEqual(before);
    expect(mail!.subject).toContain("VOID");
    expect(mail!.text).toMatch(/Copies out in your name:\n- Printed, \d{4}-\d\d-\d\d \d\d:\d\d UTC\nTake them out of use/);
    const [fitters] = await mailsTo(shop.fitter);
    expect(fitters!.text).toContain("Copies out in your name:");
    const [submitters] = await mailsTo(shop.detailer);
    expect(submitters!.text).toContain("- Downloaded, unmarked,");

    const rows = await due(shop.owner);
    expect(rows.map((row) => row.by)).toEqual(["Pat inspector", "Pat detailer", "Pat fitter"]);
    const fittersOwn = rows.find((row) => row.by === "Pat fitter")!;
    const another = rows.find((row) => row.by === "Pat detailer")!;
    expect((await withdraw(shop.fitter, [another.id])).status).toBe(403);
    expect((await withdraw(shop.fitter, [fittersOwn.id])).status).toBe(200);
    expect((await due(shop.owner)).map((row) => row.by)).toEqual(["Pat inspector", "Pat detailer"]);
    expect([(await own(shop.fitter)).length, (await own(shop.detailer)).length]).toEqual([0, 1]);
    expect((await withdraw(shop.owner, rows.map((row) => row.id))).status).toBe(200);
    expect(await due(shop.owner)).toEqual([]);
    const marked = (await copies(shop.owner)).find((row) => row.id === fittersOwn.id)!;
    expect(marked.withdrawn).toMatchObject({ by: "Pat fitter" });
    expect((await withdraw(shop.owner, [fittersOwn.id])).status).toBe(200);
    expect((await copies(shop.owner)).find((row) => row.id === fittersOwn.id)!.withdrawn).toEqual(marked.withdrawn);
  });

  test("printed of a dead revision carry its word and need not come back", async () => {
    await take(shop.fitter);
    const [newest] = await copies(shop.owner);
    expect(newest).toMatchObject({ marked: "VOID", withdraw: false });
    expect(await due(shop.owner)).toEqual([]);
  });

  test("are not to be marked by a list that is empty, wrong or names an unknown copy", async () => {
    for (const copyIds of [[], ["no id"], Array.from({ length: 501 }, () => crypto.randomUUID())]) expect((await withdraw(shop.owner, copyIds)).status).toBe(400);
    expect((await withdraw(shop.owner, [crypto.randomUUID()])).status).toBe(404);
  });

  test("of a spool nothing is issued of are nobody's to see for a fitter", async () => {
    const open = await submitted(shop);
    await take(shop.owner, "?kind=review", open.revisionId);
    expect(await copies(shop.owner, open.spoolId)).toHaveLength(1);
    expect(await copies(shop.fitter, open.spoolId)).toEqual([]);
  });
});

describe("when a new revision supersedes the one they hold", () => {
  test("holders are mailed what they hold of the old one, it stands on their pages and on the list, and the new one's copies do not", async () => {
    const first = await signed(shop);
    const holder = await addMember(shop.shopId, "inspector");
    expect((await take(holder, "?copy=1", first.revisionId)).status).toBe(200);
    const detail = (await call(lineRoute.GET, { as: shop.detailer, params: { lineId: first.lineId } })).json;
    const document = structuredClone(detail.document);
    document.runs[0].points[1].offset = pointAt("b", [1_444, 0, 0]).offset;
    expect((await call(lineRoute.PUT, { as: shop.detailer, method: "PUT", params: { lineId: first.lineId }, body: { version: detail.version, document } })).status).toBe(200);
    const next = await call(submitRoute.POST, { as: shop.detailer, method: "POST", params: { spoolId: first.spoolId }, body: { description: "Longer", size: "letter" } });
    const { revisionId } = next.json as { revisionId: string };
    expect(await own(holder)).toEqual([]);
    expect((await call(signRoute.POST, { as: shop.inspector, method: "POST", params: { revisionId }, body: signBody })).status).toBe(200);

    const [mail] = await mailsTo(holder);
    expect(mail!.text).toContain("Revision A is SUPERSEDED");
    expect(mail!.text).toMatch(/Copies out in your name:\n- Printed,/);
    await take(holder, "?copy=1", revisionId);
    expect((await own(holder)).map(({ code, state, spoolId }) => ({ code, state, spoolId }))).toEqual([{ code: "A", state: "superseded", spoolId: first.spoolId }]);
    const list = (await call(jobCopies.GET, { as: shop.owner, params: { jobId: first.jobId } })).json as CopyRow[];
    expect(list.map(({ by, code }) => `${by} ${code}`)).toEqual(["Pat inspector A"]);
    expect((await withdraw(holder, list.map((row) => row.id))).status).toBe(200);
    expect(await own(holder)).toEqual([]);
  });
});
