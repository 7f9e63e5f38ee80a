/** Where the process that makes measured packages begins. */
import { fileURLToPath } from "node:url";
import { withBundle } from "../../scripts/lib/bundle.mjs";

await withBundle(fileURLToPath(new URL("./package-process.ts", import.meta.url)), async ({ answer }) => answer(), { maps: false });
const { stop } = await import("esbuild");
await stop();
