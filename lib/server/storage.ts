/**
 * Object storage for PDFs and uploads, through the S3 SDK. An object's key is its shop and the SHA-256 of its bytes,
 * so the same bytes are stored once, stored bytes never change, and whoever reads can check them.
 */
import { createHash } from "node:crypto";
import {
  DeleteObjectCommand, GetObjectCommand, HeadBucketCommand, PutObjectCommand, S3Client, S3ServiceException,
} from "@aws-sdk/client-s3";
import { settings } from "./settings";

export interface StoredObject {
  readonly key: string;
  readonly sha256: string;
  readonly bytes: number;
}

const REQUEST_LIMIT_MS = 20_000;
const REACH_LIMIT_MS = 3_000;

const shared = globalThis as typeof globalThis & { quarterlineStorage?: S3Client };

/** The process's connection to the store. */
export function storageClient(): S3Client {
  return client();
}

function client(): S3Client {
  const { S3_ENDPOINT, S3_REGION, S3_ACCESS_KEY_ID, S3_SECRET_ACCESS_KEY } = settings();
  shared.quarterlineStorage ??= new S3Client({
    endpoint: S3_ENDPOINT,
    region: S3_REGION,
    credentials: { accessKeyId: S3_ACCESS_KEY_ID, secretAccessKey: S3_SECRET_ACCESS_KEY },
    forcePathStyle: true,
    // Stores that only speak the older protocol refuse the SDK's default trailing checksums.
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
  return shared.quarterlineStorage;
}

/** SHA-256 of bytes, lower-case hex. */
export function sha256Hex(bytes: Uint8Array): string {
  return createHash("sha256").update(bytes).digest("hex");
}

/** Where a shop's object with this hash lies. */
export function objectKey(shopId: string, sha256: string): string {
  return `${shopId}/${sha256}`;
}

/** Stores bytes under their hash. Storing the same bytes again changes nothing. @throws when the store refuses. */
export async function putObject(shopId: string, bytes: Uint8Array, contentType: string): Promise<StoredObject> {
  const sha256 = sha256Hex(bytes);
  const key = objectKey(shopId, sha256);
  await client().send(
    new PutObjectCommand({ Bucket: settings().S3_BUCKET, Key: key, Body: bytes, ContentType: contentType, ContentLength: bytes.length }),
    { abortSignal: AbortSignal.timeout(REQUEST_LIMIT_MS) },
  );
  return { key, sha256, bytes: bytes.length };
}

/**
 * The bytes of an object, or null when there is none.
 * @throws when the store fails, or the bytes do not hash to the key's SHA-256: a damaged sheet is never handed out.
 */
export async function getObject(key: string): Promise<Uint8Array | null> {
  const answer = await openObject(key);
  if (answer === null) return null;
  const bytes = await answer.transformToByteArray();
  const expected = key.slice(key.lastIndexOf("/") + 1);
  if (sha256Hex(bytes) !== expected) throw new Error("A stored object does not match its hash.");
  return bytes;
}

/** An object as a web stream (not checked against its hash), or null when there is none. @throws when the store fails. */
export async function getObjectStream(key: string): Promise<ReadableStream | null> {
  const answer = await openObject(key);
  return answer === null ? null : answer.transformToWebStream();
}

async function openObject(key: string) {
  try {
    const answer = await client().send(new GetObjectCommand({ Bucket: settings().S3_BUCKET, Key: key }), {
      abortSignal: AbortSignal.timeout(REQUEST_LIMIT_MS),
    });
    return answer.Body ?? null;
  } catch (error) {
    if (isMissing(error)) return null;
    throw error;
  }
}

/** Removes an object; one that is not there is no error. Signed sheets are never removed by the application. */
export async function deleteObject(key: string): Promise<void> {
  await client().send(new DeleteObjectCommand({ Bucket: settings().S3_BUCKET, Key: key }), {
    abortSignal: AbortSignal.timeout(REQUEST_LIMIT_MS),
  });
}

/** Whether the bucket answers; never throws. */
export async function storageReachable(): Promise<boolean> {
  try {
    await client().send(new HeadBucketCommand({ Bucket: settings().S3_BUCKET }), { abortSignal: AbortSignal.timeout(REACH_LIMIT_MS) });
    return true;
  } catch {
    return false;
  }
}

function isMissing(error: unknown): boolean {
  return error instanceof S3ServiceException && (error.name === "NoSuchKey" || error.$metadata.httpStatusCode === 404);
}

/** Forgets the connection; for tests that point the settings at another store. */
export function forgetStorage(): void {
  shared.quarterlineStorage?.destroy();
  shared.quarterlineStorage = undefined;
}
