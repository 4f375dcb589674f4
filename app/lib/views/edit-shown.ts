/** An edit of the board as it is shown before it is made, and while it waits: what it changes, when it counts, what lapses. Pure. */
import { applyEdit } from "#app/lib/gates/apply-edit";
import { classifyEdit, type EditClass, mayAcceptEdit, mayRejectEdit, type Waiting } from "#app/lib/gates/edit-verdicts";
import type { Edit } from "#app/lib/gates/edits";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import type { Change } from "#app/lib/gates/part-changes";
import type { UnitSystem } from "#app/lib/units/display";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";
import { nameIn } from "#app/lib/views/places";
import { type WhatLapses, whatLapses } from "#app/lib/views/what-lapses";

export interface ShownChange {
  /** "asks for more", "less or otherwise", "other words", "order only". */
  word: string;
  says: string;
}

export interface ShownEdit {
  /** The edit as the form sends it back. */
  json: string;
  class: EditClass;
  /** When it counts, in a sentence or two. */
  when: string;
  changes: ShownChange[];
  /** Null: nothing can lapse, as nothing was proved. */
  lapses: WhatLapses | null;
}

const WORDS: Record<Change["weight"], string> = {
  more: "asks for more",
  less: "less or otherwise",
  words: "other words",
  order: "order only",
};
const WHEN: Record<EditClass, string> = {
  free: "Nothing has been proved on this board yet, so it counts at once.",
  "at once": "It asks for more, so it counts at once.",
  waits: "It asks for less, or says it anew, so it waits for an inspector, another person than you. Until then the old rule holds.",
};

/** What this edit would undo once it counts: the same evaluator with it and without. */
export const lapsesByEdit = (e: Evaluation, edit: Edit, wordsOnly = false): WhatLapses =>
  whatLapses(e, evaluate(applyEdit(e.snapshot, edit, wordsOnly), e.at));

/** @returns what the page shows; a sentence where the edit cannot be made. */
export function shownEdit(e: Evaluation, edit: Edit, units: UnitSystem): ShownEdit | string {
  const judged = classifyEdit(e.snapshot, edit, units);
  if (!judged.ok) return judged.sentence;
  return {
    json: JSON.stringify(edit),
    class: judged.class,
    when: WHEN[judged.class],
    changes: judged.changes.map(({ weight, says }) => ({ word: WORDS[weight], says })),
    lapses: judged.class === "free" ? null : lapsesByEdit(e, edit),
  };
}

export interface ShownWaiting {
  id: string;
  anchor: string;
  subject: string;
  says: string[];
  reason: string;
  /** "Asked for by Mirela Tansen, 3 Dec 14:10 CET". */
  by: string;
  /** Null: it fits this board no more. */
  lapses: WhatLapses | null;
  mayAccept: May;
  mayReject: May;
  /** Its maker takes it back. */
  own: boolean;
  wordsOnly: boolean;
}

export const anchorOfEdit = (id: string): string => `edit-${id}`;

export function shownWaiting(
  e: Evaluation,
  me: Viewer,
  waiting: Waiting & { subject: string; reason: string },
  units: UnitSystem,
): ShownWaiting {
  const judged = classifyEdit(e.snapshot, waiting.edit, units);
  return {
    id: waiting.id,
    anchor: anchorOfEdit(waiting.id),
    subject: waiting.subject,
    says: judged.ok ? judged.changes.map((c) => c.says) : [judged.sentence],
    reason: waiting.reason,
    by: `Asked for by ${nameIn(e.snapshot, waiting.by)}, ${e.facts.when(waiting.recorded)}`,
    lapses: judged.ok ? lapsesByEdit(e, waiting.edit) : null,
    mayAccept: mayOf(mayAcceptEdit(e, { member: me.id, waiting })),
    mayReject: mayOf(mayRejectEdit(e, { member: me.id, waiting })),
    own: waiting.by === me.id,
    wordsOnly: judged.ok && judged.wordsOnly,
  };
}
