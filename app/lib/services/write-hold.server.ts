// Writes HOLD for one run: the act, its event and the crew's mail. Called by a person's HOLD, and by every act after which
// a run with GO in force is no longer clear.
import type { Tx } from "#app/db/client.server";
import { runActs } from "#app/db/schema/runs";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { RunResult } from "#app/lib/gates/result";
import type { Role } from "#app/lib/gates/snapshot";
import { notifyCrew } from "#app/lib/services/notify-crew.server";
import type { RecordWriter } from "#app/lib/services/record-writer.server";

export interface Hold {
  tx: Tx;
  writer: RecordWriter;
  /** The board as it is now; its blockers of the run say why. */
  e: Evaluation;
  run: RunResult;
  who: { by: string; as: Role };
  reason: string;
  /** Written by the board, not called by a person. */
  auto: boolean;
}

export async function writeHold({ tx, writer, e, run, who, reason, auto }: Hold): Promise<string> {
  if (!run.id) throw new Error("HOLD of a run that is not planned");
  const stops = run.blockers.map((b) => `${b.title}. ${b.sentence}`);
  const base = await writer.record(who, { type: "hold-called", data: { run: run.id, reason, auto, stops } });
  await tx.insert(runActs).values({ ...base, runId: run.id, act: "hold", detail: { reason, auto } });
  await notifyCrew(tx, {
    kind: "hold",
    actId: base.id,
    e,
    runId: run.id,
    by: who.by,
    reason,
    auto,
    goEnds: null,
    stops: run.blockers,
    head: writer.head(),
  });
  return base.id;
}

/** Holds every run whose GO was called and which is no longer clear. Returns how many. */
export async function holdWhatIsNotClear(hold: Omit<Hold, "run" | "reason" | "auto">): Promise<number> {
  const stopped = hold.e.result.runs.filter((r) => r.goLost);
  for (const run of stopped) {
    const [first] = run.blockers;
    await writeHold({ ...hold, run, reason: first ? `${first.title}. ${first.sentence}` : "The run is no longer clear.", auto: true });
  }
  return stopped.length;
}
