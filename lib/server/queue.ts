/**
 * The job queue, kept in PostgreSQL by pg-boss. Jobs are put in inside the caller's transaction, so a job exists
 * exactly when the change that caused it does. Schema and queues were made beforehand by the owner role.
 */
import PgBoss from "pg-boss";
import type { Transaction } from "sequelize";
import { log } from "./log";
import { QUEUES, QUEUE_SCHEMA, type QueueData, type QueueName } from "./queue-names";
import { settings } from "./settings";

export type { QueueData, QueueName } from "./queue-names";

/** What to do with a job of each queue. A throw means: try again later. */
export type QueueHandlers = { readonly [Name in QueueName]: (data: QueueData[Name]) => Promise<void> };

/** The driver connection under a Sequelize transaction, which its type leaves out. */
interface DriverConnection {
  query(sql: string, values: unknown[]): Promise<{ rows: unknown[] }>;
}

const POLL_SECONDS = 1;
const STOP_LIMIT_MS = 5_000;
const QUEUE_POOL = 2;

const shared = globalThis as typeof globalThis & { quarterlineWorker?: PgBoss };

/** Never started: only its statement for putting a job in is used, on the caller's own connection. */
const sender = new PgBoss({ db: { executeSql: refuseOwnConnection }, schema: QUEUE_SCHEMA });

async function refuseOwnConnection(): Promise<never> {
  throw new Error("A job is put into the queue on the caller's transaction only.");
}

/**
 * Puts a job into a queue as part of `transaction`.
 * @returns the job's id.
 * @throws when the queue does not exist.
 */
export async function enqueue<Name extends QueueName>(
  name: Name,
  data: QueueData[Name],
  transaction: Transaction,
): Promise<string> {
  const connection = (transaction as unknown as { connection: DriverConnection }).connection;
  const executeSql = (sql: string, values: unknown[]) => connection.query(sql, values);
  const id = await sender.send(name, data, { db: { executeSql } });
  if (id === null) throw new Error(`The queue "${name}" does not exist.`);
  return id;
}

/**
 * Starts working the queues in this process; many processes may. Safe to call twice.
 * @throws when the queue's schema is missing or of another version.
 */
export async function workQueues(handlers: QueueHandlers): Promise<void> {
  if (shared.quarterlineWorker) return;
  const boss = new PgBoss({
    connectionString: settings().DATABASE_URL,
    application_name: "quarterline-queue",
    schema: QUEUE_SCHEMA,
    max: QUEUE_POOL,
    migrate: false,
    schedule: false,
    // Mails carry single-use links, so finished jobs are not kept about.
    archiveCompletedAfterSeconds: 60,
    deleteAfterHours: 1,
  });
  shared.quarterlineWorker = boss;
  boss.on("error", (error) => log.warn({ error }, "queue trouble"));
  await boss.start();
  for (const { name } of QUEUES) await workOne(boss, name, handlers);
}

async function workOne<Name extends QueueName>(boss: PgBoss, name: Name, handlers: QueueHandlers): Promise<void> {
  let worker: string | null = null;
  worker = await boss.work<QueueData[Name]>(name, { pollingIntervalSeconds: POLL_SECONDS }, async (jobs) => {
    for (const job of jobs) {
      try {
        await handlers[name](job.data);
      } catch (error) {
        log.warn({ queue: name, jobId: job.id, error }, "job failed, to be tried again");
        throw error;
      }
    }
    // The next job is fetched at once instead of after the pause, so that a backlog drains as fast as it can be done.
    if (worker !== null) boss.notifyWorker(worker);
  });
}

/** Lets running jobs finish (a few seconds at most) and stops. A job cut short is worked again later. */
export async function stopQueues(): Promise<void> {
  const boss = shared.quarterlineWorker;
  shared.quarterlineWorker = undefined;
  await boss?.stop({ graceful: true, timeout: STOP_LIMIT_MS, wait: true });
}
