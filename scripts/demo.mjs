// The demo: installs and builds what is missing, loads the invented installs into data/demo, starts the server and the mail
// fake, and says where they are. `--fresh` throws the old demo away first.
import { rmSync } from "node:fs";
import { resolve } from "node:path";
import { buildIfStale, installPackages } from "./prepare.mjs";

const folder = resolve("data", "demo");

/** @param {import("./running.mjs").DemoPerson[]} people */
const table = (people) => {
  const rows = people.map((p) => [p.name, p.role, p.email, `password: ${p.password}`, `PIN: ${p.pin}`]);
  const widths = [0, 1, 2, 3].map((column) => Math.max(...rows.map((row) => row[column].length)));
  return rows.map((row) => row.map((cell, column) => cell.padEnd(widths[column] ?? 0)).join("   ")).join("\n");
};

try {
  installPackages();
  buildIfStale();
  if (process.argv.includes("--fresh")) rmSync(folder, { recursive: true, force: true });
  // Only now: it needs the packages.
  const { seedFolder, startInstance } = await import("./running.mjs");
  const people = seedFolder(folder);
  const { HOST = "127.0.0.1", PORT = "3000", SMTP_PORT = "2525", INBOX_PORT = "2580" } = process.env;
  const instance = await startInstance({
    folder,
    host: HOST,
    port: Number(PORT),
    smtpPort: Number(SMTP_PORT),
    inboxPort: Number(INBOX_PORT),
  });
  console.log(`
Bladecount   ${instance.address}
Inbox        ${instance.mail.url}   (the mail fake: nothing is delivered to anyone)

Sign-ins of the demo, all invented:
${table(people)}

Ctrl+C stops it. npm run demo -- --fresh starts the demo anew.`);
  for (const signal of ["SIGINT", "SIGTERM"]) process.once(signal, () => void instance.stop());
  await instance.ended;
  process.exit(0);
} catch (error) {
  const inUse =
    error.code === "EADDRINUSE" ? " Another program (or another demo) uses it; set SMTP_PORT, INBOX_PORT or PORT to a free one." : "";
  console.error(`\nThe demo did not start. ${error.message}${inUse}`);
  process.exit(1);
}
