// A system was opened up or disturbed: every proof of it lapses until it is done again. Closed in the same act where it is over.
import { openingClosings, openings } from "#app/db/schema/openings";
import { mayOpen } from "#app/lib/gates/happening-verdicts";
import type { Role } from "#app/lib/gates/snapshot";
import type { OpenSystem } from "#app/lib/schemas/happenings";
import { done, invalid, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

export function openSystem(act: Act, input: OpenSystem): Promise<Outcome<{ opening: string }>> {
  return perform({ ...act, kind: "open-system", input }, async (d) => {
    const refusal = refusalOf(mayOpen(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    if (input.happened && input.happened > d.now) return invalid("That time has not come yet. Enter when it happened, or leave it empty.");
    return done({ opening: await writeOpening(d, roleOf(d.member, "builder", "inspector"), input) });
  });
}

/** What making or restoring a loose end opened. `undisturbed`: its maker says that nothing was. */
interface OfLooseEnd {
  looseEnd: string;
  undisturbed: boolean;
}

/** Writes an opening as part of an act; returns its id. It counts now: a tablet's or a typed time never makes it older. */
export async function writeOpening(d: Doing, as: Role, input: OpenSystem, of?: OfLooseEnd): Promise<string> {
  const row = { systems: [...new Set(input.systems)], reason: input.reason, opened: d.now };
  const happened = input.happened ?? undefined;
  const data = { ...row, happened, looseEnd: of?.looseEnd, undisturbed: of?.undisturbed ? (true as const) : undefined };
  const base = await d.record(as, { type: "opened", data });
  await d.tx.insert(openings).values({ ...base, ...row, happened, looseEnd: of?.looseEnd, claimed: of?.undisturbed });
  if (input.closed) await writeClosing(d, as, base.id, "");
  return base.id;
}

export async function writeClosing(d: Doing, as: Role, opening: string, note: string): Promise<void> {
  const base = await d.record(as, { type: "opening-closed", data: { opening, closed: d.now, note } });
  await d.tx.insert(openingClosings).values({ ...base, openingId: opening, closed: d.now, note });
}
