/** "How does it stand on Saturday at nine": a later instant asked for in the address, and the words around it. Pure. */
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import { instantOfLocal, localOf } from "#app/lib/gates/local-time";
import { dayWhen } from "#app/lib/views/run-words";

export interface StandAtView {
  date: string;
  time: string;
  timeZone: string;
  /** "Sat 5 Dec 09:00 CET" when a later instant is shown; null = now. */
  when: string | null;
  error: { field: "date" | "time"; sentence: string } | null;
}

/** Longest look ahead, ms: two years. Further off, dates say more about the calendar than about the aircraft. */
const FURTHEST = 730 * 86_400_000;

/**
 * @param query `date` "2026-12-05" and `time` "09:00", as clocks at the install show them; none = now.
 * @param suggest instant that the fields offer: the planned start, or tomorrow at the same time.
 * @returns the board at that instant if nothing more is recorded until then, or as it is now with the reason.
 */
export function standAt(e: Evaluation, query: URLSearchParams, suggest: number | null): { e: Evaluation; view: StandAtView } {
  const { timeZone } = e.snapshot.install;
  const offered = localOf(suggest !== null && suggest > e.at ? suggest : e.at + 86_400_000, timeZone);
  const date = query.get("date");
  const time = query.get("time");
  if (date === null || time === null) return { e, view: { ...offered, timeZone, when: null, error: null } };
  const asked = instantOfLocal(date, time, timeZone);
  const no = (field: "date" | "time", sentence: string) => ({ e, view: { date, time, timeZone, when: null, error: { field, sentence } } });
  if (!asked.ok) return no(asked.field, asked.sentence);
  if (asked.at <= e.at) return no("date", "That time is past. What stood then is told by the record; choose a later time.");
  if (asked.at - e.at > FURTHEST) return no("date", "That is more than two years off. Choose an earlier day.");
  return { e: evaluate(e.snapshot, asked.at), view: { date, time, timeZone, when: dayWhen(asked.at, timeZone), error: null } };
}
