// An inspector marks an opening as recorded by mistake. It matters for the release alone: lapsed proofs come back by a keep.
import { openingMistakes } from "#app/db/schema/openings";
import { mayMarkMistake } from "#app/lib/gates/happening-verdicts";
import type { MarkMistake } from "#app/lib/schemas/happenings";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function markMistake(act: Act, input: MarkMistake): Promise<Outcome<{ opening: string }>> {
  return perform({ ...act, kind: "mark-mistake", input }, async (d) => {
    const { opening, reason } = input;
    const refusal = refusalOf(mayMarkMistake(d.e, { opening, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record("inspector", { type: "opening-mistaken", data: { opening, reason } });
    await d.tx.insert(openingMistakes).values({ ...base, openingId: opening, reason });
    return done({ opening });
  });
}
