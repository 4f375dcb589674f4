// Signatures of gates and of the release: what they mean in words, what they cover, and the text that the signer was shown.
import { integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Cover } from "#app/lib/gates/snapshot";
import { recordColumns } from "./columns";
import { gates } from "./gates";

const signed = () => ({
  meaning: text("meaning").notNull(),
  rulesVersion: text("rules_version").notNull(),
  shownText: text("shown_text").notNull(),
  /** SHA-256 of `shownText`; this goes into the chain. */
  shownHash: text("shown_hash").notNull(),
});

export const signatures = sqliteTable(
  "signatures",
  {
    ...recordColumns(),
    gateId: text("gate_id")
      .notNull()
      .references(() => gates.id, { onDelete: "restrict" }),
    gateRevision: integer("gate_revision").notNull(),
    covers: text("covers", { mode: "json" }).$type<Cover[]>().notNull(),
    ...signed(),
  },
  (t) => [uniqueIndex("signatures_seq").on(t.installId, t.seq)],
);

export const signatureWithdrawals = sqliteTable(
  "signature_withdrawals",
  {
    ...recordColumns(),
    signatureId: text("signature_id")
      .notNull()
      .references(() => signatures.id, { onDelete: "restrict" }),
    reason: text("reason").notNull(),
  },
  (t) => [uniqueIndex("signature_withdrawals_seq").on(t.installId, t.seq), uniqueIndex("signature_withdrawals_one").on(t.signatureId)],
);

export const releaseSignatures = sqliteTable(
  "release_signatures",
  {
    ...recordColumns(),
    covers: text("covers", { mode: "json" }).$type<{ items: Cover[]; signatures: string[] }>().notNull(),
    ...signed(),
  },
  (t) => [uniqueIndex("release_signatures_seq").on(t.installId, t.seq)],
);

export const releaseSignatureWithdrawals = sqliteTable(
  "release_signature_withdrawals",
  {
    ...recordColumns(),
    signatureId: text("signature_id")
      .notNull()
      .references(() => releaseSignatures.id, { onDelete: "restrict" }),
    reason: text("reason").notNull(),
  },
  (t) => [
    uniqueIndex("release_signature_withdrawals_seq").on(t.installId, t.seq),
    uniqueIndex("release_signature_withdrawals_one").on(t.signatureId),
  ],
);
