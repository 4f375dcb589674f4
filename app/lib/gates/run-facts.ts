/** What a run's acts add up to, before any judgement: started, ended, outcome, and the newest word on GO. */
import type { Instant, PlanVersion, Run, RunAct } from "#app/lib/gates/snapshot";

type Act<K extends RunAct["act"]> = Extract<RunAct, { act: K }>;

export interface RunFacts {
  run: Run;
  /** Newest plan version. */
  plan: PlanVersion | null;
  /** A start that was not taken back. */
  start: Act<"start"> | null;
  endedAt: Instant | null;
  outcome: "completed" | "cut short" | null;
  /** End of the run if its outcome is `completed`. */
  completedEnd: Instant | null;
  scrub: Act<"scrub"> | null;
  /** Newest of go, hold and take-back. */
  word: Act<"go"> | Act<"hold"> | Act<"take-back"> | null;
  /** Newest HOLD, or start taken back, which holds the run too: answers given before it speak for nothing after it. */
  lastHold: Act<"hold"> | Act<"take-back"> | null;
  logRead: Act<"log-read"> | null;
  noLog: Act<"no-log"> | null;
}

/** @param run acts in any order; they are taken by `seq`. */
export function runFacts(run: Run): RunFacts {
  const facts: RunFacts = {
    run,
    plan: null,
    start: null,
    endedAt: null,
    outcome: null,
    completedEnd: null,
    scrub: null,
    word: null,
    lastHold: null,
    logRead: null,
    noLog: null,
  };
  for (const plan of run.plans) if (!facts.plan || plan.version > facts.plan.version) facts.plan = plan;
  for (const act of [...run.acts].sort((a, b) => a.seq - b.seq)) {
    if (act.act === "go" || act.act === "hold" || act.act === "take-back") facts.word = act;
    if (act.act === "hold" || act.act === "take-back") facts.lastHold = act;
    if (act.act === "start") {
      facts.start = act;
      facts.endedAt = null;
      facts.outcome = null;
    } else if (act.act === "take-back") facts.start = null;
    else if (act.act === "ended") facts.endedAt = act.at;
    else if (act.act === "outcome") facts.outcome = facts.start?.unstarted ? "cut short" : act.outcome;
    else if (act.act === "scrub") facts.scrub = act;
    else if (act.act === "log-read") facts.logRead = act;
    else if (act.act === "no-log") facts.noLog = act;
  }
  if (!facts.start) facts.endedAt = null;
  if (facts.endedAt !== null && facts.outcome === "completed") facts.completedEnd = facts.endedAt;
  return facts;
}

/** GO called and neither used up nor over: the newest word is GO, nothing started since, and its window is open. */
export function goCalled(facts: RunFacts, at: Instant): Act<"go"> | null {
  const { word } = facts;
  return word?.act === "go" && !facts.start && !facts.scrub && at < word.ends ? word : null;
}
