// The one folder of a test run. A worker is ended before its own clearing up, so the run's main process does it.
import { mkdirSync, rmSync } from "node:fs";
import type { TestProject } from "vitest/node";

export function setup(project: TestProject): () => void {
  const folder = project.config.env.TEST_FOLDER;
  if (!folder) throw new Error("The test run has no folder of its own");
  mkdirSync(folder, { recursive: true });
  return () => rmSync(folder, { recursive: true, force: true, maxRetries: 3 });
}
