/** May this member do this now? Acts on runs that are planned: acknowledge, answer, GO, HOLD, SCRUB, start, end. */
import { crewOf } from "#app/lib/gates/crew";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import { heldRole } from "#app/lib/gates/facts";
import { soonest } from "#app/lib/gates/items";
import { needsMember, needsRole, no, notFound, OK, refuse, runOver } from "#app/lib/gates/permit";
import type { RunResult, Verdict } from "#app/lib/gates/result";
import type { RunFacts } from "#app/lib/gates/run-facts";
import type { Instant } from "#app/lib/gates/snapshot";

type Found = { run: RunFacts; result: RunResult; verdict: null } | { run: null; result: null; verdict: Verdict };

function find(e: Evaluation, id: string): Found {
  const run = e.facts.runs.get(id);
  const result = e.result.runs.find((r) => r.id === id);
  return run && result ? { run, result, verdict: null } : { run: null, result: null, verdict: notFound(e, "run") };
}

const at = (id: string) => ({ subject: ["run", id] as ["run", string], page: "run" as const, id });
function inCrew(e: Evaluation, run: RunFacts, member: string, act: string): Verdict | null {
  const outsider = needsMember(e, member);
  if (outsider) return outsider;
  return crewOf(run).includes(member)
    ? null
    : no(e, {
        ...at(run.run.id),
        code: "not-your-role",
        title: "No place on this run",
        sentence: `Only those who hold a place on this run ${act}. The lead sets the places.`,
        roles: ["lead"],
      });
}

const stale = (e: Evaluation, run: RunFacts, version: number, act: string): Verdict | null =>
  run.plan?.version === version
    ? null
    : no(e, {
        ...at(run.run.id),
        code: "stale",
        title: "The card has changed",
        sentence: `It is version ${run.plan?.version ?? 0} now. Read it again, then ${act}.`,
        roles: ["crew"],
      });

export function mayAcknowledge(e: Evaluation, a: { run: string; member: string; version: number }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  if (f.run.start || f.run.scrub) return runOver(e, a.run, f.result.state);
  return inCrew(e, f.run, a.member, "acknowledge its card") ?? stale(e, f.run, a.version, "answer") ?? OK;
}

export function mayAnswer(e: Evaluation, a: { run: string; member: string; version: number; answer: "go" | "no-go" }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const crew = inCrew(e, f.run, a.member, "answer its roll call");
  if (crew) return crew;
  // Bad news is always taken: a no-go needs neither the newest card nor an open run.
  if (a.answer === "no-go") return OK;
  if (f.run.start || f.run.scrub) return runOver(e, a.run, f.result.state);
  const old = stale(e, f.run, a.version, "answer");
  if (old) return old;
  return f.run.run.acks.some((k) => k.by === a.member && k.version === a.version)
    ? OK
    : no(e, {
        ...at(a.run),
        code: "order",
        title: "Read the card first",
        sentence: `Acknowledge run card version ${a.version}, then say go.`,
        roles: ["crew"],
      });
}

export function mayRecordWind(e: Evaluation, a: { run: string; member: string }): Verdict {
  const f = find(e, a.run);
  return f.verdict ?? needsMember(e, a.member) ?? (f.run?.scrub || f.run?.endedAt ? runOver(e, a.run, f.result?.state ?? "over") : OK);
}

/** When a GO called now would end: its window from the planned start, or earlier with what it stands on. Null = no planned start. */
export function goEnds(e: Evaluation, run: string): Instant | null {
  const f = find(e, run);
  const start = f.run?.run.plannedStart ?? null;
  return start === null ? null : soonest(start + e.snapshot.settings.goWindow, f.result?.until ?? null);
}

/** @param a.version of the card that the lead saw; left out: asks only whether GO may be called now. */
export function mayCallGo(e: Evaluation, a: { run: string; member: string; version?: number }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const role = needsRole(e, a.member, ["lead"], "call GO");
  if (role) return role;
  if (f.result.go)
    return no(e, {
      ...at(a.run),
      code: "already",
      title: "GO stands",
      sentence: `GO was called and stands until ${e.facts.when(f.result.go.ends)}.`,
      roles: ["lead"],
    });
  const old = a.version === undefined ? null : stale(e, f.run, a.version, "call GO");
  if (old) return old;
  if (!f.result.clear) return refuse(...f.result.blockers);
  const start = f.run.run.plannedStart;
  if (start === null)
    return no(e, {
      ...at(a.run),
      code: "not-planned",
      title: "No time set",
      sentence: "Set the time and place of the run, then call GO.",
      roles: ["lead"],
    });
  if (start + e.snapshot.settings.goWindow <= e.at)
    return no(e, {
      ...at(a.run),
      code: "planned-too-late",
      title: "The planned time has passed",
      sentence: `It was planned for ${e.facts.when(start)}. Set a new time, then call GO.`,
      roles: ["lead"],
    });
  if (f.result.until !== null && start >= f.result.until) {
    const then = evaluate(e.snapshot, start).result.runs.find((r) => r.id === a.run);
    return refuse(...(then?.blockers ?? []).map((b) => ({ ...b, sentence: `By ${e.facts.when(start)}: ${b.sentence}` })));
  }
  return OK;
}

