/** The role table at the routes: every row allowed for those who may, refused with 403 for those who may not. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as auditRoute from "@/app/api/shop/audit/route";
import * as benchRoute from "@/app/api/bench/route";
import * as invitations from "@/app/api/shop/invitations/route";
import * as jobRoute from "@/app/api/jobs/[jobId]/route";
import * as jobs from "@/app/api/jobs/route";
import * as lineCopy from "@/app/api/lines/[lineId]/copy/route";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as nests from "@/app/api/jobs/[jobId]/nests/route";
import * as linesOfJob from "@/app/api/jobs/[jobId]/lines/route";
import * as people from "@/app/api/shop/people/route";
import * as personRoute from "@/app/api/shop/people/[membershipId]/route";
import * as reviewRoute from "@/app/api/revisions/[revisionId]/route";
import * as asBuilt from "@/app/api/revisions/[revisionId]/as-built/route";
import * as hold from "@/app/api/revisions/[revisionId]/hold/route";
import * as release from "@/app/api/revisions/[revisionId]/release/route";
import * as returned from "@/app/api/revisions/[revisionId]/return/route";
import * as sheet from "@/app/api/revisions/[revisionId]/sheet/route";
import * as sign from "@/app/api/revisions/[revisionId]/sign/route";
import * as voided from "@/app/api/revisions/[revisionId]/void/route";
import * as shopLogo from "@/app/api/shop/logo/route";
import * as shopRoute from "@/app/api/shop/route";
import * as packages from "@/app/api/jobs/[jobId]/packages/route";
import * as packageSheets from "@/app/api/jobs/[jobId]/packages/sheets/route";
import * as offcuts from "@/app/api/shop/offcuts/route";
import * as draftSheet from "@/app/api/spools/[spoolId]/sheet/route";
import * as spoolRoute from "@/app/api/spools/[spoolId]/route";
import * as submit from "@/app/api/spools/[spoolId]/submit/route";
import * as takeOuts from "@/app/api/shop/take-outs/route";
import * as uploadRoute from "@/app/api/uploads/[uploadId]/route";
import * as uploads from "@/app/api/lines/[lineId]/uploads/route";
import type { Role } from "@/lib/rules/api-types";
import { sampleDocument } from "../factories";
import { pngFile } from "./files";
import { routeNamed } from "./routes";
import { marksOf, signBody, signed, submitted, type TestRevision } from "./revision-support";
import { addMember, call, type Call, endOfFile, newLine, newShop, ROLES, type TestLine, type TestShop, unique } from "./support";

const work = { POST: await routeNamed("POST /spools/[spoolId]/work") };
let shop: TestShop;
let issued: TestRevision;
beforeAll(async () => {
  shop = await newShop();
  issued = await signed(shop);
});
afterAll(endOfFile);


interface Row {
  readonly what: string;
  readonly handler: unknown;
  readonly method: string;
  /** Roles that may, in the order owner, detailer, inspector, fitter. */
  readonly may: string;
  readonly needs?: "line" | "submitted" | "signed";
  readonly make: (fresh: TestRevision & TestLine) => Omit<Call, "method" | "as"> | Promise<Omit<Call, "method" | "as">>;
}

const onRevision = (more: object = {}) => ({ revisionId }: TestRevision) => ({ params: { revisionId }, ...more });
const onSpool = (more: object = {}) => ({ spoolIds }: TestLine) => ({ params: { spoolId: spoolIds[0]! }, ...more });
const onLine = (more: object = {}) => ({ lineId }: TestLine) => ({ params: { lineId }, ...more });
const reason = { body: { reason: "A reason to read", verified: true } };
const recorded = (kind: string, which: "piece" | "weld", values: Record<string, string>) => async ({ spoolIds, lineId }: TestLine) => ({
  params: { spoolId: spoolIds[0]! },
  body: { kind, ...(await marksOf(lineId))[which], values },
});

