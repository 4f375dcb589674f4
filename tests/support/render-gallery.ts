/**
 * Renders the gallery to static pages with the built style sheet and photographs each at tablet and phone width in both
 * themes: `npx tsx tests/support/render-gallery.ts <folder> [page ...]`. Needs a Chromium at CHROMIUM or /usr/bin/chromium.
 */
import { mkdir, readdir, writeFile } from "node:fs/promises";
import path from "node:path";
import { pathToFileURL } from "node:url";
import { chromium } from "@playwright/test";
import tailwindcss from "@tailwindcss/vite";
import { renderToStaticMarkup } from "react-dom/server";
import { build } from "vite";
import { PAGES } from "./gallery";

const [folder, ...only] = process.argv.slice(2);
if (!folder) throw new Error("name a folder for the pages and pictures");

const SIZES = { tablet: { width: 1180, height: 820 }, phone: { width: 390, height: 844 } };
const out = path.resolve(folder);

await build({
  configFile: false,
  logLevel: "warn",
  base: "./",
  plugins: [tailwindcss()],
  build: { outDir: path.join(out, "css"), emptyOutDir: true, assetsInlineLimit: 0, rollupOptions: { input: path.resolve("app/app.css") } },
});
const assets = await readdir(path.join(out, "css", "assets"));
const sheet = assets.find((name) => name.endsWith(".css"));
if (!sheet) throw new Error("the build made no style sheet");

await mkdir(out, { recursive: true });
const browser = await chromium.launch({ executablePath: process.env.CHROMIUM ?? "/usr/bin/chromium", args: ["--no-sandbox"] });
let overflowing = 0;
for (const [name, node] of Object.entries(PAGES)) {
  if (only.length && !only.includes(name)) continue;
  for (const theme of ["apron", "hangar"]) {
    const html = `<!doctype html><html lang="en" data-theme="${theme}"><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${name}</title><link rel="stylesheet" href="css/assets/${sheet}"><body>${renderToStaticMarkup(node)}</body></html>`;
    const file = path.join(out, `${name}-${theme}.html`);
    await writeFile(file, html);
    for (const [size, viewport] of Object.entries(SIZES)) {
      const page = await browser.newPage({ viewport });
      await page.goto(pathToFileURL(file).href);
      await page.evaluate(() => document.fonts.ready);
      await page.screenshot({ path: path.join(out, `${name}-${size}-${theme}.png`), fullPage: true });
      const wide = await page.evaluate(() => document.documentElement.scrollWidth - window.innerWidth);
      if (wide > 0) {
        overflowing++;
        console.log(`${name} ${size} ${theme}: ${wide} px too wide`);
      }
      await page.close();
    }
  }
}
await browser.close();
console.log(overflowing ? `${overflowing} pages too wide` : "nothing is too wide");
