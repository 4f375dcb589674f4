// The acts of the openings' page. An opening is shown with what it makes lapse before it counts; the page needs no script for that.
import { parseWithZod } from "@conform-to/zod/v4";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import { closeOpeningForm, markMistakeForm, openChoice, openForm, openingForm } from "#app/lib/schemas/happening-forms";
import { closeOpening } from "#app/lib/services/close-opening.server";
import { confirmUndisturbed } from "#app/lib/services/confirm-undisturbed.server";
import { markMistake } from "#app/lib/services/mark-mistake.server";
import { openSystem } from "#app/lib/services/open-system.server";
import { OPENING_PRESETS } from "#app/lib/template/systems";
import { anchorOfOpening, type OpenShown, seenOf } from "#app/lib/views/openings";
import { presetsOn } from "#app/lib/views/systems";
import { lapsesByOpening } from "#app/lib/views/what-lapses";

/** The reply to the form of a new opening also carries what was chosen and what that makes lapse. */
export type OpeningReply = FormReply & { open?: OpenShown };
/** `opened`: a new opening was recorded. */
export type OpeningActed = { done: true; anchor: string; opened?: true } | { done: false; reply: OpeningReply; status: number };

/** Null where the form is none of this page's. */
export async function actOnOpenings(install: InstallContext, sent: FormData): Promise<OpeningActed | null> {
  const act = actsOf(install);
  const id = String(sent.get("opening") ?? "");
  if (sent.has("preset")) return choosePreset(install, sent);
  switch (sent.get("intent")) {
    case "preview":
      return preview(install, sent);
    case "open":
      return open(install, sent);
    case "close":
      return formAct({
        sent,
        form: `${anchorOfOpening(id)}-close`,
        schema: closeOpeningForm,
        serve: ({ commandId, ...input }) => closeOpening(act(commandId), input),
        anchor: (v) => anchorOfOpening(v.opening),
      });
    case "undisturbed":
      return formAct({
        sent,
        form: `${anchorOfOpening(id)}-undisturbed`,
        schema: openingForm,
        serve: ({ commandId, opening }) => confirmUndisturbed(act(commandId), { opening }),
        anchor: (v) => anchorOfOpening(v.opening),
      });
    case "mistake":
      return formAct({
        sent,
        form: `${anchorOfOpening(id)}-mistake`,
        schema: markMistakeForm,
        serve: ({ commandId, ...input }) => markMistake(act(commandId), input),
        anchor: (v) => anchorOfOpening(v.opening),
      });
    default:
      return null;
  }
}

/** The form comes back with what was chosen, and with what that makes lapse where it is a choice. */
function shown({ e, me }: InstallContext, sent: FormData, errors: FormReply["errors"], asked: OpenShown["asked"]): OpeningReply {
  const choice = parseWithZod(sent, { schema: openChoice });
  const reply = replyOf("open", sent, errors);
  const systems = sent.getAll("systems").map(String);
  if (choice.status !== "success") return { ...reply, open: { stamp: newId(), asked, systems, chosen: null } };
  const { value } = choice;
  const lapses = lapsesByOpening(e, me, value.systems, value.closed);
  return {
    ...reply,
    open: { stamp: newId(), asked, systems, chosen: { ...value, lapses, seen: seenOf(e, value.systems, value.closed) } },
  };
}

function choosePreset(install: InstallContext, sent: FormData): OpeningActed {
  const preset = presetsOn(install.e).find((p) => p.key === sent.get("preset"));
  if (!preset) return { done: false, reply: shown(install, sent, { "": [NO_PRESET] }, "preset"), status: 400 };
  const known = new Set(OPENING_PRESETS.flatMap((p) => p.systems as string[]));
  const systems = new Set([...sent.getAll("systems").filter((s) => known.has(String(s))), ...preset.systems].map(String));
  sent.delete("systems");
  for (const system of systems) sent.append("systems", system);
  return { done: false, reply: shown(install, sent, {}, "preset"), status: 200 };
}
const NO_PRESET = "That work is not on this install. Choose the systems one by one.";

function preview(install: InstallContext, sent: FormData): OpeningActed {
  const choice = parseWithZod(sent, { schema: openChoice });
  if (choice.status === "success") return { done: false, reply: shown(install, sent, {}, "preview"), status: 200 };
  return { done: false, reply: shown(install, sent, errorsOf(choice.reply().error), "preview"), status: 400 };
}

/** Taken only with the choice that was shown, so that nobody makes a GO turn into HOLD without having read it. */
async function open(install: InstallContext, sent: FormData): Promise<OpeningActed> {
  const { e, snapshot, now } = install;
  const submission = parseWithZod(sent, { schema: openForm(snapshot.install.timeZone, now) });
  if (submission.status !== "success")
    return { done: false, reply: shown(install, sent, errorsOf(submission.reply().error), "preview"), status: 400 };
  const { commandId, ...input } = submission.value;
  if (sent.get("seen") !== seenOf(e, input.systems, input.closed))
    return { done: false, reply: shown(install, sent, { "": [NOT_SHOWN] }, "preview"), status: 409 };
  const outcome = await openSystem(actsOf(install)(commandId), input);
  if (outcome.ok) return { done: true, anchor: anchorOfOpening(outcome.value.opening), opened: true };
  return { done: false, reply: shown(install, sent, { "": [outcome.message] }, "preview"), status: outcome.status };
}
const NOT_SHOWN = "What you chose, or the GO in force, has changed since this was shown. Look at what lapses now, then confirm.";

const errorsOf = (error: Record<string, string[] | null> | null | undefined): FormReply["errors"] =>
  Object.fromEntries(Object.entries(error ?? {}).flatMap(([field, list]) => (list?.length ? [[field.replace(/\[\d+\]$/, ""), list]] : [])));
