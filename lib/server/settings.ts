/**
 * The one door to the environment. Everything the server needs to know is read here, checked once, and kept.
 * `npm start` makes all of these for a local stack; elsewhere they come from the machine that runs it.
 */
import { z } from "zod";

const flag = z
  .enum(["0", "1"])
  .default("0")
  .transform((text) => text === "1");

const settingsSchema = z.object({
  DATABASE_URL: z.url({ protocol: /^postgres(ql)?$/ }),
  DATABASE_POOL: z.coerce.number().int().min(1).max(200).default(10),
  S3_ENDPOINT: z.url().optional(),
  S3_REGION: z.string().min(1).default("us-east-1"),
  S3_BUCKET: z.string().min(3),
  S3_ACCESS_KEY_ID: z.string().min(1),
  S3_SECRET_ACCESS_KEY: z.string().min(1),
  SMTP_URL: z.url({ protocol: /^smtps?$/ }),
  MAIL_FROM: z.string().min(3).default("Quarterline <quarterline@localhost>"),
  BASE_URL: z.url({ protocol: /^https?$/ }),
  NEXTAUTH_SECRET: z.string().min(16),
  /** What certificates and their passwords are encrypted under. Lost, they are lost with it. */
  SEALING_KEY: z.string().min(32),
  /** bcrypt cost: 12 takes about a third of a second; tests lower it. */
  PASSWORD_COST: z.coerce.number().int().min(4).max(15).default(12),
  DEMO: flag,
  OUTBOX_DIR: z.string().optional(),
  LOG_LEVEL: z.enum(["trace", "debug", "info", "warn", "error", "fatal", "silent"]).default("info"),
  WORK_QUEUE: flag.default(true),
  /** Threads that prepare a package's sheets; absent = one per processor, four at most. */
  PACKAGE_THREADS: z.coerce.number().int().min(1).max(16).optional(),
  /** A worker that says nothing of its package for so long counts as dead, seconds. */
  PACKAGE_SILENCE_S: z.coerce.number().int().min(1).max(600).default(10),
});

export type Settings = z.infer<typeof settingsSchema>;

let known: Settings | null = null;

/**
 * The checked settings of this process.
 * @throws Error naming every setting that is missing or malformed; values are never repeated in it, some are secrets.
 */
export function settings(): Settings {
  known ??= parseSettings(process.env);
  return known;
}

/**
 * Reads settings from a plain record of strings, an empty string counting as absent.
 * @throws Error as `settings` does.
 */
export function parseSettings(environment: Readonly<Record<string, string | undefined>>): Settings {
  const given = Object.fromEntries(Object.entries(environment).filter(([, value]) => value !== ""));
  const parsed = settingsSchema.safeParse(given);
  if (!parsed.success) {
    const names = [...new Set(parsed.error.issues.map((issue) => String(issue.path[0])))];
    throw new Error(`These settings are missing or malformed: ${names.join(", ")}.`);
  }
  if (parsed.data.DEMO && !isLoopback(parsed.data.BASE_URL)) {
    throw new Error("DEMO=1 is for loopback addresses only: demo logins and the outbox must not be on a network.");
  }
  return { ...parsed.data, BASE_URL: parsed.data.BASE_URL.replace(/\/+$/, "") };
}

/** Whether an address names this machine only. */
export function isLoopback(url: string): boolean {
  const host = new URL(url).hostname;
  return host === "localhost" || host === "[::1]" || /^127\.\d+\.\d+\.\d+$/.test(host);
}

/** Forgets what was read; for tests that change the environment. */
export function forgetSettings(): void {
  known = null;
}
