/**
 * Brings a database to the newest layout, as the owner role. Each file of migrations/ exports `up` and `down`, taking
 * {context: QueryInterface}; each runs in one transaction made here, so a killed migration leaves nothing behind.
 */
import { readdirSync } from "node:fs";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { APP_ROLE } from "./roles.mjs";

const TABLE = "schema_migrations";
/** Any fixed number; it keeps two migrators of one database apart. */
const LOCK_KEY = 7_240_316;

/**
 * @param {string} ownerUrl @param {string} root the project's folder
 * @returns {Promise<string[]>} names of the migrations that were applied now
 */
export async function migrate(ownerUrl, root) {
  return withMigrator(ownerUrl, root, async ({ umzug, sequelize }) => {
    const applied = (await umzug.up()).map((migration) => migration.name);
    await sequelize.query(`GRANT SELECT ON ${TABLE} TO ${APP_ROLE}`);
    await prepareQueues(ownerUrl, root, sequelize);
    return applied;
  });
}

/** Undoes the newest migration. @param {string} ownerUrl @param {string} root */
export async function migrateDown(ownerUrl, root) {
  return withMigrator(ownerUrl, root, async ({ umzug }) => (await umzug.down()).map((migration) => migration.name));
}

/** Migrations that would run, oldest first. @param {string} ownerUrl @param {string} root @returns {Promise<string[]>} */
export async function pendingMigrations(ownerUrl, root) {
  return withMigrator(ownerUrl, root, async ({ umzug }) => (await umzug.pending()).map((migration) => migration.name));
}

async function withMigrator(ownerUrl, root, work) {
  const { Sequelize } = await import("sequelize");
  // One connection, so that BEGIN, the migration and COMMIT share it.
  const sequelize = new Sequelize(ownerUrl, { dialect: "postgres", logging: false, pool: { max: 1, min: 1, idle: 3_600_000 } });
  try {
    await sequelize.query(`SELECT pg_advisory_lock(${LOCK_KEY})`);
    await sequelize.query(`CREATE TABLE IF NOT EXISTS ${TABLE} (name text PRIMARY KEY, applied_at timestamptz NOT NULL DEFAULT now())`);
    const { Umzug } = await import("umzug");
    const umzug = new Umzug({
      migrations: migrationFiles(root).map((file) => migrationOf(file, sequelize)),
      context: sequelize.getQueryInterface(),
      storage: storageOf(sequelize),
      logger: undefined,
    });
    return await work({ umzug, sequelize });
  } catch (error) {
    // Umzug's error carries the whole connection, password and all; only what went wrong is passed on.
    const reason = error.cause ?? error;
    throw error.migration ? new Error(`Migration ${error.migration.name} failed: ${reason.message}`, { cause: reason.original }) : reason;
  } finally {
    await sequelize.close();
  }
}

function migrationFiles(root) {
  const folder = path.join(root, "migrations");
  return readdirSync(folder).filter((name) => /^\d.*\.ts$/.test(name)).sort().map((name) => path.join(folder, name));
}

function migrationOf(file, sequelize) {
  const name = path.basename(file, ".ts");
  return {
    name,
    up: (parameters) => inOneTransaction(sequelize, async () => {
      await (await loadTypeScript(file)).up(parameters);
      await sequelize.query(`INSERT INTO ${TABLE} (name) VALUES ($1)`, { bind: [name] });
    }),
    down: (parameters) => inOneTransaction(sequelize, async () => {
      await (await loadTypeScript(file)).down(parameters);
      await sequelize.query(`DELETE FROM ${TABLE} WHERE name = $1`, { bind: [name] });
    }),
  };
}

async function loadTypeScript(file) {
  const { tsImport } = await import("tsx/esm/api");
  const loaded = await tsImport(pathToFileURL(file).href, import.meta.url);
  return loaded.default && !("up" in loaded) ? { ...loaded.default, ...loaded } : loaded;
}

async function inOneTransaction(sequelize, work) {
  await sequelize.query("BEGIN");
  const ownTransaction = sequelize.transaction;
  sequelize.transaction = () => {
    throw new Error("A migration already runs inside one transaction and must not open its own.");
  };
  try {
    await work();
    await sequelize.query("COMMIT");
  } catch (error) {
    await sequelize.query("ROLLBACK").catch(() => {});
    throw error;
  } finally {
    sequelize.transaction = ownTransaction;
  }
}

/** Rows are written by the migration's own transaction, so only reading is left to do here. */
function storageOf(sequelize) {
  return {
    logMigration: async () => {},
    unlogMigration: async () => {},
    executed: async () => {
      const [rows] = await sequelize.query(`SELECT name FROM ${TABLE} ORDER BY name`);
      return rows.map((row) => row.name);
    },
  };
}

/** Makes the queue's schema and its queues, and lets the application's role put jobs in and take them out. */
async function prepareQueues(ownerUrl, root, sequelize) {
  const { default: PgBoss } = await import("pg-boss");
  const { QUEUES, QUEUE_SCHEMA } = await loadTypeScript(path.join(root, "lib/server/queue-names.ts"));
  const boss = new PgBoss({ connectionString: ownerUrl, schema: QUEUE_SCHEMA, supervise: false, schedule: false, max: 1 });
  boss.on("error", () => {});
  await boss.start();
  try {
    for (const { name, ...rule } of QUEUES) {
      const options = { policy: "standard", retryBackoff: true, ...rule };
      if (await boss.getQueue(name)) await boss.updateQueue(name, options);
      else await boss.createQueue(name, options);
    }
  } finally {
    await boss.stop({ graceful: false, wait: true });
  }
  await sequelize.query(`
    GRANT USAGE ON SCHEMA ${QUEUE_SCHEMA} TO ${APP_ROLE};
    GRANT SELECT, INSERT, UPDATE, DELETE ON ALL TABLES IN SCHEMA ${QUEUE_SCHEMA} TO ${APP_ROLE};
    GRANT USAGE ON ALL SEQUENCES IN SCHEMA ${QUEUE_SCHEMA} TO ${APP_ROLE};
  `);
}
