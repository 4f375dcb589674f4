/** How many items a gate has, in words: those that people prove, and those that the board works out by itself. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemsIn } from "#app/lib/gates/facts";
import { count } from "#app/lib/gates/who";
import { isComputed } from "#app/lib/gates/work-facts";

/** How many of the gate's items nobody ticks. */
export const workedOut = (e: Evaluation, gate: string): number => itemsIn(e.facts, gate).filter(isComputed).length;

/** "7 items, and 1 that the board works out"; "7 items" where there is none of those. */
export function itemsWords(e: Evaluation, gate: string): string {
  const all = itemsIn(e.facts, gate).length;
  const by = workedOut(e, gate);
  return by ? `${count(all - by, "item")}, and ${by} that the board works out` : count(all, "item");
}
