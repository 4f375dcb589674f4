/**
 * The states that a valve, a nut and a blade can show, and the word for each: no state is told by shape or colour alone.
 */

/** A gate, a post-run gate, the release. */
export type ValveState = "waiting" | "in-work" | "ready" | "half-signed" | "signed" | "lapsed";
/** `shut` is the board's answer: not clear. */
export type ShownValve = ValveState | "shut";

export const VALVE_WORD: Record<ShownValve, string> = {
  waiting: "waiting",
  "in-work": "in work",
  ready: "ready to sign",
  "half-signed": "half signed",
  signed: "signed",
  lapsed: "lapsed",
  shut: "not clear",
};

/** Degrees from across the pipe to along it; a lapsed handle is broken and has no angle. */
export const LEVER_ANGLE: Record<Exclude<ShownValve, "lapsed">, number> = {
  waiting: 0,
  "in-work": 0,
  ready: 0,
  shut: 0,
  "half-signed": 45,
  signed: 90,
};

export type NutState = "todo" | "done" | "na" | "second-eyes" | "lapsed";

export const NUT_WORD: Record<NutState, string> = {
  todo: "to do",
  done: "done",
  na: "not applicable",
  "second-eyes": "waits for second eyes",
  lapsed: "lapsed",
};

export type RunState = "planned" | "next" | "called" | "held" | "running" | "ended" | "reviewed" | "scrubbed";

export const RUN_WORD: Record<RunState, string> = {
  planned: "planned",
  next: "next",
  called: "GO called",
  held: "HOLD",
  running: "running",
  ended: "ended, not reviewed",
  reviewed: "reviewed",
  scrubbed: "scrubbed",
};
