import { data, Form, redirect } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Fitting } from "#app/components/ui/Fitting";
import { ItemNut } from "#app/components/ui/ItemNut";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { mailLog } from "#app/db/queries/mail-log.server";
import { mayMailAgain } from "#app/lib/gates/set-up-verdicts";
import { readForm } from "#app/lib/http/form.server";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { mailAgainForm } from "#app/lib/schemas/set-up-forms";
import { sendMailAgain } from "#app/lib/services/send-mail-again.server";
import { anchorOfMail, mailView } from "#app/lib/views/mail";
import { mayOf } from "#app/lib/views/may";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.mail";

export const meta: Route.MetaFunction = () => [{ title: "Mail · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, me, installId, now, snapshot } = context.get(installContext);
  const again = (row: { kind: string; act: string }) => mayOf(mayMailAgain(e, { member: me.id, kind: row.kind, act: row.act }));
  return { view: mailView(await mailLog(db(), installId), now, snapshot.install.timeZone, again), formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const sent = await readForm(request);
  const acts = actsOf(install);
  const acted = await formAct({
    sent,
    form: anchorOfMail(String(sent.get("mail") ?? "")),
    schema: mailAgainForm,
    serve: ({ commandId, mail }) => sendMailAgain(acts(commandId), { mail }),
    anchor: ({ mail }) => anchorOfMail(mail),
  });
  if (acted.done) return redirect(`${boardOf(install.installId)}/mail#${acted.anchor}`, 303);
  return data(acted.reply, { status: acted.status });
}

const NUT = { sent: "done", waiting: "todo", "given up": "lapsed" } as const;

export default function Mail({ loaderData, actionData }: Route.ComponentProps) {
  const { view, formId } = loaderData;
  return (
    <main id="main">
      <TitlePipe title="Mail" state={view.state} fill={view.sent} />
      {view.lost > 0 && (
        <Notice kind="danger" title={view.lost === 1 ? "1 mail did not get through." : `${view.lost} mails did not get through.`} band>
          No mail is not a no-go: tell these people yourself, and check their addresses. A lead can have a mail tried again.
        </Notice>
      )}
      {view.groups.length === 0 && (
        <p className="max-w-[62ch] px-4 py-6 text-lead tablet:px-6">
          Mails about runs show here: GO, no-go, HOLD and SCRUB, each with who got it and when. The first goes out when a lead calls GO or
          sends a no-go.
        </p>
      )}
      {view.groups.map((group) => (
        <section key={group.id} aria-labelledby={group.id} className="border-b-2 border-ink px-4 py-4 tablet:px-6">
          <h2 id={group.id} className="text-h3 leading-snug">
            {group.subject}
          </h2>
          <p className="text-ink-2">written {group.written}</p>
          <ul className="mt-2">
            {group.lines.map((line) => (
              <li
                key={line.id}
                id={line.anchor}
                className="grid grid-cols-[52px_minmax(0,1fr)] items-center gap-x-4 border-t border-line py-2 tablet:grid-cols-[52px_minmax(0,1fr)_minmax(0,1fr)]"
              >
                <ItemNut state={NUT[line.state]} size={44} />
                <p>{line.to}</p>
                <p className="max-tablet:col-start-2">
                  <b className={line.state === "given up" ? "text-stop-ink" : undefined}>{line.words}</b>
                  {line.error && <span className="block text-note text-ink-2">{line.error}</span>}
                </p>
                {line.again && (
                  <Form method="post" className="col-start-2 flex flex-col gap-2 py-2 tablet:col-start-3" preventScrollReset>
                    <HiddenIds commandId={`${formId}-${line.id}`} also={{ mail: line.id }} />
                    <FormFaults faults={fieldsOf(line.anchor, actionData).faults} />
                    <Fitting reason={line.again.ok ? undefined : line.again.why}>Try again</Fitting>
                  </Form>
                )}
              </li>
            ))}
          </ul>
        </section>
      ))}
    </main>
  );
}
