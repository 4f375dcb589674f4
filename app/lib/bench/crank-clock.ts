/**
 * The crank clock as a state machine: starter on, starter off, pressure seen, each at an instant. It holds to the rule of crank.ts:
 * no burst before its rest is over, none after the give-up total; a burst that runs too long is told, and counted as it was.
 * Instants in ms since the epoch, durations in s. Pure: whoever draws it brings the time.
 */
import { type Burst, type CrankRule, crankSummary, mayCrank } from "#app/lib/bench/crank";

export interface CrankClock {
  bursts: Burst[];
  /** The burst that is on. */
  running: { at: number; pressureAfter: number | null } | null;
}

export const NO_BURSTS: CrankClock = { bursts: [], running: null };

export type CrankEvent = { kind: "on" | "off" | "pressure" | "take-back"; at: number };

export type Stepped = { ok: true; clock: CrankClock } | { ok: false; sentence: string };

const no = (sentence: string): Stepped => ({ ok: false, sentence });

/** @returns the clock after the event, or why it cannot be: what to do instead. */
export function crankStep(rule: CrankRule, clock: CrankClock, { kind, at }: CrankEvent): Stepped {
  const { bursts, running } = clock;
  switch (kind) {
    case "on": {
      if (running) return no("The starter is on already.");
      const may = mayCrank(rule, bursts, at);
      return may.may ? { ok: true, clock: { bursts, running: { at, pressureAfter: null } } } : no(may.sentence);
    }
    case "pressure":
      if (!running) return no("Pressure is marked while the starter turns. Mark it in the next burst.");
      if (running.pressureAfter !== null) return no("Pressure is marked in this burst already.");
      return { ok: true, clock: { bursts, running: { ...running, pressureAfter: Math.max(0, tenths(at - running.at)) } } };
    case "off": {
      if (!running) return no("The starter is off already.");
      const seconds = Math.max(0.1, tenths(at - running.at));
      const pressureAfter = running.pressureAfter === null ? null : Math.min(running.pressureAfter, seconds);
      return { ok: true, clock: { bursts: [...bursts, { at: running.at, seconds, pressureAfter }], running: null } };
    }
    case "take-back":
      if (running) return no("Switch the starter off first.");
      return bursts.length ? { ok: true, clock: { bursts: bursts.slice(0, -1), running: null } } : no("There is no burst to take back.");
  }
}

/** Seconds with one decimal, from milliseconds. */
const tenths = (ms: number): number => Math.round(ms / 100) / 10;

export interface CrankFace {
  /** `crank` = the starter may be, or is, on; `over` = it is on for too long; `rest`, `stop` = it must be off; `seen` = pressure is there. */
  tone: "ready" | "crank" | "over" | "rest" | "stop" | "seen";
  /** One word, read across the hangar. */
  word: string;
  /** The huge figure, s: how long it has been on, or how long it still rests; null = none. */
  figure: number | null;
  sentence: string;
  may: { on: boolean; off: boolean; pressure: boolean };
  /** Bursts so far, the one that is on included; cranking in all, s. */
  bursts: number;
  total: number;
  /** Seconds of cranking after which pressure was seen; null = not yet. */
  pressure: number | null;
}

/** What the clock shows at instant `at`. */
export function crankFace(rule: CrankRule, { bursts, running }: CrankClock, at: number): CrankFace {
  // The face may be a moment older than the last press: it never shows less than what was marked.
  const on = running ? Math.max(0, running.pressureAfter ?? 0, tenths(at - running.at)) : 0;
  const all = running ? [...bursts, { at: running.at, seconds: Math.max(0.1, on), pressureAfter: running.pressureAfter }] : bursts;
  const summary = crankSummary(all, rule.giveUpAfter);
  const base = { bursts: all.length, total: tenths(summary.total * 1000), pressure: summary.pressure?.cranking ?? null };
  if (running) {
    const before = crankSummary(bursts, rule.giveUpAfter);
    const most = before.pressure ? rule.on : Math.min(rule.on, tenths((rule.giveUpAfter - before.total) * 1000));
    const may = { on: false, off: true, pressure: running.pressureAfter === null };
    if (on >= most) return { ...base, tone: "over", word: "OFF NOW", figure: on, sentence: `${most} s are over. Starter off.`, may };
    return {
      ...base,
      tone: "crank",
      word: "CRANKING",
      figure: on,
      sentence:
        running.pressureAfter === null
          ? `Off at ${most} s at the latest. Watch the oil pressure.`
          : `Pressure seen after ${running.pressureAfter} s. Starter off.`,
      may,
    };
  }
  const idle = { on: false, off: false, pressure: false };
  const now = mayCrank(rule, bursts, at);
  if (summary.pressure && !summary.gaveUp)
    return {
      ...base,
      tone: "seen",
      word: "PRESSURE",
      figure: null,
      sentence: `Seen after ${tenths(summary.pressure.cranking * 1000)} s of cranking in ${all.length === 1 ? "1 burst" : `${all.length} bursts`}. Bring it to the item.`,
      may: { ...idle, on: now.may },
    };
  if (now.may)
    return {
      ...base,
      tone: "ready",
      word: "READY",
      figure: null,
      sentence: `Crank for ${tenths(now.seconds * 1000)} s at most. ${now.left === 1 ? "1 burst" : `${now.left} bursts`} left before the long rest.`,
      may: { ...idle, on: true },
    };
  const left = now.at === null ? null : Math.max(0, Math.ceil((now.at - at) / 1000));
  return {
    ...base,
    tone: now.reason === "give-up" || now.reason === "record" ? "stop" : "rest",
    word: left === null ? "STOP" : "REST",
    figure: left,
    sentence: now.sentence,
    may: idle,
  };
}
