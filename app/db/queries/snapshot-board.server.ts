// The snapshot's board: people, values, gates and items as they are defined now. One query a table.
import { and, asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { gates } from "#app/db/schema/gates";
import { items } from "#app/db/schema/items";
import { memberRoles, members } from "#app/db/schema/members";
import { users } from "#app/db/schema/users";
import { values } from "#app/db/schema/values";
import type { Snapshot } from "#app/lib/gates/snapshot";

export async function loadBoard(reader: Reader, installId: string): Promise<Pick<Snapshot, "members" | "values" | "gates" | "items">> {
  const [people, periods, valueRows, gateRows, itemRows] = await Promise.all([
    reader
      .select({ id: members.userId, name: users.name })
      .from(members)
      .innerJoin(users, eq(users.id, members.userId))
      .where(eq(members.installId, installId))
      .orderBy(asc(members.addedAt), asc(members.userId)),
    reader.select().from(memberRoles).where(eq(memberRoles.installId, installId)).orderBy(asc(memberRoles.from)),
    reader
      .select()
      .from(values)
      .where(and(eq(values.installId, installId), eq(values.hidden, false)))
      .orderBy(asc(values.position)),
    reader.select().from(gates).where(eq(gates.installId, installId)).orderBy(asc(gates.position), asc(gates.key)),
    reader.select().from(items).where(eq(items.installId, installId)).orderBy(asc(items.gateId), asc(items.position)),
  ]);
  return {
    members: people.map((p) => ({
      ...p,
      roles: periods.filter((r) => r.userId === p.id).map(({ role, from, to }) => ({ role, from, to })),
    })),
    values: valueRows.map((v) => ({ ...v.def, value: v.value, source: v.source })),
    gates: gateRows.map(({ installId: _, position: __, ...gate }) => gate),
    items: itemRows.map(({ installId: _, position: __, gateId, source, ...item }) => ({
      ...item,
      gate: gateId,
      ...(source === null ? {} : { source }),
    })),
  };
}
