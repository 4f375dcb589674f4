/**
 * The run's forms as they arrive from a page: text in, the services' input out. Speeds are typed in kt and rpm, a time at the
 * install's own clock; every message says what to type instead. Pure.
 */
import { z } from "zod";
import { POSITION_NAMES } from "#app/lib/gates/crew";
import { instantOfLocal } from "#app/lib/gates/local-time";
import { type PlanRules, planFaults } from "#app/lib/gates/plan-verdicts";
import { commandIdSchema, reasonSchema, textSchema } from "#app/lib/schemas/act";
import { pinSchema } from "#app/lib/schemas/signing";
import type { PositionKey } from "#app/lib/template/types";
import { parseEntry } from "#app/lib/units/display";
import type { Quantity } from "#app/lib/units/quantity";

const entry = (quantity: Quantity) =>
  z
    .string()
    .default("")
    .transform((text, context) => {
      const read = parseEntry(text, quantity, "si");
      if (read.ok) return read.si;
      context.addIssue({ code: "custom", message: read.sentence });
      return z.NEVER;
    });
const speed = entry("speed").refine((v) => v <= 60, "That is a storm. Type the wind in knots.");
const commandId = commandIdSchema;
const LOST = "The form has lost the version of its card. Load the page again.";
const version = z.coerce.number(LOST).int(LOST).min(1, LOST);

export const acknowledgeForm = z.object({ intent: z.literal("acknowledge"), commandId, version });
export const goAnswerForm = z.object({ intent: z.literal("go"), commandId, version });
export const noGoAnswerForm = z.object({
  intent: z.literal("no-go"),
  commandId,
  version,
  reason: textSchema("Say why it is no-go, in a few words.", 1000),
});
export const windForm = z
  .object({
    intent: z.literal("wind"),
    commandId,
    speed,
    gust: speed,
    tail: z.enum(["no", "yes"], "Say whether any of it comes from behind."),
  })
  .refine((w) => w.gust >= w.speed, { message: "Gusts are not below the wind: type the highest that you saw.", path: ["gust"] });
/** The four acts of the run's page. */
export const runPageForm = z.discriminatedUnion(
  "intent",
  [acknowledgeForm, goAnswerForm, noGoAnswerForm, windForm],
  "This page does not know what was asked. Load it again.",
);

export const reasonForm = z.object({ commandId, reason: reasonSchema });
export const goForm = z.object({ commandId, version, pin: pinSchema });

const chosen = z
  .array(z.string().optional())
  .optional()
  .transform((list) => (list ?? []).filter((m): m is string => Boolean(m)));
const POSITION_KEYS = Object.keys(POSITION_NAMES) as PositionKey[];

/** The plan of one rung's run. Empty places are allowed: the run's page says what is missing. */
export function planForm(rules: PlanRules, timeZone: string) {
  const perPosition = Object.fromEntries(POSITION_KEYS.map((key) => [key, chosen])) as Record<PositionKey, typeof chosen>;
  return z
    .object({
      commandId,
      date: z.string("Choose a date."),
      time: z.string("Choose a time."),
      place: textSchema("Say where, such as apron south.", 200, 2),
      rpm: entry("rotation"),
      windLimit: speed,
      gustLimit: speed,
      crew: z.object(perPosition).optional(),
    })
    .transform(({ crew, date, time, ...form }, context) => {
      const issue = (path: (string | number)[], message: string) => context.addIssue({ code: "custom", path, message });
      const start = instantOfLocal(date, time, timeZone);
      if (!start.ok) issue([start.field], start.sentence);
      const positions = POSITION_KEYS.flatMap((position) => (crew?.[position] ?? []).map((member) => ({ position, member })));
      const plan = { ...form, rpm: exactly(form.rpm, rules.rung.rpm), positions };
      for (const { field, sentence } of planFaults(rules, plan))
        issue(typeof field === "string" ? [field] : ["crew", field.position], sentence);
      return start.ok ? { ...plan, plannedStart: start.at } : z.NEVER;
    });
}

/** The rung's own speed where its whole figure was typed: a plan cut by the rounding would not settle the rung. */
const exactly = (typed: number, own: number | null): number =>
  own !== null && Math.floor(own * 60 + 1e-6) === Math.round(typed * 60) ? own : typed;
