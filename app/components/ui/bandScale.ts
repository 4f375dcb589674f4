/** Ends and pitch of a rule that shows a band and a value: pure arithmetic, no units of its own. */
export interface BandScale {
  from: number;
  to: number;
  /** Distance of numbered marks. */
  step: number;
}

/**
 * A rule that holds band and value with a little room, on round numbers, with 3 to 6 numbered marks.
 * `min`, `max` null = that end of the band is open. All numbers in the unit that is shown.
 */
export function bandScale(min: number | null, max: number | null, value: number | null): BandScale {
  const shown = [min, max, value].filter((n): n is number => n !== null && Number.isFinite(n));
  const low = shown.length ? Math.min(...shown) : 0;
  const high = shown.length ? Math.max(...shown) : 1;
  const width = high - low || Math.abs(high) || 1;
  const step = roundStep((width * 1.7) / 5);
  // an open end gets more room, so that it does not look like a limit
  let from = Math.floor((low - width * (min === null ? 0.5 : 0.2)) / step) * step;
  let to = Math.ceil((high + width * (max === null ? 0.5 : 0.2)) / step) * step;
  if (to - from < 2 * step) {
    from -= step;
    to += step;
  }
  return { from: low >= 0 ? Math.max(0, from) : from, to: high <= 0 ? Math.min(0, to) || to : to, step };
}

/** 1, 2 or 5 times a power of ten, the next one up. */
function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  const times = [1, 2, 5, 10].find((n) => n * power >= rough * 0.999) ?? 10;
  return times * power;
}
