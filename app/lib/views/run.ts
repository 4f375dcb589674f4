/**
 * One run as its page shows it to one person: where it stands, how high it is cleared and why, what stops it, the card,
 * the people, the wind, and what this person may do, each with the reason where not. Pure.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayPlan } from "#app/lib/gates/plan-verdicts";
import type { Blocker, RunResult, RunState, Verdict } from "#app/lib/gates/result";
import type { RunFacts } from "#app/lib/gates/run-facts";
import { goEnds, mayCallGo, mayCallNoGo, mayHold, mayRecordWind, mayScrub } from "#app/lib/gates/run-verdicts";
import type { Role } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { format } from "#app/lib/units/display";
import { type LineRunView, lineOf } from "#app/lib/views/board-line";
import { nameIn, type Place, placeOf, runOf, whoClears } from "#app/lib/views/places";
import { type MineView, mineView, type RollView, rollView } from "#app/lib/views/run-crew";
import { type RunFindings, runFindings } from "#app/lib/views/run-findings";
import {
  type CardView,
  type ClearanceView,
  cardView,
  clearanceView,
  dayWhen,
  gatesShare,
  lowerFirst,
  timeOrWhen,
} from "#app/lib/views/run-words";

export interface StopView {
  n: number;
  title: string;
  sentence: string;
  who: string;
  place: Place;
}

export interface Act {
  ok: boolean;
  /** Why not, and what to do next; empty when it may be done. */
  why: string;
}

export interface RunView {
  id: string;
  label: string;
  title: string;
  /** "Sat 5 Dec 09:30 CET, apron south" */
  when: string;
  state: RunState;
  ladder: LineRunView[];
  /** Share of the next run's gates that stand. */
  gates: number;
  notice: { kind: "hold" | "done" | "danger" | "plain"; title: string; text: string } | null;
  clearance: ClearanceView;
  card: CardView | null;
  stops: StopView[];
  findings: RunFindings;
  roll: RollView;
  mine: MineView | null;
  wind: WindView;
  gear: "nose" | "tail";
  pusher: boolean;
  acts: { go: Act; noGo: Act; hold: Act; scrub: Act; plan: Act; wind: Act };
  foot: { says: string; note: string };
  /** Nothing but crew: the page begins with the reader's own place. */
  onlyCrew: boolean;
  lead: boolean;
  href: string;
}

export interface WindView {
  newest: string | null;
  limit: string;
  /** For the floor plan: "6 kt, limit 15 kt". */
  short: string;
}

export interface Viewer {
  id: string;
  roles: Role[];
}

const act = (verdict: Verdict): Act => ({ ok: verdict.ok, why: verdict.ok ? "" : (verdict.blockers[0]?.sentence ?? "") });

/** Null where the install has no such run. `place` is the run's text of where. */
export function runView(e: Evaluation, runId: string, me: Viewer, place: string): RunView | null {
  const run = e.facts.runs.get(runId);
  const judged = e.result.runs.find((r) => r.id === runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run || !judged || !rung) return null;
  const ask = { run: runId, member: me.id };
  const zone = e.snapshot.install.timeZone;
  const time = run.run.plannedStart === null ? "no time set" : dayWhen(run.run.plannedStart, zone);
  return {
    id: runId,
    label: run.run.label,
    title: `Run ${run.run.label}, ${lowerFirst(rung.name)}`,
    when: place ? `${time}, ${place}` : time,
    state: judged.state,
    ladder: lineOf(e, new Map()).runs,
    gates: gatesShare(e),
    notice: noticeOf(e, run, judged),
    clearance: clearanceView(e, judged.clearance),
    card: run.plan ? cardView(run.plan.card, run.plan.version) : null,
    stops: stopViews(e, judged, me.id),
    findings: runFindings(e, runId),
    roll: rollView(e, run, me.id),
    mine: mineView(e, run, me.id),
    wind: windView(e, run),
    gear: e.snapshot.traits.gear,
    pusher: e.snapshot.traits.pusher,
    acts: {
      go: act(mayCallGo(e, ask)),
      noGo: act(mayCallNoGo(e, ask)),
      hold: act(mayHold(e, ask)),
      scrub: act(mayScrub(e, ask)),
      plan: act(mayPlan(e, { ...ask, rung: rung.key })),
      wind: act(mayRecordWind(e, ask)),
    },
    foot: footOf(e, run, judged),
    onlyCrew: me.roles.every((r) => r === "crew"),
    lead: me.roles.includes("lead"),
    href: runOf(e.snapshot.install.id, runId),
  };
}

/** What stops it, or what is left after it ended. */
export function stopViews(e: Evaluation, judged: RunResult, me: string): StopView[] {
  const list =
    judged.state === "ended" ? judged.reviewBlockers : ["planned", "held", "called"].includes(judged.state) ? judged.blockers : [];
  return list.map((b, i) => stopView(e, b, i + 1, me));
}

