// Ratings and limits of an install. The row holds what is so now; the history is in the events.
import { integer, primaryKey, real, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { ValueDef, ValueKey } from "#app/lib/template/types";
import { installId } from "./columns";

export const values = sqliteTable(
  "values",
  {
    installId: installId(),
    key: text("key").$type<ValueKey>().notNull(),
    position: integer("position").notNull(),
    def: text("def", { mode: "json" }).$type<ValueDef>().notNull(),
    /** SI; null = not known. */
    value: real("value"),
    /** Where it was read; null = not confirmed. */
    source: text("source"),
    /** The answers about the install ask for it no more. */
    hidden: integer("hidden", { mode: "boolean" }).notNull().default(false),
  },
  (t) => [primaryKey({ columns: [t.installId, t.key] })],
);
