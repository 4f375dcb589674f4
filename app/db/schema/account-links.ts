// Links that let somebody do one thing with an account, once: reset the password, confirm a new mail address, open the first account.
// The id is the SHA-256 of the link's token.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { users } from "./users";

export const accountLinks = sqliteTable(
  "account_links",
  {
    id: text("id").primaryKey(),
    purpose: text("purpose", { enum: ["reset", "new-address", "start"] }).notNull(),
    /** None for the first account, which is nobody's yet. */
    userId: text("user_id").references(() => users.id, { onDelete: "cascade" }),
    /** The new mail address. */
    address: text("address"),
    createdAt: integer("created_at").notNull(),
    expiresAt: integer("expires_at").notNull(),
  },
  (t) => [index("account_links_user").on(t.userId, t.purpose)],
);

export type AccountLink = typeof accountLinks.$inferSelect;
