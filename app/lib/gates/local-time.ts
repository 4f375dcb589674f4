/**
 * Clocks and days at a place: from an instant to what clocks show there and back, and when a day ends. Nights on which the clocks
 * change have an hour that does not exist and one that comes twice. Pure; Intl only knows the zones.
 * Instants in ms since 1970 UTC, zones are IANA names. Every function throws RangeError on an unknown zone.
 */
import type { Instant } from "#app/lib/gates/snapshot";

export type LocalTime = { ok: true; at: Instant } | { ok: false; field: "date" | "time"; sentence: string };

const formatters = new Map<string, Intl.DateTimeFormat>();

/** What clocks at the place show at that instant, as if it were UTC, in ms; whole seconds. */
function wallAt(at: Instant, timeZone: string): number {
  let formatter = formatters.get(timeZone);
  if (!formatter) {
    formatter = new Intl.DateTimeFormat("en-GB", {
      timeZone,
      hourCycle: "h23",
      year: "numeric",
      month: "numeric",
      day: "numeric",
      hour: "numeric",
      minute: "numeric",
      second: "numeric",
    });
    formatters.set(timeZone, formatter);
  }
  const p: Record<string, number> = {};
  for (const { type, value } of formatter.formatToParts(at)) p[type] = Number(value);
  return Date.UTC(p.year ?? 1970, (p.month ?? 1) - 1, p.day ?? 1, p.hour ?? 0, p.minute ?? 0, p.second ?? 0);
}

const DAY = 86_400_000;

/** The offsets in force just before and just after `wall`, each once: two on a night on which the clocks change. */
const offsetsNear = (wall: number, timeZone: string): number[] => [
  ...new Set([wall - DAY, wall + DAY].map((at) => wallAt(at, timeZone) - at)),
];

/** Instants at which clocks there show `wall`, whole seconds: one, none in the hour left out, two in the hour that comes twice. */
const instantsOf = (wall: number, timeZone: string): Instant[] =>
  offsetsNear(wall, timeZone)
    .map((offset) => wall - offset)
    .filter((at) => wallAt(at, timeZone) === wall)
    .sort((a, b) => a - b);

/** The first instant at which clocks there show `wall`; where they go forward over it, the one that the old offset makes of it. */
function firstFrom(wall: number, timeZone: string): Instant {
  const [at] = instantsOf(wall, timeZone);
  return at ?? wall - Math.min(...offsetsNear(wall, timeZone));
}

const refuse = (field: "date" | "time", sentence: string): LocalTime => ({ ok: false, field, sentence });

/** "2026-12-05" as UTC midnight, ms; null where there is no such date. */
function midnight(date: string): number | null {
  const at = /^\d{4}-\d{2}-\d{2}$/.test(date) ? Date.parse(`${date}T00:00:00Z`) : Number.NaN;
  return Number.isNaN(at) || new Date(at).toISOString().slice(0, 10) !== date ? null : at;
}

/**
 * @param date "2026-12-05". @param time "09:30", or with seconds "09:30:15".
 * @returns the one instant at which clocks there show it, or which field is wrong and what to type instead.
 */
export function instantOfLocal(date: string, time: string, timeZone: string): LocalTime {
  const day = date.trim();
  if (!/^\d{4}-\d{2}-\d{2}$/.test(day)) return refuse("date", "Type the date as year-month-day, such as 2026-12-05.");
  const t = /^(\d{1,2}):(\d{2})(?::(\d{2}))?$/.exec(time.trim());
  const [hours, minutes, seconds] = [Number(t?.[1]), Number(t?.[2]), Number(t?.[3] ?? 0)];
  if (!t || hours > 23 || minutes > 59 || seconds > 59) return refuse("time", "Type the time as hours and minutes, such as 09:30.");
  const start = midnight(day);
  if (start === null) return refuse("date", `There is no ${day}: check day and month.`);
  const [at, again] = instantsOf(start + ((hours * 60 + minutes) * 60 + seconds) * 1000, timeZone);
  if (at === undefined)
    return refuse(
      "time",
      `There is no ${time.trim()} on that day at ${timeZone}: the clocks go forward over it. Choose a time after the change.`,
    );
  if (again !== undefined)
    return refuse(
      "time",
      `${time.trim()} comes twice on that day at ${timeZone}: the clocks go back. Choose a time before or after that hour.`,
    );
  return { ok: true, at };
}

/** What to show in a date and a time field for an instant. */
export function localOf(at: Instant, timeZone: string): { date: string; time: string } {
  const wall = new Date(wallAt(at, timeZone)).toISOString();
  return { date: wall.slice(0, 10), time: wall.slice(11, 16) };
}

/** @returns the first instant after the local day that holds `at`. */
export function endOfDay(at: Instant, timeZone: string): Instant {
  const wall = wallAt(at, timeZone);
  return firstFrom((Math.floor(wall / DAY) + 1) * DAY, timeZone);
}

/** @param date "2026-12-03". @returns the first instant after that local day, or null where there is no such date. */
export function endOfDate(date: string, timeZone: string): Instant | null {
  const start = midnight(date);
  return start === null ? null : firstFrom(start + DAY, timeZone);
}

/** @param date "2026-12-03". @returns the first instant of that local day, or null where there is no such date. */
export function startOfDate(date: string, timeZone: string): Instant | null {
  const start = midnight(date);
  return start === null ? null : firstFrom(start, timeZone);
}
