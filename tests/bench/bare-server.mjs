/**
 * The least a server of the job list can be: node:http and pg, nothing of ours. It opens the same session cookie, runs
 * the two statements it is handed (the session's and the list's) with as many connections, and answers the rows as
 * JSON. No permissions by role, no headers of safety, no last-seen time. Started with a channel; answers its port.
 */
import { createServer } from "node:http";
import { decode } from "next-auth/jwt";
import pg from "pg";

const { url, pool: max, secret, session, list } = JSON.parse(process.env.BARE_SERVER ?? "{}");
const pool = new pg.Pool({ connectionString: url, max });
const COOKIE = /(?:^|; )next-auth\.session-token=([^;]+)/;

/** Values in a statement's order, by what each was when the statement was written down. */
const run = async ({ text, slots }, known) => (await pool.query(text, slots.map((slot) => known[slot]))).rows;

async function answer(request, response) {
  const claims = await decode({ token: COOKIE.exec(request.headers.cookie ?? "")?.[1], secret });
  const [viewer] = await run(session, { sessionId: claims?.sid, now: new Date() });
  if (viewer === undefined) return response.writeHead(401).end();
  const rows = await run(list, { shopId: viewer.shopId, issuedOnly: false });
  response.writeHead(200, { "content-type": "application/json" }).end(JSON.stringify(rows));
}

const server = createServer((request, response) => {
  answer(request, response).catch(() => response.writeHead(500).end());
});
// Without the measurement it is of no use.
process.once("disconnect", () => process.exit(0));
server.listen(0, "127.0.0.1", () => process.send?.({ port: server.address().port }));
