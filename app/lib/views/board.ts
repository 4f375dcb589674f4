/**
 * The board as one person sees it: the answer, what stops us, the Line, the clearance and what this person can do now.
 * Pure: an evaluation and a person in, plain data out.
 */

import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Blocker, RunResult } from "#app/lib/gates/result";
import type { Role } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { type ActView, actsOf } from "#app/lib/views/board-acts";
import { type CrewView, crewViewOf } from "#app/lib/views/board-crew";
import { type LineView, lineOf } from "#app/lib/views/board-line";
import { nameIn, type Place, placeOf, whoClears } from "#app/lib/views/places";

export interface AnswerView {
  title: string;
  /** Second line: how many things stop it, or how far it is cleared. */
  state: string;
  note: string | null;
  tone: "clear" | "shut" | "held" | "go" | "running";
}

export interface StopLine {
  n: number;
  title: string;
  sentence: string;
  who: string;
  place: Place;
  /** A fuller name for the link, for whoever hears it alone. */
  linkLabel: string;
}

export interface ClearanceView {
  rpm: string;
  binds: string;
  limits: { name: string; source: string; rpm: number; text: string; binds: boolean }[];
}

export interface BoardView {
  answer: AnswerView;
  stops: StopLine[];
  line: LineView;
  clearance: ClearanceView | null;
  acts: ActView[];
  /** The shorter board of somebody who is crew and nothing else; null for the others. */
  crew: CrewView | null;
}

export interface Viewer {
  id: string;
  roles: Role[];
}

export function boardView(e: Evaluation, me: Viewer): BoardView {
  const { next, release } = e.result;
  const blockers = next ? next.blockers : release.blockers;
  const stops = blockers.map((b, i) => stopLine(e, b, i + 1, me.id));
  const onlyCrew = me.roles.every((r) => r === "crew");
  return {
    answer: answerOf(e),
    stops,
    line: lineOf(e, balloonsOf(e, blockers)),
    clearance: next && next.clearance.limits.length > 0 ? clearanceOf(next) : null,
    acts: actsOf(e, me),
    crew: onlyCrew ? crewViewOf(e, me.id) : null,
  };
}

/** The first words of the board. The same sentence stands in the answer of the API. */
export function answerOf(e: Evaluation): AnswerView {
  const { next } = e.result;
  if (!next) return releaseAnswer(e);
  const run = `run ${next.label}`;
  const stopped = `${count(next.blockers.length, "thing")} ${next.blockers.length === 1 ? "stops" : "stop"} it`;
  if (next.state === "running")
    return {
      title: `Run ${next.label} is on`,
      state: "The run card is live",
      note: "Anyone may call STOP.",
      tone: "running",
    };
  if (next.go)
    return {
      title: `GO stands for ${run}`,
      state: `until ${e.facts.when(next.go.ends)}`,
      note: `Cleared to ${rpmText(next.clearance.rpm)}.${startWords(next)}`,
      tone: "go",
    };
  if (next.state === "held")
    return {
      title: `HOLD, ${run}`,
      state: next.blockers.length ? stopped : "Nothing stops it now",
      note: holdWords(e, next),
      tone: "held",
    };
  if (next.clear)
    return {
      title: `Clear for ${run}`,
      state: `cleared to ${rpmText(next.clearance.rpm)}`,
      note: `${next.until === null ? "" : `Stands until ${e.facts.when(next.until)}. `}A lead can call GO.`,
      tone: "clear",
    };
  return { title: `Not clear for ${run}`, state: stopped, note: waitWords(e, next), tone: "shut" };
}

function releaseAnswer(e: Evaluation): AnswerView {
  const { release } = e.result;
  const stopped = `${count(release.blockers.length, "thing")} ${release.blockers.length === 1 ? "stops" : "stop"} it`;
  switch (release.state) {
    case "released":
      return {
        title: "Released for taxi tests",
        state: "Every run is reviewed",
        note: "Ready to taxi is not ready to fly.",
        tone: "clear",
      };
    case "ready":
      return { title: "Ready for release", state: "Lead and inspector sign", note: null, tone: "clear" };
    case "half signed":
      return { title: "Release half signed", state: "One signature is left", note: null, tone: "clear" };
    case "lapsed":
      return { title: "Release has lapsed", state: stopped, note: null, tone: "shut" };
    default:
      return { title: "Not released yet", state: stopped, note: "Every run is settled.", tone: "shut" };
  }
}

const startWords = (next: RunResult): string =>
  next.startBlockers.length ? ` Before the start: ${next.startBlockers.map((b) => lowerFirst(b.title)).join(", ")}.` : "";

const lowerFirst = (s: string): string => (/^[A-Z][a-z]/.test(s) ? `${s[0]?.toLowerCase()}${s.slice(1)}` : s);

function holdWords(e: Evaluation, next: RunResult): string | null {
  const hold = e.snapshot.runs
    .find((r) => r.id === next.id)
    ?.acts.filter((a) => a.act === "hold")
    .sort((a, b) => a.seq - b.seq)
    .at(-1);
  if (!hold) return null;
  const by = hold.auto ? "The board called HOLD by itself" : `${nameIn(e.snapshot, hold.by)} called HOLD`;
  return `${by} ${e.facts.when(hold.recorded)}.`;
}

/** How many gates only wait for the ones that are named. */
function waitWords(e: Evaluation, next: RunResult): string | null {
  const named = new Set(next.blockers.filter((b) => b.subject.kind === "gate").map((b) => b.subject.id));
  const rest = next.requiredGates.filter((id) => e.result.gates[id]?.present && !e.result.gates[id]?.stands && !named.has(id));
  if (!rest.length || !named.size) return null;
  if (rest.length > 2) return `${rest.length} more gates wait for ${named.size === 1 ? "this" : "these"}.`;
  const names = rest.map((id) => lowerFirst(e.facts.gates.get(id)?.name ?? "a gate"));
  return `Then ${names.join(", then ")}.`;
}

function stopLine(e: Evaluation, b: Blocker, n: number, me: string): StopLine {
  const place = placeOf(e.snapshot, b.link);
  return {
    n,
    title: b.title,
    sentence: b.sentence,
    who: whoClears(e.snapshot, b.owner, me),
    place,
    linkLabel: `${place.label}: ${b.title}`,
  };
}

/** Numbers of what stops us by gate or run; `next-run` for what is about the run that is not planned yet. */
function balloonsOf(e: Evaluation, blockers: Blocker[]): Map<string, number> {
  const found = new Map<string, number>();
  blockers.forEach((b, i) => {
    const at = b.subject.kind === "gate" ? b.subject.id : b.link.page === "gate" ? b.link.id : null;
    const id = at && e.facts.gates.has(at) ? at : "next-run";
    if (!found.has(id)) found.set(id, i + 1);
  });
  return found;
}

function clearanceOf(next: RunResult): ClearanceView {
  const { binds, limits, rpm } = next.clearance;
  const source = { plan: "run plan", redline: "limit of the engine", finding: "open finding", restraint: "restraint sheet" };
  return {
    rpm: rpmText(rpm),
    binds: binds ? binds.label : "nothing yet",
    limits: limits.map((l) => ({
      name: l.label,
      source: source[l.kind],
      rpm: l.rpm,
      text: rpmText(l.rpm).replace(" rpm", ""),
      binds: l === binds || (l.kind === binds?.kind && l.id === binds.id),
    })),
  };
}
