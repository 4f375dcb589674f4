// Signed-in browsers. The id is the SHA-256 of the cookie's token: a copy of this table signs nobody in.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import { users } from "./users";

export const sessions = sqliteTable(
  "sessions",
  {
    id: text("id").primaryKey(),
    userId: text("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    createdAt: integer("created_at").notNull(),
    lastSeenAt: integer("last_seen_at").notNull(),
    expiresAt: integer("expires_at").notNull(),
    /** Browser and system in words ("Chrome on Android"), so that a person knows their sessions apart. */
    userAgent: text("user_agent").notNull().default(""),
  },
  (t) => [index("sessions_user").on(t.userId)],
);

export type Session = typeof sessions.$inferSelect;
