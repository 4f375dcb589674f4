/** Forms of the crib. Dates are days at the install ("2026-12-31"); a check is in date to the end of its last day. */
import { z } from "zod";
import { freeTextSchema, idSchema, noteSchema, textSchema } from "#app/lib/schemas/act";

export const dateSchema = z.string("Enter a date.").regex(/^\d{4}-\d{2}-\d{2}$/, "Enter a date.");
const nameSchema = textSchema("Give it a name.", 120, 2);

export const addToolSchema = z.object({ name: nameSchema, serial: freeTextSchema(80) });
export const recordToolCheckSchema = z.object({
  tool: idSchema,
  /** The day of the check; null = now. */
  on: dateSchema.nullable().default(null),
  good: z.boolean(),
  /** Last day in date; only on a good check. */
  due: dateSchema.nullable().default(null),
  /** Only on a bad check: first day of doubt, where that is further back than its last good check. */
  since: dateSchema.nullable().default(null),
  /** Number of the certificate, and its picture. */
  certificate: freeTextSchema(80),
  photo: idSchema.nullable().default(null),
  note: noteSchema,
});
export const addExtinguisherSchema = z.object({
  name: nameSchema,
  agent: z.enum(["co2", "clean", "foam", "powder", "water"], "Choose the agent."),
  classB: z.boolean(),
  /** kg */
  charge: z.number("Enter the charge.").positive().max(200),
  /** As its label says: "10-B:C", "113B". */
  rating: freeTextSchema(40),
  /** Where it stands or hangs. */
  position: freeTextSchema(120),
});
export const recordLookSchema = z.object({
  extinguisher: idSchema,
  kind: z.enum(["look", "service", "withdrawn"]),
  due: dateSchema.nullable().default(null),
  note: noteSchema,
});
export type AddTool = z.output<typeof addToolSchema>;
export type RecordToolCheck = z.input<typeof recordToolCheckSchema>;
export type AddExtinguisher = z.input<typeof addExtinguisherSchema>;
export type RecordLook = z.output<typeof recordLookSchema>;
