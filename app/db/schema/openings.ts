// Openings of systems, their closing, a second person's word that one disturbed nothing, an inspector's mark that one was a mistake.
import { integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { SystemKey } from "#app/lib/template/types";
import { recordColumns } from "./columns";
import { looseEnds } from "./loose-ends";

export const openings = sqliteTable(
  "openings",
  {
    ...recordColumns(),
    systems: text("systems", { mode: "json" }).$type<SystemKey[]>().notNull(),
    reason: text("reason").notNull(),
    /** The instant that counts. */
    opened: integer("opened").notNull(),
    /** When it happened, as a person typed it later; shown, never counted. */
    happened: integer("happened"),
    /** The loose end whose making or restoring this is. */
    looseEnd: text("loose_end").references(() => looseEnds.id, { onDelete: "restrict" }),
    /** Whoever recorded it says that nothing was disturbed; nothing comes of that until a second person says so too. */
    claimed: integer("claimed", { mode: "boolean" }).notNull().default(false),
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

/** A second person looked and confirms that nothing was disturbed. */
export const openingUndisturbed = sqliteTable("opening_undisturbed", { ...recordColumns(), openingId: openingId() }, (t) => [
  uniqueIndex("opening_undisturbed_seq").on(t.installId, t.seq),
]);
