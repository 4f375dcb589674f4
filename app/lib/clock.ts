// Server time. Every instant in the program comes from `now()`, in milliseconds since 1970 UTC, and never runs backwards
// within a process: a clock set back by its time service holds still until real time has caught up.

export interface Clock {
  /** Milliseconds since 1970 UTC. */
  now(): number;
}

/** A clock that holds still instead of going back. `source` gives raw milliseconds. */
export function steadyClock(source: () => number = Date.now): Clock {
  let last = 0;
  return {
    now() {
      last = Math.max(last, source());
      return last;
    },
  };
}

let current: Clock = steadyClock();

/** The instant that counts for what is recorded now, in milliseconds since 1970 UTC. */
export const now = (): number => current.now();

/** Replaces the process's clock and returns the one that ran before. For tests and for the demo's invented past. */
export function setClock(clock: Clock): Clock {
  const before = current;
  current = clock;
  return before;
}
