// The system is closed up again. What it was proved by before is done anew.
import { mayCloseOpening } from "#app/lib/gates/happening-verdicts";
import type { CloseOpening } from "#app/lib/schemas/happenings";
import { writeClosing } from "#app/lib/services/open-system.server";
import { done, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf, stale } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function closeOpening(act: Act, input: CloseOpening): Promise<Outcome<{ opening: string }>> {
  return perform({ ...act, kind: "close-opening", input }, async (d) => {
    const opening = d.e.snapshot.openings.find((o) => o.id === input.opening);
    if (!opening) return notFound("That opening");
    const refusal = refusalOf(mayCloseOpening(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    if (opening.closed !== null) return stale(`It was closed on ${d.e.facts.when(opening.closed)}. Nothing is left to close.`);
    await writeClosing(d, roleOf(d.member, "builder", "inspector"), opening.id, input.note);
    return done({ opening: opening.id });
  });
}
