/** People in and out: sign-in and its limits, sessions, invitations, resets, roles, removal. */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as accept from "@/app/api/invitations/accept/route";
import * as resetRoute from "@/app/api/password-reset/route";
import * as confirmRoute from "@/app/api/password-reset/confirm/route";
import * as sessionsRoute from "@/app/api/sessions/route";
import * as sessionRoute from "@/app/api/sessions/[sessionId]/route";
import * as signUp from "@/app/api/sign-up/route";
import * as peopleRoute from "@/app/api/shop/people/route";
import * as personRoute from "@/app/api/shop/people/[membershipId]/route";
import * as invitationsRoute from "@/app/api/shop/invitations/route";
import * as invitationRoute from "@/app/api/shop/invitations/[invitationId]/route";
import * as viewerRoute from "@/app/api/viewer/route";
import * as viewerShop from "@/app/api/viewer/shop/route";
import { verifyAudit } from "@/lib/server/audit";
import { signIn, signInLimited } from "@/lib/server/auth";
import { runCommand } from "@/lib/server/command";
import { closeDb } from "@/lib/server/database";
import { stopQueues, workQueues } from "@/lib/server/queue";
import { queueHandlers } from "@/lib/jobs/handlers";
import { settings } from "@/lib/server/settings";
import { addMember, call, cookieOf, newShop, PASSWORD, unique, withClient, type TestShop } from "./support";

let shop: TestShop;

beforeAll(async () => {
  shop = await newShop();
  await workQueues(queueHandlers);
});
afterAll(async () => {
  await stopQueues();
  await closeDb();
});

function mailsTo(address: string): { subject: string; text: string }[] {
  const folder = settings().OUTBOX_DIR ?? "";
  const mails = readdirSync(folder).filter((name) => name.endsWith(".json")).map((name) => JSON.parse(readFileSync(path.join(folder, name), "utf8")) as { to: string[]; subject: string; text: string });
  return mails.filter((mail) => mail.to.includes(address));
}

/** Waits for the queue to deliver; fails when it does not. */
async function mailTo(address: string, subject: RegExp): Promise<string> {
  for (let tries = 0; tries < 200; tries += 1) {
    const found = mailsTo(address).filter((mail) => subject.test(mail.subject));
    if (found.length > 0) return found[found.length - 1]!.text;
    await new Promise((resolve) => setTimeout(resolve, 100));
  }
  throw new Error(`no mail to ${address}`);
}

const linkToken = (text: string, place: string) => new RegExp(`/${place}/([A-Za-z0-9_-]+)`).exec(text)![1]!;
const from = (address: string) => new Headers({ "x-forwarded-for": address, "user-agent": "Mozilla/5.0 (Windows NT 10.0) Firefox/130.0" });

async function invited(role = "fitter", email = `${unique("new")}@shop.example`): Promise<{ id: string; email: string; token: string }> {
  const made = await call(invitationsRoute.POST, { as: shop.owner, method: "POST", body: { email, role } });
  expect(made.status).toBe(201);
  return { id: made.json.id as string, email, token: linkToken(await mailTo(email, /^Join/), "invitation") };
}

describe("sign-up and sign-in", () => {
  test("a new shop opens with its owner, who can sign in and is named by the viewer route", async () => {
    const email = `${unique("ann")}@shop.example`;
    const opened = await call(signUp.POST, { method: "POST", body: { shopName: "Bright Bend", name: "Ann", email: email.toUpperCase(), password: PASSWORD } });
    expect(opened.status).toBe(201);
    const sessionId = await signIn({ email, password: PASSWORD }, from("192.0.2.1"));
    const viewer = await call(viewerRoute.GET, { as: { ...shop.owner, cookie: await cookieOf(sessionId) } });
    expect(viewer.json).toMatchObject({ name: "Ann", email, role: "owner", shop: { name: "Bright Bend" } });
    expect(viewer.json.shops).toHaveLength(1);
    expect(viewer.text).not.toContain("hash");
  });

  test("a wrong password and an unknown address are refused in the same words", async () => {
    const words = (email: string) => signIn({ email, password: "not the password" }, from("192.0.2.2")).then(() => "in", (error: Error) => error.message);
    const known = await words(shop.fitter.email);
    expect(known).toMatch(/do not go together/);
    expect(await words("nobody@shop.example")).toBe(known);
  });

  test("too many tries are answered 429 with the time to wait, even with the right password", async () => {
    const email = shop.inspector.email;
    for (let tries = 0; tries < 6; tries += 1) {
      await expect(signIn({ email, password: "wrong wrong wrong" }, from("192.0.2.3"))).rejects.toThrow(/do not go together/);
    }
    await expect(signIn({ email, password: PASSWORD }, from("192.0.2.3"))).rejects.toThrow(/Too many tries/);
    const url = new URL(`${settings().BASE_URL}/api/auth/callback/credentials`);
    const answer = await signInLimited(url, from("192.0.2.3"), new URLSearchParams({ email, password: PASSWORD }).toString());
    expect(answer?.status).toBe(429);
    expect(Number(answer?.headers.get("retry-after"))).toBeGreaterThan(800);
    expect((await answer?.json()).message).toMatch(/Wait 15 minutes/);
    const elsewhere = await signIn({ email, password: PASSWORD }, from("192.0.2.4"));
    expect(elsewhere).toMatch(/^[0-9a-f-]{36}$/);
  });

  test("parallel tries are all counted", async () => {
    const email = shop.detailer.email;
    const tries = await Promise.allSettled(Array.from({ length: 12 }, () => signIn({ email, password: "wrong wrong wrong" }, from("192.0.2.5"))));
    const refused = tries.filter((one) => one.status === "rejected" && /Too many/.test(String((one.reason as Error).message)));
    expect(refused).toHaveLength(6);
  });
});

