import { useEffect, useState } from "react";

/** What whoever holds the card has pressed; kept on this device, so that a reload or a lost network loses none of it. */
export interface LiveState {
  /** Items of the start checklist that were answered. */
  answered: number[];
  oil: { shows: number | null; above: number | null };
  /** Index of the step that is on, and since when. */
  step: number;
  since: number | null;
  marks: { at: number; words: string }[];
  /** The card came to this device while the engine ran: what was pressed elsewhere before is not known here. */
  takenOver: boolean;
}

const EMPTY: LiveState = { answered: [], oil: { shows: null, above: null }, step: 0, since: null, marks: [], takenOver: false };

export function useLiveState(run: string): [LiveState, (to: Partial<LiveState>) => void] {
  const key = `live-card-${run}`;
  const [state, setState] = useState(EMPTY);
  useEffect(() => {
    try {
      const kept = JSON.parse(localStorage.getItem(key) ?? "null") as LiveState | null;
      if (kept && Array.isArray(kept.answered) && Array.isArray(kept.marks)) setState({ ...EMPTY, ...kept });
    } catch {
      // Nothing usable is kept: the card begins anew.
    }
  }, [key]);
  return [
    state,
    (to) =>
      setState((was) => {
        const next = { ...was, ...to };
        try {
          localStorage.setItem(key, JSON.stringify(next));
        } catch {
          // A device that keeps nothing: the card works while the page is open.
        }
        return next;
      }),
  ];
}

/** The time, ten times a second while something is measured. */
export function useNow(ticking: boolean, first: number): number {
  const [now, setNow] = useState(first);
  useEffect(() => {
    setNow(Date.now());
    if (!ticking) return;
    const timer = setInterval(() => setNow(Date.now()), 200);
    return () => clearInterval(timer);
  }, [ticking]);
  return now;
}
