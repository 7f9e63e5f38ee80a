/**
 * Sign-in through next-auth's credentials provider. The token it keeps in the cookie is cut down to the id of a
 * session row; nothing about the person travels.
 */
import type { NextAuthOptions } from "next-auth";
import Credentials from "next-auth/providers/credentials";
import { emailSchema, signInSchema } from "@/lib/rules/forms";
import { answerOfError, Refusal } from "./errors";
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

/**
 * The answer to a sign-in after too many tries (429 with a sentence and the time to wait), or null to go on. Asked
 * before next-auth, which would answer every refusal with 401. `url` is where its own client looks for the error.
 */
export async function signInLimited(request: Request): Promise<Response | null> {
  if (request.method !== "POST" || !new URL(request.url).pathname.endsWith("/callback/credentials")) return null;
  const form = new URLSearchParams(await request.clone().text().catch(() => ""));
  const parsed = emailSchema.safeParse(form.get("email") ?? "");
  if (!parsed.success) return null;
  try {
    await assertTriesLeft(signInLimits(parsed.data, addressOf(request.headers)), new Date());
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
