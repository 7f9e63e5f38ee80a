/** Sign-in through next-auth's own route, as a browser does it: what the cookie holds, how refusals and limits answer. */
import { workAsyncStorage } from "next/dist/server/app-render/work-async-storage.external";
import { workUnitAsyncStorage } from "next/dist/server/app-render/work-unit-async-storage.external";
import { NextRequest } from "next/server";
import { decode } from "next-auth/jwt";
import { afterAll, beforeAll, describe, expect, test, vi } from "vitest";
import * as authRoute from "@/app/api/auth/[...nextauth]/route";
import * as viewerRoute from "@/app/api/viewer/route";
import { forgetSettings, settings } from "@/lib/server/settings";
import { sessionCookieName } from "@/lib/server/session";
import { authOptions } from "@/lib/server/auth";
import { call, endOfFile, newShop, PASSWORD, type TestShop } from "./support";

/** Next's server puts this where its own modules look for it, before any of them is loaded. */
await vi.hoisted(async () => {
  const { AsyncLocalStorage } = await import("node:async_hooks");
  Object.assign(globalThis, { AsyncLocalStorage });
});

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

interface Browser {
  readonly jar: Map<string, string>;
  readonly address: string;
}

/** Calls a handler within what Next keeps of a request, where next-auth reads cookies and headers from. */
function inRequest<T>(request: NextRequest, work: () => Promise<T>): Promise<T> {
  const store = { type: "request", phase: "render", cookies: request.cookies, headers: request.headers };
  return workAsyncStorage.run({ route: "/api/auth/[...nextauth]" } as never, () => workUnitAsyncStorage.run(store as never, work));
}

async function ask(browser: Browser, path: string, form?: Record<string, string>): Promise<Response> {
  const cookie = [...browser.jar].map(([name, value]) => `${name}=${value}`).join("; ");
  const headers = { cookie, "x-forwarded-for": browser.address, origin: settings().BASE_URL, ...(form === undefined ? {} : { "content-type": "application/x-www-form-urlencoded" }) };
  const request = new NextRequest(`${settings().BASE_URL}/api/auth/${path}`, { method: form === undefined ? "GET" : "POST", headers, body: form === undefined ? undefined : new URLSearchParams(form) });
  const params = Promise.resolve({ nextauth: path.split("?")[0]!.split("/") });
  const answer = await inRequest(request, () => (form === undefined ? authRoute.GET(request, { params }) : authRoute.POST(request, { params })));
  for (const line of answer.headers.getSetCookie()) {
    const [pair = ""] = line.split(";");
    const at = pair.indexOf("=");
    if (/max-age=0|expires=thu, 01 jan 1970/i.test(line)) browser.jar.delete(pair.slice(0, at));
    else browser.jar.set(pair.slice(0, at), pair.slice(at + 1));
  }
  return answer;
}

async function enter(browser: Browser, email: string, password: string): Promise<Response> {
  const { csrfToken } = (await (await ask(browser, "csrf")).json()) as { csrfToken: string };
  return ask(browser, "callback/credentials", { csrfToken, email, password, json: "true", callbackUrl: settings().BASE_URL });
}

const newBrowser = (address: string): Browser => ({ jar: new Map(), address });

