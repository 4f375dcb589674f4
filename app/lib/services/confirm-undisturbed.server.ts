// A second person looked: nothing was disturbed when a loose end was made or put back. Its opening counts no more.
import { openingUndisturbed } from "#app/db/schema/openings";
import { mayConfirmUndisturbed } from "#app/lib/gates/happening-verdicts";
import type { OpeningRef } from "#app/lib/schemas/happenings";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function confirmUndisturbed(act: Act, input: OpeningRef): Promise<Outcome<{ opening: string }>> {
  return perform({ ...act, kind: "confirm-undisturbed", input }, async (d) => {
    const { opening } = input;
    const refusal = refusalOf(mayConfirmUndisturbed(d.e, { opening, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "inspector", "builder", "lead"), { type: "opening-undisturbed", data: { opening } });
    await d.tx.insert(openingUndisturbed).values({ ...base, openingId: opening });
    return done({ opening });
  });
}
