/** What the Line is drawn from: gates, walk-round, the ladder of runs and the release, as the evaluator sees them now. */

import type { ValveState } from "#app/components/ui/states";
import { rpmText } from "#app/lib/gates/clearance";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { GateResult, RunResult } from "#app/lib/gates/result";
import type { Gate, Rung } from "#app/lib/gates/snapshot";
import { boardOf, gateOf, runOf } from "#app/lib/views/places";
import { noteOf, valveOf, waitsFor } from "#app/lib/views/shown-states";

export interface StopView {
  state: ValveState;
  note: string;
  href: string;
}

export interface LineGateView extends StopView {
  id: string;
  key: string;
  name: string;
  short: string;
  needs: string[];
  after: string[];
  part: number;
  balloon: number | null;
  full: string;
}

export interface LineRunView {
  id: string;
  key: string;
  name: string;
  href: string;
  rpmText: string;
  share: number;
  state: "planned" | "next" | "called" | "held" | "running" | "ended" | "reviewed" | "scrubbed";
  spade: boolean;
  postRun: StopView | null;
  serviceBefore: StopView | null;
  balloon: number | null;
}

export interface LineView {
  gates: LineGateView[];
  walkRound: LineGateView | null;
  runs: LineRunView[];
  release: StopView;
}

/** @param balloons number in what stops us, by subject id of a gate or run. */
export function lineOf(e: Evaluation, balloons: Map<string, number>): LineView {
  const { snapshot, result } = e;
  const shown = snapshot.gates.flatMap((gate) => {
    const judged = result.gates[gate.id];
    return judged?.present ? [{ gate, judged }] : [];
  });
  const view = ({ gate, judged }: { gate: Gate; judged: GateResult }) => gateView(e, gate, judged, balloons.get(gate.id) ?? null);
  const walk = shown.find(({ gate }) => gate.eachRun);
  return {
    gates: shown.filter(({ gate }) => !gate.eachRun && !gate.lookBack && gate.requiredBy.kind !== "release").map(view),
    walkRound: walk ? { ...view(walk), ...walkRoundNames(e, walk.gate) } : null,
    runs: e.facts.rungs.map((rung) => runView(e, rung, balloons)),
    release: releaseView(e),
  };
}

/** The walk-round is for one run: its names say which. */
const walkRoundNames = (e: Evaluation, gate: Gate): { name: string; short: string } =>
  e.result.next ? { name: `${gate.name}, run ${e.result.next.label}`, short: `${gate.short} ${e.result.next.label}` } : gate;

function gateView(e: Evaluation, gate: Gate, judged: GateResult, balloon: number | null): LineGateView {
  return {
    id: gate.id,
    key: gate.key,
    name: gate.name,
    short: gate.short,
    href: gateOf(e.snapshot.install.id, gate.id),
    needs: gate.needs,
    after: gate.after,
    state: valveOf(judged.state),
    note: noteOf(e, judged),
    part: judged.of ? judged.done / judged.of : 0,
    balloon,
    full: fullOf(e, judged),
  };
}

/** State and reason in full, times with their zone. */
function fullOf(e: Evaluation, judged: GateResult): string {
  switch (judged.state) {
    case "signed": {
      const last = e.snapshot.signatures.find((s) => s.id === judged.holding.at(-1));
      const until = judged.until === null ? "" : `, stands until ${e.facts.when(judged.until)}`;
      return last ? `signed ${e.facts.when(last.recorded)}${until}` : "signed";
    }
    case "waiting": {
      const names = waitsFor(e.result.gates, judged).map((id) => e.facts.gates.get(id)?.name ?? "a gate");
      return `waits for ${names.join(", ")}`;
    }
    case "lapsed":
      return `lapsed: ${judged.blockers[0]?.sentence ?? ""}`;
    case "in work":
      return judged.done ? `in work: ${judged.done} of ${judged.of} done` : "not begun";
    case "ready":
      return "ready to sign";
    default:
      return `${judged.state}: ${judged.blockers[0]?.sentence ?? ""}`;
  }
}

