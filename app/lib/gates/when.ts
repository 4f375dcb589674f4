/**
 * Instants as people read them, always with their zone ("3 Dec 14:10 CET").
 * Pure: Intl only translates; the instant and the zone come from the caller.
 */
import type { Instant } from "#app/lib/gates/snapshot";

const formatters = new Map<string, Intl.DateTimeFormat>();

function formatter(timeZone: string, withYear: boolean): Intl.DateTimeFormat {
  const key = `${timeZone}|${withYear}`;
  let found = formatters.get(key);
  if (!found) {
    found = new Intl.DateTimeFormat("en-GB", {
      day: "numeric",
      month: "short",
      hour: "2-digit",
      minute: "2-digit",
      timeZone,
      timeZoneName: "short",
      hourCycle: "h23",
      ...(withYear ? { year: "numeric" } : {}),
    });
    formatters.set(key, found);
  }
  return found;
}

/** @returns "3 Dec 14:10 CET", or with the year "3 Dec 2026 14:10 CET". Throws RangeError on an unknown zone. */
export function when(instant: Instant, timeZone: string, withYear = false): string {
  const part: Record<string, string> = {};
  for (const p of formatter(timeZone, withYear).formatToParts(instant)) part[p.type] = p.value;
  return `${part.day} ${part.month}${withYear ? ` ${part.year}` : ""} ${part.hour}:${part.minute} ${part.timeZoneName}`;
}