const ROWS: readonly Row[] = [
  { what: "invite a person", handler: invitations.POST, method: "POST", may: "ynnn", make: () => ({ body: { email: `${unique("i")}@shop.example`, role: "fitter" } }) },
  { what: "change a role", handler: personRoute.PATCH, method: "PATCH", may: "ynnn", make: async () => ({ params: { membershipId: (await addMember(shop.shopId, "fitter")).membershipId }, body: { role: "inspector" } }) },
  { what: "remove a person", handler: personRoute.DELETE, method: "DELETE", may: "ynnn", make: async () => ({ params: { membershipId: (await addMember(shop.shopId, "fitter")).membershipId } }) },
  { what: "change settings, title block and stock", handler: shopRoute.PATCH, method: "PATCH", may: "ynnn", make: () => ({ body: { sheetSize: "letter", fields: [{ label: "Area", value: "1" }], stock: [] } }) },
  { what: "change the logo", handler: shopLogo.PUT, method: "PUT", may: "ynnn", make: () => ({ file: { name: "l.png", bytes: pngFile() } }) },
  { what: "word on a take-out", handler: takeOuts.POST, method: "POST", may: "ynnn", make: () => ({ body: { key: "elbow:lr-90:10", valueMm: 382 } }) },
  { what: "put an offcut on the rack", handler: offcuts.POST, method: "POST", may: "ynnn", make: () => ({ body: { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 700, heat: "" } }) },
  { what: "read the rack", handler: offcuts.GET, method: "GET", may: "yyyy", make: () => ({}) },
  { what: "ask for a cutting plan", handler: nests.POST, method: "POST", may: "yynn", needs: "line", make: ({ jobId, spoolIds }) => ({ params: { jobId }, body: { spoolIds: [spoolIds[0]!], saw: "Band saw" } }) },
  { what: "read packages", handler: packages.GET, method: "GET", may: "yyyy", needs: "line", make: ({ jobId }) => ({ params: { jobId } }) },
  { what: "read the sheets that may be packed", handler: packageSheets.GET, method: "GET", may: "yyyy", needs: "line", make: ({ jobId }) => ({ params: { jobId } }) },
  { what: "read cutting plans", handler: nests.GET, method: "GET", may: "yyyy", needs: "line", make: ({ jobId }) => ({ params: { jobId } }) },
  { what: "read settings", handler: shopRoute.GET, method: "GET", may: "yyyy", make: () => ({}) },
  { what: "read people", handler: people.GET, method: "GET", may: "yyyy", make: () => ({}) },
  { what: "read the log", handler: auditRoute.GET, method: "GET", may: "yyyn", make: () => ({}) },
  { what: "open a job", handler: jobs.POST, method: "POST", may: "yynn", make: () => ({ body: { number: unique("J"), title: "t", client: "", area: "", units: "metric" } }) },
  { what: "change a job", handler: jobRoute.PATCH, method: "PATCH", may: "yynn", needs: "line", make: ({ jobId }) => ({ params: { jobId }, body: { title: "Other" } }) },
  { what: "add a line", handler: linesOfJob.POST, method: "POST", may: "yynn", needs: "line", make: ({ jobId }) => ({ params: { jobId }, body: { number: unique("L"), title: "" } }) },
  { what: "save a run", handler: lineRoute.PUT, method: "PUT", may: "yynn", needs: "line", make: ({ lineId }) => ({ params: { lineId }, body: { version: 1, document: sampleDocument(unique("L"), 1_200) } }) },
  { what: "rename a line", handler: lineRoute.PATCH, method: "PATCH", may: "yynn", needs: "line", make: onLine({ body: { title: "Renamed" } }) },
  { what: "copy a line", handler: lineCopy.POST, method: "POST", may: "yynn", needs: "line", make: onLine({ body: { number: "copy", title: "" } }) },
  { what: "attach a sketch", handler: uploads.POST, method: "POST", may: "yynn", needs: "line", make: onLine({ file: { name: "s.png", bytes: pngFile() } }) },
  { what: "read a line", handler: lineRoute.GET, method: "GET", may: "yyyn", needs: "line", make: onLine() },
  { what: "read a draft sheet", handler: draftSheet.GET, method: "GET", may: "yyyn", needs: "line", make: onSpool() },
  { what: "read a revision for review", handler: reviewRoute.GET, method: "GET", may: "yyyn", needs: "submitted", make: onRevision() },
  { what: "submit a revision", handler: submit.POST, method: "POST", may: "yynn", needs: "line", make: onSpool({ body: { description: "First", size: "letter" } }) },
  { what: "sign", handler: sign.POST, method: "POST", may: "ynyn", needs: "submitted", make: onRevision({ body: signBody }) },
  { what: "return", handler: returned.POST, method: "POST", may: "ynyn", needs: "submitted", make: onRevision(reason) },
  { what: "hold", handler: hold.POST, method: "POST", may: "ynyn", needs: "signed", make: onRevision(reason) },
  { what: "void", handler: voided.POST, method: "POST", may: "ynyn", needs: "signed", make: onRevision(reason) },
  { what: "close as built", handler: asBuilt.POST, method: "POST", may: "ynyn", needs: "signed", make: onRevision(reason) },
  { what: "record a cut", handler: work.POST, method: "POST", may: "ynyy", needs: "signed", make: recorded("cut", "piece", { heat: "H-1" }) },
  { what: "record a fit-up", handler: work.POST, method: "POST", may: "ynyy", needs: "signed", make: recorded("fit-up", "weld", { gap: "1/8" }) },
  { what: "record a weld", handler: work.POST, method: "POST", may: "ynyy", needs: "signed", make: recorded("weld", "weld", { welder: "W-7" }) },
  { what: "record a visual examination", handler: work.POST, method: "POST", may: "ynyn", needs: "signed", make: recorded("visual", "weld", { result: "accepted" }) },
  { what: "record a measured length", handler: work.POST, method: "POST", may: "yyyy", needs: "signed", make: recorded("actual", "piece", { actual: "26 1/4" }) },
  { what: "read the bench", handler: benchRoute.GET, method: "GET", may: "yyyy", make: () => ({}) },
  { what: "read a spool that is issued", handler: spoolRoute.GET, method: "GET", may: "yyyy", needs: "signed", make: onSpool() },
  { what: "print an issued sheet", handler: sheet.GET, method: "GET", may: "yyyy", needs: "signed", make: onRevision({ query: "?kind=fabrication&copy=1" }) },
];

