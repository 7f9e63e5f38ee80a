/**
 * One recipe per route and method: how its owner calls it so that it succeeds. `scope` says what the same request from
 * another shop's owner must come to: "foreign-id" names a row of the first shop in the request and must answer 404;
 * "own" names none, so it must touch and show the other shop only; "public" is for anybody, for the reason given.
 */
import * as shopLogo from "@/app/api/shop/logo/route";
import * as jobLogo from "@/app/api/jobs/[jobId]/logo/route";
import * as invitations from "@/app/api/shop/invitations/route";
import * as nests from "@/app/api/jobs/[jobId]/nests/route";
import * as packages from "@/app/api/jobs/[jobId]/packages/route";
import * as offcuts from "@/app/api/shop/offcuts/route";
import * as uploads from "@/app/api/lines/[lineId]/uploads/route";
import * as hold from "@/app/api/revisions/[revisionId]/hold/route";
import { emptySurvey } from "@/iso";
import { sampleDocument } from "../factories";
import { sampleMeasurement } from "../measurements";
import { pngFile } from "./files";
import { uploadedP12 } from "../p12-files";
import { copyOf, marksOf, signBody, signed, submitted } from "./revision-support";
import { addMember, call, newLine, unique, type Answer, type Call, type TestShop } from "./support";

export interface Recipe {
  readonly scope: "foreign-id" | "own" | "public";
  /** Why it needs no 404 where it is public. */
  readonly because?: string;
  readonly make: (shop: TestShop) => Promise<Omit<Call, "method">>;
}

const foreign = (make: Recipe["make"]): Recipe => ({ scope: "foreign-id", make });
const own = (make: Recipe["make"]): Recipe => ({ scope: "own", make });
const open = (because: string): Recipe => ({ scope: "public", because, make: async () => ({}) });

async function made(answer: Promise<Answer>): Promise<string> {
  const { status, text, json } = await answer;
  if (status >= 300) throw new Error(`making a row answered ${status} ${text}`);
  return json.id as string;
}

const upload = async (shop: TestShop) => {
  const { lineId } = await newLine(shop);
  const file = { name: "sketch.png", bytes: pngFile() };
  return made(call(uploads.POST, { as: shop.owner, method: "POST", params: { lineId }, file }));
};
const invitation = (shop: TestShop) => made(call(invitations.POST, { as: shop.owner, method: "POST", body: { email: `${unique("x")}@shop.example`, role: "fitter" } }));
const logoKey = async (shop: TestShop, side: number) => {
  const { sha256Hex } = await import("@/lib/server/storage");
  const bytes = pngFile(side, side);
  await call(shopLogo.PUT, { as: shop.owner, method: "PUT", file: { name: "logo.png", bytes } });
  return sha256Hex(bytes);
};
const onLine = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { lineId: (await newLine(shop)).lineId }, ...more }));
const onJob = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { jobId: (await newLine(shop)).jobId }, ...more }));
const onSpool = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { spoolId: (await newLine(shop)).spoolIds[0]! }, ...more }));
const onSubmitted = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { revisionId: (await submitted(shop)).revisionId }, ...more }));
const onSigned = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { revisionId: (await signed(shop)).revisionId }, ...more }));
const nest = async (shop: TestShop) => {
  const { jobId, spoolId } = await signed(shop);
  return made(call(nests.POST, { as: shop.owner, method: "POST", params: { jobId }, body: { spoolIds: [spoolId], saw: "Band saw", seconds: 1 } }));
};
const onNest = () => foreign(async (shop) => ({ params: { nestId: await nest(shop) } }));
const madeOf = async (shop: TestShop, more: object = {}) => {
  const { jobId, revisionId } = await signed(shop);
  return made(call(packages.POST, { as: shop.owner, method: "POST", params: { jobId }, body: { revisionIds: [revisionId], form: "pdf", ...more } }));
};
const readyPackage = async (shop: TestShop, more: object = {}) => {
  const packageId = await madeOf(shop, more);
  const { runPackageJob } = await import("@/lib/jobs/package-job");
  await runPackageJob({ shopId: shop.shopId, packageId });
  return packageId;
};
const onPackage = () => foreign(async (shop) => ({ params: { packageId: await madeOf(shop) } }));
const onReadyPackage = () => foreign(async (shop) => ({ params: { packageId: await readyPackage(shop) } }));
const reason = { body: { reason: "A reason to read", verified: true } };
const member = (more: Omit<Call, "method"> = {}) => foreign(async (shop) => ({ params: { membershipId: (await addMember(shop.shopId, "fitter")).membershipId }, ...more }));

