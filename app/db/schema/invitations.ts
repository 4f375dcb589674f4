// Somebody was asked by mail to join an install. Nobody becomes a member by it: that takes the person's own yes.
// The table holds the SHA-256 of the link's token; a copy of it lets nobody in.
import { sql } from "drizzle-orm";
import { index, integer, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { installId, ROLES, userId } from "./columns";

export const invitations = sqliteTable(
  "invitations",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    /** Lower case, as with people. */
    email: text("email").notNull(),
    role: text("role", { enum: ROLES }).notNull(),
    /** The lead in whose name the role is given; of the newest sending. */
    invitedBy: userId("invited_by"),
    createdAt: integer("created_at").notNull(),
    sentAt: integer("sent_at").notNull(),
    /** How often it was sent: an older link no longer counts. */
    sendings: integer("sendings").notNull().default(1),
    expiresAt: integer("expires_at").notNull(),
    tokenHash: text("token_hash").notNull().unique(),
    outcome: text("outcome", { enum: ["accepted", "withdrawn"] }),
    settledAt: integer("settled_at"),
  },
  (t) => [
    index("invitations_install").on(t.installId, t.createdAt),
    uniqueIndex("invitations_open").on(t.installId, t.email, t.role).where(sql`"outcome" is null`),
  ],
);

export type Invitation = typeof invitations.$inferSelect;
