// One process at a time: whoever takes the lease does the work until it runs out or is given back. Renewed by taking it again.
import { and, eq, lte, or } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { leases } from "#app/db/schema/leases";
import { now } from "#app/lib/clock";

/** Takes or renews the lease for `ms`. False while somebody else holds it. */
export function takeLease(name: string, holder: string, ms: number): Promise<boolean> {
  return write(async (tx) => {
    const at = now();
    const until = at + ms;
    await tx.insert(leases).values({ name, holder, until: 0 }).onConflictDoNothing();
    const taken = await tx
      .update(leases)
      .set({ holder, until })
      .where(and(eq(leases.name, name), or(eq(leases.holder, holder), lte(leases.until, at))))
      .returning({ name: leases.name });
    return taken.length > 0;
  });
}

/** Gives the lease back, so that another process need not wait for it to run out. */
export async function giveLeaseBack(name: string, holder: string): Promise<void> {
  await write((tx) =>
    tx
      .update(leases)
      .set({ until: 0 })
      .where(and(eq(leases.name, name), eq(leases.holder, holder))),
  );
}