function runView(e: Evaluation, rung: Rung, balloons: Map<string, number>): LineRunView {
  const { snapshot, result } = e;
  const install = snapshot.install.id;
  const run = latestOf(e, rung.key);
  const plan = run?.id ? snapshot.runs.find((r) => r.id === run.id)?.plans.at(-1) : undefined;
  const rpm = plan?.rpm ?? rung.rpm;
  const isNext = result.next !== null && result.next.rung === rung.key && (run === null || run.id === result.next.id);
  const state = run && run.state !== "planned" ? run.state : isNext ? "next" : "planned";
  const grounded = isNext && (result.next?.blockers.some((b) => b.code === "grounding") ?? false);
  return {
    id: run?.id ?? `rung-${rung.key}`,
    key: run?.label ?? rung.key,
    name: rung.name,
    href: run?.id ? runOf(install, run.id) : `${boardOf(install)}/build-up`,
    rpmText: rpm === null ? "speed not entered" : rpmText(rpm),
    share: rung.share,
    state: rung.leftOut && !run ? "scrubbed" : state,
    spade: run?.state === "held" || grounded,
    postRun: rung.leftOut && !run ? null : postRunOf(e, run, rung),
    serviceBefore: serviceBefore(e, rung),
    balloon: (run?.id && balloons.get(run.id)) || (isNext ? (balloons.get("next-run") ?? null) : null),
  };
}

/** The run that stands for its rung: the one not scrubbed with the highest label, else none. */
function latestOf(e: Evaluation, rung: string): RunResult | null {
  const next = e.result.next;
  if (next?.rung === rung) return next;
  const tried = e.result.runs.filter((r) => r.rung === rung && r.id !== null && r.state !== "scrubbed");
  return tried.sort((a, b) => (a.label < b.label ? -1 : 1)).at(-1) ?? null;
}

function stopOf(e: Evaluation, gate: Gate): StopView | null {
  const judged = e.result.gates[gate.id];
  if (!judged?.present) return null;
  return {
    state: valveOf(judged.state),
    note: noteOf(e, judged),
    href: gateOf(e.snapshot.install.id, gate.id),
  };
}

function postRunOf(e: Evaluation, run: RunResult | null, rung: Rung): StopView {
  const gate = run?.id ? e.snapshot.gates.find((g) => g.lookBack?.kind === "run" && g.lookBack.run === run.id) : undefined;
  const href = run?.id ? runOf(e.snapshot.install.id, run.id) : `${boardOf(e.snapshot.install.id)}/build-up`;
  return (gate && stopOf(e, gate)) ?? { state: "waiting", note: `waits for run ${run?.label ?? rung.key}`, href };
}

function serviceBefore(e: Evaluation, rung: Rung): StopView | null {
  const gate = e.snapshot.gates.find(
    (g) => g.lookBack?.kind === "rung" && g.requiredBy.kind === "rung-and-release" && g.requiredBy.rung === rung.key,
  );
  if (!gate) return null;
  const stop = stopOf(e, gate);
  const before = gate.lookBack?.kind === "rung" ? gate.lookBack.rung : "";
  return stop && !e.facts.settledBy.has(before) && stop.state !== "signed"
    ? { ...stop, state: "waiting", note: `waits for run ${before}` }
    : stop;
}

function releaseView(e: Evaluation): StopView {
  const { release } = e.result;
  const gate = e.snapshot.gates.find((g) => g.requiredBy.kind === "release" && !g.lookBack);
  const href = gate ? gateOf(e.snapshot.install.id, gate.id) : `${boardOf(e.snapshot.install.id)}/build-up`;
  const states = { "not yet": "waiting", ready: "ready", "half signed": "half-signed", released: "signed", lapsed: "lapsed" } as const;
  return { state: states[release.state], note: release.state, href };
}
