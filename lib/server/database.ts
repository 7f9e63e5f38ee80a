/**
 * The database handle. One Sequelize pool per process, made on first use and kept on globalThis, since Next loads
 * routes and instrumentation as separate module worlds that must share one pool.
 */
import { Sequelize, type Transaction } from "sequelize";
import { bindModels } from "@/models";
import { log } from "./log";
import { settings } from "./settings";

const STATEMENT_LIMIT_MS = 20_000;
const IDLE_IN_TRANSACTION_LIMIT_MS = 30_000;
const LOCK_LIMIT_MS = 10_000;

/** PostgreSQL's codes for work that may succeed when simply done again: serialization failure, deadlock. */
const WORTH_ANOTHER_TRY = new Set(["40001", "40P01"]);
const TRIES = 4;

const shared = globalThis as typeof globalThis & { quarterlineDatabase?: Sequelize };

/** The handle this module world's models are bound to: classes are made anew per world, the pool is not. */
let boundTo: Sequelize | null = null;

/** The process's Sequelize handle, as the application's database role. */
export function getDb(): Sequelize {
  shared.quarterlineDatabase ??= openDatabase(settings().DATABASE_URL, settings().DATABASE_POOL);
  if (boundTo !== shared.quarterlineDatabase) {
    boundTo = shared.quarterlineDatabase;
    bindModels(boundTo);
  }
  return shared.quarterlineDatabase;
}

/** A handle with the pool and time limits every process uses. */
export function openDatabase(url: string, poolSize: number): Sequelize {
  return new Sequelize(url, {
    dialect: "postgres",
    logging: false,
    pool: { max: poolSize, min: 0, idle: 30_000, acquire: 60_000 },
    dialectOptions: {
      application_name: "quarterline",
      statement_timeout: STATEMENT_LIMIT_MS,
      idle_in_transaction_session_timeout: IDLE_IN_TRANSACTION_LIMIT_MS,
      lock_timeout: LOCK_LIMIT_MS,
      keepAlive: true,
    },
  });
}

/**
 * Runs `work` in one transaction, committed when it resolves and undone when it throws. A deadlock or serialization
 * failure is tried again from the start, so `work` must do nothing outside the database that may not happen twice.
 */
export async function inTransaction<T>(work: (transaction: Transaction) => Promise<T>): Promise<T> {
  for (let attempt = 1; ; attempt += 1) {
    try {
      return await getDb().transaction(work);
    } catch (error) {
      const code = databaseCode(error);
      if (code === null || !WORTH_ANOTHER_TRY.has(code) || attempt === TRIES) throw error;
      log.debug({ code, attempt }, "transaction tried again");
    }
  }
}

/** PostgreSQL's five-character code of an error, or null when it did not come from the database. */
export function databaseCode(error: unknown): string | null {
  const original = (error as { original?: { code?: unknown } } | null)?.original;
  return typeof original?.code === "string" ? original.code : null;
}

/** Whether the database answers; never throws. */
export async function databaseReachable(): Promise<boolean> {
  try {
    await getDb().query("SELECT 1");
    return true;
  } catch {
    return false;
  }
}

/** Closes the pool; the next getDb() opens a new one. */
export async function closeDb(): Promise<void> {
  const open = shared.quarterlineDatabase;
  shared.quarterlineDatabase = undefined;
  await open?.close();
}
