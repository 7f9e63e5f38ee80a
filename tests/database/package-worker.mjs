/** A worker process for the test that kills it: loads what `npm run worker` runs, and begins when told. */
import { fileURLToPath } from "node:url";
import { withBundle } from "../../scripts/lib/bundle.mjs";

await withBundle(fileURLToPath(new URL("../../lib/jobs/process.ts", import.meta.url)), async ({ startProcess }) => {
  process.once("message", () => void startProcess());
  process.once("disconnect", () => process.exit(0));
}, { maps: false });
process.send("loaded");
