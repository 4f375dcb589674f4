/** Forms about openings, loose ends and findings. */
import { z } from "zod";
import { idSchema, instantSchema, noteSchema, reasonSchema, rotationSchema, systemSchema, textSchema } from "#app/lib/schemas/act";

export const openSystemSchema = z.object({
  systems: z.array(systemSchema).min(1, "Choose at least one system."),
  reason: reasonSchema,
  /** Opened and closed again already: one act. */
  closed: z.boolean().default(false),
  /** When it happened, ms since 1970 UTC, where that was earlier: shown, but it counts from when it is recorded. */
  happened: instantSchema.nullable().default(null),
});
export const openingRefSchema = z.object({ opening: idSchema });
export const closeOpeningSchema = z.object({ opening: idSchema, note: noteSchema });
export const markMistakeSchema = z.object({ opening: idSchema, reason: reasonSchema });
export type OpenSystem = z.input<typeof openSystemSchema>;
export type OpeningRef = z.output<typeof openingRefSchema>;
export type CloseOpening = z.output<typeof closeOpeningSchema>;
export type MarkMistake = z.output<typeof markMistakeSchema>;

const photosSchema = z.array(idSchema).max(10, "At most 10 photos.").default([]);

export const makeLooseEndSchema = z.object({
  what: textSchema("Say what it is.", 200),
  count: z.number().int().min(1).max(1000),
  system: systemSchema,
  why: reasonSchema,
  due: z.discriminatedUnion("kind", [
    z.object({ kind: z.literal("gate"), gate: idSchema }),
    z.object({ kind: z.literal("rung"), rung: z.string().min(1).max(8) }),
  ]),
  /** The item that asks for it; null = nobody asked, so making it is an opening. */
  askedBy: idSchema.nullable().default(null),
  /** Nothing was disturbed by making it; counts once a second person confirms that. */
  undisturbed: z.boolean().default(false),
  photos: photosSchema,
});
export const looseEndSchema = z.object({ looseEnd: idSchema });
/** `undisturbed`: nothing was disturbed by putting it back; counts once a second person confirms that. */
export const restoreLooseEndSchema = looseEndSchema.extend({ undisturbed: z.boolean().default(false) });
export const acceptLooseEndSchema = z.object({
  looseEnd: idSchema,
  rung: z.string("Choose the run.").min(1, "Choose the run.").max(8, "Choose the run."),
  reason: reasonSchema,
});
export type MakeLooseEnd = z.input<typeof makeLooseEndSchema>;
export type LooseEndRef = z.output<typeof looseEndSchema>;
export type RestoreLooseEnd = z.input<typeof restoreLooseEndSchema>;
export type AcceptLooseEnd = z.output<typeof acceptLooseEndSchema>;

const severity = z.enum(["grounding", "limiting", "watch"], "Choose how bad it is.");
const capFits = (f: { severity: string; cap: number | null }) => (f.severity === "limiting") === (f.cap !== null);
const capMessage = { message: "A limiting finding needs the highest speed allowed; the others have none.", path: ["cap"] };

export const raiseFindingSchema = z
  .object({
    system: systemSchema,
    words: reasonSchema,
    severity,
    cap: rotationSchema.nullable().default(null),
    photo: idSchema.nullable().default(null),
    /** After the first. */
    morePhotos: photosSchema,
  })
  .refine(capFits, capMessage);
export const gradeFindingSchema = z
  .object({ finding: idSchema, severity, cap: rotationSchema.nullable().default(null), words: reasonSchema })
  .refine(capFits, capMessage);
export const findingWordsSchema = z.object({ finding: idSchema, words: reasonSchema });
export type RaiseFinding = z.input<typeof raiseFindingSchema>;
export type GradeFinding = z.output<typeof gradeFindingSchema>;
export type FindingWords = z.output<typeof findingWordsSchema>;
