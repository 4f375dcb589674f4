// A no-go is a mail and an event: what stops the run and who is on it. State and answers stay as they are.
import { mayCallNoGo } from "#app/lib/gates/run-verdicts";
import type { RunReason } from "#app/lib/schemas/run";
import { notifyCrew } from "#app/lib/services/notify-crew.server";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function callNoGo(act: Act, input: RunReason): Promise<Outcome<{ noGo: string }>> {
  return perform({ ...act, kind: "call-no-go", input }, async (d) => {
    const { run, reason } = input;
    const refusal = refusalOf(mayCallNoGo(d.e, { run, member: d.member.id }));
    if (refusal) return refusal;
    const stops = d.e.result.runs.find((r) => r.id === run)?.blockers ?? [];
    const base = await d.record("lead", {
      type: "no-go-sent",
      data: { run, reason, stops: stops.map((b) => `${b.title}. ${b.sentence}`) },
    });
    await notifyCrew(d.tx, {
      kind: "no-go",
      actId: base.id,
      e: d.e,
      runId: run,
      by: d.member.id,
      reason,
      auto: false,
      goEnds: null,
      stops,
      head: d.writer.head(),
    });
    return done({ noGo: base.id });
  });
}
