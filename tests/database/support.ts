/** What database tests share: shops with people of every role, and route handlers called as Next would call them. */
import { randomUUID } from "node:crypto";
import { encode } from "next-auth/jwt";
import { Client } from "pg";
import { addJob } from "@/lib/commands/change-jobs";
import { storeLine } from "@/lib/commands/add-line";
import { addPerson, openShop } from "@/lib/commands/open-shop";
import type { Role } from "@/lib/rules/api-types";
import { runCommand, type Actor } from "@/lib/server/command";
import { closeDb } from "@/lib/server/database";
import { hashPassword } from "@/lib/server/passwords";
import { sessionCookieName, startSession } from "@/lib/server/session";
import { settings } from "@/lib/server/settings";
import type { RouteHandler } from "@/lib/server/write";
import { Membership, Spool } from "@/models";
import type { RunDocument } from "@/iso";
import { sampleDocument } from "../factories";

export const PASSWORD = "a long enough password";
export const ROLES: readonly Role[] = ["owner", "detailer", "inspector", "fitter"];

export interface TestPerson extends Actor {
  readonly membershipId: string;
  readonly email: string;
  readonly cookie: string;
  readonly sessionId: string;
}

export interface TestShop extends Readonly<Record<Role, TestPerson>> {
  readonly shopId: string;
}

let made = 0;

/** A word no other test has used. */
export function unique(word: string): string {
  made += 1;
  return `${word}-${made}-${randomUUID().slice(0, 8)}`;
}

/** A shop with one person of each role, each signed in. */
export async function newShop(): Promise<TestShop> {
  const email = `${unique("owner")}@shop.example`;
  const opened = await runCommand(null, "logged", (context) => openShop(context, { shopName: unique("Shop"), name: "Olive Owner", email, password: PASSWORD }));
  const membership = await Membership.findOne({ where: { shopId: opened.shopId, personId: opened.personId }, rejectOnEmpty: true });
  const owner = await signedIn({ shopId: opened.shopId, personId: opened.personId, role: "owner", name: "Olive Owner" }, membership.id, email);
  const [detailer, inspector, fitter] = [
    await addMember(opened.shopId, "detailer"),
    await addMember(opened.shopId, "inspector"),
    await addMember(opened.shopId, "fitter"),
  ];
  return { shopId: opened.shopId, owner, detailer, inspector, fitter };
}

/** One more person of a role, signed in. */
export async function addMember(shopId: string, role: Role): Promise<TestPerson> {
  const email = `${unique(role)}@shop.example`;
  const name = `Pat ${role}`;
  const membershipId = randomUUID();
  const now = new Date();
  const passwordHash = await hashPassword(PASSWORD);
  const personId = await runCommand(null, "unlogged", async (context) => {
    const id = await addPerson({ email, name, passwordHash, createdAt: now }, context.tx);
    await Membership.create({ shopId, id: membershipId, personId: id, role, joinedAt: now }, { transaction: context.tx });
    return id;
  });
  return signedIn({ shopId, personId, role, name }, membershipId, email);
}

async function signedIn(actor: Actor, membershipId: string, email: string): Promise<TestPerson> {
  const sessionId = await startSession(actor.personId, "Test browser");
  if (sessionId === null) throw new Error("no session");
  return { ...actor, membershipId, email, sessionId, cookie: await cookieOf(sessionId) };
}

/** The cookie a browser would hold for a session. */
export async function cookieOf(sessionId: string): Promise<string> {
  const token = await encode({ token: { sid: sessionId }, secret: settings().NEXTAUTH_SECRET });
  return `${sessionCookieName()}=${token}`;
}

export interface Call {
  readonly as?: TestPerson | null;
  readonly method?: string;
  readonly params?: Readonly<Record<string, string>>;
  readonly query?: string;
  /** Sent as JSON; a string is sent as it is. */
  readonly body?: unknown;
  readonly file?: { readonly name: string; readonly bytes: Uint8Array };
  readonly headers?: Readonly<Record<string, string>>;
}

