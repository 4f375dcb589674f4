// The acts of the loose ends' page. Making one is shown with what it makes lapse before it counts, where anything does.
import { parseWithZod } from "@conform-to/zod/v4";
import { actsOf, formAct, photosIn } from "#app/lib/http/form-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { type FormReply, replyOf } from "#app/lib/schemas/form-reply";
import { acceptLooseEndForm, looseEndForm, makeLooseEndForm, openingForm, restoreForm } from "#app/lib/schemas/happening-forms";
import { acceptLooseEnd } from "#app/lib/services/accept-loose-end.server";
import { confirmUndisturbed } from "#app/lib/services/confirm-undisturbed.server";
import { makeLooseEnd } from "#app/lib/services/make-loose-end.server";
import { confirmRestored, restoreLooseEnd } from "#app/lib/services/restore-loose-end.server";
import { anchorOfLooseEnd, type MakingShown } from "#app/lib/views/loose-ends";
import { anchorOfOpening } from "#app/lib/views/openings";
import { holdWords, lapsesByLooseEnd, lapseWords } from "#app/lib/views/what-lapses";

export type LooseEndReply = FormReply & { making?: MakingShown };
export type LooseEndActed = { done: true; anchor: string } | { done: false; reply: LooseEndReply; status: number };

/** Null where the form is none of this page's. @param photoFault why a photo that was sent could not be taken. */
export async function actOnLooseEnds(install: InstallContext, sent: FormData, photoFault: string | null): Promise<LooseEndActed | null> {
  const act = actsOf(install);
  const row = anchorOfLooseEnd(String(sent.get("looseEnd") ?? ""));
  const anchor = ({ looseEnd }: { looseEnd: string }) => anchorOfLooseEnd(looseEnd);
  switch (sent.get("intent")) {
    case "make":
      return make(install, sent, photoFault);
    case "restore":
      return formAct({
        sent,
        form: `${row}-restore`,
        schema: restoreForm,
        serve: ({ commandId, ...input }) => restoreLooseEnd(act(commandId), input),
        anchor,
      });
    case "confirm":
      return formAct({
        sent,
        form: `${row}-confirm`,
        schema: looseEndForm,
        serve: ({ commandId, looseEnd }) => confirmRestored(act(commandId), { looseEnd }),
        anchor,
      });
    case "undisturbed":
      return formAct({
        sent,
        form: `${anchorOfOpening(String(sent.get("opening") ?? ""))}-undisturbed`,
        schema: openingForm,
        serve: ({ commandId, opening }) => confirmUndisturbed(act(commandId), { opening }),
        anchor: () => row,
      });
    case "accept":
      return formAct({
        sent,
        form: `${row}-accept`,
        schema: acceptLooseEndForm,
        serve: ({ commandId, ...input }) => acceptLooseEnd(act(commandId), input),
        anchor,
      });
    default:
      return null;
  }
}

async function make(install: InstallContext, sent: FormData, photoFault: string | null): Promise<LooseEndActed> {
  const photos = photosIn(sent, "photos");
  const { e, me } = install;
  const submission = parseWithZod(sent, { schema: makeLooseEndForm });
  if (submission.status !== "success") return { done: false, reply: replyOf("make", sent, submission.reply().error), status: 400 };
  if (photoFault) return { done: false, reply: replyOf("make", sent, { photos: [photoFault] }), status: 422 };
  const { commandId, ...input } = submission.value;
  const go = e.result.runs.find((r) => r.go)?.id ?? "";
  const seen = [input.system, sent.get("due"), input.askedBy ?? "", go].join("|");
  if (sent.get("seen") !== seen) {
    const lapses = lapsesByLooseEnd(e, me, input, input.askedBy !== null);
    const says = [lapseWords(lapses), input.undisturbed && input.askedBy === null ? UNTIL_CONFIRMED : ""].filter(Boolean).join(" ");
    const making = { seen, hold: holdWords(lapses), says };
    if (lapses.hold || lapses.items > 0) return { done: false, reply: { ...replyOf("make", sent, {}), making }, status: 200 };
  }
  const outcome = await makeLooseEnd(actsOf(install)(commandId), { ...input, photos });
  if (outcome.ok) return { done: true, anchor: anchorOfLooseEnd(outcome.value.looseEnd) };
  const field = outcome.code === "invalid" ? "askedBy" : "";
  return { done: false, reply: replyOf("make", sent, { [field]: [outcome.message] }), status: outcome.status };
}
const UNTIL_CONFIRMED = "It does so until a second person has looked and confirms that nothing was disturbed; then all of it stands again.";
