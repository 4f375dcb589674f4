// Who somebody is on an install, asked in SQL: no row means that for this person the install does not exist.
import { and, asc, eq, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { memberRoles } from "#app/db/schema/members";
import { users } from "#app/db/schema/users";
import type { Role } from "#app/lib/gates/snapshot";

export interface CurrentMember {
  id: string;
  name: string;
  /** Roles held now; never empty. */
  roles: Role[];
}

/** The person's roles on the install now, or null: not a member, no longer one, or no such install. Answer 404 then. */
export async function memberOf(reader: Reader, installId: string, userId: string): Promise<CurrentMember | null> {
  const rows = await reader
    .select({ name: users.name, role: memberRoles.role })
    .from(memberRoles)
    .innerJoin(users, eq(users.id, memberRoles.userId))
    .where(and(eq(memberRoles.installId, installId), eq(memberRoles.userId, userId), isNull(memberRoles.to), isNull(users.disabledAt)))
    .orderBy(asc(memberRoles.from));
  const [first] = rows;
  return first ? { id: userId, name: first.name, roles: rows.map((r) => r.role) } : null;
}
