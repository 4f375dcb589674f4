// Changes an install's board: before the first proof freely, after it at once where it asks for more. What asks for less is written
// down and waits for an inspector; until then the old rule holds.
import { edits } from "#app/db/schema/edits";
import { nameOfSubject } from "#app/lib/gates/edit-changes";
import { classifyEdit, type EditClass, mayEditBoard } from "#app/lib/gates/edit-verdicts";
import { type Edit, subjectOf } from "#app/lib/gates/edits";
import type { Snapshot } from "#app/lib/gates/snapshot";
import type { EditBoard } from "#app/lib/schemas/edit";
import { writeEdit } from "#app/lib/services/board-writer.server";
import { done, invalid, type Outcome, refusalOf, refuse } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

/** `waiting`: id of the edit that now waits; null where it counts. */
export interface Edited {
  class: EditClass;
  waiting: string | null;
}

export function editBoard(act: Act, input: EditBoard): Promise<Outcome<Edited>> {
  return perform({ ...act, kind: "edit-board", input }, async (d) => {
    const { edit, reason } = input;
    const refusal = refusalOf(mayEditBoard(d.e, { member: d.member.id, edit }));
    if (refusal) return refusal;
    const judged = classifyEdit(d.e.snapshot, edit);
    if (!judged.ok) throw new Error("An edit was allowed that cannot be made");
    const as = edit.kind === "traits" ? "lead" : roleOf(d.member, "lead", "inspector");
    if (judged.class !== "waits") {
      await writeEdit(d, as, edit, { reason, proposal: null, wordsOnly: false });
      return done<Edited>({ class: judged.class, waiting: null });
    }
    if (reason.length < 3) return invalid("Say why: an inspector reads it before this counts.");
    const says = judged.changes.map((c) => c.says);
    const subject = subjectWords(d.e.snapshot, edit);
    const words = says.join("; ");
    if (d.e.snapshot.editsWaiting.some((w) => w.subject === subject && w.words === words))
      return refuse(409, "already", "This very change waits already. An inspector accepts or rejects it.");
    const base = await d.record(as, { type: "edit-proposed", data: { edit: JSON.parse(JSON.stringify(edit)), subject, says, reason } });
    await d.tx.insert(edits).values({ ...base, edit, subject, words, reason });
    return done<Edited>({ class: judged.class, waiting: base.id });
  });
}

function subjectWords(snapshot: Snapshot, edit: Edit): string {
  const subject = subjectOf(edit);
  return subject ? nameOfSubject(snapshot, subject) : "The answers about the install";
}