describe("sessions", () => {
  test("one's own sessions are listed with a device, and one that is ended is out at once", async () => {
    const person = await addMember(shop.shopId, "fitter");
    const sessionId = await signIn({ email: person.email, password: PASSWORD }, from("192.0.2.6"));
    const rows = await call(sessionsRoute.GET, { as: person });
    expect(rows.json).toHaveLength(2);
    expect(rows.json.find((row: { id: string }) => row.id === sessionId)).toMatchObject({ device: "Firefox on Windows", current: false });
    const other = { ...person, cookie: await cookieOf(sessionId) };
    expect((await call(viewerRoute.GET, { as: other })).status).toBe(200);
    expect((await call(sessionRoute.DELETE, { as: person, method: "DELETE", params: { sessionId } })).status).toBe(200);
    expect((await call(viewerRoute.GET, { as: other })).status).toBe(401);
    expect((await call(sessionRoute.DELETE, { as: person, method: "DELETE", params: { sessionId } })).status).toBe(404);
  });

  test("a session of somebody else cannot be ended", async () => {
    const ended = await call(sessionRoute.DELETE, { as: shop.owner, method: "DELETE", params: { sessionId: shop.fitter.sessionId } });
    expect(ended.status).toBe(404);
  });

  test("no cookie, a forged one and one signed with another secret are nobody", async () => {
    const { encode } = await import("next-auth/jwt");
    const forged = await encode({ token: { sid: shop.owner.sessionId }, secret: "another secret of some length" });
    for (const cookie of ["", "next-auth.session-token=abc", `next-auth.session-token=${forged}`, "next-auth.session-token=%E0%A4%A"]) {
      expect((await call(viewerRoute.GET, { as: { ...shop.owner, cookie } })).status).toBe(401);
    }
  });

  test("a session that has run out is nobody's", async () => {
    const person = await addMember(shop.shopId, "fitter");
    await withClient("super", (client) => client.query("UPDATE sessions SET expires_at = now() - interval '1 second' WHERE id = $1", [person.sessionId]));
    expect((await call(viewerRoute.GET, { as: person })).status).toBe(401);
  });
});

describe("invitations", () => {
  test("a new person joins once by the mailed link; the database holds no token", async () => {
    const { email, token } = await invited("inspector");
    const stored = await withClient("super", (client) => client.query("SELECT token_hash FROM invitations WHERE email = $1", [email]));
    expect(stored.rows[0].token_hash).not.toContain(token);
    const body = { token, name: "Nell New", password: PASSWORD };
    const both = await Promise.all([call(accept.POST, { method: "POST", body }), call(accept.POST, { method: "POST", body })]);
    expect(both.map((one) => one.status).sort()).toEqual([200, 410]);
    const again = await call(accept.POST, { method: "POST", body });
    expect(again.status).toBe(410);
    expect(again.json.message).toMatch(/used, was withdrawn or has run out/);
    const people = await call(peopleRoute.GET, { as: shop.fitter });
    expect(people.json.filter((row: { email: string }) => row.email === email)).toHaveLength(1);
  });

  test("a known person joins a second shop with the password they have, and can look at either", async () => {
    const other = await newShop();
    const { token } = await invited("detailer", other.owner.email);
    const wrong = await call(accept.POST, { method: "POST", body: { token, name: "Olive", password: "some other password" } });
    expect(wrong.status).toBe(400);
    expect(wrong.json.fields.password).toMatch(/password you sign in with/);
    expect((await call(accept.POST, { method: "POST", body: { token, name: "Olive", password: PASSWORD } })).status).toBe(200);
    expect((await call(viewerRoute.GET, { as: other.owner })).json.shops).toHaveLength(2);
    expect((await call(viewerShop.POST, { as: other.owner, method: "POST", body: { shopId: shop.shopId } })).status).toBe(200);
    expect((await call(viewerRoute.GET, { as: other.owner })).json).toMatchObject({ role: "detailer", shop: { id: shop.shopId } });
    const foreign = await newShop();
    expect((await call(viewerShop.POST, { as: other.owner, method: "POST", body: { shopId: foreign.shopId } })).status).toBe(404);
  });

  test("a link that ran out or was withdrawn is gone, and makes room for a new one", async () => {
    const late = await invited();
    await withClient("super", (client) => client.query("UPDATE invitations SET expires_at = now() - interval '1 second' WHERE id = $1", [late.id]));
    expect((await call(accept.POST, { method: "POST", body: { token: late.token, name: "Late", password: PASSWORD } })).status).toBe(410);
    const again = await call(invitationsRoute.POST, { as: shop.owner, method: "POST", body: { email: late.email, role: "fitter" } });
    expect(again.status).toBe(201);
    const twice = await call(invitationsRoute.POST, { as: shop.owner, method: "POST", body: { email: late.email, role: "fitter" } });
    expect(twice.status).toBe(409);
    expect((await call(invitationRoute.DELETE, { as: shop.owner, method: "DELETE", params: { invitationId: again.json.id } })).status).toBe(200);
    expect((await call(invitationsRoute.GET, { as: shop.owner })).json.map((row: { id: string }) => row.id)).not.toContain(again.json.id);
  });
});

