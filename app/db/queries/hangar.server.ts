// The installs that a person works on now, with their roles there. Where each stands is the evaluator's answer, not a column.
import { and, asc, eq, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { groupBy } from "#app/db/queries/group-by";
import { installs } from "#app/db/schema/installs";
import { memberRoles } from "#app/db/schema/members";
import type { Role } from "#app/lib/gates/snapshot";

export interface HangarInstall {
  id: string;
  registration: string;
  name: string;
  timeZone: string;
  roles: Role[];
}

export async function hangarOf(reader: Reader, userId: string): Promise<HangarInstall[]> {
  const rows = await reader
    .select({
      id: installs.id,
      registration: installs.registration,
      name: installs.name,
      timeZone: installs.timeZone,
      role: memberRoles.role,
    })
    .from(memberRoles)
    .innerJoin(installs, eq(installs.id, memberRoles.installId))
    .where(and(eq(memberRoles.userId, userId), isNull(memberRoles.to)))
    .orderBy(asc(installs.registration), asc(installs.id), asc(memberRoles.from));
  return [...groupBy(rows, (r) => r.id).values()].flatMap((group) => {
    const [first] = group;
    if (!first) return [];
    const { role: _, ...install } = first;
    return [{ ...install, roles: group.map((r) => r.role) }];
  });
}
