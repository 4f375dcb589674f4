/** Days of the crib: when a check runs out, in words and along the rule of the twelve months to come. Pure. */

import { localOf } from "#app/lib/gates/local-time";
import type { Instant } from "#app/lib/gates/snapshot";

const DAY = 86_400_000;
const YEAR = 365 * DAY;

export type DueState = "in date" | "due soon" | "out";

export interface DueView {
  /** "calibration", "monthly look", "yearly service" */
  name: string;
  state: DueState;
  /** "in date", "8 days left", "past its date", "never done" */
  word: string;
  /** "14 Mar 2027"; null = none. */
  until: string | null;
  /** Share of the year to come, 0 to 1. */
  share: number;
}

/** @param ends first instant at which it is no longer in date. @param soon days before that from which it is due soon. */
export function dueView(name: string, ends: Instant | null, soon: number, now: Instant, timeZone: string): DueView {
  if (ends === null) return { name, state: "out", word: "never done", until: null, share: 0 };
  const until = dayText(ends - 1, timeZone);
  if (ends <= now) return { name, state: "out", word: "past its date", until, share: 0 };
  const left = Math.max(1, Math.ceil((ends - now) / DAY));
  const share = Math.min(1, (ends - now) / YEAR);
  if (left > soon) return { name, state: "in date", word: "in date", until, share };
  return { name, state: "due soon", word: left === 1 ? "last day" : `${left} days left`, until, share };
}

/** "12 days left", "last day", "past its date since 3 Nov 2026". @param ends as in `dueView`. */
export function daysLeft(ends: Instant, now: Instant, timeZone: string): string {
  if (ends <= now) return `past its date since ${dayText(ends, timeZone)}`;
  const left = Math.max(1, Math.ceil((ends - now) / DAY));
  return left === 1 ? "last day" : `${left} days left`;
}

const RANK: Record<DueState, number> = { out: 0, "due soon": 1, "in date": 2 };
/** Of several dates the one that matters first. */
export const worstOf = (dues: DueView[]): DueView | undefined =>
  [...dues].sort((a, b) => RANK[a.state] - RANK[b.state] || a.share - b.share)[0];

const days = new Map<string, Intl.DateTimeFormat>();

/** "14 Mar 2027", the day at the place that holds the instant. */
export function dayText(at: Instant, timeZone: string): string {
  let format = days.get(timeZone);
  if (!format) {
    format = new Intl.DateTimeFormat("en-GB", { timeZone, day: "numeric", month: "short", year: "numeric" });
    days.set(timeZone, format);
  }
  const part = Object.fromEntries(format.formatToParts(at).map((p) => [p.type, p.value]));
  return `${part.day} ${part.month} ${part.year}`;
}

/** "2027-01-01": today at the place, `months` later; the last day of a shorter month. */
export function dateAfter(now: Instant, months: number, timeZone: string): string {
  const [year = 1970, month = 1, day = 1] = localOf(now, timeZone).date.split("-").map(Number);
  const last = new Date(Date.UTC(year, month + months, 0)).getUTCDate();
  return new Date(Date.UTC(year, month - 1 + months, Math.min(day, last))).toISOString().slice(0, 10);
}

/** First days of the twelve months to come, along the rule; every third has its name. */
export function monthTicks(now: Instant, timeZone: string): { share: number; label: string | null }[] {
  const [year = 1970, month = 1] = localOf(now, timeZone).date.split("-").map(Number);
  const name = new Intl.DateTimeFormat("en-GB", { timeZone: "UTC", month: "short" });
  return Array.from({ length: 12 }, (_, n) => {
    const first = Date.UTC(year, month + n, 1);
    return { share: (first - now) / YEAR, label: n % 3 === 0 ? name.format(first).slice(0, 3) : null };
  });
}
