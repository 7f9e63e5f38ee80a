/** What no page of ours would send: each answered in a sentence with the right status, nothing changed, nothing told. */
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import * as jobs from "@/app/api/jobs/route";
import * as lineRoute from "@/app/api/lines/[lineId]/route";
import * as logoRoute from "@/app/api/objects/logo/[key]/route";
import * as shopLogo from "@/app/api/shop/logo/route";
import * as shopRoute from "@/app/api/shop/route";
import * as signUp from "@/app/api/sign-up/route";
import * as takeOuts from "@/app/api/shop/take-outs/route";
import * as uploadRoute from "@/app/api/uploads/[uploadId]/route";
import * as uploads from "@/app/api/lines/[lineId]/uploads/route";
import { sha256Hex } from "@/lib/server/storage";
import { jpegFile, pngFile, SVG, textBytes } from "./files";
import { type Answer, call, type Call, endOfFile, newLine, newShop, tablePrints, type TestShop } from "./support";

let shop: TestShop;
beforeAll(async () => {
  shop = await newShop();
});
afterAll(endOfFile);

function expectSentence(answer: Answer): void {
  expect(answer.json.message).toMatch(/^[A-Z].*[.]$/);
  expect(answer.text).not.toMatch(/\.ts:\d|node_modules|ZodError|Sequelize|SELECT |stack/);
}

const good = { number: "J-1", title: "T", client: "", area: "", units: "imperial" };
const post = (more: Partial<Call>) => call(jobs.POST, { as: shop.owner, method: "POST", ...more });

