// A day before time ends a proof that a planned run rests on, lead and builders get one mail that names it.
import { and, eq, gt, isNotNull, like, lt } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { outbox } from "#app/db/schema/outbox";
import { runs } from "#app/db/schema/runs";
import { now } from "#app/lib/clock";
import { type RunsOut, runsOutBefore } from "#app/lib/gates/runs-out";
import { hashOf } from "#app/lib/record/chain";
import { notifyCrew } from "#app/lib/services/notify-crew.server";
import { beginRecord } from "#app/lib/services/perform.server";

const AHEAD = 24 * 3600_000;
/** Runs planned further off than this are looked at later. */
const PLANNED_WITHIN = 30 * 24 * 3600_000;

/** Looks at every planned run. Returns for how many a mail was written. */
export async function remindRunsOut(): Promise<number> {
  const at = now();
  const planned = await db()
    .select({ id: runs.id, installId: runs.installId })
    .from(runs)
    .where(and(isNotNull(runs.plannedStart), gt(runs.plannedStart, at), lt(runs.plannedStart, at + PLANNED_WITHIN)));
  let told = 0;
  for (const { id, installId } of planned) {
    const board = await boardNow(db(), installId, now());
    const soon = board ? endingSoon(runsOutBefore(board.e, id), board.e.at) : [];
    if (soon.length && !(await alreadyTold(installId, keyOf(id, soon)))) told += await tell(installId, id);
  }
  return told;
}

const endingSoon = (all: RunsOut[], at: number): RunsOut[] => all.filter((r) => r.until <= at + AHEAD);
const keyOf = (run: string, soon: RunsOut[]): string => hashOf(`${run} ${soon.map((r) => `${r.item}@${r.until}`).join(" ")}`).slice(0, 32);

async function alreadyTold(installId: string, key: string): Promise<boolean> {
  const rows = await db()
    .select({ id: outbox.id })
    .from(outbox)
    .where(and(eq(outbox.installId, installId), eq(outbox.kind, "runs-out"), like(outbox.dedupeKey, `runs-out:${key}:%`)))
    .limit(1);
  return rows.length > 0;
}

/** Judged again where it is written: somebody may have done it in between. */
function tell(installId: string, run: string): Promise<number> {
  return write(async (tx) => {
    const { writer, e } = await beginRecord(tx, installId);
    const soon = endingSoon(runsOutBefore(e, run), e.at);
    if (!soon.length) return 0;
    await notifyCrew(tx, {
      kind: "runs-out",
      actId: keyOf(run, soon),
      e,
      runId: run,
      by: "",
      reason: "",
      auto: true,
      goEnds: null,
      stops: soon.map((r) => r.blocker),
      head: writer.head(),
    });
    return 1;
  });
}