describe("the sign-in route", () => {
  test("the cookie is for the server only and holds the id of a session and nothing of the person", async () => {
    const browser = newBrowser("203.0.113.1");
    const answer = await enter(browser, shop.fitter.email, PASSWORD);
    expect(answer.status).toBe(200);
    const line = answer.headers.getSetCookie().find((one) => one.startsWith(`${sessionCookieName()}=`)) ?? "";
    expect(line).toMatch(/HttpOnly/i);
    expect(line).toMatch(/SameSite=Lax/i);
    const claims = await decode({ token: browser.jar.get(sessionCookieName()), secret: settings().NEXTAUTH_SECRET });
    expect(Object.keys(claims ?? {}).sort()).toEqual(["exp", "iat", "jti", "sid"]);
    const cookie = `${sessionCookieName()}=${browser.jar.get(sessionCookieName())}`;
    expect((await call(viewerRoute.GET, { as: { ...shop.fitter, cookie } })).json.email).toBe(shop.fitter.email);
    expect(await (await ask(browser, "session")).text()).not.toMatch(/fitter|sid/);
  });

  test("signing out ends the session row, so that a kept cookie opens nothing", async () => {
    const browser = newBrowser("203.0.113.2");
    await enter(browser, shop.fitter.email, PASSWORD);
    const cookie = `${sessionCookieName()}=${browser.jar.get(sessionCookieName())}`;
    const { csrfToken } = (await (await ask(browser, "csrf")).json()) as { csrfToken: string };
    await ask(browser, "signout", { csrfToken, json: "true" });
    expect((await call(viewerRoute.GET, { as: { ...shop.fitter, cookie } })).status).toBe(401);
  });

  test("a wrong password answers 401 with a sentence, and no cookie", async () => {
    const browser = newBrowser("203.0.113.3");
    const answer = await enter(browser, shop.fitter.email, "not the password");
    expect(answer.status).toBe(401);
    const { url } = (await answer.json()) as { url: string };
    expect(new URL(url).searchParams.get("error")).toMatch(/do not go together/);
    expect(browser.jar.has(sessionCookieName())).toBe(false);
  });

  test("without the form's token nobody is signed in", async () => {
    const browser = newBrowser("203.0.113.4");
    await ask(browser, "callback/credentials", { csrfToken: "made up", email: shop.fitter.email, password: PASSWORD, json: "true" });
    expect(browser.jar.has(sessionCookieName())).toBe(false);
  });

  test("after too many tries the answer is 429 with the time to wait", async () => {
    const browser = newBrowser("203.0.113.5");
    for (let tries = 0; tries < 6; tries += 1) expect((await enter(browser, shop.detailer.email, "not the password")).status).toBe(401);
    const answer = await enter(browser, shop.detailer.email, PASSWORD);
    expect(answer.status).toBe(429);
    expect(Number(answer.headers.get("retry-after"))).toBeGreaterThan(0);
    expect(await answer.json()).toMatchObject({ code: "throttled", message: expect.stringMatching(/^Too many tries/) });
    expect(browser.jar.has(sessionCookieName())).toBe(false);
  });

  test("what is no form of ours is refused in a sentence", async () => {
    const post = (body: BodyInit, type: string) => {
      const request = new NextRequest(`${settings().BASE_URL}/api/auth/callback/credentials`, { method: "POST", headers: { "content-type": type, origin: settings().BASE_URL }, body });
      return inRequest(request, () => authRoute.POST(request, { params: Promise.resolve({ nextauth: ["callback", "credentials"] }) }));
    };
    const large = await post(`email=${"x".repeat(40_000)}`, "application/x-www-form-urlencoded");
    expect(large.status).toBe(413);
    expect(await large.json()).toMatchObject({ code: "too-large" });
    const broken = await post("{", "application/json");
    expect(broken.status).toBe(400);
    expect(await broken.json()).toMatchObject({ code: "invalid", message: "That is not readable JSON." });
  });

  test("it leads nowhere but to this site", async () => {
    const { redirect } = authOptions().callbacks!;
    const baseUrl = settings().BASE_URL;
    for (const url of ["https://elsewhere.example/", "//elsewhere.example", "/\\elsewhere.example", "javascript:alert(1)"]) expect(await redirect!({ url, baseUrl })).toBe(baseUrl);
    expect(await redirect!({ url: "/jobs", baseUrl })).toBe("/jobs");
  });

  test("on https the cookie is kept to https", () => {
    const before = process.env.BASE_URL;
    process.env.BASE_URL = "https://sheets.example";
    forgetSettings();
    try {
      expect(sessionCookieName()).toBe("__Secure-next-auth.session-token");
      expect(authOptions().useSecureCookies).toBe(true);
    } finally {
      process.env.BASE_URL = before;
      forgetSettings();
    }
  });
});
