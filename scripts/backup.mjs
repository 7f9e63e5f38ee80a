/**
 * `npm run backup -- FOLDER`: database and objects, into a new folder. Works beside a running Quarterline and on a
 * stopped one; on the settings of the environment where DATABASE_URL is given.
 */
import path from "node:path";
import { writeBackup } from "./lib/backup.mjs";
import { isLocked, releaseLock, takeLock } from "./lib/lock.mjs";
import { PlainError, say, sayWhy } from "./lib/say.mjs";
import { localEnvironment } from "./lib/settings-file.mjs";
import { withServices } from "./lib/stack.mjs";

async function main() {
  const folder = process.argv[2];
  if (!folder || folder.startsWith("-")) throw new PlainError("Name the folder to write:  npm run backup -- FOLDER", 64);
  const environment = localEnvironment();
  if (!environment.MIGRATION_DATABASE_URL) throw new PlainError("MIGRATION_DATABASE_URL must be given: the backup is made as the owner role.", 78);
  const write = (found) => writeBackup(found, path.resolve(folder), new Date());
  if (process.env.DATABASE_URL || isLocked()) await write(environment);
  else {
    takeLock();
    await withServices((stack) => write(stack.environment));
  }
  say(`the backup is in ${path.resolve(folder)}; it holds private data, keep it safe`);
}

main().catch((error) => {
  process.exitCode = sayWhy(error);
}).finally(() => releaseLock());
