/**
 * The clocks of a running engine: oil pressure after the start, and how far a step is held. Pure; instants in ms, durations in s.
 * Figures: pressure shows within 10 s and is above its least within 30 s, else stop (engine makers' starting instructions; common
 * practice, the maker's own come first).
 */
export const OIL_SHOWS = 10;
export const OIL_ABOVE = 30;

export interface OilMarks {
  /** Instants at which somebody pressed; null = not yet. */
  shows: number | null;
  above: number | null;
}

export interface OilFace {
  word: "shows" | "above" | "stop" | "good";
  /** Seconds left of the wait that is on; 0 when it is over. */
  left: number;
  sentence: string;
}

/** @param fired instant at which the engine fired. */
export function oilFace(fired: number, marks: OilMarks, now: number): OilFace {
  const since = (now - fired) / 1000;
  const leftOf = (limit: number) => Math.max(0, Math.ceil(limit - since));
  if (marks.above !== null)
    return (marks.above - fired) / 1000 <= OIL_ABOVE
      ? { word: "good", left: 0, sentence: `Above its least after ${Math.round((marks.above - fired) / 1000)} s.` }
      : stop(`It was above its least only after ${Math.round((marks.above - fired) / 1000)} s; ${OIL_ABOVE} s are allowed.`);
  if (marks.shows === null && since >= OIL_SHOWS) return stop(`No oil pressure in ${OIL_SHOWS} s.`);
  if (since >= OIL_ABOVE) return stop(`Oil pressure is not above its least after ${OIL_ABOVE} s.`);
  return marks.shows === null
    ? { word: "shows", left: leftOf(OIL_SHOWS), sentence: `Oil pressure must show within ${OIL_SHOWS} s.` }
    : { word: "above", left: leftOf(OIL_ABOVE), sentence: `It must be above its least within ${OIL_ABOVE} s.` };
}

const stop = (why: string): OilFace => ({ word: "stop", left: 0, sentence: `${why} STOP: shut the engine down and find the cause.` });

/** Seconds that a step has been held and still is to be held; `over` when its time is up. */
export function holdFace(hold: number | null, began: number, now: number): { held: number; left: number; over: boolean } {
  const held = Math.max(0, Math.floor((now - began) / 1000));
  const left = hold === null ? 0 : Math.max(0, Math.ceil(hold - (now - began) / 1000));
  return { held, left, over: hold !== null && left === 0 };
}
