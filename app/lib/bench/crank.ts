/**
 * The crank clock: bursts with a longest length, rests between, a long rest after a set, and an end to the tries.
 * Source of the default: starter makers' duty cycles (10 s on, 20 s rest, 6 times, then 30 min); the starter's own comes first.
 * Instants in ms since the epoch, durations in s.
 */
import { atLeast, atMost } from "#app/lib/bench/compare";

export interface CrankRule {
  /** Longest burst. */
  on: number;
  /** Rest after each burst. */
  rest: number;
  /** Bursts in a set. */
  tries: number;
  /** Rest after a set. */
  longRest: number;
  /** Cranking without oil pressure after which to stop and look for the cause. Common practice, no source. */
  giveUpAfter: number;
}

export const DEFAULT_CRANK_RULE: CrankRule = { on: 10, rest: 20, tries: 6, longRest: 1800, giveUpAfter: 60 };

export interface Burst {
  at: number;
  seconds: number;
  /** Seconds into the burst at which pressure was seen; null = not in this one. */
  pressureAfter: number | null;
}

export interface CrankSummary {
  bursts: number;
  /** Seconds of cranking in all. */
  total: number;
  /** First pressure: seconds since the first burst began, and seconds of cranking up to then; null = not seen. */
  pressure: { sinceFirst: number; cranking: number } | null;
  /** The give-up total was reached without pressure: a later pressure does not undo it. */
  gaveUp: boolean;
}

export type CrankState =
  /** Crank now, for at most `seconds`; `left` = bursts left in this set, this one included. */
  | { may: true; seconds: number; left: number }
  /** `at` = when cranking is allowed again; null = not before the cause is found or the record put right. */
  | { may: false; reason: "running" | "rest" | "long-rest" | "give-up" | "record"; at: number | null; sentence: string };

const inOrder = (bursts: readonly Burst[]): Burst[] => [...bursts].sort((a, b) => a.at - b.at);
const endOf = (burst: Burst): number => burst.at + burst.seconds * 1000;

/** A sentence for each burst that cannot be true (length, pressure outside it, overlap), in order of time; empty when all can. */
export function burstErrors(bursts: readonly Burst[]): string[] {
  return inOrder(bursts).flatMap((burst, index, sorted) => {
    const name = `Burst ${index + 1}`;
    const before = sorted[index - 1];
    if (!Number.isFinite(burst.at)) return [`${name} has no time: enter when it began.`];
    if (!(Number.isFinite(burst.seconds) && burst.seconds > 0)) return [`${name} must have lasted longer than 0 s: enter its length.`];
    const seen = burst.pressureAfter;
    if (seen !== null && !(seen >= 0 && seen <= burst.seconds))
      return [`${name}: pressure must have been seen inside the burst, between 0 and ${burst.seconds} s.`];
    if (before && Number.isFinite(endOf(before)) && burst.at < endOf(before))
      return [`${name} begins before burst ${index} ended: correct one of the two.`];
    return [];
  });
}

/** Totals of a burst history (any order). RangeError for a history with `burstErrors`. */
export function crankSummary(bursts: readonly Burst[], giveUpAfter: number): CrankSummary {
  const [error] = burstErrors(bursts);
  if (error) throw new RangeError(error);
  const sorted = inOrder(bursts);
  const total = sorted.reduce((sum, burst) => sum + burst.seconds, 0);
  let dry = 0;
  for (const burst of sorted) {
    if (burst.pressureAfter !== null) {
      const cranking = dry + burst.pressureAfter;
      const sinceFirst = (burst.at - (sorted[0]?.at ?? burst.at)) / 1000 + burst.pressureAfter;
      return { bursts: sorted.length, total, pressure: { sinceFirst, cranking }, gaveUp: !atMost(cranking, giveUpAfter) };
    }
    dry += burst.seconds;
  }
  return { bursts: sorted.length, total, pressure: null, gaveUp: atLeast(dry, giveUpAfter) };
}

/**
 * May I crank at instant `at`, for how long, else when. Bursts in any order; one that is over-long counts as the number of bursts it
 * would have filled, and asks for as many rests. A set ends with a long rest. Throws RangeError only for a rule that is no rule.
 */
export function mayCrank(rule: CrankRule, bursts: readonly Burst[], at: number): CrankState {
  needRule(rule, at);
  const [error] = burstErrors(bursts);
  if (error) return { may: false, reason: "record", at: null, sentence: error };
  const sorted = inOrder(bursts);
  const last = sorted.at(-1);
  const { gaveUp, pressure, total } = crankSummary(bursts, rule.giveUpAfter);
  if (last && at < endOf(last)) return wait("running", endOf(last) + rests(rule, last), "A burst is still running: let it end, then rest.");
  if (gaveUp) {
    const sentence = `No oil pressure within ${rule.giveUpAfter} s of cranking: stop and look for the cause (oil in, lines, pump primed, sender) before cranking again.`;
    return wait("give-up", null, sentence);
  }
  const used = usedInSet(rule, sorted);
  if (last && used >= rule.tries) {
    const free = endOf(last) + rule.longRest * 1000;
    if (at < free)
      return wait(
        "long-rest",
        free,
        `The set of ${rule.tries === 1 ? "one burst" : `${rule.tries} bursts`} is used up: let the starter cool for ${minutes(rule.longRest)}.`,
      );
  } else if (last) {
    const free = endOf(last) + rests(rule, last);
    if (at < free) return wait("rest", free, "The starter rests between bursts: wait until the clock says so.");
  }
  const cooled = last !== undefined && at - endOf(last) >= rule.longRest * 1000;
  const left = cooled ? rule.tries : rule.tries - used;
  return { may: true, seconds: pressure ? rule.on : Math.min(rule.on, rule.giveUpAfter - total), left };
}

const wait = (reason: "running" | "rest" | "long-rest" | "give-up", at: number | null, sentence: string): CrankState => ({
  may: false,
  reason,
  at,
  sentence,
});
const minutes = (seconds: number): string => (seconds >= 120 ? `${Math.round(seconds / 60)} min` : `${seconds} s`);
const fills = (rule: CrankRule, burst: Burst): number => Math.max(1, Math.ceil(burst.seconds / rule.on - 1e-9));
const rests = (rule: CrankRule, burst: Burst): number => fills(rule, burst) * rule.rest * 1000;

/** Bursts used since the last long rest. */
function usedInSet(rule: CrankRule, sorted: readonly Burst[]): number {
  let used = 0;
  let before: Burst | null = null;
  for (const burst of sorted) {
    if (before && burst.at - endOf(before) >= rule.longRest * 1000) used = 0;
    used += fills(rule, burst);
    before = burst;
  }
  return used;
}

function needRule(rule: CrankRule, at: number): void {
  const { on, rest, tries, longRest, giveUpAfter } = rule;
  const positive = [on, giveUpAfter].every((value) => Number.isFinite(value) && value > 0);
  const rested = [rest, longRest].every((value) => Number.isFinite(value) && value >= 0) && longRest >= rest;
  if (!positive || !rested || !Number.isInteger(tries) || tries < 1)
    throw new RangeError("a crank rule needs times above 0, whole tries, and a long rest no shorter than the rest");
  if (!Number.isFinite(at)) throw new RangeError("the instant must be a number of milliseconds");
}
