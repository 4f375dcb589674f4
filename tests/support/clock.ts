// A clock that tests turn by hand. It becomes the process's clock; `before` is the one to put back.
import { type Clock, setClock } from "#app/lib/clock";

export function handClock(start: number): { before: Clock; add: (ms: number) => void } {
  let at = start;
  const before = setClock({ now: () => at });
  return {
    before,
    add(ms) {
      at += ms;
    },
  };
}
