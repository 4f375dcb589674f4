/** Times as a person types them at the install: local wall clock in, instant out. Pure; Intl only knows the zones. */
import type { Instant } from "#app/lib/gates/snapshot";

/** How far the wall clock there is ahead of UTC at `instant`, ms. */
function ahead(instant: Instant, timeZone: string): number {
  const parts = new Intl.DateTimeFormat("en-GB", {
    timeZone,
    hourCycle: "h23",
    year: "numeric",
    month: "numeric",
    day: "numeric",
    hour: "numeric",
    minute: "numeric",
    second: "numeric",
  }).formatToParts(instant);
  const n = Object.fromEntries(parts.map((p) => [p.type, Number(p.value)]));
  const wall = Date.UTC(n.year ?? 0, (n.month ?? 1) - 1, n.day ?? 1, n.hour ?? 0, n.minute ?? 0, n.second ?? 0);
  return wall - Math.floor(instant / 1000) * 1000;
}

/** @param text "2026-12-03T14:10" or with seconds. @returns ms since 1970 UTC, or null where it is no time. */
export function instantAt(text: string, timeZone: string): Instant | null {
  const match = /^(\d{4}-\d{2}-\d{2})T(\d{2}):(\d{2})(?::(\d{2}))?$/.exec(text.trim());
  if (!match) return null;
  const wall = Date.parse(`${match[1]}T${match[2]}:${match[3]}:${match[4] ?? "00"}Z`);
  if (Number.isNaN(wall)) return null;
  const guess = wall - ahead(wall, timeZone);
  return wall - ahead(guess, timeZone);
}

/** The local day of `instant`, "2026-12-03". */
export function dayAt(instant: Instant, timeZone: string): string {
  return new Date(instant + ahead(instant, timeZone)).toISOString().slice(0, 10);
}