export interface Answer {
  readonly status: number;
  readonly headers: Headers;
  readonly bytes: Uint8Array;
  readonly text: string;
  // eslint-disable-next-line @typescript-eslint/no-explicit-any -- tests read whatever shape they expect
  readonly json: any;
}

/** Calls a route handler with a request as a page of the site would send it. */
export async function call(handler: unknown, { as = null, method = "GET", params = {}, query = "", body, file, headers = {} }: Call): Promise<Answer> {
  const sent = new Headers({ origin: settings().BASE_URL, ...(as === null ? {} : { cookie: as.cookie }) });
  if (method !== "GET" && file === undefined) sent.set("content-type", "application/json");
  for (const [name, value] of Object.entries(headers)) sent.set(name, value);
  const request = new Request(`${settings().BASE_URL}/api/test${query}`, { method, headers: sent, body: payload(method, body, file) });
  const answer = await (handler as RouteHandler)(request, { params: Promise.resolve(params) });
  const bytes = new Uint8Array(await answer.arrayBuffer());
  const text = new TextDecoder().decode(bytes);
  const isJson = (answer.headers.get("content-type") ?? "").includes("json");
  return { status: answer.status, headers: answer.headers, bytes, text, json: isJson && text !== "" ? JSON.parse(text) : null };
}

function payload(method: string, body: unknown, file: Call["file"]): BodyInit | undefined {
  if (method === "GET" || method === "HEAD") return undefined;
  if (file !== undefined) {
    const form = new FormData();
    form.append("file", new File([file.bytes.slice().buffer], file.name));
    return form;
  }
  return typeof body === "string" ? body : JSON.stringify(body ?? {});
}

export interface TestLine {
  readonly jobId: string;
  readonly lineId: string;
  readonly spoolIds: readonly string[];
}

/** A job with one line of the document and its spools, made by the detailer. */
export async function newLine(shop: TestShop, document: RunDocument = sampleDocument(unique("L"))): Promise<TestLine> {
  const job = await runCommand<Actor, { id: string }>(shop.detailer, "logged", (context) =>
    addJob(context, { number: unique("J"), title: "Test job", client: "Client", area: "Area 1", units: "imperial" }),
  );
  const line = await runCommand<Actor, { id: string }>(shop.detailer, "logged", (context) => storeLine(context, job.id, document, null));
  const spools = await Spool.findAll({ where: { shopId: shop.shopId, lineId: line.id }, order: [["letter", "ASC"]] });
  return { jobId: job.id, lineId: line.id, spoolIds: spools.map((spool) => spool.id) };
}

/** A connection beneath the application: as the application's role, the owner's, or the superuser's. */
export async function withClient<T>(who: "app" | "owner" | "super", work: (client: Client) => Promise<T>): Promise<T> {
  const urls = { app: process.env.DATABASE_URL, owner: process.env.MIGRATION_DATABASE_URL, super: process.env.QUARTERLINE_TEST_SUPER_URL };
  const client = new Client({ connectionString: urls[who] });
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}

const NOT_COMPARED = ["throttles", "schema_migrations"];

/** One fingerprint per table of everything in it, to see that nothing changed. Sessions are left their last-seen time. */
export async function tablePrints(): Promise<Record<string, string>> {
  return withClient("super", async (client) => {
    const tables = await client.query<{ name: string }>("SELECT table_name AS name FROM information_schema.tables WHERE table_schema = 'public' ORDER BY 1");
    const prints: Record<string, string> = {};
    for (const { name } of tables.rows) {
      if (NOT_COMPARED.includes(name)) continue;
      const row = name === "sessions" ? "(to_jsonb(t) - 'last_seen_at')::text" : "t::text";
      const print = await client.query<{ print: string }>(`SELECT coalesce(md5(string_agg(md5(${row}), '' ORDER BY md5(${row}))), '') AS print FROM ${name} t`);
      prints[name] = print.rows[0]?.print ?? "";
    }
    return prints;
  });
}

/** Drops the mails a file's tests queued, which the next file must not wait for, and closes the pool. */
export async function endOfFile(): Promise<void> {
  await withClient("app", (client) => client.query("DELETE FROM pgboss.job WHERE state = 'created'"));
  await closeDb();
}
