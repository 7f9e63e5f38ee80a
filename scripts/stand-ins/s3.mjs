/**
 * Stand-in for S3: s3rver on loopback, keeping objects in OBJECTS_DIR. Two things are made stricter than it is by
 * itself: every request must name our access key, and an object is on the disk before it is acknowledged.
 * Environment: OBJECTS_DIR, STAND_IN_PORT, S3_BUCKET, S3_ACCESS_KEY_ID. Ends with its parent.
 */
import { createHash, randomUUID } from "node:crypto";
import { mkdirSync } from "node:fs";
import { mkdir, open, rename, rm } from "node:fs/promises";
import http from "node:http";
import path from "node:path";
import S3rver from "s3rver";
import account from "s3rver/lib/models/account.js";
import { standIn } from "./stand-in.mjs";

const { OBJECTS_DIR, STAND_IN_PORT, S3_BUCKET, S3_ACCESS_KEY_ID } = process.env;
mkdirSync(OBJECTS_DIR, { recursive: true, mode: 0o700 });

account.DUMMY_ACCOUNT.revokeAccessKey("S3RVER");
account.DUMMY_ACCOUNT.createKeyPair(S3_ACCESS_KEY_ID, S3_ACCESS_KEY_ID);

const store = new S3rver({
  directory: OBJECTS_DIR,
  silent: true,
  vhostBuckets: false,
  configureBuckets: [{ name: S3_BUCKET }],
});

/** Written aside, flushed and renamed, so a crash leaves the old object or the new one and never half of one. */
store.store.putObject = async function putObject(object) {
  const target = this.getResourcePath(object.bucket, object.key, "object");
  const aside = path.join(path.dirname(target), `.${randomUUID()}`);
  await mkdir(path.dirname(target), { recursive: true });
  const md5 = createHash("md5");
  let size = 0;
  const file = await open(aside, "w", 0o600);
  try {
    for await (const part of Buffer.isBuffer(object.content) ? [object.content] : object.content) {
      md5.update(part);
      size += part.length;
      await file.writeFile(part);
    }
    await file.sync();
    await file.close();
    await rename(aside, target);
  } catch (error) {
    await file.close().catch(() => {});
    await rm(aside, { force: true });
    throw error;
  }
  const digest = md5.digest("hex");
  await this.putMetadata(object.bucket, object.key, object.metadata, digest);
  return { size, md5: digest };
};

await store.configureBuckets();
const answer = store.callback();
const server = http.createServer((request, response) => {
  const named = (request.headers.authorization ?? "").includes(`Credential=${S3_ACCESS_KEY_ID}/`);
  if (named) return answer(request, response);
  response.writeHead(403, { "content-type": "application/xml", connection: "close" });
  response.end("<Error><Code>AccessDenied</Code><Message>Access Denied</Message></Error>");
});
server.listen(Number(STAND_IN_PORT), "127.0.0.1", () => standIn.ready());
standIn.onStop((done) => {
  server.close(done);
  server.closeIdleConnections();
});
