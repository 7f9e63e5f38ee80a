/**
 * Where a thread that prepares packages begins: brings in lib/jobs/package-thread.ts as one module, made once for all threads
 * of the process and handed to them by name; a thread that is given none makes its own.
 */
import { withBundle } from "./lib/bundle.mjs";

const { fileURLToPath } = await import("node:url");
await withBundle(fileURLToPath(new URL("../lib/jobs/package-thread.ts", import.meta.url)), async ({ serveThread }) => serveThread());
const { stop } = await import("esbuild");
await stop();
