import NextAuth from "next-auth";
import type { NextRequest } from "next/server";
import { answerAuth, authOptions } from "@/lib/server/auth";
import type { RouteContext } from "@/lib/server/write";

type Handler = (request: NextRequest, context: RouteContext) => Promise<Response>;

/** Sign-in, sign-out and their tokens are next-auth's. */
function handler(request: NextRequest, context: RouteContext): Promise<Response> {
  return answerAuth(request, (read) => (NextAuth(authOptions()) as Handler)(read, context));
}

export { handler as GET, handler as POST };
