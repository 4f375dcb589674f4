import { defineConfig } from "@playwright/test";

const port = Number(process.env.E2E_PORT ?? 3200);

export default defineConfig({
  testDir: "./tests/e2e",
  outputDir: "./test-results/browser",
  globalSetup: "./tests/e2e/start-instance.ts",
  // The tests share one instance and one database file.
  workers: 1,
  fullyParallel: false,
  // Journeys sign in (a hash of a quarter of a second) as several people; a busy machine with two cores takes its time.
  timeout: 90_000,
  expect: { timeout: 10_000 },
  reporter: [["list"]],
  use: {
    baseURL: `http://127.0.0.1:${port}`,
    browserName: "chromium",
    screenshot: "off",
    trace: "off",
    launchOptions: { executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium", args: ["--no-sandbox", "--disable-dev-shm-usage"] },
  },
});
