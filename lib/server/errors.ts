/** Refusals with a status, a code for programs and a plain sentence for people; everything else is a fault, logged and not told. */
import type { ApiError } from "@/lib/rules/api-types";
import { databaseCode } from "./database";
import { log } from "./log";

type Fields = Readonly<Record<string, string>>;

/** A refusal the caller is meant to read. */
export class Refusal extends Error {
  constructor(
    readonly status: number,
    readonly code: string,
    message: string,
    readonly more: { readonly fields?: Fields; readonly retryAfterS?: number; readonly body?: Readonly<Record<string, unknown>> } = {},
  ) {
    super(message);
    this.name = "Refusal";
  }
}

export const refuseInvalid = (message: string, fields?: Fields) => new Refusal(400, "invalid", message, { fields });
export const refuseUnknown = () => new Refusal(401, "unauthenticated", "Sign in to go on.");
export const refuseForbidden = (message: string) => new Refusal(403, "forbidden", message);
export const refuseNotFound = () => new Refusal(404, "not-found", "There is nothing here, or it belongs to another shop.");
export const refuseConflict = (message: string, body?: Readonly<Record<string, unknown>>) => new Refusal(409, "conflict", message, { body });
export const refuseGone = (message: string) => new Refusal(410, "gone", message);
export const refuseTooLarge = (message: string) => new Refusal(413, "too-large", message);
export const refuseType = (message: string) => new Refusal(415, "invalid", message);
export const refuseThrottled = (message: string, retryAfterS: number) => new Refusal(429, "throttled", message, { retryAfterS });

const UNIQUE_VIOLATION = "23505";
/** Codes of a server that is not there, starting or stopping. */
const DATABASE_AWAY = /^(08|57P)/;

/** The answer to a failed request. Never a stack, a query or a value the caller did not send. */
export function answerOfError(error: unknown): Response {
  if (error instanceof Refusal) return answerOfRefusal(error);
  const code = databaseCode(error);
  if (code === UNIQUE_VIOLATION) return answerOfRefusal(refuseConflict("Somebody else did the same just now. Load the page again."));
  if (isDatabaseAway(error, code)) {
    log.error({ error }, "database away");
    return answerOfRefusal(new Refusal(503, "failed", "The database does not answer just now. Try again in a moment."));
  }
  log.error({ error }, "request failed");
  return answerOfRefusal(new Refusal(500, "failed", "Something went wrong on the server. Nothing was changed; try again."));
}

function isDatabaseAway(error: unknown, code: string | null): boolean {
  if (code !== null) return DATABASE_AWAY.test(code);
  return error instanceof Error && /^SequelizeConnection/.test(error.name);
}

function answerOfRefusal(refusal: Refusal): Response {
  const { fields, retryAfterS, body } = refusal.more;
  const error: ApiError = { message: refusal.message, code: refusal.code, ...(fields === undefined ? {} : { fields }) };
  const headers = new Headers({ "cache-control": "no-store" });
  if (retryAfterS !== undefined) headers.set("retry-after", String(retryAfterS));
  return Response.json({ ...error, ...body }, { status: refusal.status, headers });
}
