// The seeded demo for the browser tests: loaded once, and one instance of the production build on a copy of it. Test files that
// change the demo start an instance of their own on another copy (`test.use({ own: ... })`).
import { cpSync, existsSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { FullConfig } from "@playwright/test";
import { demoPlaces } from "../../scripts/demo-places.mjs";
import { seedFolder, startInstance } from "../../scripts/running.mjs";

export default async function start(config: FullConfig): Promise<() => Promise<void>> {
  if (!existsSync("build/server/index.js")) throw new Error("There is no build to test. Run: npm run build");
  const { hostname, port } = new URL(config.projects[0]?.use.baseURL ?? "");
  const folder = mkdtempSync(join(tmpdir(), "bladecount-browser-"));
  const demo = join(folder, "demo");
  const shared = join(folder, "shared");
  const people = seedFolder(demo);
  const places = await demoPlaces(demo);
  cpSync(demo, shared, { recursive: true });
  const instance = await startInstance({ folder: shared, host: hostname, port: Number(port), quiet: true });
  // For the tests, which run in other processes.
  process.env.E2E_DEMO = demo;
  process.env.E2E_INBOX = instance.mail.url;
  process.env.E2E_PEOPLE = JSON.stringify(people);
  process.env.E2E_PLACES = JSON.stringify(places);
  return async () => {
    await instance.stop();
    rmSync(folder, { recursive: true, force: true });
  };
}
