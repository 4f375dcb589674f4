import type { CrankClock } from "#app/lib/bench/crank-clock";

/** Kept on this device alone, so that a reload, a closed tab or a lost network loses no burst. */
const keyOf = (item: string): string => `crank-clock-${item}`;

const isClock = (x: unknown): x is CrankClock => {
  const clock = x as CrankClock | null;
  return Array.isArray(clock?.bursts) && clock.bursts.every((b) => Number.isFinite(b.at) && Number.isFinite(b.seconds));
};

export function readClock(item: string): CrankClock | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(keyOf(item)) ?? "null");
    return isClock(kept) ? kept : null;
  } catch {
    return null;
  }
}

export function keepClock(item: string, clock: CrankClock | null): void {
  try {
    if (clock === null || (clock.bursts.length === 0 && clock.running === null)) localStorage.removeItem(keyOf(item));
    else localStorage.setItem(keyOf(item), JSON.stringify(clock));
  } catch {
    // A device that keeps nothing: the clock still runs while the page is open.
  }
}
