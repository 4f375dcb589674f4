/** Forms about proofs: recording one, and what others say about one. */
import { z } from "zod";
import { idSchema, instantSchema, noteSchema, reasonSchema } from "#app/lib/schemas/act";

export const recordProofSchema = z.object({
  item: idSchema,
  /** Revision of the item that was on the screen. */
  revision: z.number().int(),
  /** The proof that was on the screen: null = none. Left out: not asked whether somebody was faster. */
  seen: idSchema.nullable().optional(),
  as: z.enum(["builder", "inspector", "lead", "crew"]),
  state: z.enum(["done", "failed", "na"]),
  /** One entry per part of the item; checked against the item by `checkEvidence`. */
  evidence: z.array(z.unknown()).max(20),
  /** Ids of tools from the crib. */
  tools: z.array(idSchema).max(20).default([]),
  note: noteSchema,
  /** Who did it, where somebody else writes it down. */
  did: idSchema.nullable().default(null),
  /** A time typed afterwards (late entry), ms since 1970 UTC; null = now. */
  at: instantSchema.nullable().default(null),
  /** The maker was told that the gate's signatures will lapse. */
  told: z.boolean().default(false),
});
export type RecordProof = z.output<typeof recordProofSchema>;

export const withdrawProofSchema = z.object({ proof: idSchema, reason: reasonSchema });
export const confirmProofSchema = z.object({ proof: idSchema, as: z.enum(["builder", "inspector", "lead"]) });
export const acceptNotApplicableSchema = z.object({ proof: idSchema, reason: reasonSchema });
export const keepProofSchema = z.object({ proof: idSchema, reason: reasonSchema });
export type WithdrawProof = z.output<typeof withdrawProofSchema>;
export type ConfirmProof = z.output<typeof confirmProofSchema>;
export type AcceptNotApplicable = z.output<typeof acceptNotApplicableSchema>;
export type KeepProof = z.output<typeof keepProofSchema>;
