/** The invented demo shop, put into an empty database on first use. */
import { existsSync } from "node:fs";
import path from "node:path";
import { ROOT } from "./paths.mjs";
import { migrate } from "./migrations.mjs";
import { ensureDatabase } from "./roles.mjs";
import { say } from "./say.mjs";
import { DATABASE, superUrlOf, writeSettings } from "./settings-file.mjs";
import { runStep } from "./steps.mjs";

const SEED = path.join(ROOT, "scripts/seed-demo.ts");

/**
 * Seeds when this is a demo, the database is local or named as a demo, and there is no shop yet. A seed that was cut
 * short left only demo rows behind (the server never ran on them), so that database is made anew first.
 * @param {Record<string, any>} settings @param {Record<string, string | undefined>} environment
 */
export async function seedDemo(settings, environment) {
  if (environment.DEMO !== "1" || !existsSync(SEED)) return;
  if (settings.seeding === "begun" && !process.env.DATABASE_URL) await beginAnew(settings, environment);
  if ((await rows(environment.DATABASE_URL, "SELECT 1 FROM shops LIMIT 1")).length > 0) return;
  say("seeding the demo shop");
  settings.seeding = "begun";
  writeSettings(settings);
  await runStep("Seeding the demo shop", process.execPath, ["--import", "tsx", SEED], { cwd: ROOT, env: { ...environment, LOG_LEVEL: "warn" } });
  settings.seeding = "done";
  settings.demoLogins = await rows(
    environment.DATABASE_URL,
    "SELECT p.email, p.name, m.role FROM memberships m JOIN people p ON p.id = m.person_id WHERE m.removed_at IS NULL ORDER BY m.role, p.email",
  );
  writeSettings(settings);
}

async function beginAnew(settings, environment) {
  say("an earlier seeding was cut short; beginning it anew");
  await rows(superUrlOf(settings), `DROP DATABASE IF EXISTS ${DATABASE} WITH (FORCE)`);
  await ensureDatabase(superUrlOf(settings), { database: DATABASE, ...settings });
  await migrate(environment.MIGRATION_DATABASE_URL, ROOT);
}

async function rows(url, sql) {
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    return (await client.query(sql)).rows;
  } finally {
    await client.end();
  }
}
