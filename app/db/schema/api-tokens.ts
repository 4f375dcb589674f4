// Keys with which a person's own programs ask the API. Shown once; the table holds the SHA-256.
import { index, integer, sqliteTable, text } from "drizzle-orm/sqlite-core";
import type { Scope } from "../../lib/schemas/account";
import { users } from "./users";

export const apiTokens = sqliteTable(
  "api_tokens",
  {
    id: text("id").primaryKey(),
    userId: text("user_id")
      .notNull()
      .references(() => users.id, { onDelete: "cascade" }),
    /** What it is for, in its owner's words. */
    name: text("name").notNull(),
    tokenHash: text("token_hash").notNull().unique(),
    scopes: text("scopes", { mode: "json" }).$type<Scope[]>().notNull(),
    createdAt: integer("created_at").notNull(),
    expiresAt: integer("expires_at").notNull(),
    lastUsedAt: integer("last_used_at"),
  },
  (t) => [index("api_tokens_user").on(t.userId, t.createdAt)],
);

export type ApiToken = typeof apiTokens.$inferSelect;
