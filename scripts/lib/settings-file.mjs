/**
 * .data/settings.json (mode 600): the secrets, ports and addresses of the local parts, made once and kept, so that
 * a second start finds its data and printed addresses stay true.
 */
import { createHash, randomBytes } from "node:crypto";
import { existsSync, mkdirSync, readFileSync, renameSync, rmdirSync, writeFileSync } from "node:fs";
import path from "node:path";
import { dataFolder, ROOT } from "./paths.mjs";
import { canServerUse, makeServerFolder, SUPERUSER } from "./postgres.mjs";
import { anyFreePort, freePortFrom, isPortFree } from "./ports.mjs";
import { APP_ROLE, databaseUrl, OWNER_ROLE } from "./roles.mjs";
import { PlainError, say, warn } from "./say.mjs";
import { objectStoreSettings } from "./stand-ins.mjs";

const FIRST_PORT = 4310;
export const DATABASE = "quarterline";

function file() {
  return path.join(dataFolder(), "settings.json");
}

/** @returns {Record<string, any> | null} null when there are none yet. */
export function readSettings() {
  if (!existsSync(file())) return null;
  try {
    return JSON.parse(readFileSync(file(), "utf8"));
  } catch {
    throw new PlainError(`${file()} cannot be read as settings. Restore it from a copy, or move the data folder away to begin anew.`);
  }
}

/** Replaces the file whole, so that a crash leaves the old or the new one. */
export function writeSettings(settings) {
  writeFileSync(`${file()}.new`, `${JSON.stringify(settings, null, 2)}\n`, { mode: 0o600 });
  renameSync(`${file()}.new`, file());
}

const secret = (bytes = 24) => randomBytes(bytes).toString("base64url");

/** Folders made before certificates were kept have no key to seal them under: they get one. */
function withSealingKey(settings) {
  if (settings.sealingKey) return settings;
  settings.sealingKey = secret(32);
  writeSettings(settings);
  return settings;
}

/** Makes the data folder and, at the first time, the settings. @returns {Record<string, any>} */
export function ensureSettings() {
  const folder = dataFolder();
  mkdirSync(folder, { recursive: true, mode: 0o711 });
  mkdirSync(path.join(folder, "logs"), { recursive: true, mode: 0o700 });
  const known = readSettings();
  if (known) return withSealingKey(known);
  const made = {
    superPassword: secret(),
    ownerPassword: secret(),
    appPassword: secret(),
    s3AccessKeyId: secret(15),
    s3SecretAccessKey: secret(30),
    nextAuthSecret: secret(32),
    sealingKey: secret(32),
  };
  writeSettings(made);
  say("made secrets of its own (settings.json in the data folder)");
  return made;
}

/**
 * Where the database's files are. In the data folder when the server's user can go there; else (a clone under
 * root's home) in /var/tmp, under a name of this folder's own, which is kept in the settings.
 * @param {Record<string, any>} settings
 */
export function databaseHome(settings) {
  if (settings.databaseHome && existsSync(settings.databaseHome)) {
    makeServerFolder(settings.databaseHome);
    return settings.databaseHome;
  }
  const near = path.join(dataFolder(), "pg");
  makeServerFolder(near);
  const mark = createHash("sha256").update(`${dataFolder()} ${settings.superPassword}`).digest("hex").slice(0, 12);
  const home = canServerUse(near) ? near : path.join("/var/tmp", `quarterline-${mark}`);
  makeServerFolder(home);
  if (!canServerUse(home)) throw new PlainError(`The database's user cannot work in ${home}. Clone the project to a folder others may enter.`, 77);
  settings.databaseHome = home;
  writeSettings(settings);
  if (home !== near) {
    rmdirSync(near);
    say(`database files are in ${home}, since the database's user cannot enter this folder`);
  }
  return home;
}