export const stopView = (e: Evaluation, b: Blocker, n: number, me: string): StopView => ({
  n,
  title: b.title,
  sentence: b.sentence,
  who: whoClears(e.snapshot, b.owner, me),
  place: placeOf(e.snapshot, b.link),
});

export function windView(e: Evaluation, run: RunFacts): WindView {
  const kt = (v: number) => format("speed", v, "si").text;
  const wind = [...run.run.winds].sort((a, b) => a.seq - b.seq).at(-1);
  const limit = run.plan ? `${kt(run.plan.windLimit)}, gusts ${kt(run.plan.gustLimit)}, none from behind` : "not planned";
  if (!wind) return { newest: null, limit, short: run.plan ? `not read, limit ${kt(run.plan.windLimit)}` : "not read" };
  const time = timeOrWhen(wind.recorded, e.at, e.snapshot.install.timeZone);
  const by = nameIn(e.snapshot, wind.by);
  return {
    newest: `${kt(wind.speed)}, gusts ${kt(wind.gust)}, ${wind.tail ? "some from behind" : "none from behind"}; ${by}, ${time}.`,
    limit,
    short: `${kt(wind.speed)}${run.plan ? `, limit ${kt(run.plan.windLimit)}` : ""}`,
  };
}

function noticeOf(e: Evaluation, run: RunFacts, judged: RunResult): RunView["notice"] {
  const zone = e.snapshot.install.timeZone;
  switch (judged.state) {
    case "called": {
      const start = judged.startBlockers.length
        ? ` Before the start: ${judged.startBlockers.map((b) => lowerFirst(b.title)).join(", ")}.`
        : "";
      return {
        kind: "done",
        title: `GO stands until ${dayWhen(judged.go?.ends ?? e.at, zone)}.`,
        text: `Any change that stops the run turns it into HOLD by itself and tells the crew.${start}`,
      };
    }
    case "held":
      return heldNotice(e, run);
    case "running":
      return {
        kind: "danger",
        title: "The run is on.",
        text: "Anybody may shout STOP, or cross the arms overhead. Nobody moves until the run lead says “In”.",
      };
    case "ended":
      return {
        kind: "plain",
        title: "The run has ended.",
        text: "It is not reviewed yet: what is left is named below. The propeller is live, and parts are hot.",
      };
    case "reviewed":
      return { kind: "done", title: `Reviewed, ${run.outcome ?? "outcome not stated"}.`, text: "" };
    case "scrubbed":
      return {
        kind: "plain",
        title: "Scrubbed.",
        text: `${run.scrub?.reason ?? ""} Plan another run of this rung from the build-up.`.trim(),
      };
    default:
      return null;
  }
}

function heldNotice(e: Evaluation, run: RunFacts): RunView["notice"] {
  const zone = e.snapshot.install.timeZone;
  const word = run.word;
  if (word?.act === "hold") {
    const by = word.auto ? "By itself" : `${nameIn(e.snapshot, word.by)} called it`;
    return {
      kind: "hold",
      title: `HOLD since ${dayWhen(word.recorded, zone)}. ${by}: ${word.reason}`,
      text: "Nobody starts the engine. HOLD stays until a lead calls GO again, and everybody answers again before that.",
    };
  }
  if (word?.act === "take-back")
    return {
      kind: "hold",
      title: `HOLD since ${dayWhen(word.recorded, zone)}: the start was taken back.`,
      text: "The try is recorded as an opening of the bay. Find the cause, walk round again; the propeller is live.",
    };
  return {
    kind: "hold",
    title: word?.act === "go" ? `GO ended on ${dayWhen(word.ends, zone)}.` : "HOLD.",
    text: "Nobody starts the engine. A lead calls GO again when nothing stops the run.",
  };
}

function footOf(e: Evaluation, run: RunFacts, judged: RunResult): RunView["foot"] {
  const name = `run ${run.run.label}`;
  const blockers = judged.blockers;
  if (judged.state === "called")
    return { says: `GO stands for ${name}`, note: `until ${dayWhen(judged.go?.ends ?? e.at, e.snapshot.install.timeZone)}` };
  if (judged.state === "planned" || judged.state === "held") {
    if (judged.clear) {
      const ends = goEnds(e, run.run.id);
      return {
        says: `Clear for ${name}`,
        note: ends === null ? "Set a time, then call GO." : `GO would stand until ${dayWhen(ends, e.snapshot.install.timeZone)}.`,
      };
    }
    return {
      says: `${count(blockers.length, "thing")} ${blockers.length === 1 ? "stops" : "stop"} ${name}`,
      note: `${blockers
        .slice(0, 3)
        .map((b) => b.title)
        .join(". ")}${blockers.length > 3 ? `, and ${blockers.length - 3} more` : ""}.`,
    };
  }
  return {
    says: `Run ${run.run.label} is ${judged.state}`,
    note: judged.state === "ended" ? `${count(judged.reviewBlockers.length, "thing")} left to review.` : "",
  };
}
