// Time passes without anybody pressing anything: every few seconds each GO whose end has come is written down as HOLD and the crew
// is told. Were this to stop, GO would be over all the same; the board derives that.
import { log } from "#app/lib/log.server";
import { holdOverdue } from "#app/lib/services/hold-overdue.server";

const EVERY = 15_000;

export function startGoWatch(): { stop: () => void } {
  let busy = false;
  const look = async () => {
    if (busy) return;
    busy = true;
    try {
      const held = await holdOverdue();
      if (held) log.info({ held }, "GO ended by time");
    } catch (error) {
      log.error({ err: error }, "could not look for a GO whose end has come");
    } finally {
      busy = false;
    }
  };
  const timer = setInterval(() => void look(), EVERY);
  timer.unref();
  void look();
  return { stop: () => clearInterval(timer) };
}
