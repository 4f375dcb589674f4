/** Events of the build-up: plans, the crew's answers, GO and what ends it, the run, its review. */
import { z } from "zod";
import { event, id, instant, json, words } from "#app/lib/record/event-parts";

const version = z.number().int().min(1);

export const runEvents = [
  event("rung-left-out", { rung: z.string(), reason: words }),
  event("rung-set-back", { rung: z.string(), reason: words }),
  event("run-planned", {
    run: id, rung: z.string(), label: z.string(), place: words, plannedStart: instant.nullable(), version, rpm: z.number(), card: json,
    positions: z.array(z.strictObject({ position: z.string(), member: id })), windLimit: z.number(), gustLimit: z.number(), requiredGates: z.array(id),
  }),
  event("brief-acknowledged", { run: id, version }),
  event("roll-call-answered", { run: id, version, answer: z.enum(["go", "no-go"]), reason: words, queueEmpty: z.boolean() }),
  event("wind-recorded", { run: id, speed: z.number(), gust: z.number(), tail: z.boolean(), dayEnds: instant }),
  event("go-called", { run: id, version, plannedStart: instant, ends: instant, cap: z.number(), signatures: z.array(id) }),
  event("no-go-sent", { run: id, reason: words, stops: z.array(words) }),
  event("hold-called", { run: id, reason: words, auto: z.boolean(), stops: z.array(words) }),
  event("run-scrubbed", { run: id, reason: words }),
  event("run-started", { run: id, unstarted: z.boolean(), gate: id, made: json }),
  event("start-taken-back", { run: id, gate: id.nullable() }),
  event("run-ended", { run: id, at: instant }),
  event("outcome-stated", { run: id, outcome: z.enum(["completed", "cut short"]) }),
  event("log-read", { run: id }),
  event("log-missing-accepted", { run: id, reason: words }),
  event("exceedance", { run: id, sentence: words }),
  event("exceedance-answered", { exceedance: id, finding: id.nullable(), words }),
] as const; // biome-ignore format: a list of shapes
