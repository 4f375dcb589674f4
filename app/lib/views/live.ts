/** The live card of a run: who holds it, what may be pressed now, and the card's steps with their figures. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { mayHold, mayLead, mayReport, mayStart } from "#app/lib/gates/run-verdicts";
import { type May, mayOf } from "#app/lib/views/may";
import { gateOf, runOf } from "#app/lib/views/places";
import { type CardView, cardView, dayWhen, holdText, lowerFirst, rpmFigure, stepSpeed } from "#app/lib/views/run-words";

export interface LiveStep {
  no: number;
  title: string;
  rpm: string;
  /** Seconds; null = no hold. */
  hold: number | null;
  holdText: string;
  see: string;
  marks: string[];
}

export interface LiveView {
  run: string;
  label: string;
  title: string;
  state: "called" | "running" | "ended" | "other";
  startedAt: number | null;
  /** Words of what keeps it from being started, soonest first. */
  stops: { title: string; sentence: string }[];
  cleared: string;
  card: CardView;
  steps: LiveStep[];
  /** Whether the engine has an oil pressure to wait for. */
  oil: boolean;
  may: { start: May; takeBack: May; end: May; outcome: May; hold: May };
  /** Lead, run lead or recorder: whoever may hold the card. */
  leads: boolean;
  /** Below the title: "running since 12 Dec 09:41 CET". */
  says: string;
  back: string;
  review: string;
  post: { href: string; label: string } | null;
  outcome: string | null;
}

/** @returns null where the install has no such run, or it was never planned. */
export function liveView(e: Evaluation, runId: string, member: string): LiveView | null {
  const run = e.facts.runs.get(runId);
  const judged = e.result.runs.find((r) => r.id === runId);
  const rung = e.facts.rungs.find((r) => r.key === run?.run.rung);
  if (!run?.plan || !judged || !rung) return null;
  const zone = e.snapshot.install.timeZone;
  const ask = { run: runId, member };
  const reports = (report: "take-back" | "ended" | "outcome") => mayOf(mayReport(e, { ...ask, report, outcome: "cut short" }));
  const start = mayStart(e, ask);
  const post = [...e.facts.gates.values()].find((g) => g.lookBack?.kind === "run" && g.lookBack.run === runId);
  const install = e.snapshot.install.id;
  const state = judged.state === "called" || judged.state === "running" ? judged.state : judged.state === "ended" ? "ended" : "other";
  return {
    run: runId,
    label: run.run.label,
    title: `Run ${run.run.label}, ${lowerFirst(rung.name)}`,
    state,
    startedAt: run.start?.recorded ?? null,
    stops: start.ok || run.start ? [] : start.blockers.map(({ title, sentence }) => ({ title, sentence })),
    cleared: rpmFigure(judged.clearance.rpm),
    card: cardView(run.plan.card, run.plan.version),
    steps: run.plan.card.steps.map((s) => ({
      no: s.no,
      title: s.title,
      rpm: stepSpeed(s),
      hold: s.hold,
      holdText: holdText(s.hold),
      see: s.see,
      marks: s.marks,
    })),
    oil: e.snapshot.values.some((v) => v.key === "oilPressureMin"),
    may: {
      start: mayOf(start),
      takeBack: reports("take-back"),
      end: reports("ended"),
      outcome: reports("outcome"),
      hold: mayOf(mayHold(e, ask)),
    },
    leads: mayLead(e, ask),
    says: saysOf(state, run.start ? dayWhen(run.start.recorded, zone) : "", run.outcome),
    back: runOf(install, runId),
    review: `${runOf(install, runId)}/review`,
    post: post ? { href: gateOf(install, post.id), label: post.name } : null,
    outcome: run.outcome,
  };
}

function saysOf(state: LiveView["state"], started: string, outcome: string | null): string {
  if (state === "running") return `running since ${started}`;
  if (state === "called") return "GO stands";
  return state === "ended" ? `ended, ${outcome ?? "outcome not stated"}` : "not called";
}
