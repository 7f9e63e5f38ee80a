import { defineConfig } from "vitest/config";
import path from "node:path";

const alias = { "@": path.resolve(import.meta.dirname) };

/** Three suites, fastest first: pure (no database, no browser), database (real PostgreSQL), browser (Chromium). */
export default defineConfig({
  resolve: { alias },
  test: {
    // Both processors of a small machine: by itself the runner leaves one idle.
    maxWorkers: "100%",
    projects: [
      {
        resolve: { alias },
        test: { name: "pure", include: ["tests/{iso,pdf,lib,components,tree}/**/*.test.{ts,tsx}"], testTimeout: 60_000 },
      },
      {
        resolve: { alias },
        test: {
          name: "database",
          include: ["tests/database/**/*.test.ts"],
          globalSetup: ["tests/database/global-setup.ts"],
          setupFiles: ["tests/environment.ts"],
          fileParallelism: false,
          testTimeout: 60_000,
          hookTimeout: 120_000,
        },
      },
      {
        resolve: { alias },
        test: {
          name: "browser",
          include: ["tests/browser/**/*.test.ts"],
          globalSetup: ["tests/browser/global-setup.ts"],
          setupFiles: ["tests/environment.ts"],
          fileParallelism: false,
          testTimeout: 180_000,
          hookTimeout: 300_000,
        },
      },
    ],
  },
});
