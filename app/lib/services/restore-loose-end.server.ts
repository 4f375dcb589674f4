// A loose end is put back. It counts as restored once a second person has seen it.
// Where no item asked for it, restoring it is an opening of its system; one that goes once a second person confirms that nothing was disturbed.
import { eq } from "drizzle-orm";
import { looseEndEvents, looseEnds } from "#app/db/schema/loose-ends";
import { mayConfirmRestored, mayRestore } from "#app/lib/gates/happening-verdicts";
import type { LooseEndRef, RestoreLooseEnd } from "#app/lib/schemas/happenings";
import { writeOpening } from "#app/lib/services/open-system.server";
import { done, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function restoreLooseEnd(act: Act, input: RestoreLooseEnd): Promise<Outcome<{ looseEnd: string }>> {
  return perform({ ...act, kind: "restore-loose-end", input }, async (d) => {
    const { looseEnd, undisturbed = false } = input;
    const refusal = refusalOf(mayRestore(d.e, { looseEnd, member: d.member.id }));
    if (refusal) return refusal;
    const [row] = await d.tx
      .select({ what: looseEnds.what, system: looseEnds.system, askedBy: looseEnds.askedBy })
      .from(looseEnds)
      .where(eq(looseEnds.id, looseEnd));
    if (!row) return notFound("That loose end");
    const as = roleOf(d.member, "builder", "inspector");
    const base = await d.record(as, { type: "loose-end-restored", data: { looseEnd } });
    await d.tx.insert(looseEndEvents).values({ ...base, looseEndId: looseEnd, kind: "restored" });
    if (row.askedBy === null) {
      const opening = { systems: [row.system], reason: `Loose end restored: ${row.what}`, closed: true };
      await writeOpening(d, as, opening, { looseEnd, undisturbed });
    }
    return done({ looseEnd });
  });
}

export function confirmRestored(act: Act, input: LooseEndRef): Promise<Outcome<{ looseEnd: string }>> {
  return perform({ ...act, kind: "confirm-restored", input }, async (d) => {
    const { looseEnd } = input;
    const refusal = refusalOf(mayConfirmRestored(d.e, { looseEnd, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "inspector", "builder", "lead"), { type: "loose-end-confirmed", data: { looseEnd } });
    await d.tx.insert(looseEndEvents).values({ ...base, looseEndId: looseEnd, kind: "confirmed" });
    return done({ looseEnd });
  });
}