async function fresh(needs: Row["needs"]): Promise<TestRevision & TestLine> {
  if (needs === "submitted") return submitted(shop);
  if (needs === "signed") return signed(shop);
  if (needs === "line") return { ...(await newLine(shop)), spoolId: "", revisionId: "" };
  return issued;
}

describe("the role table at the routes", () => {
  for (const row of ROWS) {
    test(`${row.what}: ${ROLES.filter((_, index) => row.may[index] === "y").join(", ")}`, async () => {
      for (const [index, role] of ROLES.entries()) {
        const sent = await row.make(await fresh(row.needs));
        const answer = await call(row.handler, { ...sent, as: shop[role], method: row.method });
        const shown = `${role}: ${answer.status} ${answer.text.slice(0, 300)}`;
        if (row.may[index] === "y") expect(answer.status, shown).toBeLessThan(300);
        else expect(answer.status, shown).toBe(403);
      }
    });
  }

  test("releasing a hold: owner, inspector", async () => {
    for (const [role, status] of [["fitter", 403], ["detailer", 403], ["inspector", 200], ["owner", 200]] as const satisfies readonly (readonly [Role, number])[]) {
      const { revisionId } = await signed(shop);
      await call(hold.POST, { as: shop.owner, method: "POST", params: { revisionId }, ...reason });
      expect((await call(release.POST, { as: shop[role], method: "POST", params: { revisionId }, ...reason })).status).toBe(status);
    }
  });
});

describe("a fitter sees issued sheets only", () => {
  test("jobs, lines and spools with nothing issued are not there", async () => {
    const bare = await newLine(shop);
    const mine = await call(jobs.GET, { as: shop.fitter });
    expect(mine.json.map((row: { id: string }) => row.id)).toContain(issued.jobId);
    expect(mine.json.map((row: { id: string }) => row.id)).not.toContain(bare.jobId);
    expect((await call(jobs.GET, { as: shop.inspector })).json.map((row: { id: string }) => row.id)).toContain(bare.jobId);
    expect((await call(jobRoute.GET, { as: shop.fitter, params: { jobId: bare.jobId } })).status).toBe(403);
    expect([403, 404]).toContain((await call(spoolRoute.GET, { as: shop.fitter, params: { spoolId: bare.spoolIds[0]! } })).status);
  });

  test("an issued spool shows its live sheet and no draft", async () => {
    const spool = await call(spoolRoute.GET, { as: shop.fitter, params: { spoolId: issued.spoolIds[0]! } });
    expect(spool.json.draft).toBeNull();
    expect(spool.json.live.revisionId).toBe(issued.revisionId);
    const job = await call(jobRoute.GET, { as: shop.fitter, params: { jobId: issued.jobId } });
    expect(job.json.lines).toHaveLength(1);
  });

  test("a sheet that is for review is not printed for a fitter", async () => {
    const { revisionId } = await submitted(shop);
    const answer = await call(sheet.GET, { as: shop.fitter, params: { revisionId }, query: "?kind=review" });
    expect([403, 404]).toContain(answer.status);
    expect(answer.text).not.toContain("%PDF");
  });

  test("a sketch on a line is not theirs to see", async () => {
    const { lineId } = await newLine(shop);
    const { json } = await call(uploads.POST, { as: shop.detailer, method: "POST", params: { lineId }, file: { name: "s.png", bytes: pngFile() } });
    expect((await call(uploadRoute.GET, { as: shop.fitter, params: { uploadId: json.id } })).status).toBe(403);
  });
});
