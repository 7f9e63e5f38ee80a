/** Backup, wipe, restore: the same rows and the same sheets, byte for byte; and what a restore refuses. */
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { DeleteObjectCommand, S3Client } from "@aws-sdk/client-s3";
import { Client } from "pg";
import { afterAll, beforeAll, describe, expect, test } from "vitest";
import { startThrowAwayServices, type ThrowAwayServices } from "../../scripts/lib/throw-away.mjs";
import { restoreBackup, writeBackup } from "../../scripts/lib/backup.mjs";
import { forgetSettings } from "@/lib/server/settings";
import { forgetStorage, getObject, putObject } from "@/lib/server/storage";
import { addShopWithSheets, type StoredSheet } from "./stored-sheets";

const NOW = new Date("2026-03-02T09:00:00Z");
const before = { ...process.env };
let services: ThrowAwayServices;
let folder: string;
let sheets: StoredSheet[];

beforeAll(async () => {
  services = await startThrowAwayServices();
  Object.assign(process.env, services.environment);
  forgetSettings();
  forgetStorage();
  folder = mkdtempSync(path.join(tmpdir(), "quarterline-backup-"));
  const client = await open("DATABASE_URL");
  ({ sheets } = await addShopWithSheets(client, 6, async (shopId, bytes) => (await putObject(shopId, bytes, "application/pdf")).key));
  await client.end();
});

afterAll(async () => {
  await services.stop();
  rmSync(folder, { recursive: true, force: true });
  Object.assign(process.env, before);
  forgetSettings();
  forgetStorage();
});

async function open(setting: string): Promise<Client> {
  const client = new Client({ connectionString: services.environment[setting] });
  await client.connect();
  return client;
}

/** Every row of every table of ours, as text, in a fixed order. */
async function everyRow(): Promise<Record<string, string[]>> {
  const client = await open("MIGRATION_DATABASE_URL");
  const { rows: tables } = await client.query<{ name: string }>("SELECT tablename AS name FROM pg_tables WHERE schemaname = 'public' ORDER BY 1");
  const all: Record<string, string[]> = {};
  for (const { name } of tables) {
    const { rows } = await client.query<{ row: string }>(`SELECT t::text AS row FROM ${name} t ORDER BY 1`);
    all[name] = rows.map(({ row }) => row);
  }
  await client.end();
  return all;
}

async function wipe(): Promise<void> {
  const client = await open("MIGRATION_DATABASE_URL");
  await client.query("DROP SCHEMA pgboss CASCADE; DROP SCHEMA public CASCADE; CREATE SCHEMA public");
  await client.end();
  const store = new S3Client({
    endpoint: services.environment.S3_ENDPOINT,
    region: "us-east-1",
    forcePathStyle: true,
    credentials: { accessKeyId: services.environment.S3_ACCESS_KEY_ID ?? "", secretAccessKey: services.environment.S3_SECRET_ACCESS_KEY ?? "" },
  });
  for (const { key } of sheets) await store.send(new DeleteObjectCommand({ Bucket: services.environment.S3_BUCKET, Key: key }));
}

describe("backup and restore", () => {
  test("after a wipe every row and every sheet is back, byte for byte, with the application's role kept to its grants", async () => {
    const rowsBefore = await everyRow();
    expect(rowsBefore.revision_sheets).toHaveLength(6);
    const manifest = await writeBackup(services.environment, path.join(folder, "good"), NOW);
    expect(manifest.objects).toHaveLength(6);
    await wipe();
    for (const { key } of sheets) expect(await getObject(key)).toBeNull();
    await restoreBackup(services.environment, path.join(folder, "good"), { force: false });
    expect(await everyRow()).toEqual(rowsBefore);
    for (const { key, bytes } of sheets) expect(Buffer.compare((await getObject(key)) ?? new Uint8Array(), bytes)).toBe(0);
    const app = await open("DATABASE_URL");
    await expect(app.query("DELETE FROM audit_events")).rejects.toThrow("permission denied");
    await expect(app.query("UPDATE revision_sheets SET bytes = 1")).rejects.toThrow("permission denied");
    expect((await app.query("SELECT count(*)::int AS n FROM pgboss.queue")).rows[0].n).toBeGreaterThan(0);
    await app.end();
  });

  test("a database that holds a shop is not overwritten unless forced", async () => {
    const rowsBefore = await everyRow();
    await expect(restoreBackup(services.environment, path.join(folder, "good"), { force: false })).rejects.toThrow("--force");
    expect(await everyRow()).toEqual(rowsBefore);
    const client = await open("DATABASE_URL");
    await client.query("UPDATE shops SET name = 'Renamed since'");
    await client.end();
    await restoreBackup(services.environment, path.join(folder, "good"), { force: true });
    expect(await everyRow()).toEqual(rowsBefore);
  });

  test("a damaged or unfinished backup is refused before anything is touched", async () => {
    const copy = path.join(folder, "damaged");
    const manifest = await writeBackup(services.environment, copy, NOW);
    const rowsBefore = await everyRow();
    const object = path.join(copy, "objects", manifest.objects[0]?.key ?? "");
    const bytes = readFileSync(object);
    bytes[100] = (bytes[100] ?? 0) ^ 1;
    writeFileSync(object, bytes);
    await expect(restoreBackup(services.environment, copy, { force: true })).rejects.toThrow("does not match its hash");
    rmSync(object);
    await expect(restoreBackup(services.environment, copy, { force: true })).rejects.toThrow("is missing");
    rmSync(path.join(copy, "manifest.json"));
    await expect(restoreBackup(services.environment, copy, { force: true })).rejects.toThrow("no finished backup");
    expect(await everyRow()).toEqual(rowsBefore);
  });

  test("a folder that holds something is not written into", async () => {
    await expect(writeBackup(services.environment, path.join(folder, "good"), NOW)).rejects.toThrow("not empty");
  });
});
