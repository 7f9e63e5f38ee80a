/** The layout of the database: up, down and up again; what every table of a shop must have. */
import path from "node:path";
import { Client } from "pg";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { migrate, migrateDown, pendingMigrations } from "../../scripts/lib/migrations.mjs";
import { startThrowAwayPostgres } from "../../scripts/lib/throw-away.mjs";
import { withClient } from "./support";

const ROOT = path.resolve(import.meta.dirname, "../..");
let postgres: Awaited<ReturnType<typeof startThrowAwayPostgres>>;

beforeAll(async () => {
  postgres = await startThrowAwayPostgres();
});
afterAll(() => postgres.stop());

async function layout(): Promise<string[]> {
  const client = new Client({ connectionString: postgres.ownerUrl });
  await client.connect();
  try {
    const columns = await client.query<{ line: string }>(
      `SELECT table_name || '.' || column_name || ' ' || data_type || ' ' || is_nullable AS line FROM information_schema.columns WHERE table_schema = 'public'
       UNION ALL SELECT indexdef FROM pg_indexes WHERE schemaname = 'public'
       UNION ALL SELECT conrelid::regclass::text || ' ' || pg_get_constraintdef(oid) FROM pg_constraint WHERE connamespace = 'public'::regnamespace
       UNION ALL SELECT grantee || ' ' || table_name || ' ' || privilege_type FROM information_schema.table_privileges WHERE table_schema = 'public' AND grantee = 'quarterline_app'
       UNION ALL SELECT tgrelid::regclass::text || ' ' || tgname FROM pg_trigger WHERE NOT tgisinternal
       ORDER BY 1`,
    );
    return columns.rows.map((row) => row.line);
  } finally {
    await client.end();
  }
}

describe("migrations", () => {
  test("each can be undone, and all of them make the same layout again", async () => {
    const first = await layout();
    const undone: string[] = [];
    for (let names = await migrateDown(postgres.ownerUrl, ROOT); names.length > 0; names = await migrateDown(postgres.ownerUrl, ROOT)) undone.push(...names);
    expect(undone.length).toBeGreaterThanOrEqual(5);
    const bare = (await layout()).filter((line) => !line.includes("schema_migrations"));
    expect(bare).toEqual([]);
    expect((await migrate(postgres.ownerUrl, ROOT)).sort()).toEqual([...undone].sort());
    expect(await layout()).toEqual(first);
    expect(await pendingMigrations(postgres.ownerUrl, ROOT)).toEqual([]);
  });
});

/** Tables of the whole installation, not of one shop. */
const SHARED = ["people", "password_resets", "throttles", "schema_migrations", "shops"];

describe("tables of a shop", () => {
  test("each has shop_id in its key, and every reference to another names the shop too", async () => {
    const loose = await withClient("super", async (client) => {
      const tables = await client.query<{ name: string; key: string[] }>(
        `SELECT c.conrelid::regclass::text AS name, array_agg(a.attname::text) AS key
         FROM pg_constraint c JOIN pg_attribute a ON a.attrelid = c.conrelid AND a.attnum = ANY(c.conkey)
         WHERE c.contype = 'p' AND c.connamespace = 'public'::regnamespace GROUP BY c.conrelid`,
      );
      const references = await client.query<{ name: string; target: string; columns: string[] }>(
        `SELECT c.conrelid::regclass::text AS name, c.confrelid::regclass::text AS target,
           (SELECT array_agg(a.attname::text) FROM pg_attribute a WHERE a.attrelid = c.conrelid AND a.attnum = ANY(c.conkey)) AS columns
         FROM pg_constraint c WHERE c.contype = 'f' AND c.connamespace = 'public'::regnamespace`,
      );
      const keyless = tables.rows.filter(({ name, key }) => !SHARED.includes(name) && name !== "sessions" && !key.includes("shop_id")).map(({ name }) => name);
      const crossing = references.rows.filter(({ target, columns }) => !["people", "shops"].includes(target) && !columns.includes("shop_id")).map(({ name, target }) => `${name} to ${target}`);
      return { seen: tables.rows.length, references: references.rows.length, keyless, crossing };
    });
    expect(loose).toMatchObject({ keyless: [], crossing: [] });
    expect(loose.seen).toBeGreaterThan(20);
    expect(loose.references).toBeGreaterThan(30);
  });

  test("a row cannot refer to another shop's row, whatever the program does", async () => {
    const { newLine, newShop } = await import("./support");
    const [first, other] = [await newShop(), await newShop()];
    const { jobId } = await newLine(first);
    const outcome = await withClient("app", (client) =>
      client
        .query(
          `INSERT INTO lines (shop_id, id, job_id, number, title, size, material, points, document, marks, version, created_at, created_by, updated_at, updated_by)
           VALUES ($1, gen_random_uuid(), $2, 'L', '', '', '', 0, '', '', 1, now(), $3, now(), $3)`,
          [other.shopId, jobId, other.owner.personId],
        )
        .then(() => "done", (error: { code: string }) => error.code),
    );
    expect(outcome).toBe("23503");
  });
});
