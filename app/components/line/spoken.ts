/**
 * What a screen reader says for each part of the Line. It begins with the words that are seen (WCAG 2.5.3), then gives
 * the full name and the reason.
 */
import { isHeld, type LadderItem } from "#app/components/line/runLadder";
import type { LineGate, LineRun, LineStop } from "#app/components/line/types";
import { RUN_WORD, VALVE_WORD } from "#app/components/ui/states";

/** "Fuel prime, lapsed 3 Dec, 1 in what stops us; Fuel flow and prime, lapsed: fuel system opened 3 Dec 14:10 CET". */
export function spokenGate(gate: LineGate, shown: string): string {
  const seen = [shown, gate.note, gate.balloon ? `${gate.balloon} in what stops us` : ""].filter(Boolean).join(", ");
  const more = [shown === gate.name ? "" : gate.name, gate.full === gate.note ? "" : gate.full].filter(Boolean).join(", ");
  const told = `${seen} ${more}`.toLowerCase();
  const word = told.includes(VALVE_WORD[gate.state]) ? "" : VALVE_WORD[gate.state];
  return [seen, [word, more].filter(Boolean).join(", ")].filter(Boolean).join("; ");
}

/** Word for where a run stands; a spade is HOLD whatever the run's own state. */
export const runWord = (run: LineRun) => (isHeld(run) ? RUN_WORD.held : RUN_WORD[run.state]);

/** `seen` = the words beside the blade. */
export function spokenRun(run: LineRun, seen: string): string {
  const stops = run.balloon ? `, ${run.balloon} in what stops us` : "";
  return `${seen}${stops}; run ${run.key}, ${run.name}, to ${run.rpmText}, ${runWord(run)}`;
}

/** State and note of a small valve: the note alone where it says the state already. */
export function stopWords(stop: LineStop): string {
  const word = VALVE_WORD[stop.state];
  if (!stop.note) return word;
  return stop.note.toLowerCase().includes(word) || stop.note.startsWith("waits") ? stop.note : `${word}: ${stop.note}`;
}

export function stopName(item: Extract<LadderItem, { kind: "post-run" | "service" | "release" }>): string {
  if (item.kind === "post-run") return `After run ${item.run.key}`;
  return item.kind === "service" ? `Service before run ${item.run.key}` : "Release for taxi tests";
}
