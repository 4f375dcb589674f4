/** Forms of the live card and of the review after it. Text in, the services' input out. Pure. */
import { z } from "zod";
import { commandIdSchema, idSchema, reasonSchema } from "#app/lib/schemas/act";

const commandId = commandIdSchema;
const UNKNOWN = "This page does not know what was asked. Load it again.";

export const liveForm = z.discriminatedUnion(
  "intent",
  [
    z.object({ intent: z.literal("start"), commandId }),
    z.object({ intent: z.literal("take-back"), commandId }),
    z.object({ intent: z.literal("ended"), commandId }),
    z.object({ intent: z.literal("completed"), commandId }),
    z.object({ intent: z.literal("cut short"), commandId }),
  ],
  UNKNOWN,
);

/** One exceedance a line. */
const lines = z
  .string()
  .max(20_000)
  .default("")
  .transform((text) =>
    text
      .split(/\r?\n/)
      .map((line) => line.trim())
      .filter(Boolean),
  )
  .refine((list) => list.length <= 200, "At most 200 lines: sum up those that belong together.")
  .refine((list) => list.every((l) => l.length <= 400), "A line has at most 400 characters: shorten the longest.");

export const reviewForm = z.discriminatedUnion(
  "intent",
  [
    z.object({ intent: z.literal("log-read"), commandId, exceedances: lines }),
    z.object({ intent: z.literal("no-log"), commandId, reason: reasonSchema }),
    z.object({
      intent: z.literal("answer"),
      commandId,
      exceedance: idSchema,
      finding: z
        .string()
        .default("")
        .transform((id) => id || null),
      words: reasonSchema,
    }),
  ],
  UNKNOWN,
);
