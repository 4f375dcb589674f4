// Runs of the demo: planned, briefed, called, run, ended and reviewed.
import { type Crew, value } from "#app/db/seed/crew.server";
import { said } from "#app/db/seed/set-up.server";
import { callGo } from "#app/lib/services/call-go.server";
import { enterNumber } from "#app/lib/services/enter-number.server";
import { planRun } from "#app/lib/services/plan-run.server";
import { endRun, stateOutcome } from "#app/lib/services/report-run.server";
import { recordLogRead } from "#app/lib/services/review-run.server";
import { acknowledgeBrief, answerRollCall, recordWind } from "#app/lib/services/roll-call.server";
import { startRun } from "#app/lib/services/start-run.server";
import type { PositionKey } from "#app/lib/template/types";
import { toSI } from "#app/lib/units/convert";
import { PIN } from "../../../fixtures/demo/people";

export type Places = [position: PositionKey, person: string][];

export async function plan(crew: Crew, rung: string, places: Places, plannedStart: number, place: string): Promise<string> {
  const e = await crew.board();
  const rpm = e.snapshot.rungs.find((r) => r.key === rung)?.rpm;
  const limit = (key: "windLimit" | "gustLimit") => e.facts.values.get(key)?.value ?? 0;
  if (!rpm) throw new Error(`Run ${rung} of the demo has no speed`);
  const positions = places.map(([position, person]) => ({ position, member: crew.idOf(person) }));
  const input = { run: null, rung, plannedStart, place, rpm, positions, windLimit: limit("windLimit"), gustLimit: limit("gustLimit") };
  return value(await planRun(crew.act(crew.data.lead), input)).run;
}

/** Each of them reads the card and acknowledges it. */
export async function brief({ act, clock }: Crew, run: string, people: string[]): Promise<void> {
  for (const person of people) {
    clock.minutes(1);
    value(await acknowledgeBrief(act(person), { run, version: 1 }));
  }
}

export async function sayGo({ act, clock }: Crew, run: string, people: string[]): Promise<void> {
  for (const person of people) {
    clock.minutes(1);
    value(await answerRollCall(act(person), { run, version: 1, answer: "go", reason: "", queueEmpty: true }));
  }
}

/** Knots. */
export async function readWind({ act }: Crew, run: string, person: string, speed: number, gust: number): Promise<void> {
  value(await recordWind(act(person), { run, speed: toSI(speed, "kt"), gust: toSI(gust, "kt"), tail: false }));
}

export async function go({ act, data, clock }: Crew, run: string): Promise<void> {
  value(await callGo(act(data.lead), { run, version: 1, pin: PIN }));
  clock.minutes(1);
}

/** Starts the engine, runs it for some minutes, and states that the card was completed. */
export async function runIt({ act, data, clock }: Crew, run: string, minutes: number): Promise<void> {
  value(await startRun(act(data.lead), { run }));
  clock.minutes(minutes);
  value(await endRun(act(data.lead), { run, at: null }));
  clock.minutes(2);
  value(await stateOutcome(act(data.lead), { run, outcome: "completed" }));
  clock.minutes(12);
}

/** Reads the log, and enters what the makers say of the post-run items before they are worked. */
export async function readLog({ act, data, board }: Crew, run: string, person: string, exceedances: string[]): Promise<string[]> {
  const read = value(await recordLogRead(act(person), { run, exceedances }));
  const e = await board();
  const gate = e.snapshot.gates.find((g) => g.lookBack?.kind === "run" && g.lookBack.run === run);
  for (const item of e.snapshot.items.filter((i) => i.gate === gate?.id))
    for (const [part, word] of (data.makers[item.key] ?? []).entries())
      value(await enterNumber(act(person), { item: item.id, part, source: word.source, ...said(word) }));
  return read.exceedances;
}