/** Gives each local part a port, keeping the one it had while that is free. @param {Record<string, any>} settings @param {string[]} parts */
export async function assignPorts(settings, parts) {
  for (const part of parts) {
    const name = `${part}Port`;
    const taken = new Set(["database", "objects", "mail", "web"].filter((other) => other !== part).map((other) => settings[`${other}Port`]));
    if (settings[name] && (await isPortFree(settings[name]))) continue;
    do settings[name] = await anyFreePort();
    while (taken.has(settings[name]));
  }
  writeSettings(settings);
}

/**
 * The port of the pages. One that PORT names must be free when BASE_URL is given too, since the address leads there;
 * else a taken port gives way to another, which is kept.
 * @param {Record<string, any>} settings @param {string} host
 */
export async function assignWebPort(settings, host) {
  const named = process.env.PORT ? Number(process.env.PORT) : null;
  if (named !== null && !(Number.isInteger(named) && named > 0 && named < 65536)) throw new PlainError("PORT must be a number from 1 to 65535.", 78);
  const wanted = named ?? settings.webPort ?? FIRST_PORT;
  if (!(await isPortFree(wanted, host))) {
    if (named !== null && process.env.BASE_URL) throw new PlainError(`Port ${named} is taken by another program, and BASE_URL leads to it. Stop that program or name another PORT.`, 75);
    const next = await freePortFrom(wanted + 1, host);
    warn(`port ${wanted} is taken by another program, using ${next} from now on`);
    if (settings.webPort) warn(`addresses printed on sheets so far lead to port ${settings.webPort}; set BASE_URL to keep one for good`);
    settings.webPort = next;
  } else settings.webPort = wanted;
  settings.baseUrl = process.env.BASE_URL || `http://127.0.0.1:${settings.webPort}`;
  writeSettings(settings);
}

/**
 * What the application's processes are told. Anything given in the caller's environment replaces the local part.
 * @param {Record<string, any>} settings
 */
export function environmentOf(settings) {
  const given = (name, fallback) => process.env[name] || fallback;
  const localDatabase = !process.env.DATABASE_URL;
  const localObjects = !process.env.S3_BUCKET;
  const localMail = !process.env.SMTP_URL;
  return {
    ...process.env,
    DATABASE_URL: given("DATABASE_URL", databaseUrl(APP_ROLE, settings.appPassword, settings.databasePort, DATABASE)),
    MIGRATION_DATABASE_URL: given("MIGRATION_DATABASE_URL", localDatabase ? databaseUrl(OWNER_ROLE, settings.ownerPassword, settings.databasePort, DATABASE) : ""),
    ...(localObjects ? objectStoreSettings(settings.objectsPort, settings.s3AccessKeyId, settings.s3SecretAccessKey) : {}),
    SMTP_URL: given("SMTP_URL", `smtp://127.0.0.1:${settings.mailPort}`),
    OUTBOX_DIR: localMail ? path.join(dataFolder(), "outbox") : "",
    BASE_URL: given("BASE_URL", settings.baseUrl),
    NEXTAUTH_URL: given("BASE_URL", settings.baseUrl),
    NEXTAUTH_SECRET: given("NEXTAUTH_SECRET", settings.nextAuthSecret),
    SEALING_KEY: given("SEALING_KEY", settings.sealingKey),
    PORT: String(settings.webPort ?? ""),
    DEMO: given("DEMO", localDatabase && localObjects && localMail && !process.env.BASE_URL ? "1" : "0"),
    QUARTERLINE_DATA_DIR: dataFolder(),
    QUARTERLINE_ROOT: ROOT,
    NODE_ENV: "production",
    NEXT_TELEMETRY_DISABLED: "1",
  };
}

/** The environment of a stack that was started here before. @returns {Record<string, string>} */
export function localEnvironment() {
  const settings = readSettings();
  if (!settings?.databasePort && !process.env.DATABASE_URL) throw new PlainError("There is no local database yet. Run `npm start` once, or set DATABASE_URL and MIGRATION_DATABASE_URL.");
  return environmentOf(settings ? withSealingKey(settings) : {});
}

/** The superuser's address of the local cluster. */
export function superUrlOf(settings, database = "postgres") {
  return databaseUrl(SUPERUSER, settings.superPassword, settings.databasePort, database);
}
