/**
 * Sign-in through next-auth's credentials provider. The token it keeps in the cookie is cut down to the id of a
 * session row; nothing about the person travels.
 */
import type { NextAuthOptions } from "next-auth";
import Credentials from "next-auth/providers/credentials";
import { NextRequest } from "next/server";
import { emailSchema, signInSchema } from "@/lib/rules/forms";
import { bytesWithin } from "./body";
import { answerOfError, refuseInvalid, Refusal } from "./errors";
import { log } from "./log";
import { isPassword } from "./passwords";
import { addressOf, deviceOf } from "./request-facts";
import { endSession, isSecureSite, personByEmail, SESSION_DAYS, startSession } from "./session";
import { settings } from "./settings";
import { assertTriesLeft, countTry, forgetTries, signInLimits } from "./throttle";

const WRONG = "That e-mail address and password do not go together.";
const NO_SHOP = "You do not belong to a shop any longer. Ask its owner for an invitation.";

/**
 * Checks an address and password and starts a session.
 * @returns the session's id. @throws Refusal with a sentence: 401 when they do not go together, 429 after too many tries.
 */
export async function signIn(credentials: unknown, headers: Headers): Promise<string> {
  const parsed = signInSchema.safeParse(credentials);
  if (!parsed.success) throw new Refusal(401, "unauthenticated", WRONG);
  const { email, password } = parsed.data;
  const limits = signInLimits(email, addressOf(headers));
  await countTry(limits, new Date());
  const person = await personByEmail(email);
  if (!(await isPassword(password, person?.passwordHash ?? null)) || person === null) throw new Refusal(401, "unauthenticated", WRONG);
  await forgetTries(limits[0]);
  const sessionId = await startSession(person.id, deviceOf(headers));
  if (sessionId === null) throw new Refusal(401, "unauthenticated", NO_SHOP);
  return sessionId;
}

/** next-auth's options, read when asked for since settings are not there while building. */
export function authOptions(): NextAuthOptions {
  return {
    secret: settings().NEXTAUTH_SECRET,
    useSecureCookies: isSecureSite(),
    session: { strategy: "jwt", maxAge: SESSION_DAYS * 86_400 },
    pages: { signIn: "/sign-in", error: "/sign-in" },
    providers: [
      Credentials({
        credentials: { email: {}, password: {} },
        authorize: async (credentials, request) => ({ id: await signInPlainly(credentials, request.headers) }),
      }),
    ],
    callbacks: {
      jwt: ({ token, user }) => ({ sid: user?.id ?? token.sid }),
      session: ({ session }) => ({ expires: session.expires }),
      redirect: ({ url, baseUrl }) => (isOnSite(url, baseUrl) ? url : baseUrl),
    },
    events: {
      signOut: async ({ token }) => {
        if (typeof token?.sid === "string") await endSession(token.sid);
      },
    },
    logger: { error: (code) => log.warn({ code }, "sign-in trouble"), warn: () => undefined, debug: () => undefined },
  };
}

/** More than any form of next-auth's sends. */
const FORM_MAX_BYTES = 16 * 1024;

/**
 * Answers a request to next-auth's routes. Its own handler answers every refusal with 401 and reads a body of any
 * length, so what is too much or too often is answered here.
 * @param handle next-auth's handler, given the request with its body read.
 */
export async function answerAuth(request: NextRequest, handle: (request: NextRequest) => Promise<Response>): Promise<Response> {
  try {
    if (request.method !== "POST") return await handle(request);
    const body = await bytesWithin(request, FORM_MAX_BYTES);
    const { method, headers } = request;
    const refused = await signInLimited(new URL(request.url), headers, new TextDecoder().decode(body));
    return refused ?? (await handle(new NextRequest(request.url, { method, headers, body: body.slice().buffer })));
  } catch (error) {
    // next-auth reads JSON by itself and lets the parser's error through.
    return answerOfError(error instanceof SyntaxError ? refuseInvalid("That is not readable JSON.") : error);
  }
}

/**
 * The answer to a sign-in after too many tries (429 with a sentence and the time to wait), or null to go on. `url` in
 * it is where next-auth's client looks for the error.
 */
export async function signInLimited({ pathname }: URL, headers: Headers, body: string): Promise<Response | null> {
  if (!pathname.endsWith("/callback/credentials")) return null;
  const parsed = emailSchema.safeParse(new URLSearchParams(body).get("email") ?? "");
  if (!parsed.success) return null;
  try {
    await assertTriesLeft(signInLimits(parsed.data, addressOf(headers)), new Date());
    return null;
  } catch (error) {
    const answer = answerOfError(error);
    const url = `${settings().BASE_URL}/sign-in?error=${answer.status === 429 ? "throttled" : "failed"}`;
    return Response.json({ ...(await answer.json()), url }, { status: answer.status, headers: answer.headers });
  }
}

/** next-auth shows an error's message to the person, so a fault must not carry its own. */
async function signInPlainly(credentials: unknown, headers: unknown): Promise<string> {
  try {
    return await signIn(credentials, new Headers((headers ?? {}) as Record<string, string>));
  } catch (error) {
    if (error instanceof Refusal) throw new Error(error.message);
    log.error({ error }, "sign-in failed");
    throw new Error("Something went wrong on the server. Try again.");
  }
}

function isOnSite(url: string, baseUrl: string): boolean {
  return url.startsWith("/") ? /^\/[A-Za-z0-9]/.test(url) || url === "/" : URL.canParse(url) && new URL(url).origin === new URL(baseUrl).origin;
}
