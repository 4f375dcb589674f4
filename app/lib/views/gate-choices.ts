/** What a row lets one choose from: wrenches with their due date, and people. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { heldAnyRole } from "#app/lib/gates/facts";

export interface ChoiceView {
  value: string;
  label: string;
  disabled?: boolean;
}

/** Tools of the crib; one that is not in date now can still be named for work done while it was. */
export function toolsOf(e: Evaluation): ChoiceView[] {
  return e.snapshot.tools.map((tool) => {
    const newest = [...tool.checks].sort((a, b) => a.at - b.at).at(-1);
    const due = newest?.due ?? null;
    const says = !newest
      ? "no check recorded"
      : !newest.good
        ? "out of tolerance"
        : due === null
          ? "no due date"
          : due <= e.at
            ? `overdue since ${e.facts.when(due - 1)}`
            : `due ${e.facts.when(due - 1)}`;
    return { value: tool.id, label: `${tool.name}, ${says}` };
  });
}

/** The other members, by name. */
export function peopleOf(e: Evaluation, me: string): ChoiceView[] {
  return e.snapshot.members
    .filter((m) => m.id !== me && heldAnyRole(e.facts, m.id, e.at))
    .map((m) => ({ value: m.id, label: m.name }))
    .sort((a, b) => a.label.localeCompare(b.label));
}
