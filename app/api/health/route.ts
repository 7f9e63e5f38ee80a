/** Whether this process and what it leans on work, for start scripts, load balancers and monitors. No sign-in. */
import { databaseReachable } from "@/lib/server/database";
import { mailReachable } from "@/lib/server/mail";
import { storageReachable } from "@/lib/server/storage";

export const dynamic = "force-dynamic";

/** 200 when database and storage answer and mail can be handed on, else 503 saying which does not. */
export async function GET(): Promise<Response> {
  const [database, storage, mail] = await Promise.all([databaseReachable(), storageReachable(), mailReachable()]);
  const healthy = database && storage && mail;
  return Response.json({ healthy, database, storage, mail }, { status: healthy ? 200 : 503, headers: { "cache-control": "no-store" } });
}
