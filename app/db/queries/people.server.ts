// Everybody with an account, for administrators: nothing of what they do on an install.
import { asc, max, sql } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { sessions } from "#app/db/schema/sessions";
import { users } from "#app/db/schema/users";

export interface PersonRow {
  id: string;
  name: string;
  email: string;
  isAdmin: boolean;
  hasPin: boolean;
  createdAt: number;
  disabledAt: number | null;
  /** Of the sessions that are still there. */
  lastSeenAt: number | null;
}

export async function everybody(reader: Reader, most = 1000): Promise<PersonRow[]> {
  const seen = await reader
    .select({ userId: sessions.userId, at: max(sessions.lastSeenAt) })
    .from(sessions)
    .groupBy(sessions.userId);
  const lastSeen = new Map(seen.map((s) => [s.userId, s.at]));
  const { id, name, email, isAdmin, createdAt, disabledAt } = users;
  const rows = await reader
    .select({ id, name, email, isAdmin, hasPin: sql<number>`${users.pinHash} is not null`, createdAt, disabledAt })
    .from(users)
    .orderBy(asc(users.name), asc(users.email))
    .limit(most);
  return rows.map((row) => ({ ...row, hasPin: Boolean(row.hasPin), lastSeenAt: lastSeen.get(row.id) ?? null }));
}
