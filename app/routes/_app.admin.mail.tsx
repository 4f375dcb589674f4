import { data, Form, redirect } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { Fitting } from "#app/components/ui/Fitting";
import { StateRow } from "#app/components/ui/StateRow";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { instanceMail, mailCounts } from "#app/db/queries/instance-mail.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { instanceMailForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { tryMailAgain } from "#app/lib/services/administer.server";
import { instanceMailView } from "#app/lib/views/admin";
import type { Route } from "./+types/_app.admin.mail";

export const meta: Route.MetaFunction = () => [{ title: "Mail of the instance · Bladecount" }];

/** Of those that went out or wait the newest are enough; what was given up is listed whole. */
const MOST = { "given up": 500, waiting: 100, sent: 50 };

export async function loader() {
  const counts = await mailCounts(db());
  const groups = [];
  for (const state of ["given up", "waiting", "sent"] as const)
    groups.push({ state, count: counts[state], mails: (await instanceMail(db(), state, MOST[state])).map(instanceMailView) });
  return { groups };
}

export async function action({ request, context }: Route.ActionArgs) {
  const sent = await readForm(request);
  const form = `mail-${sent.get("mail")}`;
  const acted = await accountAct({ sent, form, schema: instanceMailForm, serve: ({ mail }) => tryMailAgain(actorOf(context), mail) });
  return acted.done ? redirect(`/admin/mail#${form}`, 303) : data(acted.reply, { status: acted.status });
}

const NUT = { sent: "done", waiting: "todo", "given up": "lapsed" } as const;
const TITLE = { sent: "Sent", waiting: "Waiting", "given up": "Given up" };
const NONE = {
  sent: "Nothing was sent yet.",
  waiting: "Nothing waits.",
  "given up": "Nothing was given up.",
};

export default function InstanceMail({ loaderData: { groups }, actionData }: Route.ComponentProps) {
  const of = (state: string) => groups.find((g) => g.state === state)?.count ?? 0;
  const all = groups.reduce((sum, g) => sum + g.count, 0);
  return (
    <main id="main">
      <TitlePipe
        title="Mail of the instance"
        state={`${of("sent")} sent, ${of("waiting")} waiting, ${of("given up")} given up`}
        fill={all ? of("sent") / all : 1}
      />
      <p className="max-w-[62ch] px-4 pt-4 text-ink-2 tablet:px-6">
        What is in a mail is not shown here, and of an install’s mails not the subject either. A GO mail is sent again by a lead of its
        install, while the GO is in force.
      </p>
      {groups.map(({ state, count, mails }) => (
        <section key={state} aria-labelledby={`mails-${NUT[state]}`}>
          <h2 id={`mails-${NUT[state]}`} className="border-b-2 border-ink px-4 pt-6 pb-3 text-h3 tablet:px-6">
            {TITLE[state]}
            {count > mails.length && <span className="font-normal text-ink-2">, the newest {mails.length}</span>}
          </h2>
          {mails.length === 0 && <p className="px-4 py-3 text-ink-2 tablet:px-6">{NONE[state]}</p>}
          <ul>
            {mails.map(({ id, anchor, to, what, says, error, again }) => (
              <StateRow key={id} id={anchor} nut={NUT[state]} word={state}>
                <h3 className="text-lead break-words">{what}</h3>
                <p className="break-words">{to}</p>
                <p className="text-ink-2">{says}</p>
                {error && <p className="text-note text-ink-2">{error}</p>}
                {again && (
                  <Form method="post" className="flex flex-col items-start gap-2 pt-2" preventScrollReset>
                    <input type="hidden" name="mail" value={id} />
                    <FormFaults faults={fieldsOf(anchor, actionData).faults} />
                    <Fitting label={`Try the mail to ${to} again`}>Try again</Fitting>
                  </Form>
                )}
              </StateRow>
            ))}
          </ul>
        </section>
      ))}
    </main>
  );
}
