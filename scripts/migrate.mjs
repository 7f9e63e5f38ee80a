/**
 * Brings the database to the newest layout: `node scripts/migrate.mjs`, or `node scripts/migrate.mjs down` to undo the
 * newest step. The database is the one of MIGRATION_DATABASE_URL (the owner role), else the local one of `npm start`.
 */
import { migrate, migrateDown } from "./lib/migrations.mjs";
import { ROOT } from "./lib/paths.mjs";
import { say, sayWhy } from "./lib/say.mjs";
import { localEnvironment } from "./lib/settings-file.mjs";

try {
  const url = process.env.MIGRATION_DATABASE_URL || localEnvironment().MIGRATION_DATABASE_URL;
  const down = process.argv[2] === "down";
  const names = down ? await migrateDown(url, ROOT) : await migrate(url, ROOT);
  for (const name of names) say(`${down ? "undone" : "applied"} ${name}`);
  if (names.length === 0) say("nothing to do");
} catch (error) {
  process.exitCode = sayWhy(error);
}
