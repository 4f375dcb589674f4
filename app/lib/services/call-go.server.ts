// GO: a lead calls it with PIN on a clear run. It stores what it stood on, says when it ends, and the crew is told.
import { runActs } from "#app/db/schema/runs";
import { goEnds, mayCallGo } from "#app/lib/gates/run-verdicts";
import type { CallGo } from "#app/lib/schemas/run";
import { pinRefusal } from "#app/lib/services/check-pin.server";
import { notifyCrew } from "#app/lib/services/notify-crew.server";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, evaluateIn, perform } from "#app/lib/services/perform.server";

export async function callGo(act: Act, { pin, ...input }: CallGo): Promise<Outcome<{ go: string; ends: number }>> {
  const wrongPin = await pinRefusal(act, pin);
  if (wrongPin) return wrongPin;
  return perform({ ...act, kind: "call-go", input }, async (d) => {
    const refusal = refusalOf(mayCallGo(d.e, { ...input, member: d.member.id }));
    if (refusal) return refusal;
    const plannedStart = d.e.facts.runs.get(input.run)?.run.plannedStart;
    const judged = d.e.result.runs.find((r) => r.id === input.run);
    const ends = goEnds(d.e, input.run);
    if (!judged || plannedStart == null || ends === null) throw new Error("GO was allowed on a run that is not planned");
    const detail = {
      version: input.version,
      plannedStart,
      ends,
      cap: judged.clearance.rpm,
      signatures: judged.requiredGates.flatMap((id) => d.e.result.gates[id]?.holding ?? []),
    };
    const base = await d.record("lead", { type: "go-called", data: { run: input.run, ...detail } });
    await d.tx.insert(runActs).values({ ...base, runId: input.run, act: "go", detail });
    await notifyCrew(d.tx, {
      kind: "go",
      actId: base.id,
      e: await evaluateIn(d.tx, d.installId, d.now),
      runId: input.run,
      by: d.member.id,
      reason: "",
      auto: false,
      goEnds: ends,
      stops: [],
      head: d.writer.head(),
    });
    return done({ go: base.id, ends });
  });
}