export const RECIPES: Readonly<Record<string, Recipe>> = {
  "GET /auth/[...nextauth]": open("next-auth's own routes know no shop"),
  "POST /auth/[...nextauth]": open("next-auth's own routes know no shop"),
  "GET /health": open("says only whether the process works"),
  "GET /outbox": open("answers in demo mode on loopback only"),
  "GET /status/[token]": open("the printed token is the permission; it shows state, never content"),
  "POST /sign-up": open("nobody is signed in yet"),
  "POST /invitations/accept": open("the mailed token is the permission"),
  "POST /password-reset": open("nobody is signed in"),
  "POST /password-reset/confirm": open("the mailed token is the permission"),

  "GET /viewer": own(async () => ({})),
  "POST /viewer/shop": foreign(async (shop) => ({ body: { shopId: shop.shopId } })),
  "GET /sessions": own(async () => ({})),
  "DELETE /sessions/[sessionId]": foreign(async (shop) => {
    const { startSession } = await import("@/lib/server/session");
    return { params: { sessionId: (await startSession(shop.owner.personId, "Second")) ?? "" } };
  }),
  "GET /shop": own(async () => ({})),
  "PATCH /shop": own(async () => ({ body: { sheetSize: "A4" } })),
  "GET /shop/people": own(async () => ({})),
  "PATCH /shop/people/[membershipId]": member({ body: { role: "inspector" } }),
  "DELETE /shop/people/[membershipId]": member(),
  "GET /shop/invitations": own(async () => ({})),
  "POST /shop/invitations": own(async () => ({ body: { email: `${unique("y")}@shop.example`, role: "fitter" } })),
  "DELETE /shop/invitations/[invitationId]": foreign(async (shop) => ({ params: { invitationId: await invitation(shop) } })),
  "PUT /shop/logo": own(async () => ({ file: { name: "logo.png", bytes: pngFile(9, 9) } })),
  "DELETE /shop/logo": own(async () => ({})),
  "GET /shop/certificate": own(async () => ({})),
  "PUT /shop/certificate": own(async () => ({ body: { p12: uploadedP12({ password: "open it" }).toString("base64"), password: "open it" } })),
  "POST /shop/certificate": own(async () => ({})),
  "GET /shop/take-outs": own(async () => ({})),
  "POST /shop/take-outs": own(async () => ({ body: { key: "elbow:lr-90:6", valueMm: 230 } })),
  "GET /shop/offcuts": own(async () => ({})),
  "POST /shop/offcuts": own(async () => ({ body: { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 900, heat: "H-9" } })),
  "DELETE /shop/offcuts/[offcutId]": foreign(async (shop) => {
    const body = { nps: "4", schedule: "STD", material: "ASTM A106 Gr B", lengthMm: 800, heat: "" };
    return { params: { offcutId: await made(call(offcuts.POST, { as: shop.owner, method: "POST", body })) } };
  }),
  "GET /shop/audit": own(async () => ({})),
  "GET /jobs": own(async () => ({})),
  "POST /jobs": own(async () => ({ body: { number: unique("J"), title: "New", client: "", area: "", units: "imperial" } })),
  "GET /jobs/[jobId]": onJob(),
  "PATCH /jobs/[jobId]": onJob({ body: { title: "Another title" } }),
  "PUT /jobs/[jobId]/logo": onJob({ file: { name: "logo.png", bytes: pngFile(10, 10) } }),
  "DELETE /jobs/[jobId]/logo": foreign(async (shop) => {
    const { jobId } = await newLine(shop);
    await call(jobLogo.PUT, { as: shop.owner, method: "PUT", params: { jobId }, file: { name: "logo.png", bytes: pngFile(11, 11) } });
    return { params: { jobId } };
  }),
  "GET /jobs/[jobId]/copies": onJob(),
  "GET /jobs/[jobId]/lines": onJob(),
  "POST /jobs/[jobId]/lines": onJob({ body: { number: "L-new", title: "" } }),
  "GET /jobs/[jobId]/nests": onJob(),
  "POST /jobs/[jobId]/nests": foreign(async (shop) => {
    const { jobId, spoolIds } = await newLine(shop);
    return { params: { jobId }, body: { spoolIds, saw: "Band saw" } };
  }),
  "GET /jobs/[jobId]/packages": onJob(),
  "GET /jobs/[jobId]/packages/sheets": onJob(),
  "POST /jobs/[jobId]/packages": foreign(async (shop) => {
    const { jobId, revisionId } = await signed(shop);
    return { params: { jobId }, body: { revisionIds: [revisionId], form: "pdf" } };
  }),
  "GET /packages/[packageId]": onPackage(),
  "POST /packages/[packageId]/cancel": onPackage(),
  "POST /packages/[packageId]/again": onPackage(),
  "GET /packages/[packageId]/file": onReadyPackage(),
  "POST /packages/[packageId]/receipt": foreign(async (shop) => {
    const transmittal = { number: "T-1", date: "2026-12-01", purpose: "For fabrication", recipient: "Cannery", replyBy: "", remark: "" };
    return { params: { packageId: await readyPackage(shop, { transmittal }) }, body: { receivedBy: "J. Cole", receivedOn: "2026-12-03" } };
  }),
  "GET /nests/[nestId]": onNest(),
  "GET /nests/[nestId]/export": onNest(),
  "POST /nests/[nestId]/cancel": onNest(),
  "POST /nests/[nestId]/cut": foreign(async (shop) => {
    const nestId = await nest(shop);
    const { runNestJob } = await import("@/lib/jobs/nest-job");
    await runNestJob({ shopId: shop.shopId, nestId });
    return { params: { nestId }, body: { verified: true } };
  }),
  "GET /lines/[lineId]": onLine(),
  "PUT /lines/[lineId]": foreign(async (shop) => {
    const number = unique("L");
    const { lineId } = await newLine(shop, sampleDocument(number));
    return { params: { lineId }, body: { version: 1, document: sampleDocument(number, 1_500) } };
  }),
  "PATCH /lines/[lineId]": onLine({ body: { title: "Another title" } }),
  "GET /lines/[lineId]/export": onLine({ query: "?what=points" }),
  "POST /lines/[lineId]/copy": onLine({ body: { number: "L-copy", title: "Copy" } }),
  "POST /lines/[lineId]/uploads": onLine({ file: { name: "photo.png", bytes: pngFile() } }),
  "GET /lines/[lineId]/survey": onLine(),
  "PUT /lines/[lineId]/survey": onLine({ body: { version: 0, document: emptySurvey("imperial") } }),
  "POST /lines/[lineId]/survey/photos": onLine({ file: { name: "photo.png", bytes: pngFile() } }),
  "GET /uploads/[uploadId]": foreign(async (shop) => ({ params: { uploadId: await upload(shop) } })),
  "DELETE /uploads/[uploadId]": foreign(async (shop) => ({ params: { uploadId: await upload(shop) } })),
  "GET /objects/logo/[key]": foreign(async (shop) => ({ params: { key: await logoKey(shop, 12) } })),

  "GET /spools/[spoolId]": onSpool(),
  "GET /spools/[spoolId]/copies": onSpool(),
  "GET /copies": own(async (shop) => {
    await copyOf(shop);
    return {};
  }),
  "POST /copies/withdraw": foreign(async (shop) => ({ body: { copyIds: [await copyOf(shop)] } })),
  "GET /spools/[spoolId]/sheet": onSpool({ query: "?size=A4" }),
  "GET /spools/[spoolId]/bench": onSpool({ query: "?kind=layout" }),
  "GET /spools/[spoolId]/sheet-set": onSpool({ query: "?parts=cuts,legend" }),
  "GET /spools/[spoolId]/compare": onSpool({ query: "?as=data" }),
  "GET /spools/[spoolId]/as-fitted": onSpool(),
  "POST /spools/[spoolId]/as-fitted": foreign(async (shop) => {
    const { spoolId } = await signed(shop);
    return { params: { spoolId }, body: { document: sampleMeasurement() } };
  }),
  "GET /spools/[spoolId]/as-fitted/sheet": onSpool({ query: "?size=A4" }),
  "GET /spools/[spoolId]/export": onSpool({ query: "?what=cuts&as=csv" }),
  "POST /spools/[spoolId]/submit": onSpool({ body: { description: "First issue", size: "letter" } }),
  "POST /spools/[spoolId]/work": foreign(async (shop) => {
    const { spoolId, lineId } = await signed(shop);
    return { params: { spoolId }, body: { kind: "cut", ...(await marksOf(lineId)).piece, values: { heat: "H-1" } } };
  }),
  "GET /bench": own(async (shop) => {
    await signed(shop);
    return {};
  }),
  "GET /revisions/[revisionId]": onSubmitted(),
  "GET /revisions/[revisionId]/sheet": onSubmitted(),
  "POST /revisions/[revisionId]/sign": onSubmitted({ body: signBody }),
  "POST /revisions/[revisionId]/return": onSubmitted(reason),
  "POST /revisions/[revisionId]/hold": onSubmitted(reason),
  "POST /revisions/[revisionId]/release": foreign(async (shop) => {
    const { revisionId } = await signed(shop);
    await call(hold.POST, { as: shop.owner, method: "POST", params: { revisionId }, ...reason });
    return { params: { revisionId }, ...reason };
  }),
  "POST /revisions/[revisionId]/void": onSigned(reason),
  "POST /revisions/[revisionId]/as-built": onSigned(reason),
};

