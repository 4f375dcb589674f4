/**
 * Renders the gallery to static pages with the built style sheet and photographs each at tablet and phone width in both
 * themes: `npx tsx tests/support/render-gallery.ts <folder> [page ...]`. Needs a Chromium at CHROMIUM or /usr/bin/chromium.
 */
import { mkdir, readdir, writeFile } from "node:fs/promises";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { AxeBuilder } from "@axe-core/playwright";
import { chromium } from "@playwright/test";
import tailwindcss from "@tailwindcss/vite";
import { renderToStaticMarkup } from "react-dom/server";
import { build } from "vite";
import { PAGES } from "./gallery";

const [folder, ...only] = process.argv.slice(2);
if (!folder) throw new Error("name a folder for the pages and pictures");

const SIZES = { tablet: { width: 1180, height: 820 }, phone: { width: 390, height: 844 } };
const out = path.resolve(folder);

// the program's own sheet, with the utilities that only the gallery uses on top
await mkdir(out, { recursive: true });
const entry = path.join(out, "gallery.css");
await writeFile(entry, `@import "${path.resolve("app/app.css")}";\n@source "${path.resolve("tests/support")}";\n`);
await build({
  configFile: false,
  logLevel: "warn",
  base: "./",
  plugins: [tailwindcss()],
  build: { outDir: path.join(out, "css"), emptyOutDir: true, assetsInlineLimit: 0, rollupOptions: { input: entry } },
});
const assets = await readdir(path.join(out, "css", "assets"));
const sheet = assets.find((name) => name.endsWith(".css"));
if (!sheet) throw new Error("the build made no style sheet");

const browser = await chromium.launch({ executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium", args: ["--no-sandbox"] });
const faults: string[] = [];
for (const [name, node] of Object.entries(PAGES)) {
  if (only.length && !only.includes(name)) continue;
  for (const theme of ["apron", "hangar"]) {
    const html = `<!doctype html><html lang="en" data-theme="${theme}"><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${name}</title><link rel="stylesheet" href="css/assets/${sheet}"><body>${renderToStaticMarkup(node)}</body></html>`;
    const file = path.join(out, `${name}-${theme}.html`);
    await writeFile(file, html);
    for (const [size, viewport] of Object.entries(SIZES)) {
      const context = await browser.newContext({ viewport });
      const page = await context.newPage();
      await page.goto(pathToFileURL(file).href);
      await page.evaluate(() => document.fonts.ready);
      const place = `${name} ${size} ${theme}`;
      const { violations } = await new AxeBuilder({ page }).analyze();
      for (const violation of violations)
        faults.push(`${place}: ${violation.id}, ${violation.nodes.map((n) => n.html.slice(0, 120)).join(" | ")}`);
      const drawn = await page.evaluate(() => ({
        over: document.documentElement.scrollWidth - window.innerWidth,
        height: document.documentElement.scrollHeight,
      }));
      if (drawn.over > 0) faults.push(`${place}: ${drawn.over} px too wide`);
      await page.setViewportSize({ width: viewport.width, height: drawn.height });
      await page.screenshot({ path: path.join(out, `${name}-${size}-${theme}.png`) });
      await context.close();
    }
  }
}
await browser.close();
console.log(faults.length ? faults.join("\n") : "no page is too wide, axe finds nothing");
process.exitCode = faults.length ? 1 : 0;
