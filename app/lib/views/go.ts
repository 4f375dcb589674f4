/** What the lead reads on the GO tag before it goes out: run, time, speed, wind, answers, until when it stands and what ends it. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { RunResult } from "#app/lib/gates/result";
import { goEnds, mayCallGo } from "#app/lib/gates/run-verdicts";
import { nameIn, runOf } from "#app/lib/views/places";
import { mailReaders } from "#app/lib/views/plan";
import { type StopView, stopView, windView } from "#app/lib/views/run";
import { rollView } from "#app/lib/views/run-crew";
import { clearanceView, dayWhen, lowerFirst, rpmFigure } from "#app/lib/views/run-words";

export interface GoView {
  label: string;
  kicker: string;
  me: string;
  when: string;
  figure: string;
  /** "the plan binds, wind 6 kt, limit 15 kt, all 7 said go" */
  also: string;
  ends: string | null;
  endsBy: string[];
  version: number;
  readers: { id: string; name: string; places: string }[];
  stops: StopView[];
  why: string | null;
  href: string;
}

export function goView(e: Evaluation, runId: string, me: { id: string }): GoView | null {
  const run = e.facts.runs.get(runId);
  const judged = e.result.runs.find((r) => r.id === runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run?.plan || !judged || !rung) return null;
  const { install, settings } = e.snapshot;
  const verdict = mayCallGo(e, { run: runId, member: me.id });
  // A GO that cannot be called has no end to speak of.
  const ends = judged.go ? judged.go.ends : verdict.ok ? goEnds(e, runId) : null;
  const start = run.run.plannedStart;
  const byWindow = ends !== null && start !== null && ends === start + settings.goWindow;
  const hours = settings.goWindow / 3_600_000;
  return {
    label: run.run.label,
    kicker: `${install.registration} ${install.name}, run ${run.run.label}, ${lowerFirst(rung.name)}`,
    me: nameIn(e.snapshot, me.id),
    when: start === null ? "no time set" : dayWhen(start, install.timeZone),
    figure: rpmFigure(Math.min(judged.clearance.rpm, run.plan.rpm)),
    also: `${lowerFirst(clearanceView(e, judged.clearance).binds).replace(/\.$/, "")}, wind ${windView(e, run).short}, ${lowerFirst(rollView(e, run, me.id).title.replace("Roll call: ", ""))}`,
    ends: ends === null ? null : dayWhen(ends, install.timeZone),
    endsBy: [
      byWindow || ends === null
        ? `GO ends by itself ${hours} h after the planned start.`
        : `GO ends by itself when the first thing that it stands on runs out${firstOut(e, judged, ends)}.`,
      "Any change that stops the run turns GO into HOLD by itself and tells the same people. Any member may call HOLD.",
      `At the start answers and wind may be ${Math.round(settings.freshness / 60_000)} min old at most; older ones are asked again.`,
    ],
    version: run.plan.version,
    readers: mailReaders(e, runId),
    stops: verdict.ok ? [] : verdict.blockers.map((b, i) => stopView(e, b, i + 1, me.id)),
    why: verdict.ok
      ? null
      : verdict.blockers.length > 1
        ? `${verdict.blockers.length} things stop it`
        : (verdict.blockers[0]?.title ?? "not now"),
    href: runOf(install.id, runId),
  };
}

/** ": Day check" where a gate is the first to run out. */
function firstOut(e: Evaluation, judged: RunResult, ends: number | null): string {
  const gate = judged.requiredGates.find((id) => ends !== null && e.result.gates[id]?.until === ends);
  return gate ? `: ${e.facts.gates.get(gate)?.name ?? "a gate"}` : "";
}
