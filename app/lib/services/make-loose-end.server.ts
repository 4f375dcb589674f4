// Something is removed, capped or left off for now. Where no item asked for it, making it is an opening of its system too; where its
// maker says that nothing was disturbed, that opening goes once a second person has confirmed it.

import { looseEnds } from "#app/db/schema/loose-ends";
import { itemOf } from "#app/lib/gates/facts";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import { quoted } from "#app/lib/gates/steps";
import type { MakeLooseEnd } from "#app/lib/schemas/happenings";
import { writeOpening } from "#app/lib/services/open-system.server";
import { done, invalid, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { photosMissing } from "#app/lib/services/own-photos.server";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function makeLooseEnd(act: Act, input: MakeLooseEnd): Promise<Outcome<{ looseEnd: string }>> {
  return perform({ ...act, kind: "make-loose-end", input }, async (d) => {
    const refusal = refusalOf(mayRaise(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { what, count, system, why, due, askedBy = null, undisturbed = false, photos = [] } = input;
    if (due.kind === "gate" ? !d.e.facts.gates.has(due.gate) : !d.e.facts.rungs.some((r) => r.key === due.rung))
      return notFound("The gate or rung it is due before");
    const asking = askedBy === null ? null : itemOf(d.e.facts, askedBy);
    if (asking === undefined) return notFound("That item");
    if (asking && asking.offersLooseEnd?.system !== system)
      return invalid(
        `${asking.key} ${quoted(asking)}: this item has no loose end of that kind. Make it on the Loose ends page, without the item.`,
      );
    const missing = await photosMissing(d, photos, "write the loose end down");
    if (missing) return missing;
    const as = roleOf(d.member, "builder", "inspector");
    const row = { what, count, system, why, due, askedBy };
    const base = await d.record(as, { type: "loose-end-made", data: { ...row, photos: photos.length ? photos : undefined } });
    await d.tx.insert(looseEnds).values({ ...base, ...row, photos });
    if (!asking) {
      const opening = { systems: [system], reason: `Loose end made: ${what}`, closed: true };
      await writeOpening(d, as, opening, { looseEnd: base.id, undisturbed });
    }
    return done({ looseEnd: base.id });
  });
}
