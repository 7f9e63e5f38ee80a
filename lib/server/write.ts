/**
 * The one door for writes: origin, who, may they, what they send, then one transaction with the command and its log
 * entries. Route handlers are specs handed to `write` (signed in) or `writePublic` (anybody).
 */
import type { z } from "zod";
import { canDo, refusalOf, type Permission } from "@/lib/rules/permissions";
import { BODY_MAX_BYTES, emptySchema } from "@/lib/rules/write-bodies";
import { checked, fileBody, jsonBody, type SentFile } from "./body";
import { runCommand, type CommandContext } from "./command";
import { answerOfError, refuseForbidden, refuseNotFound } from "./errors";
import { isOwnOrigin } from "./origin";
import { requireViewer, type SessionViewer } from "./session";
import { settings } from "./settings";

/** What Next hands a route handler beside the request. */
export interface RouteContext {
  readonly params: Promise<Readonly<Record<string, string | string[] | undefined>>>;
}
export type RouteHandler = (request: Request, context?: RouteContext) => Promise<Response>;

/** What a handler's command is called with, beside the command context. */
export interface Sent<P, B> {
  readonly params: P;
  readonly body: B;
  readonly request: Request;
}

interface WriteSpec<V, P extends z.ZodType, B, R> {
  /** Ids in the address; one that does not fit answers 404. */
  readonly params?: P;
  readonly maxBytes?: number;
  /** "unlogged" only for writes that change nothing of a shop's (which shop one looks at, a mail asked for). */
  readonly rule?: "logged" | "unlogged";
  readonly status?: number;
  /** Runs before the transaction, for what must not be undone with it: counting tries, slow hashing. */
  readonly before?: (viewer: V, sent: Sent<z.output<P>, B>) => Promise<void>;
  readonly run: (context: CommandContext<V>, sent: Sent<z.output<P>, B>) => Promise<R>;
}

/** A write by a signed-in person with the permission. */
export function write<P extends z.ZodType = typeof emptySchema, B extends z.ZodType = typeof emptySchema, R = unknown>(
  may: Permission,
  spec: WriteSpec<SessionViewer, P, z.output<B>, R> & { readonly body?: B },
): RouteHandler {
  return guarded(async (request, context) => {
    const viewer = await permitted(request, may);
    return runSpec(viewer, spec, request, context, (max) => jsonOf(request, spec.body, max));
  });
}

/** A write that carries one file (multipart field `file`) by a signed-in person with the permission. */
export function writeFile<P extends z.ZodType, R>(
  may: Permission,
  spec: WriteSpec<SessionViewer, P, SentFile, R> & { readonly maxBytes: number },
): RouteHandler {
  return guarded(async (request, context) => {
    const viewer = await permitted(request, may);
    return runSpec(viewer, spec, request, context, (max) => fileBody(request, max));
  });
}

/** A write by somebody who need not be signed in: sign-up, links from mails. */
export function writePublic<B extends z.ZodType, R>(spec: WriteSpec<null, typeof emptySchema, z.output<B>, R> & { readonly body: B }): RouteHandler {
  return guarded((request, context) => runSpec(null, spec, request, context, (max) => jsonOf(request, spec.body, max)));
}

function guarded(work: RouteHandler): RouteHandler {
  return async (request, context) => {
    try {
      if (!isOwnOrigin(request.headers.get("origin"), settings().BASE_URL)) throw refuseForbidden("This did not come from a page of this site.");
      return await work(request, context);
    } catch (error) {
      return answerOfError(error);
    }
  };
}

/** The viewer, when they have the permission. @throws Refusal 401, 403. */
export async function permitted(request: Request, may: Permission): Promise<SessionViewer> {
  const viewer = await requireViewer(request);
  if (!canDo(viewer.role, may)) throw refuseForbidden(refusalOf(may));
  return viewer;
}

/** Ids of an address. @throws Refusal 404 when one is no id at all. */
export async function addressParams<P extends z.ZodType>(schema: P | undefined, context: RouteContext | undefined): Promise<z.output<P>> {
  if (schema === undefined) return {} as z.output<P>;
  const parsed = schema.safeParse((await context?.params) ?? {});
  if (!parsed.success) throw refuseNotFound();
  return parsed.data;
}

async function jsonOf<B extends z.ZodType>(request: Request, schema: B | undefined, maxBytes: number): Promise<z.output<B>> {
  return checked(schema ?? emptySchema, await jsonBody(request, maxBytes)) as z.output<B>;
}

async function runSpec<V extends SessionViewer | null, P extends z.ZodType, B, R>(
  viewer: V,
  spec: WriteSpec<V, P, B, R>,
  request: Request,
  context: RouteContext | undefined,
  read: (maxBytes: number) => Promise<B>,
): Promise<Response> {
  const params = await addressParams(spec.params, context);
  const sent = { params, body: await read(spec.maxBytes ?? BODY_MAX_BYTES), request };
  await spec.before?.(viewer, sent);
  const result = await runCommand(viewer, spec.rule ?? "logged", (command) => spec.run(command, sent));
  return Response.json(result ?? { ok: true }, { status: spec.status ?? 200, headers: { "cache-control": "no-store" } });
}
