/**
 * Stands before every page and route handler: refuses writes that no page of ours sent and bodies that are too
 * large, and gives every answer its security headers.
 */
import { NextResponse, type NextRequest } from "next/server";
import type { ApiError } from "@/lib/rules/api-types";
import { DATA_POLICY, pagePolicy, securityHeaders } from "@/lib/server/headers";
import { isOwnOrigin, isSafeMethod } from "@/lib/server/origin";
import { isLoopback } from "@/lib/server/settings";

const JSON_LIMIT_BYTES = 6 * 1024 * 1024;
const UPLOAD_LIMIT_BYTES = 12 * 1024 * 1024;

export const config = { matcher: ["/((?!_next/static|_next/image|icon.svg|favicon.ico).*)"] };

/** See the head of the file. */
export function proxy(request: NextRequest): NextResponse {
  const baseUrl = process.env.BASE_URL ?? "";
  const secure = baseUrl.startsWith("https:");
  if (request.nextUrl.pathname.startsWith("/api/")) return answerApi(request, baseUrl, secure);
  const elsewhere = otherLoopbackName(request, baseUrl);
  return elsewhere ?? answerPage(request, secure);
}

function answerApi(request: NextRequest, baseUrl: string, secure: boolean): NextResponse {
  const headers = securityHeaders(DATA_POLICY, secure);
  const refusal = isSafeMethod(request.method) ? null : refuseWrite(request, baseUrl);
  if (refusal !== null) return NextResponse.json(refusal.error, { status: refusal.status, headers });
  return withHeaders(NextResponse.next(), headers);
}

function refuseWrite(request: NextRequest, baseUrl: string): { status: number; error: ApiError } | null {
  if (!isOwnOrigin(request.headers.get("origin"), baseUrl)) {
    return { status: 403, error: { code: "forbidden", message: "This request did not come from a page of this site. Reload the page and try again." } };
  }
  const isUpload = (request.headers.get("content-type") ?? "").startsWith("multipart/form-data");
  const limit = isUpload ? UPLOAD_LIMIT_BYTES : JSON_LIMIT_BYTES;
  if (Number(request.headers.get("content-length") ?? 0) > limit) {
    return { status: 413, error: { code: "too-large", message: `That is too large: at most ${limit / 1024 / 1024} MB are taken.` } };
  }
  return null;
}

/**
 * On one's own machine a page may be asked for as localhost while the shop's address says 127.0.0.1, or the other way
 * round. Its writes would be refused, so the browser is sent to the address that counts. By a page, since Next cuts a
 * redirect between two names of one server down to its path.
 */
function otherLoopbackName(request: NextRequest, baseUrl: string): NextResponse | null {
  const host = request.headers.get("host");
  if (host === null || baseUrl === "" || !isLoopback(baseUrl)) return null;
  const asked = `http://${host}`;
  if (!URL.canParse(asked) || !isLoopback(asked) || new URL(asked).host === new URL(baseUrl).host) return null;
  const target = new URL(`${request.nextUrl.pathname}${request.nextUrl.search}`, baseUrl).href.replace(/&/g, "&amp;").replace(/[<>"']/g, encodeURIComponent);
  const page = `<!doctype html><html lang="en"><title>Quarterline</title><meta http-equiv="refresh" content="0;url=${target}"><p>Quarterline is at <a href="${target}">this address</a>.`;
  return new NextResponse(page, { headers: { ...securityHeaders(DATA_POLICY, false), "content-type": "text/html; charset=utf-8" } });
}

function answerPage(request: NextRequest, secure: boolean): NextResponse {
  const nonce = btoa(crypto.randomUUID());
  const policy = pagePolicy(nonce, secure, process.env.NODE_ENV === "development");
  const passedOn = new Headers(request.headers);
  // Next reads the nonce for its own scripts from the policy on the request.
  passedOn.set("x-nonce", nonce);
  passedOn.set("content-security-policy", policy);
  return withHeaders(NextResponse.next({ request: { headers: passedOn } }), securityHeaders(policy, secure));
}

function withHeaders(response: NextResponse, headers: Readonly<Record<string, string>>): NextResponse {
  for (const [name, value] of Object.entries(headers)) response.headers.set(name, value);
  return response;
}