export function mayCallNoGo(e: Evaluation, a: { run: string; member: string }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const role = needsRole(e, a.member, ["lead"], "send a no-go");
  if (role) return role;
  if (f.result.state === "planned" || f.result.state === "held") return OK;
  return f.result.state === "called"
    ? no(e, { ...at(a.run), code: "order", title: "GO stands", sentence: "Call HOLD first: it tells the crew at once.", roles: ["lead"] })
    : runOver(e, a.run, f.result.state);
}

/** HOLD from any member, on a run that has not ended. */
export function mayHold(e: Evaluation, a: { run: string; member: string }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const outsider = needsMember(e, a.member);
  if (outsider) return outsider;
  return f.run.scrub || f.run.endedAt !== null ? runOver(e, a.run, f.result.state) : OK;
}

export function mayScrub(e: Evaluation, a: { run: string; member: string }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const role = needsRole(e, a.member, ["lead"], "scrub a run");
  if (role) return role;
  if (f.run.scrub)
    return no(e, { ...at(a.run), code: "already", title: "Scrubbed already", sentence: "This run was scrubbed before.", roles: ["lead"] });
  return f.run.start
    ? no(e, {
        ...at(a.run),
        code: "order",
        title: "It was started",
        sentence: "A run that was started is reported ended and reviewed, not scrubbed.",
        roles: ["lead"],
      })
    : OK;
}

/** Lead, or whoever holds run lead or recorder on this run. */
function leadsRun(e: Evaluation, run: RunFacts, member: string, act: string): Verdict | null {
  const outsider = needsMember(e, member);
  if (outsider) return outsider;
  const places = run.plan?.positions.filter((p) => p.member === member).map((p) => p.position) ?? [];
  if (heldRole(e.facts, member, "lead", e.at) || places.includes("runlead") || places.includes("recorder")) return null;
  return no(e, {
    ...at(run.run.id),
    code: "not-your-role",
    title: "Not your place",
    sentence: `Only the lead, the run lead or the recorder can ${act}.`,
    roles: ["lead"],
  });
}

/** Whether the member may hold the card of this run: lead, run lead or recorder. */
export function mayLead(e: Evaluation, a: { run: string; member: string }): boolean {
  const run = e.facts.runs.get(a.run);
  return run !== undefined && leadsRun(e, run, a.member, "lead the run") === null;
}

export function mayStart(e: Evaluation, a: { run: string; member: string }): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const place = leadsRun(e, f.run, a.member, "start the run");
  if (place) return place;
  if (f.run.start || f.run.scrub) return runOver(e, a.run, f.result.state);
  const blockers = [...f.result.blockers, ...f.result.startBlockers];
  return blockers.length ? refuse(...blockers) : OK;
}

/**
 * Take the start back (never fired), report the end, or state the outcome.
 * @param a.outcome with `outcome`. A run that nobody started here stays cut short; one that is reviewed may only be made worse.
 */
export function mayReport(
  e: Evaluation,
  a: { run: string; member: string; report: "take-back" | "ended" | "outcome"; outcome?: "completed" | "cut short" },
): Verdict {
  const f = find(e, a.run);
  if (f.verdict) return f.verdict;
  const place = leadsRun(e, f.run, a.member, "report on the run");
  if (place) return place;
  const running = f.run.start !== null && f.run.endedAt === null;
  if (a.report === "outcome" && a.outcome !== "cut short" && f.run.start?.unstarted)
    return no(e, {
      ...at(a.run),
      code: "order",
      title: "Nobody started it here",
      sentence: "A run without start, crew and card proves nothing: it stays cut short. Plan another run of this rung.",
      roles: ["lead"],
    });
  if (a.report === "outcome" && a.outcome !== "cut short" && f.result.state === "reviewed" && f.run.outcome === "cut short")
    return no(e, {
      ...at(a.run),
      code: "order",
      title: "The run is reviewed",
      sentence: "It was reviewed as cut short. Plan another run of this rung.",
      roles: ["lead"],
    });
  const right = a.report === "outcome" ? f.run.endedAt !== null : running;
  return right
    ? OK
    : no(e, {
        ...at(a.run),
        code: "order",
        title: `The run is ${f.result.state}`,
        sentence: a.report === "outcome" ? "Report the run ended first." : "It is not running.",
        roles: ["lead"],
      });
}
