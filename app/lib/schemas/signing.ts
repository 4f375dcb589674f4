/** Forms that sign. The list covered goes back as it was shown, so that a gate that changed meanwhile is not signed unseen. */
import { z } from "zod";
import { idSchema, reasonSchema } from "#app/lib/schemas/act";

export const pinSchema = z.string("Enter your PIN.").min(1, "Enter your PIN.").max(72, "No PIN is as long as this.");
export const coverSchema = z.object({ item: idSchema, revision: z.number().int(), proof: idSchema.nullable() });

export const signGatesSchema = z.object({
  as: z.enum(["builder", "inspector", "lead"]),
  /** One sheet may hold several gates that are ready. */
  gates: z
    .array(z.object({ gate: idSchema, covers: z.array(coverSchema).max(500) }))
    .min(1, "Choose a gate.")
    .max(50),
  pin: pinSchema,
});
export type SignGates = z.output<typeof signGatesSchema>;

export const signReleaseSchema = z.object({
  as: z.enum(["lead", "inspector"]),
  covers: z.object({ items: z.array(coverSchema).max(500), signatures: z.array(idSchema).max(500) }),
  pin: pinSchema,
});
export type SignRelease = z.output<typeof signReleaseSchema>;

export const withdrawSignatureSchema = z.object({ signature: idSchema, reason: reasonSchema });
export type WithdrawSignature = z.output<typeof withdrawSignatureSchema>;
