/** Rows of one small shop with signed sheets, written by plain SQL as the application's role, and their bytes. */
import { createHash, randomBytes, randomUUID } from "node:crypto";
import type { Client } from "pg";

export interface StoredSheet {
  readonly key: string;
  readonly bytes: Uint8Array;
}

const sha256 = (bytes: Uint8Array | string): string => createHash("sha256").update(bytes).digest("hex");

/** Inserts by column names. */
async function add(client: Client, table: string, row: Readonly<Record<string, unknown>>): Promise<void> {
  const names = Object.keys(row);
  await client.query(
    `INSERT INTO ${table} (${names.join(", ")}) VALUES (${names.map((_, index) => `$${index + 1}`).join(", ")})`,
    Object.values(row),
  );
}

/**
 * A shop, two people, a job, a line and `count` spools, each with one signed revision and its stored sheet.
 * @param put stores bytes under a shop and answers the object's key
 */
export async function addShopWithSheets(
  client: Client,
  count: number,
  put: (shopId: string, bytes: Uint8Array) => Promise<string>,
): Promise<{ shopId: string; sheets: StoredSheet[] }> {
  const [shop_id, drafter, inspector, job_id, line_id] = [randomUUID(), randomUUID(), randomUUID(), randomUUID(), randomUUID()] as const;
  const at = new Date("2026-03-02T08:15:00.123Z");
  await add(client, "shops", { id: shop_id, name: "Bent Arm Pipe Works", settings: {}, created_at: at });
  for (const [id, name] of [[drafter, "Ada Marsh"], [inspector, "Jo Ruiz"]] as const) {
    await add(client, "people", { id, email: `${id}@shop.example`, name, password_hash: "none", created_at: at });
  }
  await add(client, "jobs", { shop_id, id: job_id, number: "J-1", title: "", client: "", area: "", settings: {}, created_at: at, created_by: drafter, updated_at: at });
  const line = { document: '{"lengthMm":228.60000000000002}', marks: "{}", version: 1, created_at: at, created_by: drafter, updated_at: at, updated_by: drafter };
  await add(client, "lines", { shop_id, id: line_id, job_id, number: "L-1", title: "Ü 3′", size: "4", material: "CS", points: 2, ...line });
  const sheets: StoredSheet[] = [];
  for (let index = 1; index <= count; index += 1) {
    const bytes = new Uint8Array(randomBytes(20_000 + index));
    const key = await put(shop_id, bytes);
    await addSignedSheet(client, { shop_id, line_id, drafter, inspector, index, at, key, bytes });
    sheets.push({ key, bytes });
  }
  await add(client, "audit_events", { shop_id, seq: 1, type: "shop.created", data: "{}", actor: drafter, at, prev_hash: "", hash: sha256("1") });
  return { shopId: shop_id, sheets };
}

interface SheetFacts {
  readonly shop_id: string;
  readonly line_id: string;
  readonly drafter: string;
  readonly inspector: string;
  readonly index: number;
  readonly at: Date;
  readonly key: string;
  readonly bytes: Uint8Array;
}

async function addSignedSheet(client: Client, { shop_id, line_id, drafter, inspector, index, at, key, bytes }: SheetFacts): Promise<void> {
  const [spool_id, revision_id] = [randomUUID(), randomUUID()];
  await add(client, "spools", { shop_id, id: spool_id, line_id, letter: `S${index}`, sheet_number: index, created_at: at });
  await add(client, "revisions", {
    shop_id, id: revision_id, spool_id, code: "A", ordinal: 1, state: "for-review", description: "First issue", line_version: 1,
    content_sha256: sha256(`content ${index}`), status_token: randomBytes(24).toString("base64url"),
    submitted_by: drafter, submitted_at: at, state_at: at, state_by: drafter,
  });
  await client.query("UPDATE revisions SET state = 'for-fabrication', signed_by = $1, signed_at = $2 WHERE id = $3", [inspector, at, revision_id]);
  const input = `{"index":${index},"mm":0.1}`;
  await add(client, "revision_inputs", { shop_id, id: randomUUID(), revision_id, kind: "fabrication", input, sha256: sha256(input), content_key: "k", at });
  await add(client, "revision_sheets", {
    shop_id, id: randomUUID(), revision_id, kind: "fabrication", sha256: sha256(bytes), bytes: bytes.length, object_key: key, audit_seq: 1, audit_hash: sha256("1"), at,
  });
}
