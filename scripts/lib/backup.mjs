/**
 * Database and objects together in one folder, and back. The database is dumped before the objects are copied: an
 * object is stored before a row names it, so every object a dumped row names is there to be copied.
 *   database.dump   pg_dump's custom format      objects/   one file per object, under its key
 *   manifest.json   hashes of both, written last: a folder without it is no backup
 */
import { existsSync, mkdirSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from "node:fs";
import path from "node:path";
import { copyObjectsIn, copyObjectsOut, fileHash, fileOf } from "./objects.mjs";
import { migrate } from "./migrations.mjs";
import { ROOT } from "./paths.mjs";
import { programsFor } from "./postgres.mjs";
import { APP_ROLE, OWNER_ROLE } from "./roles.mjs";
import { PlainError, say } from "./say.mjs";
import { runStep } from "./steps.mjs";

const FORMAT = 1;
const plural = (count, word) => `${count} ${word}${count === 1 ? "" : "s"}`;

/** The password goes by the environment, since command lines are open to everybody on a machine. */
function connection(url) {
  const { username, password, hostname, port, pathname, searchParams } = new URL(url);
  return {
    PATH: process.env.PATH,
    PGUSER: decodeURIComponent(username),
    PGPASSWORD: decodeURIComponent(password),
    PGHOST: hostname,
    PGPORT: port || "5432",
    PGDATABASE: decodeURIComponent(pathname.slice(1)),
    ...(searchParams.get("sslmode") ? { PGSSLMODE: searchParams.get("sslmode") } : {}),
  };
}

/**
 * Writes a backup. @param {Record<string, string>} environment with MIGRATION_DATABASE_URL and the S3 settings
 * @param {string} folder new or empty @param {Date} now
 * @throws PlainError when the folder holds something, or an object is damaged.
 */
export async function writeBackup(environment, folder, now) {
  if (existsSync(folder) && readdirSync(folder).length > 0) throw new PlainError(`${folder} is not empty. Name a new folder for the backup.`, 73);
  mkdirSync(folder, { recursive: true, mode: 0o700 });
  const dump = path.join(folder, "database.dump");
  await runStep("pg_dump", path.join(programsFor(), "pg_dump"), ["--format=custom", "--no-owner", `--file=${dump}`], { env: connection(environment.MIGRATION_DATABASE_URL) });
  say("dumped the database");
  const objects = await copyObjectsOut(environment, path.join(folder, "objects"));
  say(`copied ${plural(objects.length, "object")}`);
  const manifest = {
    format: FORMAT,
    madeAt: now.toISOString(),
    baseUrl: environment.BASE_URL,
    roles: [OWNER_ROLE, APP_ROLE],
    database: { file: "database.dump", sha256: await fileHash(dump), bytes: statSync(dump).size },
    objects,
  };
  writeFileSync(path.join(folder, "manifest.json"), `${JSON.stringify(manifest, null, 1)}\n`, { mode: 0o600 });
  return manifest;
}

/** Reads a backup's manifest and checks every file against it. @param {string} folder @throws PlainError */
export async function checkBackup(folder) {
  const file = path.join(folder, "manifest.json");
  if (!existsSync(file)) throw new PlainError(`${folder} holds no finished backup (there is no manifest.json).`, 66);
  const manifest = JSON.parse(readFileSync(file, "utf8"));
  if (manifest.format !== FORMAT) throw new PlainError(`This backup is of format ${manifest.format}; this version reads format ${FORMAT}.`, 65);
  const expected = [
    { file: path.join(folder, manifest.database.file), sha256: manifest.database.sha256 },
    ...manifest.objects.map(({ key, sha256 }) => ({ file: fileOf(path.join(folder, "objects"), key), sha256 })),
  ];
  for (const entry of expected) {
    if (!existsSync(entry.file)) throw new PlainError(`The backup is not whole: ${entry.file} is missing. Nothing was changed.`, 65);
    if ((await fileHash(entry.file)) !== entry.sha256) throw new PlainError(`The backup is damaged: ${entry.file} does not match its hash. Nothing was changed.`, 65);
  }
  return manifest;
}

/**
 * Puts a backup in place of what is there. Objects come first, then the database in one transaction: a restore that is
 * cut short leaves the database as it was.
 * @param {Record<string, string>} environment @param {string} folder @param {{force: boolean}} options
 * @throws PlainError when the database holds a shop and `force` is not given, or a role is missing.
 */
export async function restoreBackup(environment, folder, { force }) {
  const manifest = await checkBackup(folder);
  say(`the backup of ${manifest.madeAt} is whole`);
  const url = environment.MIGRATION_DATABASE_URL;
  await checkTarget(url, force);
  await copyObjectsIn(environment, path.join(folder, "objects"), manifest.objects);
  say(`put back ${plural(manifest.objects.length, "object")}`);
  const script = path.join(folder, ".restore.sql");
  try {
    await runStep("pg_restore", path.join(programsFor(), "pg_restore"), ["--no-owner", `--file=${script}`, path.join(folder, manifest.database.file)], { env: connection(url) });
    const clear = "DROP SCHEMA IF EXISTS pgboss CASCADE; DROP SCHEMA IF EXISTS public CASCADE; CREATE SCHEMA public;";
    await runStep("psql", path.join(programsFor(), "psql"), ["--no-psqlrc", "--quiet", "--output=/dev/null", "--single-transaction", "--set=ON_ERROR_STOP=1", "-c", clear, "-f", script], { env: { ...connection(url), PGOPTIONS: "--client-min-messages=warning" } });
  } finally {
    rmSync(script, { force: true });
  }
  say("put back the database");
  await migrate(url, ROOT);
  return manifest;
}

async function checkTarget(url, force) {
  const { default: pg } = await import("pg");
  const client = new pg.Client({ connectionString: url });
  await client.connect();
  try {
    const { rows: roles } = await client.query("SELECT rolname FROM pg_roles WHERE rolname = ANY($1)", [[OWNER_ROLE, APP_ROLE]]);
    if (roles.length < 2) throw new PlainError(`The database roles ${OWNER_ROLE} and ${APP_ROLE} must exist first.`, 69);
    const { rows } = await client.query("SELECT to_regclass('public.shops') IS NOT NULL AS there");
    const held = rows[0].there ? Number((await client.query("SELECT count(*) FROM shops")).rows[0].count) : 0;
    if (held > 0 && !force) throw new PlainError(`The database holds ${plural(held, "shop")}. Add --force to replace everything in it with the backup.`, 73);
  } finally {
    await client.end();
  }
}
