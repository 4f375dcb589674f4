// What the demo and the tests need before they can start: packages, a build, a browser.
import { execFileSync, spawnSync } from "node:child_process";
import { existsSync, readdirSync, statSync } from "node:fs";
import { join } from "node:path";

/** Runs a command in plain sight. Returns whether it ended well. */
export function run(command, args, env = {}) {
  console.log(`\n> ${[command, ...args].join(" ")}`);
  return spawnSync(command, args, { stdio: "inherit", env: { ...process.env, ...env } }).status === 0;
}

/** A program of this project's packages, started by Node itself: no shell, and the process is the one that we stop. */
export const tool = (name) => join("node_modules", ".bin", name);

export function installPackages() {
  const installed =
    existsSync("node_modules/.package-lock.json") && newest(["package-lock.json"]) <= newest(["node_modules/.package-lock.json"]);
  if (!installed && !run("npm", ["ci"])) throw new Error("The packages could not be installed: see above.");
}

export function buildIfStale() {
  const sources = ["app", "public", "package.json", "package-lock.json", "vite.config.ts", "vite.imports.ts", "react-router.config.ts"];
  const fresh = existsSync("build/server/index.js") && newest(sources) <= newest(["build/server/index.js"]);
  if (!fresh && !run(tool("react-router"), ["build"], { NODE_ENV: "production" })) throw new Error("The build failed: see above.");
}

/** The newest change under these files and folders, in milliseconds since 1970. */
function newest(paths) {
  let at = 0;
  for (const path of paths) {
    const stat = statSync(path, { throwIfNoEntry: false });
    if (!stat) continue;
    at = Math.max(at, stat.isDirectory() ? newest(readdirSync(path).map((name) => join(path, name))) : stat.mtimeMs);
  }
  return at;
}

const browsers = [process.env.CHROMIUM, "/usr/bin/chromium", "/usr/bin/chromium-browser", "/usr/bin/google-chrome"];

export const findBrowser = () => browsers.find((path) => path && existsSync(path));

/** Debian's own Chromium, where there is no browser yet. */
export function installBrowser() {
  if (findBrowser()) return;
  const root = process.getuid?.() === 0 ? [] : ["sudo"];
  const apt = (...args) => {
    const [command = "apt-get", ...rest] = [...root, "apt-get", ...args];
    execFileSync(command, rest, { stdio: "inherit", env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" } });
  };
  apt("update");
  apt("install", "-y", "--no-install-recommends", "chromium");
}
