// Edits of the board that wait for an inspector, and what became of them. Both are records: written once. An edit that counts at once
// has no row here; its event says all of it.
import { sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { Edit } from "#app/lib/gates/edits";
import { recordColumns } from "./columns";

export const edits = sqliteTable(
  "edits",
  {
    ...recordColumns(),
    edit: text("edit", { mode: "json" }).$type<Edit>().notNull(),
    /** What it is about, and what it changes, in words of the day on which it was made. */
    subject: text("subject").notNull(),
    words: text("words").notNull(),
    reason: text("reason").notNull(),
  },
  (t) => [uniqueIndex("edits_seq").on(t.installId, t.seq)],
);

export const editAnswers = sqliteTable(
  "edit_answers",
  {
    ...recordColumns(),
    editId: text("edit_id")
      .notNull()
      .unique()
      .references(() => edits.id, { onDelete: "restrict" }),
    answer: text("answer", { enum: ["accepted", "accepted as words only", "rejected", "taken back"] }).notNull(),
    reason: text("reason").notNull(),
  },
  (t) => [uniqueIndex("edit_answers_seq").on(t.installId, t.seq)],
);
