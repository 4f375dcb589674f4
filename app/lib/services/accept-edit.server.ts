// An inspector, another person than its maker, lets an edit count that asks for less. It is judged on the board of today.
import { editAnswers } from "#app/db/schema/edits";
import { mayAcceptEdit } from "#app/lib/gates/edit-verdicts";
import type { AcceptEdit } from "#app/lib/schemas/edit";
import { writeEdit } from "#app/lib/services/board-writer.server";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";
import { findWaiting } from "#app/lib/services/waiting-edit.server";

export function acceptEdit(act: Act, input: AcceptEdit): Promise<Outcome<{ edit: string }>> {
  return perform({ ...act, kind: "accept-edit", input }, async (d) => {
    const waiting = await findWaiting(d, input.edit);
    if ("ok" in waiting) return waiting;
    const { wordsOnly, reason } = input;
    const refusal = refusalOf(mayAcceptEdit(d.e, { member: d.member.id, waiting, wordsOnly }));
    if (refusal) return refusal;
    const answer = wordsOnly ? ("accepted as words only" as const) : ("accepted" as const);
    const base = await d.record("inspector", { type: "edit-answered", data: { edit: waiting.id, answer, reason } });
    await d.tx.insert(editAnswers).values({ ...base, editId: waiting.id, answer, reason });
    await writeEdit(d, "inspector", waiting.edit, { reason: waiting.reason, proposal: waiting.id, wordsOnly });
    return done({ edit: waiting.id });
  });
}
