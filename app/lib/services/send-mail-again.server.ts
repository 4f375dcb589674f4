// A mail that was given up gets another full set of tries, when a lead asks for it. The record is not touched: what the mail tells
// about stands in it already.
import { mailOf } from "#app/db/queries/mail-log.server";
import { mayMailAgain } from "#app/lib/gates/set-up-verdicts";
import { tryAgain } from "#app/lib/mail/outbox.server";
import { done, notFound, type Outcome, refusalOf, refuse } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export function sendMailAgain(act: Act, input: { mail: string }): Promise<Outcome<{ mail: string }>> {
  return perform({ ...act, kind: "send-mail-again", input }, async (d) => {
    const mail = await mailOf(d.tx, d.installId, input.mail);
    if (!mail) return notFound("That mail");
    const refusal = refusalOf(mayMailAgain(d.e, { member: d.member.id, kind: mail.kind, act: mail.act }));
    if (refusal) return refusal;
    return (await tryAgain(d.tx, { id: mail.id, installId: d.installId }))
      ? done({ mail: mail.id })
      : refuse(409, "already", "This mail is not given up: it went out, or it waits for its next try. Nothing is left to do.");
  });
}
