// What was already done at whose command, so that a form sent twice is done once and answered alike.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { userId } from "./columns";

export const commands = sqliteTable(
  "commands",
  {
    id: text("id").primaryKey(),
    userId: userId("user_id"),
    installId: text("install_id").notNull(),
    kind: text("kind").notNull(),
    /** SHA-256 of what was sent: the same id with other content is no replay. */
    fingerprint: text("fingerprint").notNull(),
    outcome: text("outcome", { mode: "json" }).$type<unknown>().notNull(),
    createdAt: integer("created_at").notNull(),
  },
  (t) => [index("commands_created").on(t.createdAt)],
);
