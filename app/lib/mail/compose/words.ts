/**
 * Words and figures that the mails share: text made safe for one line, times with their zone and in UTC, speeds, durations.
 * Pure. Instants in ms since 1970 UTC, rotation in crankshaft revolutions per second, durations in s.
 */
import { when } from "#app/lib/gates/when";

/** Control characters, line ends, and the marks that turn the direction of writing: none of them belongs in a name or a reason. */
// biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what is taken out
const UNSEEN = /[\u0000-\u001f\u007f-\u009f\u061c\u200b-\u200f\u2028-\u202e\u2060-\u2069\ufeff]+/g;

/** What somebody typed, as one line. Source for headers: OWASP ASVS 5.0.0, 1.3.11. */
export const oneLine = (text: string): string => text.replace(UNSEEN, " ").replace(/\s+/g, " ").trim();

/** `text` with at most `most` characters, cut at a whole character with an ellipsis. */
export function cut(text: string, most: number): string {
  const signs = [...text];
  return signs.length <= most
    ? text
    : `${signs
        .slice(0, most - 1)
        .join("")
        .trimEnd()}…`;
}

const weekdays = new Map<string, Intl.DateTimeFormat>();

/** @returns "Sat 5 Dec 09:30 CET". Throws RangeError on an unknown zone. */
export function dayAndTime(at: number, timeZone: string): string {
  let weekday = weekdays.get(timeZone);
  if (!weekday) {
    weekday = new Intl.DateTimeFormat("en-GB", { weekday: "short", timeZone });
    weekdays.set(timeZone, weekday);
  }
  return `${weekday.format(at)} ${when(at, timeZone)}`;
}

const dates = new Map<string, Intl.DateTimeFormat>();

/** @returns the day at the install that holds the instant: "Sat 5 Dec 2026". Throws RangeError on an unknown zone. */
export function dayOnly(at: number, timeZone: string): string {
  let date = dates.get(timeZone);
  if (!date) {
    date = new Intl.DateTimeFormat("en-GB", { weekday: "short", day: "numeric", month: "short", year: "numeric", timeZone });
    dates.set(timeZone, date);
  }
  const part = Object.fromEntries(date.formatToParts(at).map((p) => [p.type, p.value]));
  return `${part.weekday} ${part.day} ${part.month} ${part.year}`;
}

/** @returns the instant at the install and in UTC: "Sat 5 Dec 09:30 CET (08:30 UTC)", with the date where that differs. */
export function timeInBoth(at: number, timeZone: string): string {
  const local = dayAndTime(at, timeZone);
  const utc = when(at, "UTC");
  if (local.endsWith(utc)) return local;
  const [day, month, ...time] = utc.split(" ");
  return local.includes(` ${day} ${month} `) ? `${local} (${time.join(" ")})` : `${local} (${utc})`;
}

const whole = (n: number): string => n.toLocaleString("en", { maximumFractionDigits: 0 });

/** @returns "900 rpm", "1,100 to 1,238 rpm". */
export function speedRange(rpm: { min: number; max: number }): string {
  const [min, max] = [Math.round(rpm.min * 60), Math.round(rpm.max * 60)];
  return min === max ? `${whole(max)} rpm` : `${whole(min)} to ${whole(max)} rpm`;
}

/** @returns "30 s", "1 min 30 s", "3 min". */
export function duration(seconds: number): string {
  const [min, s] = [Math.floor(seconds / 60), Math.round(seconds % 60)];
  if (min === 0) return `${s} s`;
  return s === 0 ? `${min} min` : `${min} min ${s} s`;
}

/** "a", "a and b", "a, b and c". */
export const list = (parts: string[]): string =>
  parts.length < 2 ? (parts[0] ?? "") : `${parts.slice(0, -1).join(", ")} and ${parts.at(-1)}`;

/** First letter small, for use inside a sentence: "Fire guard" becomes "fire guard"; "KILL" stays. */
export const small = (text: string): string => text.replace(/^[A-Z](?=[a-z ])/, (letter) => letter.toLowerCase());

/** Ends with a full stop, exactly one. */
export const stopped = (text: string): string => (/[.!?…]$/.test(text) ? text : `${text}.`);
