/**
 * The queues and what each job carries. The migration step makes one queue per entry, as the owner role; the
 * application's role can only put jobs in and take them out.
 */
import type { Mail } from "./mail";

export interface QueueData {
  /** One mail to hand to SMTP. */
  mail: Mail;
  /** One cutting plan to look for. */
  nest: { readonly shopId: string; readonly nestId: string };
  /** One package to make, or to clean up after. */
  package: { readonly shopId: string; readonly packageId: string };
}

export type QueueName = keyof QueueData;

export interface QueueRule {
  readonly name: QueueName;
  readonly retryLimit: number;
  /** Seconds before the first retry, doubled at each further one. */
  readonly retryDelay: number;
  readonly expireInSeconds: number;
}

export const QUEUES: readonly QueueRule[] = [
  { name: "mail", retryLimit: 8, retryDelay: 15, expireInSeconds: 120 },
  { name: "nest", retryLimit: 3, retryDelay: 2, expireInSeconds: 300 },
  // A large one takes minutes; one whose worker died is put in anew by the next look, long before this runs out.
  { name: "package", retryLimit: 8, retryDelay: 2, expireInSeconds: 900 },
];

/** The database schema the queue lives in. */
export const QUEUE_SCHEMA = "pgboss";
