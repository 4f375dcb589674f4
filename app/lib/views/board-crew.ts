/** What a crew member needs of the next run: the own place, the run in short, the words that stop it, and what is still to be said. */

import { rpmText } from "#app/lib/gates/clearance";
import { answerCounts, newestAnswer } from "#app/lib/gates/crew";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { POSITIONS } from "#app/lib/template/positions";
import type { ActView } from "#app/lib/views/board-acts";
import { runOf } from "#app/lib/views/places";

export interface CrewView {
  /** Null where this person has no place on the next run. */
  places: { letter: string; name: string; place: string; duty: string }[];
  runHref: string | null;
  when: string | null;
  highest: string | null;
  steps: string[];
  stop: string[];
  read: string | null;
}

export function crewViewOf(e: Evaluation, member: string): CrewView {
  const run = nextRun(e);
  const plan = run?.plan ?? null;
  if (!run || !plan) return { places: [], runHref: null, when: null, highest: null, steps: [], stop: [], read: null };
  const held = plan.positions.filter((p) => p.member === member).map((p) => p.position);
  const ack = run.run.acks
    .filter((a) => a.by === member && a.version === plan.version)
    .sort((a, b) => a.seq - b.seq)
    .at(-1);
  return {
    places: POSITIONS.filter((p) => held.includes(p.key)).map(({ letter, name, place, duty }) => ({ letter, name, place, duty })),
    runHref: runOf(e.snapshot.install.id, run.run.id),
    when: run.run.plannedStart === null ? null : e.facts.when(run.run.plannedStart),
    highest: rpmText(plan.rpm),
    steps: plan.card.steps.map((s) => s.title),
    stop: plan.card.abort.stop,
    read: ack ? `You read card version ${plan.version} on ${e.facts.when(ack.recorded)}` : null,
  };
}

/** Read the card, then answer: for whoever has a place on the next run. */
export function crewActs(e: Evaluation, member: string): ActView[] {
  const run = nextRun(e);
  const plan = run?.plan;
  if (!run || !plan || !["planned", "called", "held"].includes(e.result.next?.state ?? "")) return [];
  if (!plan.positions.some((p) => p.member === member)) return [];
  const href = runOf(e.snapshot.install.id, run.run.id);
  if (!run.run.acks.some((a) => a.by === member && a.version === plan.version))
    return [{ label: "Read the run card", note: `run ${run.run.label}, version ${plan.version}, then say go or no-go`, href }];
  if (answerCounts(run, newestAnswer(run, member), plan.version)) return [];
  return [{ label: "Answer the roll call", note: `go or no-go for run ${run.run.label}${run.lastHold ? ", again after HOLD" : ""}`, href }];
}

const nextRun = (e: Evaluation) => (e.result.next?.id ? (e.facts.runs.get(e.result.next.id) ?? null) : null);
