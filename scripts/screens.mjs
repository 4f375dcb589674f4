// Pictures of the main screens, as each role sees them, on a tablet and a phone, in both themes. Needs a build.
//   SCREENS=folder node scripts/screens.mjs [data folder of a demo]
// Without a data folder the demo is loaded into one that goes away afterwards.
import { mkdirSync, mkdtempSync, rmSync } from "node:fs";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { chromium } from "@playwright/test";
import { demoPlaces } from "./demo-places.mjs";
import { findBrowser } from "./prepare.mjs";
import { seedFolder, startInstance } from "./running.mjs";

const out = process.env.SCREENS;
if (!out) {
  console.error("Name the folder for the pictures in SCREENS.");
  process.exit(64);
}
mkdirSync(out, { recursive: true });
const given = process.argv[2];
const folder = given ?? mkdtempSync(join(tmpdir(), "bladecount-screens-"));
const people = seedFolder(folder);
const places = await demoPlaces(folder);
const port = await new Promise((done) => {
  const probe = createServer().listen(0, "127.0.0.1", () => {
    const { port } = /** @type {import("node:net").AddressInfo} */ (probe.address());
    probe.close(() => done(port));
  });
});
const instance = await startInstance({ folder, host: "127.0.0.1", port, quiet: true });
const browser = await chromium.launch({ executablePath: findBrowser(), args: ["--no-sandbox", "--disable-dev-shm-usage"] });

const at = (registration) => `/installs/${places[registration].id}`;
const [a, b, c] = ["N0382L", "N0526P", "N0719T"];
const gate = (registration, key) => `${at(registration)}/gates/${places[registration].gates[key]}`;
const run = (registration, label) => `${at(registration)}/runs/${places[registration].runs[label]}`;

/** @type {[name: string, person: string, path: string][]} */
const screens = [
  ["sign-in", "", "/sign-in"],
  ["hangar", "Jonas", "/hangar"],
  ["new-install", "Sefa", "/installs/new"],
  ["account", "Jonas", "/account"],
  ["board-builder", "Jonas", at(a)],
  ["board-lead", "Odalys", at(a)],
  ["board-inspector", "Henrik", at(a)],
  ["board-crew", "Noor", at(a)],
  ["board-held", "Adaeze", at(b)],
  ["board-new", "Sefa", at(c)],
  ["gate-work", "Jonas", gate(a, "WR")],
  ["gate-signed", "Jonas", gate(a, "FP")],
  ["gate-waiting", "Bram", gate(c, "MF")],
  ["sign", "Henrik", `${gate(a, "WR")}/sign`],
  ["sign-several", "Jonas", `${at(a)}/sign`],
  ["build-up", "Adaeze", `${at(b)}/build-up`],
  ["run-crew", "Noor", run(a, "1")],
  ["run-held", "Adaeze", run(b, "3")],
  ["plan", "Odalys", `${run(a, "1")}/plan`],
  ["go", "Odalys", `${run(a, "1")}/go`],
  ["no-go", "Odalys", `${run(a, "1")}/no-go`],
  ["hold", "Priya", `${run(a, "1")}/hold`],
  ["mail", "Adaeze", `${at(b)}/mail`],
  ["set-up", "Sefa", `${at(c)}/set-up`],
  ["people", "Odalys", `${at(a)}/crew`],
  ["crib", "Odalys", `${at(a)}/crib`],
];
const sizes = [
  ["tablet", { width: 1180, height: 820 }],
  ["phone", { width: 390, height: 844 }],
];

async function signedIn(context, person) {
  if (!person) return;
  const page = await context.newPage();
  await page.goto(`${instance.address}/sign-in`);
  await page.getByLabel("E-mail").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: /^Sign in/ }).click();
  await page.waitForURL("**/hangar");
  await page.close();
}

for (const who of new Set(screens.map(([, person]) => person))) {
  const context = await browser.newContext();
  await signedIn(
    context,
    people.find((p) => p.name.startsWith(who) && who !== ""),
  );
  const page = await context.newPage();
  for (const [name, , path] of screens.filter(([, person]) => person === who)) {
    for (const theme of ["apron", "hangar"]) {
      await context.addCookies([{ name: "theme", value: theme, url: instance.address }]);
      for (const [size, viewport] of sizes) {
        await page.setViewportSize(viewport);
        const answer = await page.goto(`${instance.address}${path}`, { waitUntil: "networkidle" });
        if (answer && answer.status() >= 400) console.log(`${answer.status()} ${name} as ${who}: ${path}`);
        await page.screenshot({ path: join(out, `${name}-${size}-${theme}.png`), fullPage: size === "phone" });
      }
    }
  }
  await context.close();
}
await browser.close();
await instance.stop();
if (!given) rmSync(folder, { recursive: true, force: true });
