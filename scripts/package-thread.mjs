/** Where a thread that prepares packages begins: brings in lib/jobs/package-thread.ts with all it needs as one module. */
import { fileURLToPath } from "node:url";
import { stop } from "esbuild";
import { withBundle } from "./lib/bundle.mjs";

await withBundle(fileURLToPath(new URL("../lib/jobs/package-thread.ts", import.meta.url)), async ({ serveThread }) => serveThread(), { maps: false });
await stop();
