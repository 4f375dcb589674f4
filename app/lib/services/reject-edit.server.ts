// An edit that waited does not come to count: an inspector rejects it, or its maker takes it back.
import { editAnswers } from "#app/db/schema/edits";
import { mayRejectEdit } from "#app/lib/gates/edit-verdicts";
import type { RejectEdit } from "#app/lib/schemas/edit";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";
import { findWaiting } from "#app/lib/services/waiting-edit.server";

export function rejectEdit(act: Act, { edit, reason }: RejectEdit): Promise<Outcome<{ edit: string }>> {
  return perform({ ...act, kind: "reject-edit", input: { edit, reason } }, async (d) => {
    const waiting = await findWaiting(d, edit);
    if ("ok" in waiting) return waiting;
    const refusal = refusalOf(mayRejectEdit(d.e, { member: d.member.id, waiting }));
    if (refusal) return refusal;
    const own = waiting.by === d.member.id;
    const answer = own ? ("taken back" as const) : ("rejected" as const);
    const as = own ? roleOf(d.member, "lead", "inspector") : "inspector";
    const base = await d.record(as, { type: "edit-answered", data: { edit, answer, reason } });
    await d.tx.insert(editAnswers).values({ ...base, editId: edit, answer, reason });
    return done({ edit });
  });
}
