import { defineConfig } from "vitest/config";
import { appImports } from "./vite.imports.ts";

export default defineConfig({
  resolve: { alias: appImports },
  test: {
    projects: [
      { extends: true, test: { name: "node", environment: "node", include: ["tests/**/*.test.ts"] } },
      { extends: true, test: { name: "dom", environment: "jsdom", include: ["tests/**/*.test.tsx"], setupFiles: ["tests/support/setup-dom.ts"] } },
    ],
  },
});