describe("bodies", () => {
  const bad: readonly (readonly [string, number, Partial<Call>])[] = [
    ["malformed JSON", 400, { body: "{" }],
    ["no body", 400, { body: "" }],
    ["a list", 400, { body: [] }],
    ["null", 400, { body: "null" }],
    ["a number", 400, { body: "1e999" }],
    ["a missing field", 400, { body: { ...good, number: undefined } }],
    ["a field of the wrong type", 400, { body: { ...good, number: 12 } }],
    ["a field that is too long", 400, { body: { ...good, title: "x".repeat(5_000) } }],
    ["spaces only", 400, { body: { ...good, number: "   " } }],
    ["a NUL character", 400, { body: { ...good, title: "a\u0000b" } }],
    ["bytes that are no text", 400, { body: "\ud800" }],
    ["a form", 415, { body: "a=b", headers: { "content-type": "application/x-www-form-urlencoded" } }],
    ["plain text, as a foreign page could send", 415, { body: JSON.stringify(good), headers: { "content-type": "text/plain" } }],
    ["300 KB", 413, { body: { ...good, title: "x".repeat(300_000) } }],
    ["another site's origin", 403, { body: good, headers: { origin: "https://elsewhere.example" } }],
    ["the origin null", 403, { body: good, headers: { origin: "null" } }],
    ["an origin that only begins like ours", 403, { body: good, headers: { origin: "http://127.0.0.1:39990" } }],
  ];

  test.each(bad)("%s: %i", async (_name, status, sent) => {
    const before = await tablePrints();
    const answer = await post(sent);
    if (sent.body === "\ud800") expect([400]).toContain(answer.status);
    else expect(answer.status, answer.text.slice(0, 200)).toBe(status);
    expectSentence(answer);
    expect(await tablePrints()).toEqual(before);
  });

  test("a body said to be 50 MB is not read at all", async () => {
    const { lineId } = await newLine(shop);
    const answer = await call(lineRoute.PUT, { as: shop.owner, method: "PUT", params: { lineId }, body: "{}", headers: { "content-length": String(50 * 1024 * 1024) } });
    expect(answer.status).toBe(413);
  });

  test("a body that goes on without end is cut off at the limit", async () => {
    let sent = 0;
    const stream = new ReadableStream({
      pull(controller) {
        sent += 65_536;
        controller.enqueue(new Uint8Array(65_536).fill(32));
      },
    });
    const { settings } = await import("@/lib/server/settings");
    const headers = { origin: settings().BASE_URL, cookie: shop.owner.cookie, "content-type": "application/json" };
    const request = new Request(`${settings().BASE_URL}/api/jobs`, { method: "POST", headers, body: stream, duplex: "half" } as RequestInit);
    const answer = await jobs.POST(request);
    expect(answer.status).toBe(413);
    expect(sent).toBeLessThan(2 * 1024 * 1024);
  });

  test("fields nobody asked for are left out", async () => {
    const answer = await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body: { name: "Plain Pipe", id: "x", role: "owner", logo: { key: "../../x", type: "image/png" }, __proto__: { polluted: true } } });
    expect(answer.status).toBe(200);
    expect((await call(shopRoute.GET, { as: shop.owner })).json).toMatchObject({ name: "Plain Pipe", titleBlock: { logo: null } });
    expect(({} as { polluted?: boolean }).polluted).toBeUndefined();
  });

  test.each([[0], [-5], [1e9], ["12"], [null]])("a stock length of %s mm: 400", async (lengthMm) => {
    const body = { stock: [{ nps: "4", schedule: "STD", material: "A106", lengthMm, quantity: 1 }] };
    expect((await call(shopRoute.PATCH, { as: shop.owner, method: "PATCH", body })).status).toBe(400);
  });

  test("a take-out nobody has a table for cannot be confirmed", async () => {
    const answer = await call(takeOuts.POST, { as: shop.owner, method: "POST", body: { key: "no-such-fitting", valueMm: null } });
    expect(answer.status).toBe(400);
    expectSentence(answer);
  });

  test("a sign-up with a short password, a bad address, or an address in use", async () => {
    const body = { shopName: "S", name: "N", email: shop.fitter.email, password: "long enough password" };
    const from = { "x-forwarded-for": "198.51.100.7" };
    expect((await call(signUp.POST, { method: "POST", headers: from, body: { ...body, password: "short" } })).json.fields.password).toBeTruthy();
    expect((await call(signUp.POST, { method: "POST", headers: from, body: { ...body, email: "no address" } })).json.fields.email).toBeTruthy();
    expect((await call(signUp.POST, { method: "POST", headers: from, body: { ...body, password: "x".repeat(100) } })).status).toBe(400);
    expect((await call(signUp.POST, { method: "POST", headers: from, body })).status).toBe(409);
  });

  test("sign-ups from one address are counted", async () => {
    const statuses: number[] = [];
    for (let tries = 0; tries < 21; tries += 1) {
      const answer = await call(signUp.POST, { method: "POST", headers: { "x-forwarded-for": "198.51.100.8" }, body: { shopName: "S", name: "N", email: shop.fitter.email, password: "not their password" } });
      statuses.push(answer.status);
    }
    expect(statuses.slice(0, 20).every((status) => status === 409)).toBe(true);
    expect(statuses[20]).toBe(429);
  });
});

