import { tmpdir } from "node:os";
import { join } from "node:path";
import { defineConfig } from "vitest/config";
import { appImports } from "./vite.imports.ts";

/** What this run writes: every process makes its folders in here, and the run's end takes them away. */
const folder = join(tmpdir(), `bladecount-test-${process.pid}`);

export default defineConfig({
  resolve: { alias: appImports },
  test: {
    // Secrets that tests cause to be made do not land in the developer's data folder.
    env: { DATA_DIR: join(folder, "data"), TEST_FOLDER: folder },
    globalSetup: "tests/support/run-folder.ts",
    // Properties over thousands of boards take their time on a busy machine; nothing here tests speed.
    testTimeout: 120_000,
    hookTimeout: 120_000,
    projects: [
      { extends: true, test: { name: "node", environment: "node", include: ["tests/**/*.test.ts"] } },
      {
        extends: true,
        test: { name: "dom", environment: "jsdom", include: ["tests/**/*.test.tsx"], setupFiles: ["tests/support/setup-dom.ts"] },
      },
    ],
  },
});
