/** The local stand-ins for object storage and mail, as child processes. */
import path from "node:path";
import { startNode } from "./children.mjs";

const BUCKET = "quarterline";

/** @param {{root: string, folder: string, logs: string, port: number, accessKeyId: string}} options */
export function startObjectStore({ root, folder, logs, port, accessKeyId }) {
  return startNode({
    name: "object store",
    script: path.join(root, "scripts/stand-ins/s3.mjs"),
    cwd: root,
    env: { PATH: process.env.PATH, NODE_NO_WARNINGS: "1", AWS_SDK_JS_SUPPRESS_MAINTENANCE_MODE_MESSAGE: "1", OBJECTS_DIR: folder, STAND_IN_PORT: String(port), S3_BUCKET: BUCKET, S3_ACCESS_KEY_ID: accessKeyId },
    logFile: path.join(logs, "object-store.log"),
    waitForMessage: true,
  });
}

/** @param {{root: string, folder: string, logs: string, port: number}} options */
export function startMailCatcher({ root, folder, logs, port }) {
  return startNode({
    name: "mail catcher",
    script: path.join(root, "scripts/stand-ins/smtp.mjs"),
    cwd: root,
    env: { PATH: process.env.PATH, OUTBOX_DIR: folder, STAND_IN_PORT: String(port) },
    logFile: path.join(logs, "mail.log"),
    waitForMessage: true,
  });
}

/** What the application must know of the object store. */
export function objectStoreSettings(port, accessKeyId, secretAccessKey) {
  return {
    S3_ENDPOINT: `http://127.0.0.1:${port}`,
    S3_REGION: "us-east-1",
    S3_BUCKET: BUCKET,
    S3_ACCESS_KEY_ID: accessKeyId,
    S3_SECRET_ACCESS_KEY: secretAccessKey,
  };
}
