/**
 * A date and a time as people type them at the install, to an instant and back. Nights on which the clocks change have an hour that
 * does not exist and one that comes twice: both are refused with a sentence. Pure; Intl only knows the zones.
 * Instants in ms since 1970 UTC, zones are IANA names. Throws RangeError on an unknown zone.
 */

export type LocalTime = { ok: true; at: number } | { ok: false; field: "date" | "time"; sentence: string };

const formatters = new Map<string, Intl.DateTimeFormat>();

/** What clocks at the place show at that instant, as if it were UTC, in ms. */
function wallAt(at: number, timeZone: string): number {
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

const refuse = (field: "date" | "time", sentence: string): LocalTime => ({ ok: false, field, sentence });
const DAY = 86_400_000;

/**
 * @param date "2026-12-05". @param time "09:30".
 * @returns the one instant at which clocks there show it, or which field is wrong and what to type instead.
 */
export function instantOfLocal(date: string, time: string, timeZone: string): LocalTime {
  const d = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date.trim());
  if (!d) return refuse("date", "Type the date as year-month-day, such as 2026-12-05.");
  const t = /^(\d{1,2}):(\d{2})$/.exec(time.trim());
  if (!t || Number(t[1]) > 23 || Number(t[2]) > 59) return refuse("time", "Type the time as hours and minutes, such as 09:30.");
  const wall = Date.UTC(Number(d[1]), Number(d[2]) - 1, Number(d[3]), Number(t[1]), Number(t[2]));
  if (new Date(wall).toISOString().slice(0, 10) !== date.trim()) return refuse("date", `There is no ${date.trim()}: check day and month.`);
  // The offset before and after any change near it: each gives one instant, and only those count at which the clocks agree.
  const offsets = new Set([wall - DAY, wall + DAY].map((at) => wallAt(at, timeZone) - at));
  const found = [...offsets].map((offset) => wall - offset).filter((at) => wallAt(at, timeZone) === wall);
  const [at] = found;
  if (at === undefined)
    return refuse(
      "time",
      `There is no ${time.trim()} on that day at ${timeZone}: the clocks go forward over it. Choose a time after the change.`,
    );
  if (found.length > 1)
    return refuse(
      "time",
      `${time.trim()} comes twice on that day at ${timeZone}: the clocks go back. Choose a time before or after that hour.`,
    );
  return { ok: true, at };
}

/** What to show in a date and a time field for an instant. */
export function localOf(at: number, timeZone: string): { date: string; time: string } {
  const wall = new Date(wallAt(at, timeZone)).toISOString();
  return { date: wall.slice(0, 10), time: wall.slice(11, 16) };
}
