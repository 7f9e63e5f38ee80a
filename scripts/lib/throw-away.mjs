/** Services for tests, on data that is thrown away: PostgreSQL with roles and migrations, object store, mail catcher. */
import { randomBytes } from "node:crypto";
import { chmodSync, mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { fileURLToPath } from "node:url";
import { migrate } from "./migrations.mjs";
import { anyFreePort } from "./ports.mjs";
import { initCluster, makeServerFolder, startPostgres, SUPERUSER } from "./postgres.mjs";
import { APP_ROLE, databaseUrl, ensureDatabase, OWNER_ROLE } from "./roles.mjs";
import { objectStoreSettings, startMailCatcher, startObjectStore } from "./stand-ins.mjs";

const ROOT = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "../..");
const secret = () => randomBytes(18).toString("base64url");

/** A folder of its own under the system's temporary one, which the database's user can enter. */
export function throwAwayFolder() {
  const folder = mkdtempSync(path.join(tmpdir(), "quarterline-"));
  chmodSync(folder, 0o711);
  mkdirSync(path.join(folder, "logs"), { mode: 0o700 });
  return folder;
}

/**
 * A throw-away PostgreSQL with both roles and, unless told otherwise, every migration.
 * @param {{migrated?: boolean}} [options]
 */
export async function startThrowAwayPostgres({ migrated = true } = {}) {
  const folder = throwAwayFolder();
  const home = path.join(folder, "pg");
  const [superPassword, ownerPassword, appPassword] = [secret(), secret(), secret()];
  makeServerFolder(home);
  initCluster(home, superPassword);
  const port = await anyFreePort();
  const startIt = () => startPostgres({ home, port, logFile: path.join(folder, "logs/postgres.log") });
  let server = await startIt();
  const database = "quarterline";
  const superUrl = databaseUrl(SUPERUSER, superPassword, port, "postgres");
  await ensureDatabase(superUrl, { database, ownerPassword, appPassword });
  const ownerUrl = databaseUrl(OWNER_ROLE, ownerPassword, port, database);
  if (migrated) await migrate(ownerUrl, ROOT);
  return {
    folder,
    port,
    ownerUrl,
    appUrl: databaseUrl(APP_ROLE, appPassword, port, database),
    superUrl: databaseUrl(SUPERUSER, superPassword, port, database),
    passwords: { superPassword, ownerPassword, appPassword },
    crash: () => server.crash(),
    restart: async () => {
      server = await startIt();
    },
    stop: async () => {
      await server.stop();
      rmSync(folder, { recursive: true, force: true });
    },
  };
}

/** All services, with the environment that points the application at them. */
export async function startThrowAwayServices() {
  const postgres = await startThrowAwayPostgres();
  const { folder } = postgres;
  const logs = path.join(folder, "logs");
  const accessKeyId = secret();
  const [s3Port, smtpPort] = [await anyFreePort(), await anyFreePort()];
  const outbox = path.join(folder, "outbox");
  const objects = path.join(folder, "objects");
  const children = [
    await startObjectStore({ root: ROOT, folder: objects, logs, port: s3Port, accessKeyId }),
    await startMailCatcher({ root: ROOT, folder: outbox, logs, port: smtpPort }),
  ];
  return {
    postgres,
    folder,
    environment: {
      DATABASE_URL: postgres.appUrl,
      MIGRATION_DATABASE_URL: postgres.ownerUrl,
      QUARTERLINE_TEST_SUPER_URL: postgres.superUrl,
      ...objectStoreSettings(s3Port, accessKeyId, secret()),
      SMTP_URL: `smtp://127.0.0.1:${smtpPort}`,
      OUTBOX_DIR: outbox,
      BASE_URL: "http://127.0.0.1:3999",
      NEXTAUTH_URL: "http://127.0.0.1:3999",
      NEXTAUTH_SECRET: secret(),
      SEALING_KEY: secret() + secret(),
      LOG_LEVEL: "silent",
    },
    stop: async () => {
      await Promise.all(children.map((child) => child.stop(2000)));
      await postgres.stop();
    },
  };
}
