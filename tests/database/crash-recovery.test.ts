/** kill -9 of PostgreSQL in the middle of writing, then a restart: what was acknowledged is there, whole. */
import { Client } from "pg";
import { afterAll, beforeAll, expect, test } from "vitest";
import { startThrowAwayPostgres, type ThrowAwayPostgres } from "../../scripts/lib/throw-away.mjs";

const WRITERS = 8;
const WRITES = 200;
const CRASH_AFTER = 90;
let postgres: ThrowAwayPostgres;

beforeAll(async () => {
  postgres = await startThrowAwayPostgres({ migrated: false });
  const owner = new Client({ connectionString: postgres.ownerUrl });
  await owner.connect();
  await owner.query("CREATE TABLE notes (n integer PRIMARY KEY); CREATE TABLE note_log (n integer PRIMARY KEY REFERENCES notes)");
  await owner.query("GRANT SELECT, INSERT ON notes, note_log TO quarterline_app");
  await owner.end();
});

afterAll(() => postgres.stop());

async function connect(): Promise<Client> {
  const client = new Client({ connectionString: postgres.appUrl });
  client.on("error", () => undefined);
  await client.connect();
  return client;
}

/** One write as the application does it: the change and its log entry in one transaction. */
async function writeNote(client: Client, n: number): Promise<void> {
  await client.query("BEGIN");
  await client.query("INSERT INTO notes VALUES ($1)", [n]);
  await client.query("INSERT INTO note_log VALUES ($1)", [n]);
  await client.query("COMMIT");
}

/** Writes its share until told the server is gone; a write whose COMMIT was answered is acknowledged. */
async function writeShare(share: readonly number[], acknowledged: Set<number>, onWrite: () => void): Promise<number[]> {
  const client = await connect();
  const left = [...share];
  try {
    while (left[0] !== undefined) {
      await writeNote(client, left[0]);
      acknowledged.add(left[0]);
      left.shift();
      onWrite();
    }
  } catch {
    // The server was killed under this writer; what is left is written after the restart.
  }
  await client.end().catch(() => undefined);
  return left;
}

test("every acknowledged write survives, none is half there, and the rest can be written after the restart", async () => {
  const acknowledged = new Set<number>();
  const shares = Array.from({ length: WRITERS }, (_, writer) => Array.from({ length: WRITES / WRITERS }, (__, k) => writer * (WRITES / WRITERS) + k));
  let crash: Promise<void> | null = null;
  const onWrite = () => {
    if (acknowledged.size >= CRASH_AFTER) crash ??= postgres.crash();
  };
  const left = (await Promise.all(shares.map((share) => writeShare(share, acknowledged, onWrite)))).flat();
  await crash;
  expect(left.length).toBeGreaterThan(0);
  expect(acknowledged.size).toBeGreaterThanOrEqual(CRASH_AFTER);

  await postgres.restart();
  const client = await connect();
  const read = async (table: string) => new Set((await client.query<{ n: number }>(`SELECT n FROM ${table}`)).rows.map(({ n }) => n));
  const [notes, entries] = [await read("notes"), await read("note_log")];
  expect([...acknowledged].filter((n) => !notes.has(n))).toEqual([]);
  expect([...notes].sort((a, b) => a - b)).toEqual([...entries].sort((a, b) => a - b));

  for (const n of left.filter((wanted) => !notes.has(wanted))) await writeNote(client, n);
  expect((await read("notes")).size).toBe(WRITES);
  await client.end();
});

test("checksums and flushing to disk are on", async () => {
  const client = await connect();
  const setting = async (name: string) => (await client.query<Record<string, string>>(`SHOW ${name}`)).rows[0]?.[name];
  expect(await setting("data_checksums")).toBe("on");
  expect(await setting("fsync")).toBe("on");
  expect(await setting("synchronous_commit")).toBe("on");
  await client.end();
});
