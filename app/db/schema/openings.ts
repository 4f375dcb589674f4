// Openings of systems, their closing, and an inspector's mark that one was recorded by mistake.
import { integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { SystemKey } from "#app/lib/template/types";
import { recordColumns } from "./columns";

export const openings = sqliteTable(
  "openings",
  {
    ...recordColumns(),
    systems: text("systems", { mode: "json" }).$type<SystemKey[]>().notNull(),
    reason: text("reason").notNull(),
    /** The instant that counts. */
    opened: integer("opened").notNull(),
  },
  (t) => [uniqueIndex("openings_seq").on(t.installId, t.seq)],
);

const openingId = () =>
  text("opening_id")
    .notNull()
    .unique()
    .references(() => openings.id, { onDelete: "restrict" });

export const openingClosings = sqliteTable(
  "opening_closings",
  { ...recordColumns(), openingId: openingId(), closed: integer("closed").notNull(), note: text("note").notNull() },
  (t) => [uniqueIndex("opening_closings_seq").on(t.installId, t.seq)],
);

export const openingMistakes = sqliteTable(
  "opening_mistakes",
  { ...recordColumns(), openingId: openingId(), reason: text("reason").notNull() },
  (t) => [uniqueIndex("opening_mistakes_seq").on(t.installId, t.seq)],
);
