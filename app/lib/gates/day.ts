/**
 * Days at a place: when the local calendar day ends there. Pure; Intl only knows the zones.
 * Instants in ms since 1970 UTC; zones are IANA names. Throws RangeError on an unknown zone.
 */

/** @returns the first instant after the local day that holds `at`. */
export function endOfDay(at: number, timeZone: string): number {
  const wall = new Date(at + offset(at, timeZone));
  return instantOf(Date.UTC(wall.getUTCFullYear(), wall.getUTCMonth(), wall.getUTCDate() + 1), timeZone);
}

/** @param date "2026-12-03". @returns the first instant after that local day, or null where there is no such date. */
export function endOfDate(date: string, timeZone: string): number | null {
  const match = /^(\d{4})-(\d{2})-(\d{2})$/.exec(date);
  if (!match) return null;
  const [year, month, day] = [Number(match[1]), Number(match[2]) - 1, Number(match[3])];
  if (new Date(Date.UTC(year, month, day)).toISOString().slice(0, 10) !== date) return null;
  return instantOf(Date.UTC(year, month, day + 1), timeZone);
}

/** The instant at which clocks there show `wall` (given as if it were UTC). */
function instantOf(wall: number, timeZone: string): number {
  const guess = wall - offset(wall, timeZone);
  return wall - offset(guess, timeZone);
}

const formatters = new Map<string, Intl.DateTimeFormat>();

/** How far clocks there are ahead of UTC at that instant, ms. */
function offset(at: number, timeZone: string): number {
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
  const part: Record<string, number> = {};
  for (const p of formatter.formatToParts(at)) part[p.type] = Number(p.value);
  const { year = 0, month = 1, day = 1, hour = 0, minute = 0, second = 0 } = part;
  return Date.UTC(year, month - 1, day, hour, minute, second) - Math.floor(at / 1000) * 1000;
}
