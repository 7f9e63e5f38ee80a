/**
 * Large objects of the store: put from a file and handed out as a stream, so that neither is ever in memory whole. Kept
 * like every other object, under its shop and the SHA-256 of its bytes.
 */
import { createHash } from "node:crypto";
import { createReadStream } from "node:fs";
import { stat } from "node:fs/promises";
import { pipeline } from "node:stream/promises";
import { GetObjectCommand, PutObjectCommand, S3ServiceException } from "@aws-sdk/client-s3";
import { settings } from "./settings";
import { objectKey, storageClient, type StoredObject } from "./storage";

/** Longest time to put a large file, ms. */
const PUT_LIMIT_MS = 300_000;

/** What a file would be stored as. */
export async function fileObject(shopId: string, file: string): Promise<StoredObject> {
  const hash = createHash("sha256");
  await pipeline(createReadStream(file), hash);
  const sha256 = hash.digest("hex");
  return { key: objectKey(shopId, sha256), sha256, bytes: (await stat(file)).size };
}

/** Stores a file under the key found by `fileObject`. Storing it again changes nothing. @throws when the store refuses. */
export async function putFile(file: string, { key, bytes }: StoredObject, contentType: string): Promise<void> {
  await storageClient().send(
    new PutObjectCommand({ Bucket: settings().S3_BUCKET, Key: key, Body: createReadStream(file), ContentLength: bytes, ContentType: contentType }),
    { abortSignal: AbortSignal.timeout(PUT_LIMIT_MS) },
  );
}

export interface OpenedObject {
  readonly body: ReadableStream<Uint8Array>;
  readonly bytes: number;
  /** "bytes 0-99/1000" of a part; null of the whole. */
  readonly range: string | null;
}

/**
 * An object as a stream, or a part of it ("bytes=0-99"); null when there is none. The whole one is checked as it goes: a
 * damaged one ends in an error, which a browser shows as a broken download. Gives up only with its reader.
 * @returns "unsatisfiable" for a part that does not lie in it.
 */
export async function openStored(key: string, range: string | null, signal: AbortSignal): Promise<OpenedObject | "unsatisfiable" | null> {
  try {
    const answer = await storageClient().send(new GetObjectCommand({ Bucket: settings().S3_BUCKET, Key: key, Range: range ?? undefined }), { abortSignal: signal });
    if (answer.Body === undefined || answer.ContentLength === undefined) return null;
    const body = answer.Body.transformToWebStream() as ReadableStream<Uint8Array>;
    const part = range === null ? null : (answer.ContentRange ?? null);
    return { body: part === null ? body.pipeThrough(checkedAgainst(key)) : body, bytes: answer.ContentLength, range: part };
  } catch (error) {
    if (!(error instanceof S3ServiceException)) throw error;
    if (error.$metadata.httpStatusCode === 416) return "unsatisfiable";
    if (error.name === "NoSuchKey" || error.$metadata.httpStatusCode === 404) return null;
    throw error;
  }
}

function checkedAgainst(key: string): TransformStream<Uint8Array, Uint8Array> {
  const hash = createHash("sha256");
  const expected = key.slice(key.lastIndexOf("/") + 1);
  return new TransformStream({
    transform: (chunk, controller) => {
      hash.update(chunk);
      controller.enqueue(chunk);
    },
    flush: (controller) => {
      if (hash.digest("hex") !== expected) controller.error(new Error("A stored object does not match its hash."));
    },
  });
}
