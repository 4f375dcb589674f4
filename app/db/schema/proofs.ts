// Proofs, and what others say about one: seen with second eyes, a reason accepted, still true.
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Evidence } from "#app/lib/gates/snapshot";
import { recordColumns, userId } from "./columns";
import { items } from "./items";

export const proofs = sqliteTable(
  "proofs",
  {
    ...recordColumns(),
    itemId: text("item_id")
      .notNull()
      .references(() => items.id, { onDelete: "restrict" }),
    revision: integer("revision").notNull(),
    did: userId("did"),
    counts: integer("counts").notNull(),
    late: integer("late", { mode: "boolean" }).notNull(),
    state: text("state", { enum: ["done", "failed", "na"] }).notNull(),
    evidence: text("evidence", { mode: "json" }).$type<(Evidence | null)[]>().notNull(),
    /** Ids of the measuring tools used. */
    tools: text("tools", { mode: "json" }).$type<string[]>().notNull(),
    note: text("note").notNull(),
  },
  (t) => [uniqueIndex("proofs_seq").on(t.installId, t.seq), index("proofs_item").on(t.itemId)],
);

const proofId = () =>
  text("proof_id")
    .notNull()
    .references(() => proofs.id, { onDelete: "restrict" });

export const confirmations = sqliteTable("confirmations", { ...recordColumns(), proofId: proofId() }, (t) => [
  uniqueIndex("confirmations_seq").on(t.installId, t.seq),
]);

export const acceptances = sqliteTable("acceptances", { ...recordColumns(), proofId: proofId(), reason: text("reason").notNull() }, (t) => [
  uniqueIndex("acceptances_seq").on(t.installId, t.seq),
]);

export const keeps = sqliteTable("keeps", { ...recordColumns(), proofId: proofId(), reason: text("reason").notNull() }, (t) => [
  uniqueIndex("keeps_seq").on(t.installId, t.seq),
]);

export const proofWithdrawals = sqliteTable(
  "proof_withdrawals",
  { ...recordColumns(), proofId: proofId(), reason: text("reason").notNull() },
  (t) => [uniqueIndex("proof_withdrawals_seq").on(t.installId, t.seq), uniqueIndex("proof_withdrawals_proof").on(t.proofId)],
);
