/** Shapes of a board's definitions: evidence asked for, who signs, how long it holds. Shared by edits and by templates that are read in. */
import { z } from "zod";
import { textSchema } from "#app/lib/schemas/act";
import type { Part, ValueKey } from "#app/lib/template/types";
import { VALUES_BY_KEY } from "#app/lib/template/values";
import { type Quantity, SI } from "#app/lib/units/quantity";

const label = textSchema("Give it a label.", 60, 1);
const HOURS = "Enter hours between 0.1 and 9,000.";
const hours = z.number(HOURS).min(0.1, HOURS).max(9000, HOURS).nullable();
const figure = z.number().nullable();

export const validitySchema = z.strictObject({ hours, afterRunHours: hours });
/** The release gate has no places of its own: nobody signs it but the release. */
export const policySchema = z
  .array(
    z
      .array(z.enum(["builder", "inspector", "lead"]))
      .min(1)
      .max(3),
  )
  .max(3);
export const requiredBySchema = z.union([
  z.strictObject({ kind: z.enum(["runs-and-release", "runs", "release"]) }),
  z.strictObject({ kind: z.literal("rung-and-release"), rung: z.string().min(1).max(8) }),
]);

export const quantitySchema = z.enum(Object.keys(SI) as [Quantity, ...Quantity[]], "Choose a kind of quantity.");
const valueKey = z
  .string()
  .refine((key): key is ValueKey => VALUES_BY_KEY.has(key), "This names a rating or limit that is not known here.");
const limit = z.strictObject({ key: valueKey, end: z.enum(["min", "max"]) }).optional();
const basis = z.union([
  z.strictObject({ kind: z.literal("standard"), source: z.string().max(400) }),
  z.strictObject({ kind: z.enum(["maker", "common"]) }),
]);
const band = z
  .strictObject({ min: figure, max: figure })
  .refine((b) => (b.min ?? -Infinity) <= (b.max ?? Infinity), "The least is above the most: change one of them.")
  .nullable();
const criterion = z.strictObject({
  quantity: quantitySchema,
  band,
  basis,
  source: z.string().max(400).nullable(),
  limit,
  otherLimit: limit,
});
const places = z.array(z.string().max(60)).min(1).max(30);
const count = z.number().int().min(1).max(999);

/** One part of the evidence that an item asks for. */
export const partSchema: z.ZodType<Part> = z.discriminatedUnion("kind", [
  z.strictObject({
    kind: z.literal("tick"),
    reference: z
      .strictObject({
        asks: textSchema("Say what the maker's papers must say.", 200, 1),
        text: z.string().max(400).nullable(),
        source: z.string().max(400).nullable(),
      })
      .optional(),
  }),
  z.strictObject({ kind: z.literal("measure"), label, places, criterion }),
  z.strictObject({ kind: z.literal("torque"), label, places, criterion, count: count.nullable() }),
  z.strictObject({
    kind: z.literal("tally"),
    mode: z.enum(["pairs", "out", "in"]),
    of: z.string().max(64).optional(),
    expected: count.optional(),
    words: z.strictObject({ out: z.string().max(60), in: z.string().max(60) }),
  }),
  z.strictObject({ kind: z.literal("photo"), of: textSchema("Say what the photo shows.", 120, 1), optional: z.boolean() }),
  z.strictObject({ kind: z.literal("reading"), label, places, quantity: quantitySchema, optional: z.boolean() }),
  z.strictObject({ kind: z.literal("text"), asks: textSchema("Say what is to be written down.", 200, 1) }),
  z.strictObject({ kind: z.literal("crank"), giveUpAfter: z.number().min(5).max(120), basis }),
  z.strictObject({ kind: z.literal("sheet"), sheet: z.enum(["fuel-flow", "restraint", "compression"]) }),
  z.strictObject({
    kind: z.literal("computed"),
    rule: z.enum(["extinguishers", "loose-ends", "log", "release-record", "release-openings"]),
  }),
]);
