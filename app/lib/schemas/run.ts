/** Forms of the build-up and of a run. Speeds of wind in m/s, of the crankshaft in 1/s. */
import { z } from "zod";
import { freeTextSchema, idSchema, instantSchema, noteSchema, reasonSchema, rotationSchema } from "#app/lib/schemas/act";
import { pinSchema } from "#app/lib/schemas/signing";

const positionKey = z.enum(["operator", "runlead", "fireguard", "areaguard", "observer", "recorder", "swinger"]);
const wind = z.number("Enter a wind speed.").min(0).max(60);
const version = z.number().int().min(1);

export const planRunSchema = z.object({
  /** null = a new run of the rung. */
  run: idSchema.nullable(),
  rung: z.string().min(1).max(8),
  plannedStart: instantSchema.nullable(),
  place: freeTextSchema(200),
  rpm: rotationSchema,
  positions: z.array(z.object({ position: positionKey, member: idSchema })).max(30),
  windLimit: wind,
  gustLimit: wind,
});
export type PlanRun = z.output<typeof planRunSchema>;

export const runVersionSchema = z.object({ run: idSchema, version });
export type RunVersion = z.output<typeof runVersionSchema>;

export const answerRollCallSchema = z.object({
  run: idSchema,
  version,
  answer: z.enum(["go", "no-go"]),
  reason: noteSchema,
  queueEmpty: z.boolean(),
});
export type AnswerRollCall = z.output<typeof answerRollCallSchema>;

export const recordWindSchema = z
  .object({ run: idSchema, speed: wind, gust: wind, tail: z.boolean() })
  .refine((w) => w.gust >= w.speed, { message: "Gusts are not below the wind.", path: ["gust"] });
export type RecordWind = z.output<typeof recordWindSchema>;

/** `version` = the plan on the lead's screen: a plan changed meanwhile is not called unseen. */
export const callGoSchema = z.object({ run: idSchema, version, pin: pinSchema });
export type CallGo = z.output<typeof callGoSchema>;

export const runReasonSchema = z.object({ run: idSchema, reason: reasonSchema });
export type RunReason = z.output<typeof runReasonSchema>;

export const runSchema = z.object({ run: idSchema });
export type RunRef = z.output<typeof runSchema>;

export const endRunSchema = z.object({ run: idSchema, at: instantSchema.nullable().default(null) });
export type EndRun = z.output<typeof endRunSchema>;

export const stateOutcomeSchema = z.object({ run: idSchema, outcome: z.enum(["completed", "cut short"]) });
export type StateOutcome = z.output<typeof stateOutcomeSchema>;

export const recordLogReadSchema = z.object({
  run: idSchema,
  exceedances: z.array(z.string().trim().min(1).max(400)).max(200).default([]),
});
export type RecordLogRead = z.output<typeof recordLogReadSchema>;

export const answerExceedanceSchema = z.object({ exceedance: idSchema, finding: idSchema.nullable(), words: reasonSchema });
export type AnswerExceedance = z.output<typeof answerExceedanceSchema>;

export const rungReasonSchema = z.object({ rung: z.string().min(1).max(8), reason: reasonSchema });
export type RungReason = z.output<typeof rungReasonSchema>;
