import NextAuth from "next-auth";
import { authOptions, signInLimited } from "@/lib/server/auth";
import type { RouteContext } from "@/lib/server/write";

/** Sign-in, sign-out and their tokens are next-auth's; too many tries are answered before it is asked. */
async function handler(request: Request, context: RouteContext): Promise<Response> {
  const refused = await signInLimited(request);
  return refused ?? (NextAuth(authOptions()) as (request: Request, context: RouteContext) => Promise<Response>)(request, context);
}

export { handler as GET, handler as POST };
