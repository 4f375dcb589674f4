/** The answers about an install, changed later: what they are, what another answer would bring and take away. Pure. */
import type { Edit } from "#app/lib/gates/edits";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { keysThatCome } from "#app/lib/gates/trait-edit";
import { same } from "#app/lib/template/carry-over";
import { traitsSchema } from "#app/lib/template/traits";
import type { Traits } from "#app/lib/template/types";
import type { UnitSystem } from "#app/lib/units/display";
import type { Viewer } from "#app/lib/views/board";
import { type ShownEdit, shownEdit } from "#app/lib/views/edit-shown";
import { type Errors, firstQuestions, readDraft, type ShownQuestion, secondQuestions, traitsOf } from "#app/lib/views/new-install";

type TraitEdit = Extract<Edit, { kind: "traits" }>;

export interface AnswersView {
  questions: ShownQuestion[];
  errors: Errors;
  wrong: { field: string; message: string }[];
  /** Questions whose answer is different from the install's. */
  changed: string[];
  shown: ShownEdit | null;
}

/** The edit with an id for everything that was never on this board. */
export const traitEditOf = (e: Evaluation, edit: TraitEdit, newId: () => string): TraitEdit => ({
  ...edit,
  ids: Object.fromEntries(keysThatCome(e.snapshot, edit.to).map((key) => [key, newId()])),
});

/** @param query answers as the address has them; what it leaves out is as it stands. @param newId for what comes. */
export function answersView(e: Evaluation, me: Viewer & { units: UnitSystem }, query: URLSearchParams, newId: () => string): AnswersView {
  const from = e.snapshot.traits;
  const answers: Partial<Traits> = { ...from, ...readDraft(query).answers };
  const to = traitsOf({ registration: "", name: "", timeZone: "", answers }) ?? from;
  const first = firstQuestions({ registration: "", name: "", timeZone: "", answers: to });
  const questions = [...first, ...secondQuestions(to).map((q, n) => ({ ...q, no: first.length + n + 1 }))];
  const read = traitsSchema.safeParse(to);
  const errors: Errors = {};
  for (const { path, message } of read.success ? [] : read.error.issues) {
    const key = path[0] as keyof Traits;
    errors[key] = [...(errors[key] ?? []), message];
  }
  const differs = !same(from, to);
  const shown = differs && read.success ? shownEdit(e, traitEditOf(e, { kind: "traits", from, to, ids: {} }, newId), me.units) : null;
  return {
    questions,
    errors,
    wrong: Object.entries(errors).flatMap(([field, list]) => list.map((message) => ({ field, message }))),
    changed: questions.flatMap((q) => (same(from[q.key], to[q.key]) ? [] : [q.label.replace(/\?$/, "")])),
    shown: typeof shown === "string" ? null : shown,
  };
}
