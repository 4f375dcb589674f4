/**
 * The run's forms as they arrive from a page: text in, the services' input out. Speeds are typed in kt and rpm, a time at the
 * install's own clock; every message says what to type instead. Pure.
 */
import { z } from "zod";
import { rpmText } from "#app/lib/gates/clearance";
import { forbiddenPair, POSITION_NAMES } from "#app/lib/gates/crew";
import { commandIdSchema, reasonSchema } from "#app/lib/schemas/act";
import { instantOfLocal } from "#app/lib/schemas/local-time";
import { pinSchema } from "#app/lib/schemas/signing";
import type { CrewRule, PositionKey } from "#app/lib/template/types";
import { format, parseEntry } from "#app/lib/units/display";
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
const version = z.coerce.number().int().min(1);

export const acknowledgeForm = z.object({ intent: z.literal("acknowledge"), commandId, version });
export const goAnswerForm = z.object({ intent: z.literal("go"), commandId, version });
export const noGoAnswerForm = z.object({
  intent: z.literal("no-go"),
  commandId,
  version,
  reason: z.string({ error: "Say why it is no-go, in a few words." }).trim().min(3, "Say why it is no-go, in a few words.").max(1000),
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
export const runPageForm = z.discriminatedUnion("intent", [acknowledgeForm, goAnswerForm, noGoAnswerForm, windForm]);

export const reasonForm = z.object({ commandId, reason: reasonSchema });
export const goForm = z.object({ commandId, version, pin: pinSchema });

export interface PlanRules {
  timeZone: string;
  rung: { key: string; rpm: number | null; crew: CrewRule };
  redline: number | null;
  /** The install's own limits, m/s; a plan may be stricter only. */
  windMost: number | null;
  gustMost: number | null;
  nameOf: (member: string) => string;
}

const chosen = z
  .array(z.string().optional())
  .optional()
  .transform((list) => (list ?? []).filter((m): m is string => Boolean(m)));
const POSITION_KEYS = Object.keys(POSITION_NAMES) as PositionKey[];

/** The plan of one rung's run. Empty places are allowed: the run's page says what is missing. */
export function planForm({ timeZone, rung, redline, windMost, gustMost, nameOf }: PlanRules) {
  const perPosition = Object.fromEntries(POSITION_KEYS.map((key) => [key, chosen])) as Record<PositionKey, typeof chosen>;
  return z
    .object({
      commandId,
      date: z.string({ error: "Choose a date." }),
      time: z.string({ error: "Choose a time." }),
      place: z.string({ error: "Say where, such as apron south." }).trim().min(2, "Say where, such as apron south.").max(200),
      rpm: entry("rotation"),
      windLimit: speed,
      gustLimit: speed,
      crew: z.object(perPosition).optional(),
    })
    .transform((form, context) => {
      const issue = (path: (string | number)[], message: string) => context.addIssue({ code: "custom", path, message });
      const start = instantOfLocal(form.date, form.time, timeZone);
      if (!start.ok) issue([start.field], start.sentence);
      if (rung.rpm !== null && form.rpm > rung.rpm + 1e-6)
        issue(["rpm"], `Run ${rung.key} goes to ${rpmText(rung.rpm)} and is not clear above. More is for a later run of the build-up.`);
      if (redline !== null && form.rpm > redline + 1e-6)
        issue(["rpm"], `That is over the redline of ${rpmText(redline)}. Plan a lower run.`);
      const kt = (v: number) => format("speed", v, "si").text;
      if (windMost !== null && form.windLimit > windMost + 1e-6)
        issue(["windLimit"], `The install’s own limit is ${kt(windMost)}. Type that or less.`);
      if (gustMost !== null && form.gustLimit > gustMost + 1e-6)
        issue(["gustLimit"], `The install’s own limit is ${kt(gustMost)}. Type that or less.`);
      if (form.gustLimit < form.windLimit) issue(["gustLimit"], "The gust limit is not below the wind limit.");
      const positions = POSITION_KEYS.flatMap((position) => (form.crew?.[position] ?? []).map((member) => ({ position, member })));
      for (const fault of crewFaults(positions, rung.crew, nameOf)) issue(["crew", fault.position], fault.sentence);
      if (!start.ok) return z.NEVER;
      return {
        commandId: form.commandId,
        plannedStart: start.at,
        place: form.place,
        rpm: exactly(form.rpm, rung.rpm),
        positions,
        windLimit: form.windLimit,
        gustLimit: form.gustLimit,
      };
    });
}

/** The rung's own speed where its whole figure was typed: a plan cut by the rounding would not settle the rung. */
const exactly = (typed: number, own: number | null): number =>
  own !== null && Math.floor(own * 60 + 1e-6) === Math.round(typed * 60) ? own : typed;

/** Who may not stand where: the same position twice, or a pair that one person may not hold. */
export function crewFaults(
  positions: { position: PositionKey; member: string }[],
  rule: CrewRule,
  nameOf: (member: string) => string,
): { position: PositionKey; sentence: string }[] {
  const out: { position: PositionKey; sentence: string }[] = [];
  for (const member of new Set(positions.map((p) => p.member))) {
    const mine = positions.filter((p) => p.member === member).map((p) => p.position);
    const twice = mine.find((p, n) => mine.indexOf(p) !== n);
    if (twice)
      out.push({
        position: twice,
        sentence: `${nameOf(member)} stands as ${POSITION_NAMES[twice]} twice. Choose another person, or leave one empty.`,
      });
    const pair = forbiddenPair([...new Set(mine)], rule);
    if (pair)
      out.push({
        position: pair[1],
        sentence: `${nameOf(member)} cannot be ${POSITION_NAMES[pair[0]]} and ${POSITION_NAMES[pair[1]]} on this run. Give one of them to another person.`,
      });
  }
  return out;
}
