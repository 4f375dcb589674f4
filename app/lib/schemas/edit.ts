/**
 * Edits of a board as they are sent, and what a gate or an item of a board may say. A page sends an edit as it was shown; whatever
 * else sends one is held to the same shapes.
 */
import { z } from "zod";
import type { Edit } from "#app/lib/gates/edits";
import { idSchema, reasonSchema, systemSchema, textSchema } from "#app/lib/schemas/act";
import { partSchema, policySchema, requiredBySchema, validitySchema } from "#app/lib/schemas/board-parts";
import { traitsSchema } from "#app/lib/template/traits";

export const LONGEST_WORDS = 200;
export const LONGEST_SHORT = 16;

const ids = z.array(idSchema).max(60);
const caution = textSchema("Write the caution, or leave it empty.", 400).nullable();

export const gateFieldsSchema = z.strictObject({
  name: textSchema("Give the gate a name.", 60),
  short: textSchema("Give it a short name for the Line.", LONGEST_SHORT, 2),
  needs: ids,
  after: ids,
  requiredBy: requiredBySchema,
  validity: validitySchema.nullable(),
  policy: policySchema,
  caution,
});

export const itemFieldsSchema = z.strictObject({
  words: textSchema("Say what is to be done, and what good looks like.", LONGEST_WORDS),
  killer: z.boolean(),
  secondEyes: z.boolean(),
  guarded: z.boolean(),
  systems: z.array(systemSchema).max(22),
  parts: z.array(partSchema).max(12),
  follows: ids,
  validity: validitySchema.nullable(),
  caution,
});

const subject = z.strictObject({ kind: z.enum(["gate", "item"]), id: idSchema });
const key = z.string().regex(/^[A-Z]{2,4}\d{0,3}$/);

export const editSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("add-gate"), id: idSchema, key, to: gateFieldsSchema, before: idSchema.nullable() }),
  z.strictObject({ kind: z.literal("add-item"), id: idSchema, key, gate: idSchema, to: itemFieldsSchema }),
  z.strictObject({ kind: z.literal("change-gate"), id: idSchema, from: z.record(z.string(), z.json()), to: gateFieldsSchema.partial() }),
  z.strictObject({ kind: z.literal("change-item"), id: idSchema, from: z.record(z.string(), z.json()), to: itemFieldsSchema.partial() }),
  z.strictObject({ kind: z.enum(["hide", "show"]), subject }),
  z.strictObject({ kind: z.literal("move"), subject, by: z.literal([-1, 1]) }),
  z.strictObject({ kind: z.literal("traits"), from: traitsSchema, to: traitsSchema, ids: z.record(z.string().max(20), idSchema) }),
]);

/** Reasons may stay empty where the edit counts at once. */
export const editBoardSchema = z.object({ edit: editSchema, reason: z.string().trim().max(1000).default("") });
export const acceptEditSchema = z.object({ edit: idSchema, wordsOnly: z.boolean().default(false), reason: reasonSchema });
export const rejectEditSchema = z.object({ edit: idSchema, reason: reasonSchema });
export type AcceptEdit = z.output<typeof acceptEditSchema>;
export type RejectEdit = z.output<typeof rejectEditSchema>;

export interface EditBoard {
  edit: Edit;
  reason: string;
}

/** @returns the edit that a form carries as text; null where it is none, or one that no page of this site sends. */
export function readEdit(text: unknown): Edit | null {
  if (typeof text !== "string") return null;
  try {
    const read = editSchema.safeParse(JSON.parse(text));
    return read.success ? (read.data as Edit) : null;
  } catch {
    return null;
  }
}
