// The acts of the findings' page: raised, sharpened or lowered, fixed, closed or sent back.
import { actsOf, type FormActed, formAct, photosIn } from "#app/lib/http/form-acts.server";
import type { InstallContext } from "#app/lib/http/install.server";
import { replyOf } from "#app/lib/schemas/form-reply";
import { closeFindingForm, fixFindingForm, gradeFindingForm, raiseFindingForm, rejectFixForm } from "#app/lib/schemas/happening-forms";
import { raiseFinding } from "#app/lib/services/raise-finding.server";
import { closeFinding, fixFinding, gradeFinding, rejectFix } from "#app/lib/services/settle-finding.server";
import { anchorOfFinding } from "#app/lib/views/findings";

/**
 * Null where the form is none of this page's. @param photoFault why a photo that was sent could not be taken.
 * @param where where a new one was seen, in words that join its own; null = not said.
 */
export async function actOnFindings(
  install: InstallContext,
  sent: FormData,
  photoFault: string | null,
  where: string | null,
): Promise<FormActed | null> {
  const act = actsOf(install);
  const row = anchorOfFinding(String(sent.get("finding") ?? ""));
  const anchor = ({ finding }: { finding: string }) => anchorOfFinding(finding);
  switch (sent.get("intent")) {
    case "raise": {
      const [photo = null, ...morePhotos] = photosIn(sent, "photos");
      if (photoFault) return { done: false, reply: replyOf("raise", sent, { photos: [photoFault] }), status: 422 };
      return formAct({
        sent,
        form: "raise",
        schema: raiseFindingForm(install.me.units),
        serve: ({ commandId, words, ...input }) =>
          raiseFinding(act(commandId), { ...input, words: where === null ? words : `${words} (seen ${where})`, photo, morePhotos }),
        anchor,
      });
    }
    case "fix":
      return formAct({
        sent,
        form: `${row}-fix`,
        schema: fixFindingForm,
        serve: ({ commandId, ...input }) => fixFinding(act(commandId), input),
        anchor,
      });
    case "close":
      return formAct({
        sent,
        form: `${row}-close`,
        schema: closeFindingForm,
        serve: ({ commandId, ...input }) => closeFinding(act(commandId), input),
        anchor,
      });
    case "reject":
      return formAct({
        sent,
        form: `${row}-close`,
        schema: rejectFixForm,
        serve: ({ commandId, ...input }) => rejectFix(act(commandId), input),
        anchor,
      });
    case "grade":
      return formAct({
        sent,
        form: `${row}-grade`,
        schema: gradeFindingForm(install.me.units),
        serve: ({ commandId, ...input }) => gradeFinding(act(commandId), input),
        anchor,
      });
    default:
      return null;
  }
}
