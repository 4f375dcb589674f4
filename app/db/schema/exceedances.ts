// What a run's log shows outside the limits, or a late record that would have kept the run from being clear, and the answer to it.
import { index, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { recordColumns } from "./columns";
import { runs } from "./runs";

export const exceedances = sqliteTable(
  "exceedances",
  {
    ...recordColumns(),
    runId: text("run_id")
      .notNull()
      .references(() => runs.id, { onDelete: "restrict" }),
    sentence: text("sentence").notNull(),
  },
  (t) => [uniqueIndex("exceedances_seq").on(t.installId, t.seq), index("exceedances_run").on(t.runId)],
);

export const exceedanceAnswers = sqliteTable(
  "exceedance_answers",
  {
    ...recordColumns(),
    exceedanceId: text("exceedance_id")
      .notNull()
      .unique()
      .references(() => exceedances.id, { onDelete: "restrict" }),
    /** The finding it became; null where words answer it. */
    findingId: text("finding_id"),
    words: text("words").notNull(),
  },
  (t) => [uniqueIndex("exceedance_answers_seq").on(t.installId, t.seq)],
);
