/** Where a nesting thread begins: brings in lib/jobs/nest-thread.ts through the TypeScript loader. */
import { tsImport } from "tsx/esm/api";

await tsImport("../lib/jobs/nest-thread.ts", import.meta.url);
