// Columns that every record shares. A record is one thing that happened, written once: who, in which role, when, and its place
// in the install's history. What changes its standing later is another record that points back to it.
import { integer, text } from "drizzle-orm/sqlite-core";
import { installs } from "./installs";
import { users } from "./users";

export const ROLES = ["lead", "builder", "inspector", "crew"] as const;

export const installId = () =>
  text("install_id")
    .notNull()
    .references(() => installs.id, { onDelete: "restrict" });

export const userId = (name: string) =>
  text(name)
    .notNull()
    .references(() => users.id, { onDelete: "restrict" });

/** `seq` is the number of the record's event in the install's chain; `id` is also the id of that event. */
export const recordColumns = () => ({
  id: text("id").primaryKey(),
  installId: installId(),
  seq: integer("seq").notNull(),
  recorded: integer("recorded").notNull(),
  by: userId("by"),
  as: text("as", { enum: ROLES }).notNull(),
});