describe("uploads", () => {
  const send = async (name: string, bytes: Uint8Array) => {
    const { lineId } = await newLine(shop);
    return call(uploads.POST, { as: shop.detailer, method: "POST", params: { lineId }, file: { name, bytes } });
  };
  const logo = (bytes: Uint8Array, name = "logo") => call(shopLogo.PUT, { as: shop.owner, method: "PUT", file: { name, bytes } });

  test("a sketch is told by its content, kept, and served to its shop with safe headers", async () => {
    const bytes = pngFile();
    const { lineId } = await newLine(shop);
    const added = await call(uploads.POST, { as: shop.detailer, method: "POST", params: { lineId }, file: { name: "../../etc/sk\"etch.svg", bytes } });
    expect(added.status).toBe(201);
    const params = { uploadId: added.json.id as string };
    const served = await call(uploadRoute.GET, { as: shop.inspector, params });
    expect(served.status).toBe(200);
    expect(served.headers.get("content-type")).toBe("image/png");
    expect(served.headers.get("x-content-type-options")).toBe("nosniff");
    expect(served.headers.get("content-security-policy")).toContain("sandbox");
    expect(served.headers.get("content-disposition")).toBe("inline; filename=\"sketch.svg\"; filename*=UTF-8''sketch.svg");
    const line = await call(lineRoute.GET, { as: shop.detailer, params: { lineId } });
    expect(line.json.uploads).toMatchObject([{ name: "sketch.svg", type: "image/png", bytes: bytes.length, by: "Pat detailer" }]);
    expect((await call(uploadRoute.DELETE, { as: shop.detailer, method: "DELETE", params })).status).toBe(200);
    expect((await call(uploadRoute.GET, { as: shop.inspector, params })).status).toBe(404);
  });

  test("a PDF is saved, never shown in the page", async () => {
    const added = await send("iso.pdf", textBytes("%PDF-1.7\n1 0 obj\n<<>>\nendobj\n%%EOF"));
    const served = await call(uploadRoute.GET, { as: shop.detailer, params: { uploadId: added.json.id } });
    expect(served.headers.get("content-disposition")).toMatch(/^attachment/);
  });

  test.each([
    ["a page named like a picture", "photo.png", textBytes("<html><script>alert(1)</script></html>"), 415],
    ["an SVG", "drawing.svg", textBytes(SVG), 415],
    ["a program", "a.exe", new Uint8Array([0x4d, 0x5a, 0x90, 0, 3, 0, 0, 0]), 415],
    ["an empty file", "empty.png", new Uint8Array(), 400],
    ["11 MB", "big.png", new Uint8Array(11 * 1024 * 1024), 413],
    ["50 MB", "huge.png", new Uint8Array(50 * 1024 * 1024), 413],
  ])("%s as a sketch is refused", async (_what, name, bytes, status) => {
    const answer = await send(name, bytes);
    expect(answer.status).toBe(status);
    expectSentence(answer);
  });

  test("a form without a file, and JSON where a file belongs", async () => {
    const { lineId } = await newLine(shop);
    const as = { as: shop.detailer, method: "POST", params: { lineId } };
    expect((await call(uploads.POST, { ...as, body: {} })).status).toBe(415);
    const empty = await call(uploads.POST, { ...as, body: "--x\r\n\r\n--x--", headers: { "content-type": "multipart/form-data; boundary=x" } });
    expect(empty.status).toBe(400);
    expectSentence(empty);
  });

  test.each([["PNG", pngFile(), "image/png"], ["JPEG", jpegFile(), "image/jpeg"], ["SVG", textBytes(SVG), "image/svg+xml"]])("a %s logo is kept and served", async (_name, bytes, type) => {
    expect((await logo(bytes, "mark.bin")).status).toBe(200);
    const { json } = await call(shopRoute.GET, { as: shop.owner });
    expect(json.titleBlock.logo).toEqual({ key: sha256Hex(bytes), type });
    const served = await call(logoRoute.GET, { as: shop.fitter, params: { key: sha256Hex(bytes) } });
    expect(served.headers.get("content-type")).toBe(type);
    expect(served.headers.get("content-disposition")).toMatch(type === "image/svg+xml" ? /^attachment/ : /^inline/);
  });

  test.each([
    ["a script", SVG.replace("<path", "<script>1</script><path")],
    ["a handler", SVG.replace("<path", '<path onload="x()"')],
    ["a far link", SVG.replace("<path", '<image href="https://elsewhere.example/a.png"/><path')],
    ["an entity", SVG.replace("<svg", '<!DOCTYPE svg [<!ENTITY a "b">]><svg')],
    ["a foreign object", SVG.replace("<path", "<foreignObject/><path")],
    ["a far style", SVG.replace("<path", "<style>@import url(https://elsewhere.example/a.css)</style><path")],
  ])("an SVG logo with %s is refused", async (_what, text) => {
    const answer = await logo(textBytes(text));
    expect([400, 415]).toContain(answer.status);
    expectSentence(answer);
  });

  test("a damaged PNG, one cut short and one of giant sides are refused", async () => {
    const whole = pngFile(40, 40);
    expect((await logo(whole.slice(0, whole.length - 20))).status).toBe(400);
    const rotten = whole.slice();
    rotten.fill(0, 50, 70);
    expect((await logo(rotten)).status).toBe(400);
    const giant = whole.slice();
    new DataView(giant.buffer).setUint32(16, 60_000);
    expect((await logo(giant)).status).toBe(400);
    expect((await logo(new Uint8Array(3 * 1024 * 1024))).status).toBe(413);
  });
});
