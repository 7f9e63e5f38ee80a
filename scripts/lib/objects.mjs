/** Copies of the object store's content: every object as a file under its key, and back. */
import { createHash } from "node:crypto";
import { createReadStream, createWriteStream, mkdirSync, statSync } from "node:fs";
import path from "node:path";
import { pipeline } from "node:stream/promises";
import { PlainError } from "./say.mjs";

/** @param {Record<string, string>} environment */
async function openStore(environment) {
  // The SDK's notice about coming Node versions is for developers, not for whoever makes a backup.
  process.env.AWS_SDK_JS_NODE_VERSION_SUPPORT_WARNING_DISABLED ??= "true";
  const sdk = await import("@aws-sdk/client-s3");
  const client = new sdk.S3Client({
    endpoint: environment.S3_ENDPOINT || undefined,
    region: environment.S3_REGION || "us-east-1",
    credentials: { accessKeyId: environment.S3_ACCESS_KEY_ID, secretAccessKey: environment.S3_SECRET_ACCESS_KEY },
    forcePathStyle: true,
    requestChecksumCalculation: "WHEN_REQUIRED",
    responseChecksumValidation: "WHEN_REQUIRED",
  });
  return { sdk, client, Bucket: environment.S3_BUCKET };
}

/** SHA-256 of a file, lower-case hex. @param {string} file @returns {Promise<string>} */
export async function fileHash(file) {
  const hash = createHash("sha256");
  await pipeline(createReadStream(file), hash);
  return hash.digest("hex");
}

/**
 * Copies every object to `folder`/key and checks it against the hash its key names.
 * @param {Record<string, string>} environment @param {string} folder
 * @returns {Promise<{key: string, sha256: string, bytes: number, contentType: string}[]>}
 * @throws PlainError naming an object that is damaged in the store.
 */
export async function copyObjectsOut(environment, folder) {
  const { sdk, client, Bucket } = await openStore(environment);
  const copied = [];
  try {
    for await (const page of sdk.paginateListObjectsV2({ client }, { Bucket })) {
      for (const { Key: key } of page.Contents ?? []) copied.push(await copyOne(sdk, client, Bucket, key, folder));
    }
  } finally {
    client.destroy();
  }
  return copied;
}

async function copyOne(sdk, client, Bucket, key, folder) {
  const file = fileOf(folder, key);
  mkdirSync(path.dirname(file), { recursive: true, mode: 0o700 });
  const answer = await client.send(new sdk.GetObjectCommand({ Bucket, Key: key }));
  await pipeline(answer.Body, createWriteStream(file, { mode: 0o600 }));
  const sha256 = await fileHash(file);
  const named = key.slice(key.lastIndexOf("/") + 1);
  if (sha256 !== named) throw new PlainError(`The stored object ${key} does not match its hash. The backup was stopped; nothing was changed.`);
  return { key, sha256, bytes: statSync(file).size, contentType: answer.ContentType ?? "application/octet-stream" };
}

/** Where an object's copy lies. @throws PlainError for a key that would leave the folder. */
export function fileOf(folder, key) {
  const file = path.resolve(folder, key);
  if (!file.startsWith(`${path.resolve(folder)}${path.sep}`)) throw new PlainError(`The object key ${key} is not one of ours.`);
  return file;
}

/** Puts copies back into the store. @param {Record<string, string>} environment @param {string} folder @param {{key: string, contentType: string, bytes: number}[]} objects */
export async function copyObjectsIn(environment, folder, objects) {
  const { sdk, client, Bucket } = await openStore(environment);
  try {
    for (const { key, contentType, bytes } of objects) {
      await client.send(new sdk.PutObjectCommand({ Bucket, Key: key, Body: createReadStream(fileOf(folder, key)), ContentType: contentType, ContentLength: bytes }));
    }
  } finally {
    client.destroy();
  }
}
