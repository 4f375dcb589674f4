// Builds the measurements as the product itself is built, then runs them: a loader for tests would put its own cost on every function.
import { rmSync } from "node:fs";
import { join, resolve } from "node:path";
import { pathToFileURL } from "node:url";
import { build } from "vite";

const outDir = resolve("node_modules/.cache/bladecount-bench");
rmSync(outDir, { recursive: true, force: true });
await build({
  configFile: false,
  logLevel: "error",
  resolve: { alias: { "#app": resolve("app") } },
  publicDir: false,
  build: { ssr: "tests/bench/run.ts", outDir, minify: false, target: "node20" },
});
await import(pathToFileURL(join(outDir, "run.js")).href);
