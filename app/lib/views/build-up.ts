/** The ladder of rungs as the build-up page shows it: each rung's speed, steps and runs, and which is next. Pure. */
import { rpmText } from "#app/lib/gates/clearance";
import { POSITION_NAMES } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayPlan } from "#app/lib/gates/plan-verdicts";
import type { RunResult } from "#app/lib/gates/result";
import type { Rung } from "#app/lib/gates/snapshot";
import { count } from "#app/lib/gates/who";
import { rungsLeftOut } from "#app/lib/template/runs";
import { type LineRunView, lineOf } from "#app/lib/views/board-line";
import { boardOf, runOf } from "#app/lib/views/places";
import { type CardView, cardView, dayWhen, gatesShare, lowerFirst } from "#app/lib/views/run-words";

export interface RungView {
  key: string;
  name: string;
  rpm: string;
  share: number;
  /** "settled by run 1", "next", "after run 2", "left out". */
  word: string;
  state: "settled" | "next" | "later" | "left-out";
  people: string;
  card: CardView;
  runs: { id: string; label: string; href: string; words: string; state: RunResult["state"] }[];
  /** Where to plan one; null where a run is planned already or the rung is not next. */
  plan: { href: string; ok: boolean; why: string } | null;
}

export interface BuildUpView {
  title: string;
  state: string;
  /** Share of the next run's gates that stand. */
  gates: number;
  ladder: LineRunView[];
  rungs: RungView[];
  /** "Run 4, propeller, is not on this ladder: ...": why the numbers skip one. */
  leftOut: string[];
}

export function buildUpView(e: Evaluation, member: string): BuildUpView {
  const { rungs } = e.facts;
  const settled = rungs.filter((r) => e.facts.settledBy.has(r.key)).length;
  const next = e.result.nextRung;
  const now = e.result.next;
  const cleared = now && now.clearance.rpm > 0 ? `cleared to ${rpmText(now.clearance.rpm)}` : "not cleared to any speed yet";
  return {
    title: "Build-up",
    state: next ? `${settled} of ${rungs.length} rungs settled, run ${now?.label ?? next} ${cleared}` : "every rung is settled",
    gates: gatesShare(e),
    ladder: lineOf(e, new Map()).runs,
    rungs: rungs.map((rung) => rungView(e, rung, member)),
    leftOut: rungsLeftOut(e.snapshot.traits)
      .filter(({ key }) => !rungs.some((r) => r.key === key))
      .map(({ key, name, because }) => `Run ${key}, ${lowerFirst(name)}, is not on this ladder: ${because}.`),
  };
}

function rungView(e: Evaluation, rung: Rung, member: string): RungView {
  const install = e.snapshot.install.id;
  const runs = e.result.runs
    .filter((r): r is RunResult & { id: string } => r.rung === rung.key && r.id !== null)
    .sort((a, b) => (a.label < b.label ? -1 : 1));
  const settledBy = e.facts.settledBy.get(rung.key);
  const isNext = e.result.nextRung === rung.key;
  const state = e.facts.settledBy.has(rung.key) ? (rung.leftOut && !settledBy ? "left-out" : "settled") : isNext ? "next" : "later";
  const under = runs.some((r) => !["scrubbed", "reviewed", "ended"].includes(r.state));
  const verdict = mayPlan(e, { run: null, rung: rung.key, member });
  return {
    key: rung.key,
    name: rung.name,
    rpm: rung.rpm === null ? "speed not entered" : rpmText(rung.rpm),
    share: rung.share,
    state,
    word: wordOf(e, rung, state, settledBy ?? null),
    people: peopleOf(rung),
    card: cardView(rung.card, null),
    runs: runs.map((r) => ({ id: r.id, label: r.label, href: runOf(install, r.id), words: runWords(e, r), state: r.state })),
    plan:
      isNext && !under
        ? {
            href: `${boardOf(install)}/runs/new?rung=${rung.key}`,
            ok: verdict.ok,
            why: verdict.ok ? "" : (verdict.blockers[0]?.sentence ?? ""),
          }
        : null,
  };
}

function wordOf(e: Evaluation, rung: Rung, state: RungView["state"], by: string | null): string {
  if (state === "settled") return `settled by run ${e.facts.runs.get(by ?? "")?.run.label ?? rung.key}`;
  if (state === "left-out") return `left out: ${rung.leftOut?.reason ?? ""}`;
  if (state === "next") return "next";
  return `after run ${e.facts.rungs.filter((r) => r.order < rung.order && !e.facts.settledBy.has(r.key)).at(-1)?.key ?? ""}`;
}

const peopleOf = ({ crew }: Rung): string =>
  `${count(crew.people, "person", "people")} at least: ${crew.wanted.map((w) => (w.count > 1 ? `${w.count} ${POSITION_NAMES[w.position]}s` : POSITION_NAMES[w.position])).join(", ")}`;

const STATE_WORD: Record<RunResult["state"], string> = {
  planned: "planned",
  called: "GO stands",
  held: "HOLD",
  running: "running",
  ended: "ended, not reviewed",
  reviewed: "reviewed",
  scrubbed: "scrubbed",
};

function runWords(e: Evaluation, run: RunResult): string {
  const facts = e.facts.runs.get(run.id ?? "");
  const planned = facts?.run.plannedStart;
  const parts = [STATE_WORD[run.state]];
  if (planned != null) parts.push(dayWhen(planned, e.snapshot.install.timeZone));
  if (facts?.plan) parts.push(`to ${rpmText(facts.plan.rpm)}`);
  if (run.state === "planned" || run.state === "held")
    parts.push(run.blockers.length ? `${count(run.blockers.length, "thing")} ${run.blockers.length === 1 ? "stops" : "stop"} it` : "clear");
  return parts.join(", ");
}
