import { defineConfig } from "vitest/config";
import { appImports } from "./vite.imports.ts";

/** The tests of the rules and the record alone, in one project: what `npm run mutate` runs against each fault. */
export default defineConfig({
  resolve: { alias: appImports },
  test: {
    environment: "node",
    testTimeout: 60_000,
    // A few of the random boards for each fault: the examples find most, the properties the rest.
    env: { PROPERTY_SHARE: "0.002" },
    include: ["tests/gates-*.test.ts", "tests/record*.test.ts", "tests/views-board.test.ts"],
  },
});
