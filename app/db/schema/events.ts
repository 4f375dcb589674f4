// The record: every act on an install as one event, chained by SHA-256. Append-only, by trigger as well as by code.
import { index, integer, primaryKey, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { EventType } from "#app/lib/record/events";
import { installId, userId } from "./columns";

export const events = sqliteTable(
  "events",
  {
    installId: installId(),
    /** 1, 2, 3 ... without a gap. */
    seq: integer("seq").notNull(),
    recorded: integer("recorded").notNull(),
    by: userId("by"),
    type: text("type").$type<EventType>().notNull(),
    /** The event in canonical form (RFC 8785): the very bytes that were hashed, with `prev`. */
    body: text("body").notNull(),
    prev: text("prev").notNull(),
    hash: text("hash").notNull(),
  },
  (t) => [primaryKey({ columns: [t.installId, t.seq] }), index("events_type").on(t.installId, t.type)],
);
