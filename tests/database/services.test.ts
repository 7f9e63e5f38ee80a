/** The server's doors to what surrounds it, on real PostgreSQL and the local stand-ins. */
import { readdirSync, readFileSync } from "node:fs";
import path from "node:path";
import { afterAll, describe, expect, test } from "vitest";
import { closeDb, databaseReachable, getDb, inTransaction } from "@/lib/server/database";
import { mailReachable, sendMail } from "@/lib/server/mail";
import { enqueue, stopQueues, workQueues } from "@/lib/server/queue";
import { deleteObject, getObject, getObjectStream, objectKey, putObject, storageReachable } from "@/lib/server/storage";

const SHOP = "0b8f6c1e-5a55-4a7e-9f4e-2f6f0f5b6a10";

afterAll(async () => {
  await stopQueues();
  await closeDb();
});

async function waitFor(done: () => boolean): Promise<void> {
  const end = Date.now() + 40_000;
  while (!done() && Date.now() < end) await new Promise((resolve) => setTimeout(resolve, 50));
}

function outbox(): { to: string[]; subject: string; text: string }[] {
  const folder = process.env.OUTBOX_DIR ?? "";
  return readdirSync(folder).filter((name) => name.endsWith(".json")).map((name) => JSON.parse(readFileSync(path.join(folder, name), "utf8")));
}

describe("object storage", () => {
  test("bytes come back as they went in, under their hash, whole and as a stream", async () => {
    const bytes = new Uint8Array(300_000).map((_, index) => (index * 31) % 256);
    const stored = await putObject(SHOP, bytes, "application/pdf");
    expect(stored.key).toBe(objectKey(SHOP, stored.sha256));
    expect(Buffer.compare((await getObject(stored.key)) ?? new Uint8Array(), bytes)).toBe(0);
    const stream = await getObjectStream(stored.key);
    expect(Buffer.compare(new Uint8Array(await new Response(stream).arrayBuffer()), bytes)).toBe(0);
    await deleteObject(stored.key);
    expect(await getObject(stored.key)).toBeNull();
  });

  test("an object that does not match its hash is refused", async () => {
    const stored = await putObject(SHOP, new TextEncoder().encode("one"), "text/plain");
    const { PutObjectCommand, S3Client } = await import("@aws-sdk/client-s3");
    const raw = new S3Client({
      endpoint: process.env.S3_ENDPOINT,
      region: "us-east-1",
      forcePathStyle: true,
      requestChecksumCalculation: "WHEN_REQUIRED",
      credentials: { accessKeyId: process.env.S3_ACCESS_KEY_ID ?? "", secretAccessKey: process.env.S3_SECRET_ACCESS_KEY ?? "" },
    });
    await raw.send(new PutObjectCommand({ Bucket: process.env.S3_BUCKET, Key: stored.key, Body: "two" }));
    await expect(getObject(stored.key)).rejects.toThrow("does not match its hash");
  });

  test("the stand-in refuses whoever does not name our key", async () => {
    const stored = await putObject(SHOP, new TextEncoder().encode("private"), "text/plain");
    const answer = await fetch(`${process.env.S3_ENDPOINT}/${process.env.S3_BUCKET}/${stored.key}`);
    expect(answer.status).toBe(403);
  });
});

/** Other tests' jobs wait in the same queues, so these look only at their own mails. */
describe("queue and mail", () => {
  const mail = {
    to: "fitter@services.example",
    subject: "Sheet S-0001 – 3′ released",
    text: "Line one.\n.\nÜber = 100 % of a line that is rather longer than seventy-six characters, to be sure.\n",
  };
  const arrived = () => outbox().filter(({ to }) => to.includes(mail.to));

  test("a job exists exactly when its transaction was committed, and its mail arrives as written", async () => {
    await expect(
      inTransaction(async (transaction) => {
        await enqueue("mail", { ...mail, subject: "never" }, transaction);
        throw new Error("undone");
      }),
    ).rejects.toThrow("undone");
    await inTransaction((transaction) => enqueue("mail", mail, transaction));
    await workQueues({ mail: sendMail, nest: async () => undefined, package: async () => undefined });
    await waitFor(() => arrived().length > 0);
    expect(arrived()).toHaveLength(1);
    expect(arrived()[0]).toMatchObject({ to: [mail.to], subject: mail.subject });
    expect(arrived()[0]?.text.trim()).toBe(mail.text.trim());
  });

  test("a job whose handler throws is tried again", async () => {
    await stopQueues();
    let tries = 0;
    const id = await inTransaction((transaction) => enqueue("mail", { ...mail, subject: "again" }, transaction));
    await getDb().query("UPDATE pgboss.job SET retry_delay = 0, retry_backoff = false WHERE id = $1", { bind: [id] });
    await workQueues({
      nest: async () => undefined,
      package: async () => undefined,
      mail: async ({ subject }) => {
        if (subject !== "again") return;
        tries += 1;
        if (tries === 1) throw new Error("first try fails");
      },
    });
    await waitFor(() => tries >= 2);
    expect(tries).toBe(2);
  });
});

test("health questions are answered yes while the parts run", async () => {
  expect(await Promise.all([databaseReachable(), storageReachable(), mailReachable()])).toEqual([true, true, true]);
});
