// What was last kept of each calculator on an install's bench. Not part of the record: no event, no history, the last writer counts.
import { integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { BenchKey, TypedForm } from "#app/lib/bench/bench-def";
import { installId, userId } from "./columns";

export const benchInputs = sqliteTable(
  "bench_inputs",
  {
    installId: installId(),
    sheet: text("sheet").$type<BenchKey>().notNull(),
    inputs: text("inputs", { mode: "json" }).$type<TypedForm>().notNull(),
    by: userId("by"),
    recorded: integer("recorded").notNull(),
  },
  (t) => [primaryKey({ columns: [t.installId, t.sheet] })],
);
