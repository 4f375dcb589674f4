// One seeded instance of the production build for all browser tests, in a folder of its own that goes away afterwards.
import { existsSync, mkdtempSync, rmSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import type { FullConfig } from "@playwright/test";
import { seedFolder, startInstance } from "../../scripts/running.mjs";

export default async function start(config: FullConfig): Promise<() => Promise<void>> {
  if (!existsSync("build/server/index.js")) throw new Error("There is no build to test. Run: npm run build");
  const { hostname, port } = new URL(config.projects[0]?.use.baseURL ?? "");
  const folder = mkdtempSync(join(tmpdir(), "bladecount-browser-"));
  const people = seedFolder(folder);
  const instance = await startInstance({ folder, host: hostname, port: Number(port), quiet: true });
  // For the tests, which run in other processes.
  process.env.E2E_INBOX = instance.mail.url;
  process.env.E2E_PEOPLE = JSON.stringify(people);
  return async () => {
    await instance.stop();
    rmSync(folder, { recursive: true, force: true });
  };
}
