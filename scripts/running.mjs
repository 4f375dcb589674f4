// A whole instance for the demo and the browser tests: its data folder seeded, the mail fake and the server running.
import { spawn, spawnSync } from "node:child_process";
import { existsSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { startMailFake } from "./mail-fake.mjs";
import { tool } from "./prepare.mjs";

/** @typedef {{ name: string, email: string, password: string, pin: string, role: string }} DemoPerson */

/**
 * Fills a data folder with the demo, unless it holds one. Returns the demo's people with their sign-ins.
 * @param {string} folder
 * @returns {DemoPerson[]}
 */
export function seedFolder(folder) {
  const kept = join(folder, "sign-ins.json");
  const env = { ...process.env, DATA_DIR: folder };
  if (!existsSync(kept) && spawnSync(tool("tsx"), ["scripts/seed.ts"], { stdio: "inherit", env }).status !== 0) {
    throw new Error("The demo could not be loaded: see above.");
  }
  return JSON.parse(readFileSync(kept, "utf8"));
}

/**
 * Starts the mail fake and the server on a data folder.
 * @param {{ folder: string, host: string, port: number, smtpPort?: number, inboxPort?: number, quiet?: boolean }} options port 0 is not allowed for the server: its address is told beforehand
 */
export async function startInstance({ folder, host, port, smtpPort = 0, inboxPort = 0, quiet = false }) {
  const mail = await startMailFake({ smtpPort, httpPort: inboxPort, folder: join(folder, "inbox") });
  const server = spawn(process.execPath, ["server.mjs"], {
    stdio: quiet ? ["ignore", "ignore", "inherit"] : "inherit",
    env: {
      ...process.env,
      NODE_ENV: "production",
      DATA_DIR: folder,
      HOST: host,
      PORT: String(port),
      SMTP_PORT: String(mail.smtpPort),
      LOG_LEVEL: quiet ? "warn" : (process.env.LOG_LEVEL ?? "warn"),
    },
  });
  const ended = new Promise((done) => server.once("exit", done));
  const address = `http://${host === "0.0.0.0" ? "127.0.0.1" : host}:${port}`;
  await untilReady(`${address}/ready`, server).catch(async (error) => {
    await mail.close();
    throw error;
  });
  return {
    address,
    mail,
    ended,
    async stop() {
      server.kill("SIGTERM");
      await Promise.all([ended, mail.close()]);
    },
  };
}

/** @param {string} url @param {import("node:child_process").ChildProcess} server */
async function untilReady(url, server) {
  for (const limit = Date.now() + 20_000; Date.now() < limit; await new Promise((r) => setTimeout(r, 100))) {
    if (server.exitCode !== null) throw new Error("The server did not start: see above.");
    if (
      await fetch(url).then(
        (r) => r.ok,
        () => false,
      )
    )
      return;
  }
  server.kill("SIGTERM");
  throw new Error(`The server was not ready after 20 s: ${url}`);
}
