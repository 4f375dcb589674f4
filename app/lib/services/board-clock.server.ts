// Time passes without anybody pressing anything. Every few seconds one process (by lease, where several share a database) writes down
// what time did: a GO whose end has come becomes HOLD and the crew is told; lead and builders hear beforehand of what runs out.
// Were this to stop, GO would be over all the same; the board derives that.
import { newId } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import { applyRules } from "#app/lib/services/apply-rules.server";
import { holdOverdue } from "#app/lib/services/hold-overdue.server";
import { giveLeaseBack, takeLease } from "#app/lib/services/lease.server";
import { remindDue } from "#app/lib/services/remind-due.server";
import { remindRunsOut } from "#app/lib/services/remind-runs-out.server";
import { sweepFiles } from "#app/lib/services/sweep-files.server";

const EVERY = 15_000;
/** A process that dies is replaced after this long. */
const LEASE = 45_000;
const NAME = "board-clock";

/** What the clock does, with the words for the log, and how often, in rounds. */
const WORK: { name: string; every: number; run: () => Promise<number> }[] = [
  // Once a process: rules do not change while it runs.
  { name: "records of installs under new rules", every: Number.POSITIVE_INFINITY, run: applyRules },
  { name: "GO ended by time", every: 1, run: holdOverdue },
  { name: "mails about what runs out", every: 20, run: remindRunsOut },
  { name: "mails about what runs out in the crib", every: 240, run: remindDue },
  { name: "files that no record names, removed", every: 240, run: sweepFiles },
];

export interface BoardClock {
  /** One round, at once. Resolves to false where another process has the clock. */
  tick: () => Promise<boolean>;
  stop: () => Promise<void>;
}

export function boardClock(me = newId()): BoardClock {
  let round = 0;
  async function tick(): Promise<boolean> {
    if (!(await takeLease(NAME, me, LEASE))) return false;
    const now = round++;
    for (const { name, every, run } of WORK) {
      if (every === Number.POSITIVE_INFINITY ? now > 0 : now % every) continue;
      try {
        const done = await run();
        if (done) log.info({ done }, name);
      } catch (error) {
        // One that fails must not keep the others from their turn.
        log.error({ err: error }, `the clock could not do its work: ${name}`);
      }
    }
    return true;
  }
  return { tick, stop: () => giveLeaseBack(NAME, me) };
}

/** Starts the clock; it goes until it is stopped. */
export function startBoardClock(): { stop: () => Promise<void> } {
  const clock = boardClock();
  let busy: Promise<unknown> | null = null;
  const look = () => {
    busy ??= clock
      .tick()
      .catch((error: unknown) => log.error({ err: error }, "the clock could not be asked for"))
      .finally(() => {
        busy = null;
      });
  };
  const timer = setInterval(look, EVERY);
  timer.unref();
  look();
  return {
    async stop() {
      clearInterval(timer);
      await busy;
      await clock.stop().catch(() => {});
    },
  };
}
