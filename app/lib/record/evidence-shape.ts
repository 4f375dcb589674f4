/** The shapes of evidence, strict: what the record can hold, and what forms, tablets and scripts may send. All numbers are SI. */
import { z } from "zod";
import type { Evidence } from "#app/lib/gates/snapshot";

const number = z.number({ error: "a number is missing" });
const numbers = z.array(number).min(1).max(200);
const words = (most: number) => z.string().trim().min(1, "something must be written").max(most);
const placeCount = z.number().int().min(0).max(10_000).nullable();

export const evidenceSchema = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("tick") }),
  z.strictObject({ kind: z.literal("measure"), values: numbers }),
  z.strictObject({
    kind: z.literal("torque"),
    values: numbers,
    count: z.number().int().min(1).max(1000),
    adapter: z.number().nullable(),
    wrenchLength: z.number().positive().nullable(),
  }),
  z.strictObject({
    kind: z.literal("tally"),
    places: z
      .array(z.strictObject({ place: words(80), out: placeCount, in: placeCount }))
      .min(1)
      .max(200),
  }),
  z.strictObject({ kind: z.literal("photo"), files: z.array(z.string().min(1).max(64)).max(20), stored: z.boolean() }),
  z.strictObject({ kind: z.literal("reading"), values: numbers }),
  z.strictObject({ kind: z.literal("text"), text: words(4000) }),
  z.strictObject({
    kind: z.literal("crank"),
    bursts: z
      .array(z.strictObject({ at: z.number().int(), seconds: z.number().min(0), pressureAfter: z.number().min(0).nullable() }))
      .min(1)
      .max(100),
  }),
  z.strictObject({
    kind: z.literal("sheet"),
    sheet: z.enum(["fuel-flow", "restraint", "compression"]),
    version: z.string().max(40),
    inputs: z.record(z.string(), z.json()),
    took: z.record(z.string(), z.number()),
  }),
]);

export const evidenceListSchema: z.ZodType<(Evidence | null)[]> = z.array(evidenceSchema.nullable()).max(20);
