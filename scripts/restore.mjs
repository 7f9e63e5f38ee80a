/**
 * `npm run restore -- FOLDER [--force]`: puts a backup in place. Refuses a database that holds a shop unless forced,
 * and a Quarterline that is running. On the settings of the environment where DATABASE_URL is given.
 */
import { mkdirSync } from "node:fs";
import path from "node:path";
import { restoreBackup } from "./lib/backup.mjs";
import { releaseLock, takeLock } from "./lib/lock.mjs";
import { dataFolder } from "./lib/paths.mjs";
import { PlainError, say, sayWhy } from "./lib/say.mjs";
import { environmentOf, ensureSettings, writeSettings } from "./lib/settings-file.mjs";
import { withServices } from "./lib/stack.mjs";

async function main() {
  const [folder] = process.argv.slice(2).filter((word) => !word.startsWith("-"));
  const force = process.argv.includes("--force");
  if (!folder) throw new PlainError("Name the backup's folder:  npm run restore -- FOLDER [--force]", 64);
  mkdirSync(dataFolder(), { recursive: true, mode: 0o711 });
  takeLock();
  const restore = async (environment, settings) => {
    const { baseUrl } = await restoreBackup(environment, path.resolve(folder), { force });
    if (settings) writeSettings({ ...settings, seeding: "done" });
    if (baseUrl && environment.BASE_URL !== baseUrl) say(`sheets of that backup lead to ${baseUrl}; set BASE_URL to it to keep printed codes working`);
  };
  if (process.env.DATABASE_URL && process.env.S3_BUCKET) await restore(environmentOf(ensureSettings()), null);
  else await withServices((stack) => restore(stack.environment, stack.settings));
  say("restored; `npm start` runs on it");
}

main().catch((error) => {
  process.exitCode = sayWhy(error);
}).finally(() => releaseLock());