describe("password resets", () => {
  test("known and unknown addresses are answered alike; the link works once and ends every session", async () => {
    const person = await addMember(shop.shopId, "fitter");
    const [known, unknown] = [
      await call(resetRoute.POST, { method: "POST", body: { email: person.email } }),
      await call(resetRoute.POST, { method: "POST", body: { email: "nobody-at-all@shop.example" } }),
    ];
    expect([known.status, known.text]).toEqual([unknown.status, unknown.text]);
    const token = linkToken(await mailTo(person.email, /new password/), "reset");
    const body = { token, password: "a quite different password" };
    expect((await call(confirmRoute.POST, { method: "POST", body })).status).toBe(200);
    expect((await call(confirmRoute.POST, { method: "POST", body })).status).toBe(410);
    expect((await call(viewerRoute.GET, { as: person })).status).toBe(401);
    await expect(signIn({ email: person.email, password: PASSWORD }, from("192.0.2.8"))).rejects.toThrow();
    expect(await signIn({ email: person.email, password: body.password }, from("192.0.2.8"))).toBeTruthy();
    expect(mailsTo("nobody-at-all@shop.example")).toHaveLength(0);
  });
});

describe("roles and removal", () => {
  test("a changed role counts from the next request on", async () => {
    const person = await addMember(shop.shopId, "fitter");
    const params = { membershipId: person.membershipId };
    expect((await call(personRoute.PATCH, { as: shop.owner, method: "PATCH", params, body: { role: "detailer" } })).status).toBe(200);
    expect((await call(viewerRoute.GET, { as: person })).json.role).toBe("detailer");
  });

  test("a removed person is out at once and cannot sign in again", async () => {
    const person = await addMember(shop.shopId, "fitter");
    expect((await call(personRoute.DELETE, { as: shop.owner, method: "DELETE", params: { membershipId: person.membershipId } })).status).toBe(200);
    expect((await call(viewerRoute.GET, { as: person })).status).toBe(401);
    await expect(signIn({ email: person.email, password: PASSWORD }, from("192.0.2.9"))).rejects.toThrow(/do not belong to a shop/);
  });

  test("a shop keeps an owner, also when two remove each other at the same time", async () => {
    const lone = await newShop();
    const leave = { as: lone.owner, method: "DELETE", params: { membershipId: lone.owner.membershipId } };
    expect((await call(personRoute.DELETE, leave)).status).toBe(409);
    expect((await call(personRoute.PATCH, { ...leave, method: "PATCH", body: { role: "fitter" } })).status).toBe(409);
    const second = await addMember(lone.shopId, "owner");
    const both = await Promise.all([
      call(personRoute.DELETE, { as: lone.owner, method: "DELETE", params: { membershipId: second.membershipId } }),
      call(personRoute.DELETE, { as: second, method: "DELETE", params: { membershipId: lone.owner.membershipId } }),
    ]);
    const owners = await withClient("super", (client) => client.query("SELECT 1 FROM memberships WHERE shop_id = $1 AND role = 'owner' AND removed_at IS NULL", [lone.shopId]));
    expect(owners.rowCount).toBe(1);
    expect(both.filter((one) => one.status === 200)).toHaveLength(1);
  });

  test("the log of all this is whole", async () => {
    expect(await verifyAudit(shop.shopId)).toBeNull();
  });
});

describe("the queue", () => {
  test("drains a backlog of mails without a pause between them", async () => {
    const address = `${unique("many")}@shop.example`;
    await runCommand(shop.owner, "unlogged", async (context) => {
      for (let count = 0; count < 40; count += 1) context.mail({ to: address, subject: `Mail ${count}`, text: "One of many." });
    });
    for (let tries = 0; tries < 100 && mailsTo(address).length < 40; tries += 1) await new Promise((resolve) => setTimeout(resolve, 100));
    expect(mailsTo(address)).toHaveLength(40);
  });
});
