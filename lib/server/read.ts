/** The one door for reads: who, may they, the ids in the address, then a query. Answers JSON, or what the query answers. */
import type { z } from "zod";
import type { Permission } from "@/lib/rules/permissions";
import { checked } from "./body";
import { answerOfError } from "./errors";
import type { SessionViewer } from "./session";
import { addressParams, permitted, type RouteHandler } from "./write";

interface ReadSpec<P extends z.ZodType, Q extends z.ZodType, R> {
  /** Ids in the address; one that does not fit answers 404. */
  readonly params?: P;
  /** Search part of the address. */
  readonly query?: Q;
  readonly run: (viewer: SessionViewer, asked: { readonly params: z.output<P>; readonly query: z.output<Q>; readonly request: Request }) => Promise<R>;
}

/** A read by a signed-in person with the permission. */
export function read<P extends z.ZodType = z.ZodUnknown, Q extends z.ZodType = z.ZodUnknown, R = unknown>(may: Permission, spec: ReadSpec<P, Q, R>): RouteHandler {
  return answered(async (request, context) => {
    const viewer = await permitted(request, may);
    const params = await addressParams(spec.params, context);
    const query = queryOf(spec.query, request);
    return spec.run(viewer, { params, query, request });
  });
}

/** A read by anybody: the status of a sheet by its token. */
export function readPublic<P extends z.ZodType, R>(spec: { readonly params?: P; readonly run: (asked: { readonly params: z.output<P>; readonly request: Request }) => Promise<R> }): RouteHandler {
  return answered(async (request, context) => spec.run({ params: await addressParams(spec.params, context), request }));
}

function answered(work: (...asked: Parameters<RouteHandler>) => Promise<unknown>): RouteHandler {
  return async (request, context) => {
    try {
      const result = await work(request, context);
      return result instanceof Response ? result : Response.json(result, { headers: { "cache-control": "no-store" } });
    } catch (error) {
      return answerOfError(error);
    }
  };
}

function queryOf<Q extends z.ZodType>(schema: Q | undefined, request: Request): z.output<Q> {
  if (schema === undefined) return {} as z.output<Q>;
  return checked(schema, Object.fromEntries(new URL(request.url).searchParams));
}
