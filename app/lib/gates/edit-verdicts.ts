/**
 * What becomes of an edit of the board: it counts freely before the first proof, at once where it asks for more, and waits for an
 * inspector where it asks for less. Until then the old rule holds. Pure verdicts: page and service ask the same.
 */
import { changesOf } from "#app/lib/gates/edit-changes";
import { editFault } from "#app/lib/gates/edit-faults";
import type { Edit } from "#app/lib/gates/edits";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Change } from "#app/lib/gates/part-changes";
import { needsRole, no, OK } from "#app/lib/gates/permit";
import type { Verdict } from "#app/lib/gates/result";
import type { Recorded, Snapshot } from "#app/lib/gates/snapshot";
import type { UnitSystem } from "#app/lib/units/display";

export type EditClass = "free" | "at once" | "waits";

export type Classified =
  | { ok: true; class: EditClass; changes: Change[] /** It may be accepted as words only. */; wordsOnly: boolean }
  | { ok: false; code: "order" | "stale" | "not-found"; sentence: string };

/**
 * @param edit asks something of the board in `snapshot`. @param units for bands in words.
 * @returns when it counts and what it changes; or why it cannot be made at all, with what to do instead.
 */
export function classifyEdit(snapshot: Snapshot, edit: Edit, units: UnitSystem = "si"): Classified {
  const fault = editFault(snapshot, edit);
  if (fault) return { ok: false, ...fault };
  const changes = changesOf(snapshot, edit, units);
  const waits = edit.kind === "traits" || changes.some((c) => c.weight === "less" || c.weight === "words");
  const wordsOnly = changes.length > 0 && changes.every((c) => c.weight === "words");
  return { ok: true, class: !snapshot.proofs.length ? "free" : waits ? "waits" : "at once", changes, wordsOnly };
}

/** May this member make this edit, or any where none is named? Traits are a lead's. */
export function mayEditBoard(e: Evaluation, a: { member: string; edit?: Edit }): Verdict {
  const role =
    a.edit?.kind === "traits"
      ? needsRole(e, a.member, ["lead"], "change the answers about the install")
      : needsRole(e, a.member, ["lead", "inspector"], "change the board");
  if (role || !a.edit) return role ?? OK;
  const judged = classifyEdit(e.snapshot, a.edit);
  return judged.ok
    ? OK
    : no(e, { code: judged.code, title: "Not this change", sentence: judged.sentence, roles: ["lead"], page: "set-up" });
}

/** An edit that waits, with what it is. */
export interface Waiting extends Recorded {
  edit: Edit;
}

const ownWork = (e: Evaluation, by: string, does: string): Verdict =>
  no(e, {
    code: "own-work",
    title: "Your own change",
    sentence: `Another inspector must ${does} a change of the board than the person who made it.`,
    roles: ["inspector"],
    barred: [by],
    page: "set-up",
  });

/** An inspector, another person than its maker, lets it count; it is judged again on the board of today. */
export function mayAcceptEdit(e: Evaluation, a: { member: string; waiting: Waiting; wordsOnly?: boolean }): Verdict {
  const role = needsRole(e, a.member, ["inspector"], "accept a change of the board");
  if (role) return role;
  if (a.waiting.by === a.member) return ownWork(e, a.member, "accept");
  const judged = classifyEdit(e.snapshot, a.waiting.edit);
  if (!judged.ok)
    return no(e, {
      code: judged.code,
      title: "The board has moved on",
      sentence: `${judged.sentence} Reject this change; it can be made anew.`,
      roles: ["inspector"],
      page: "set-up",
    });
  if (a.wordsOnly && !judged.wordsOnly)
    return no(e, {
      code: "order",
      title: "More than words",
      sentence: "This changes more than words, so what was proved before must be proved again. Accept it as that, or reject it.",
      roles: ["inspector"],
      page: "set-up",
    });
  return OK;
}

/** Its maker may take it back; else an inspector rejects it. */
export function mayRejectEdit(e: Evaluation, a: { member: string; waiting: Waiting }): Verdict {
  if (a.waiting.by === a.member) return OK;
  return needsRole(e, a.member, ["inspector"], "reject a change of the board") ?? OK;
}
