// The acts of the board editor's pages. An edit is shown with what it makes lapse before it is made; no page needs a script for that.

import { db } from "#app/db/client.server";
import { templateBaseOf } from "#app/db/queries/own-templates.server";
import { templateOf } from "#app/lib/gates/board-template";
import type { Edit } from "#app/lib/gates/edits";
import { gateEdit, itemEdit, subjectOf } from "#app/lib/gates/edits";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { commandIdSchema } from "#app/lib/schemas/act";
import { readEdit } from "#app/lib/schemas/edit";
import { answerForm, type Errors, readGateForm, readItemForm, sentBy } from "#app/lib/schemas/edit-forms";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import { templateNameSchema } from "#app/lib/schemas/own-template";
import { isPlainText, NOT_PLAIN } from "#app/lib/schemas/plain-text";
import { acceptEdit } from "#app/lib/services/accept-edit.server";
import { editBoard } from "#app/lib/services/edit-board.server";
import { keepTemplate } from "#app/lib/services/keep-template.server";
import { rejectEdit } from "#app/lib/services/reject-edit.server";
import { anchorOfSubject, keyForGate, keyForItem } from "#app/lib/views/board-edit";
import { anchorOfEdit, type ShownEdit, shownEdit } from "#app/lib/views/edit-shown";

/** The reply also carries the edit that is to be looked at. */
export type EditReply = FormReply & { shown?: ShownEdit };
export type EditActed = { done: true; anchor: string } | { done: false; reply: EditReply; status: number };

/** Ids of the forms that get their errors back. */
export const FIELDS = "fields";
export const MAKE = "make";

const refusedWith = (form: string, sent: FormData, errors: Errors, status: number): EditActed => ({
  done: false,
  reply: replyOf(form, sent, errors),
  status,
});

/** Null where the form is none of these. */
export async function actOnEdits(install: InstallContext, sent: FormData): Promise<EditActed | null> {
  const act = actsOf(install);
  const id = String(sent.get("edit") ?? "");
  switch (sent.get("intent")) {
    case "look":
      return look(install, sent, readEdit(sent.get("what")));
    case "make":
      return make(install, sent);
    case "keep":
      return keep(install, sent);
    case "accept":
    case "accept-words":
      return formAct({
        sent,
        form: `${anchorOfEdit(id)}-answer`,
        schema: answerForm,
        serve: ({ commandId, edit, reason }) =>
          acceptEdit(act(commandId), { edit, reason, wordsOnly: sent.get("intent") === "accept-words" }),
        anchor: () => "waiting",
      });
    case "reject":
      return formAct({
        sent,
        form: `${anchorOfEdit(id)}-answer`,
        schema: answerForm,
        serve: ({ commandId, edit, reason }) => rejectEdit(act(commandId), { edit, reason }),
        anchor: () => "waiting",
      });
    default:
      return null;
  }
}

/** The board as a template of one's own; nothing on the install changes. */
async function keep({ snapshot, installId, me }: InstallContext, sent: FormData): Promise<EditActed> {
  const command = commandIdSchema.safeParse(sent.get("commandId"));
  const name = templateNameSchema.safeParse(sent.get("name") ?? "");
  if (!command.success || !name.success)
    return refusedWith("keep", sent, name.success ? { "": [NO_EDIT] } : { name: name.error.issues.map((i) => i.message) }, 400);
  const body = templateOf(snapshot, name.data, await templateBaseOf(db(), installId));
  const outcome = await keepTemplate({ actor: { userId: me.id }, commandId: command.data }, body);
  return outcome.ok ? { done: true, anchor: "kept" } : refusedWith("keep", sent, { "": [outcome.message] }, outcome.status);
}

const NO_EDIT = "The form does not say what to change. Load the page again; nothing was changed.";

/** Shows an edit before it is made. */
export function look(install: InstallContext, sent: FormData, edit: Edit | null, form = MAKE): EditActed {
  if (!edit) return refusedWith(form, sent, { "": [NO_EDIT] }, 400);
  const shown = shownEdit(install.e, edit, install.me.units);
  if (typeof shown === "string") return refusedWith(form, sent, { "": [shown] }, 409);
  return { done: false, reply: { ...replyOf(form, sent, {}), shown }, status: 200 };
}

async function make(install: InstallContext, sent: FormData): Promise<EditActed> {
  const edit = readEdit(sent.get("what"));
  const command = commandIdSchema.safeParse(sent.get("commandId"));
  if (!edit || !command.success) return refusedWith(MAKE, sent, { "": [NO_EDIT] }, 400);
  const reason = String(sent.get("reason") ?? "").trim();
  if (!isPlainText(reason)) return refusedWith(MAKE, sent, { "": [NOT_PLAIN] }, 400);
  const outcome = await editBoard(actsOf(install)(command.data), { edit, reason: reason.slice(0, 1000) });
  if (outcome.ok) {
    const subject = subjectOf(edit);
    return { done: true, anchor: outcome.value.waiting ? "waiting" : subject ? anchorOfSubject(subject) : "" };
  }
  const shown = shownEdit(install.e, edit, install.me.units);
  const field = outcome.code === "invalid" ? "reason" : "";
  const reply = replyOf(MAKE, sent, { [field]: [outcome.message] });
  return { done: false, reply: typeof shown === "string" ? reply : { ...reply, shown }, status: outcome.status };
}

const NOTHING = "Nothing in the form is different from what stands on the board.";

/** The item's form: null id = a new item of `gateId`. */
export function lookAtItem(install: InstallContext, sent: FormData, itemId: string | null, gateId: string): EditActed {
  const { e, me, snapshot } = install;
  const item = snapshot.items.find((i) => i.id === itemId) ?? null;
  const gate = snapshot.gates.find((g) => g.id === (item?.gate ?? gateId));
  if (!gate) return refusedWith(FIELDS, sent, { "": ["This gate is not on the board. Go back to the list."] }, 404);
  const peers = snapshot.items.filter((i) => i.gate === gate.id && !i.hidden && i.id !== itemId).map((i) => i.id);
  const read = readItemForm(sentBy(sent), item, peers, me.units);
  if (!read.ok) return refusedWith(FIELDS, sent, read.errors, 400);
  const edit: Edit | null = item
    ? itemEdit(item, read.value)
    : { kind: "add-item", id: newId(), key: keyForItem(e, gate), gate: gate.id, to: read.value };
  return edit ? look(install, sent, edit, FIELDS) : refusedWith(FIELDS, sent, { "": [NOTHING] }, 400);
}

/** The gate's form: null = a new gate. */
export function lookAtGate(install: InstallContext, sent: FormData, gateId: string | null): EditActed {
  const { e, snapshot } = install;
  const gate = snapshot.gates.find((g) => g.id === gateId) ?? null;
  const others = snapshot.gates.filter((g) => !g.hidden && g.lookBack?.kind !== "run" && g.id !== gateId).map((g) => g.id);
  const read = readGateForm(sentBy(sent), gate, others);
  if (!read.ok) return refusedWith(FIELDS, sent, read.errors, 400);
  const before = String(sent.get("before") ?? "") || null;
  const edit: Edit | null = gate
    ? gateEdit(gate, read.value)
    : { kind: "add-gate", id: newId(), key: keyForGate(e, read.value.name), to: read.value, before };
  return edit ? look(install, sent, edit, FIELDS) : refusedWith(FIELDS, sent, { "": [NOTHING] }, 400);
}
