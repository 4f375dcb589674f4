// Wrong tries in a row, by what they were tried on: a sign-in account, a network address, a person's PIN. And mails that were asked
// for, by who asked and by whose mailbox they go to.
// The key is a keyed hash, so that the table holds neither mail addresses of strangers nor network addresses.
import { integer, sqliteTable, text } from "drizzle-orm/sqlite-core";

export const attempts = sqliteTable("attempts", {
  key: text("key").primaryKey(),
  kind: text("kind", { enum: ["account", "address", "pin", "asks", "mailbox"] }).notNull(),
  failures: integer("failures").notNull(),
  lastAt: integer("last_at").notNull(),
  /** Nothing is tried before this instant. */
  blockedUntil: integer("blocked_until").notNull(),
});
