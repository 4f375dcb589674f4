// HOLD: any member, at any time before the run has ended. It stays until a lead calls GO again.
import { mayHold } from "#app/lib/gates/run-verdicts";
import type { RunReason } from "#app/lib/schemas/run";
import { done, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";
import { writeHold } from "#app/lib/services/write-hold.server";

export function callHold(act: Act, input: RunReason): Promise<Outcome<{ hold: string }>> {
  return perform({ ...act, kind: "call-hold", input }, async (d) => {
    const { run, reason } = input;
    const refusal = refusalOf(mayHold(d.e, { run, member: d.member.id }));
    if (refusal) return refusal;
    const judged = d.e.result.runs.find((r) => r.id === run);
    if (!judged) return notFound("That run");
    const who = { by: d.member.id, as: roleOf(d.member, "lead", "inspector", "builder", "crew") };
    const hold = await writeHold({ tx: d.tx, writer: d.writer, e: d.e, run: judged, who, reason, auto: false });
    return done({ hold });
  });
}
