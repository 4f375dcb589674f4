// The clock of the demo's past: set to an instant, it goes on only when the story says so, and never past the present.
import { type Clock, setClock } from "#app/lib/clock";

export interface PastClock {
  /** The real present, at which the story ends, ms since 1970 UTC. */
  present: number;
  now: () => number;
  /** Goes to an instant; one that is over already is passed by. */
  to: (at: number) => void;
  minutes: (n: number) => void;
  /** Gives the process its own clock back. */
  done: () => void;
}

export function pastClock(present: number): PastClock {
  let at = 0;
  const forward = (next: number) => {
    at = Math.min(Math.max(at, next), present);
  };
  const before: Clock = setClock({ now: () => at });
  return {
    present,
    now: () => at,
    to: forward,
    minutes: (n) => forward(at + n * 60_000),
    done: () => void setClock(before),
  };
}
