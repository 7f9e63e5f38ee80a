/**
 * Structured log lines, one JSON object each, on standard output. Ids only: names, addresses, tokens and typed text
 * stay out, and what slips into a known field is struck out before it is written.
 */
import pino from "pino";

const PRIVATE_FIELDS = [
  "password", "email", "name", "token", "secret", "cookie", "authorization", "to", "subject", "text", "html", "body",
  "document", "parameters", "sql",
];

const wordless = PRIVATE_FIELDS.flatMap((field) => [field, `*.${field}`, `*.*.${field}`]);

/** The process's logger. Attach ids: `log.info({ shopId, revisionId }, "revision submitted")`. */
export const log = pino({
  level: process.env.LOG_LEVEL || "info",
  base: { service: "quarterline" },
  timestamp: pino.stdTimeFunctions.isoTime,
  redact: { paths: wordless, censor: "[left out]" },
  serializers: { error: errorForLog, err: errorForLog },
});

/**
 * What of an error may be logged: its kind, code, message and stack. A database error's message can repeat a value
 * ("Key (email)=(...)"), so only its code and constraint are kept.
 */
export function errorForLog(error: unknown): Record<string, unknown> {
  if (!(error instanceof Error)) return { kind: typeof error };
  const database = databaseCause(error);
  if (database) return { kind: error.name, code: database.code, constraint: database.constraint, stack: framesOnly(error) };
  return { kind: error.name, message: error.message, stack: framesOnly(error) };
}

function databaseCause(error: Error): { code?: string; constraint?: string } | null {
  const inner = (error as { original?: unknown }).original ?? error;
  const isFromDatabase = typeof inner === "object" && inner !== null && "severity" in inner && "code" in inner;
  return isFromDatabase ? (inner as { code?: string; constraint?: string }) : null;
}

function framesOnly(error: Error): string[] {
  return (error.stack ?? "").split("\n").filter((line) => /^\s+at /.test(line)).slice(0, 12).map((line) => line.trim());
}
