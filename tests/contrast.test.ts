import { readFileSync } from "node:fs";
import { describe, expect, it } from "vitest";

// Contrast by WCAG 2.2 (relative luminance, contrast ratio). Text at least 7:1 (success criterion 1.4.6), because in
// sunlight glare takes about half of it; parts of the drawing at least 3:1 (1.4.11).

const css = readFileSync(new URL("../app/styles/tokens.css", import.meta.url), "utf8");

function declarations(text: string): Record<string, string> {
  return Object.fromEntries([...text.matchAll(/--([\w-]+):\s*([^;]+);/g)].map((m) => [m[1] ?? "", (m[2] ?? "").trim()]));
}

const [rawText = "", roleText = ""] = css.split(/:root,\s*\n\[data-theme\] \{/);
const [apronText = "", hangarText = ""] = roleText.split("@variant hangar {");
const raw = declarations(rawText);
const apron = declarations(apronText);
const themes = { apron, hangar: { ...apron, ...declarations(hangarText) } };

function paint(theme: Record<string, string>, name: string): string {
  const value = theme[name] ?? raw[name];
  if (value === undefined) throw new Error(`no token --${name}`);
  const reference = /^var\(--([\w-]+)\)$/.exec(value);
  return reference?.[1] ? paint(theme, reference[1]) : value;
}

function luminance(hex: string): number {
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((i) => {
    const c = Number.parseInt(hex.slice(i, i + 2), 16) / 255;
    return c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4;
  });
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
}

function contrast(a: string, b: string): number {
  const [low = 0, high = 0] = [luminance(a), luminance(b)].sort((p, q) => p - q);
  return (high + 0.05) / (low + 0.05);
}

const TEXT = `ink on ground, ink on plate, ink on sunk, ink on primer-wash, ink on seal-wash, ink on fitting-wash, ink on stop-wash,
ink-2 on ground, ink-2 on plate, ink-2 on sunk, primer-ink on ground, primer-ink on plate, primer-ink on primer-wash,
seal-ink on ground, seal-ink on plate, seal-ink on seal-wash, seal-ink on sunk, fitting-ink on ground, fitting-ink on plate,
fitting-ink on fitting-wash, fitting-ink on sunk, on-fitting on fitting, stop-ink on ground, stop-ink on plate,
stop-ink on stop-wash, on-stop on stop, on-stop on stop-flat, on-slab on slab`;
const PARTS = `line on ground, pipe on ground, flow-edge on ground, seal on ground, fitting on ground, stop-edge on ground, on-flow on flow,
stop-edge on plate, seal on plate, pipe on plate, handle on plate, idle on plate, nut-edge on ground`;

const pairs = (text: string) => text.split(/,\s*/).map((pair) => pair.split(" on ") as [string, string]);

describe.each(Object.entries(themes))("contrast in %s", (_, theme) => {
  it("reads the theme's own roles", () => expect(Object.keys(theme).length).toBeGreaterThan(30));

  it.each(pairs(TEXT))("text: %s on %s", (front, back) => {
    expect(contrast(paint(theme, front), paint(theme, back))).toBeGreaterThanOrEqual(7);
  });

  it.each(pairs(PARTS))("part: %s on %s", (front, back) => {
    expect(contrast(paint(theme, front), paint(theme, back))).toBeGreaterThanOrEqual(3);
  });
});

it("measures black on white as 21:1 (WCAG 2.2, definition of contrast ratio)", () => {
  expect(contrast("#000000", "#ffffff")).toBeCloseTo(21, 5);
});

it("shows the hangar roles as different from the apron's", () => {
  expect(paint(themes.hangar, "ground")).not.toBe(paint(themes.apron, "ground"));
});
