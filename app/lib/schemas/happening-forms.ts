/** The forms of openings, loose ends and findings as a page sends them: text in, the services' input out. Speeds are typed in rpm. Pure. */
import { z } from "zod";
import { instantOfLocal } from "#app/lib/gates/local-time";
import { commandIdSchema, idSchema, noteSchema, systemSchema, textSchema } from "#app/lib/schemas/act";
import { acceptLooseEndSchema, makeLooseEndSchema } from "#app/lib/schemas/happenings";
import { parseEntry, type UnitSystem } from "#app/lib/units/display";

const commandId = commandIdSchema;
/** A box on a page: sent only when it is ticked. */
const ticked = z
  .literal("on")
  .optional()
  .transform((sent) => sent === "on");
const words = (message: string) => textSchema(message, 1000);

// ---------------------------------------------------------------- openings

export const openChoice = z.object({
  systems: z.array(systemSchema).min(1, "Choose at least one system."),
  closed: z.enum(["open", "closed"], "Say whether it is still open.").transform((state) => state === "closed"),
});

/** @param now the typed time is at most this; an opening counts when it is recorded, whatever is typed. */
export const openForm = (timeZone: string, now: number) =>
  openChoice.extend({
    commandId,
    reason: words("Say what was done and why, in a few words."),
    happened: z
      .string()
      .default("")
      .transform((text, context) => {
        if (text.trim() === "") return null;
        const [date = "", time = ""] = text.trim().split("T");
        const read = instantOfLocal(date, time, timeZone);
        if (read.ok && read.at <= now) return read.at;
        context.addIssue({
          code: "custom",
          message: read.ok ? "That time has not come yet. Enter when it happened, or leave it empty." : read.sentence,
        });
        return z.NEVER;
      }),
  });

export const openingForm = z.object({ commandId, opening: idSchema });
export const closeOpeningForm = z.object({ commandId, opening: idSchema, note: noteSchema });
export const markMistakeForm = z.object({ commandId, opening: idSchema, reason: words("Say what the mistake was, in a few words.") });

// ---------------------------------------------------------------- loose ends

const wholeNumber = z
  .string()
  .default("")
  .transform((text, context) => {
    const n = /^\d{1,4}$/.test(text.trim()) ? Number(text.trim()) : 0;
    if (n >= 1 && n <= 1000) return n;
    context.addIssue({ code: "custom", message: "Count them and type how many, from 1 to 1000." });
    return z.NEVER;
  });

export const makeLooseEndForm = z.object({
  commandId,
  what: makeLooseEndSchema.shape.what,
  count: wholeNumber,
  system: systemSchema,
  why: words("Say why it is off, in a few words."),
  due: z
    .string("Choose before what it must be back.")
    .regex(/^(gate|rung):./, "Choose before what it must be back.")
    .transform((text): z.output<typeof makeLooseEndSchema>["due"] => {
      const id = text.slice(text.indexOf(":") + 1);
      return text.startsWith("gate:") ? { kind: "gate", gate: id } : { kind: "rung", rung: id };
    }),
  askedBy: z
    .string()
    .default("")
    .transform((id) => id || null),
  undisturbed: ticked,
});
export const restoreForm = z.object({ commandId, looseEnd: idSchema, undisturbed: ticked });
export const looseEndForm = z.object({ commandId, looseEnd: idSchema });
export const acceptLooseEndForm = z.object({
  commandId,
  looseEnd: idSchema,
  rung: acceptLooseEndSchema.shape.rung,
  reason: words("Say why the run can go with it, in a few words."),
});

// ---------------------------------------------------------------- findings

const graded = {
  severity: z.enum(["grounding", "limiting", "watch"], "Choose how bad it is."),
  cap: z.string().default(""),
};

/** The cap is read on a limiting finding alone: what is left in the field of another one is no fault. */
function withCap<T extends { severity: string; cap: string }>(form: T, units: UnitSystem, context: z.RefinementCtx) {
  if (form.severity !== "limiting") return { ...form, cap: null };
  const read = parseEntry(form.cap, "rotation", units);
  if (read.ok && read.si > 0) return { ...form, cap: read.si };
  context.addIssue({
    code: "custom",
    path: ["cap"],
    message: read.ok ? "Type a speed above zero; what must not run at all is grounding." : read.sentence,
  });
  return z.NEVER;
}

export const raiseFindingForm = (units: UnitSystem) =>
  z
    .object({ commandId, system: systemSchema, words: words("Say what you see, in a few words."), ...graded })
    .transform((form, context) => withCap(form, units, context));
export const gradeFindingForm = (units: UnitSystem) =>
  z
    .object({ commandId, finding: idSchema, words: words("Say why, in a few words."), ...graded })
    .transform((form, context) => withCap(form, units, context));

const settle = (message: string) => z.object({ commandId, finding: idSchema, words: words(message) });
export const fixFindingForm = settle("Say what was done, in a few words.");
export const closeFindingForm = settle("Say what you looked at, in a few words.");
export const rejectFixForm = settle("Say what is still wrong, in a few words.");
