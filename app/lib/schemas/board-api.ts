/**
 * What `GET /api/v1/installs/:id/board` answers: the evaluator's own answer under the head of the install.
 * Instants are ms since 1970 UTC, speeds crankshaft revolutions per second. Fields may be added, never changed within v1.
 */
import { z } from "zod";
import { commandIdSchema } from "#app/lib/schemas/act";
import { coverSchema, pinSchema } from "#app/lib/schemas/signing";

const instant = z.number().int();
const until = instant.nullable();

const blocker = z.object({
  code: z.string(),
  subject: z.object({ kind: z.string(), id: z.string() }),
  title: z.string(),
  sentence: z.string(),
  owner: z.object({ role: z.string(), members: z.array(z.string()), next: z.string().nullable() }),
  link: z.object({ page: z.string(), id: z.string().nullable(), item: z.string().nullable() }),
});
const blockers = z.array(blocker);

const clearanceLimit = z.object({
  kind: z.enum(["plan", "redline", "finding", "restraint"]),
  id: z.string(),
  label: z.string(),
  rpm: z.number(),
});

const run = z.object({
  id: z.string().nullable(),
  rung: z.string(),
  label: z.string(),
  state: z.enum(["planned", "called", "held", "running", "ended", "reviewed", "scrubbed"]),
  clear: z.boolean(),
  until,
  clearance: z.object({ rpm: z.number(), binds: clearanceLimit.nullable(), limits: z.array(clearanceLimit) }),
  requiredGates: z.array(z.string()),
  blockers,
  go: z.object({ id: z.string(), ends: instant }).nullable(),
  goLost: z.boolean(),
  startBlockers: blockers,
  reviewBlockers: blockers,
});

export const boardAnswerSchema = z.object({
  install: z.object({ id: z.string(), registration: z.string(), name: z.string(), timeZone: z.string() }),
  /** Newest event of the record that this answer rests on. */
  head: z.object({ seq: z.number().int(), hash: z.string() }),
  rulesVersion: z.string(),
  /** The board's first words. */
  answer: z.object({ title: z.string(), state: z.string() }),
  /** The run that the answer speaks of; null when every rung is settled. */
  next: run.nullable(),
  nextRung: z.string().nullable(),
  rungs: z.record(z.string(), z.object({ key: z.string(), settled: z.boolean(), by: z.string().nullable() })),
  runs: z.array(run),
  gates: z.record(
    z.string(),
    z.object({
      id: z.string(),
      key: z.string(),
      name: z.string(),
      state: z.enum(["signed", "half signed", "ready", "lapsed", "waiting", "in work"]),
      present: z.boolean(),
      complete: z.boolean(),
      ready: z.boolean(),
      stands: z.boolean(),
      until,
      covers: z.array(coverSchema),
      holding: z.array(z.string()),
      done: z.number().int(),
      of: z.number().int(),
      prerequisites: z.array(z.string()),
      blockers,
    }),
  ),
  items: z.record(
    z.string(),
    z.object({
      id: z.string(),
      key: z.string(),
      state: z.enum(["to do", "done", "not applicable", "second eyes", "lapsed"]),
      stands: z.boolean(),
      until,
      proof: z.string().nullable(),
      blockers,
    }),
  ),
  release: z.object({
    state: z.enum(["not yet", "ready", "half signed", "released", "lapsed"]),
    stands: z.boolean(),
    until,
    holding: z.array(z.string()),
    covers: z.object({ items: z.array(coverSchema), signatures: z.array(z.string()) }),
    blockers,
  }),
});
export type BoardAnswer = z.output<typeof boardAnswerSchema>;

/** Body of `POST /api/v1/installs/:id/gates/:gateId/signatures`. `covers` is the list that the board gave for this gate. */
export const signatureRequestSchema = z.object({
  commandId: commandIdSchema,
  as: z.enum(["builder", "inspector", "lead"]),
  pin: pinSchema,
  covers: z.array(coverSchema).max(500),
});
