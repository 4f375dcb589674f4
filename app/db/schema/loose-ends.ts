// Loose ends, and what became of each: restored, seen restored by a second person, accepted for a rung.
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import type { LooseEnd } from "#app/lib/gates/snapshot";
import type { SystemKey } from "#app/lib/template/types";
import { recordColumns } from "./columns";
import { items } from "./items";

export const looseEnds = sqliteTable(
  "loose_ends",
  {
    ...recordColumns(),
    what: text("what").notNull(),
    count: integer("count").notNull(),
    system: text("system").$type<SystemKey>().notNull(),
    why: text("why").notNull(),
    /** The item that asks for it; making and restoring it is no opening then. */
    askedBy: text("asked_by").references(() => items.id, { onDelete: "restrict" }),
    due: text("due", { mode: "json" }).$type<LooseEnd["due"]>().notNull(),
    /** File ids. */
    photos: text("photos", { mode: "json" }).$type<string[]>().notNull().default([]),
  },
  (t) => [uniqueIndex("loose_ends_seq").on(t.installId, t.seq)],
);

export const looseEndEvents = sqliteTable(
  "loose_end_events",
  {
    ...recordColumns(),
    looseEndId: text("loose_end_id")
      .notNull()
      .references(() => looseEnds.id, { onDelete: "restrict" }),
    kind: text("kind", { enum: ["restored", "confirmed", "accepted"] }).notNull(),
    /** Rung key and reason, only on `accepted`. */
    rung: text("rung"),
    reason: text("reason"),
  },
  (t) => [uniqueIndex("loose_end_events_seq").on(t.installId, t.seq), index("loose_end_events_of").on(t.looseEndId)],
);
