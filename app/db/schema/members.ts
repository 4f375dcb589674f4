// Who works on an install, and the periods in which they held a role. A member is named by the person's user id.
import { sql } from "drizzle-orm";
import { index, integer, primaryKey, sqliteTable, text, uniqueIndex } from "drizzle-orm/sqlite-core";
import { installId, ROLES, userId } from "./columns";

export const members = sqliteTable(
  "members",
  { installId: installId(), userId: userId("user_id"), addedAt: integer("added_at").notNull(), addedBy: userId("added_by") },
  (t) => [primaryKey({ columns: [t.installId, t.userId] }), index("members_user").on(t.userId)],
);

/** A period is closed once, by setting `to`; nothing else of a row ever changes (a trigger sees to it). */
export const memberRoles = sqliteTable(
  "member_roles",
  {
    id: text("id").primaryKey(),
    installId: installId(),
    userId: userId("user_id"),
    role: text("role", { enum: ROLES }).notNull(),
    from: integer("from").notNull(),
    to: integer("to"),
    grantedBy: userId("granted_by"),
  },
  (t) => [
    index("member_roles_install").on(t.installId, t.userId),
    index("member_roles_user").on(t.userId),
    uniqueIndex("member_roles_open").on(t.installId, t.userId, t.role).where(sql`"to" is null`),
  ],
);
