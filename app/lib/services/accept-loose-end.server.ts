// An inspector accepts that a loose end is still there for the runs of one rung.
import { looseEndEvents } from "#app/db/schema/loose-ends";
import { mayAcceptLooseEnd } from "#app/lib/gates/happening-verdicts";
import type { AcceptLooseEnd } from "#app/lib/schemas/happenings";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function acceptLooseEnd(act: Act, input: AcceptLooseEnd): Promise<Outcome<{ looseEnd: string }>> {
  return perform({ ...act, kind: "accept-loose-end", input }, async (d) => {
    const refusal = refusalOf(mayAcceptLooseEnd(d.e, { ...input, member: d.member.id }));
    if (refusal) return refusal;
    const { looseEnd, rung, reason } = input;
    const base = await d.record("inspector", { type: "loose-end-accepted", data: { looseEnd, rung, reason } });
    await d.tx.insert(looseEndEvents).values({ ...base, looseEndId: looseEnd, kind: "accepted", rung, reason });
    return done({ looseEnd });
  });
}
