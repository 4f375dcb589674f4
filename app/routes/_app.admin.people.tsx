import { data, Form, redirect } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { StateRow } from "#app/components/ui/StateRow";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { everybody } from "#app/db/queries/people.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { personForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { disableAccount, enableAccount, sendReset } from "#app/lib/services/administer.server";
import { anchorOfPerson, peopleState, personView } from "#app/lib/views/admin";
import type { Route } from "./+types/_app.admin.people";

export const meta: Route.MetaFunction = () => [{ title: "People · Bladecount" }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const { userId } = actorOf(context);
  const search = (url.searchParams.get("q") ?? "").slice(0, 80);
  const all = (await everybody(db())).map((row) => personView(row, userId));
  const wanted = search.trim().toLowerCase();
  const people = all.filter((p) => `${p.name} ${p.email}`.toLowerCase().includes(wanted));
  return { people, state: peopleState(all), search, sent: url.searchParams.get("sent") ?? "" };
}

const ACTS = { disable: disableAccount, enable: enableAccount, reset: sendReset };

export async function action({ request, context }: Route.ActionArgs) {
  const actor = actorOf(context);
  const sent = await readForm(request);
  const intent = String(sent.get("intent"));
  if (intent !== "disable" && intent !== "enable" && intent !== "reset") throw data("Choose what to do.", { status: 400 });
  const form = anchorOfPerson(String(sent.get("person") ?? ""));
  const acted = await accountAct({ sent, form, schema: personForm, serve: ({ person }) => ACTS[intent](actor, person) });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`/admin/people${intent === "reset" ? `?sent=${acted.value.person}` : ""}#${form}`, 303);
}

export default function People({ loaderData, actionData }: Route.ComponentProps) {
  const { people, state, search, sent } = loaderData;
  return (
    <main id="main">
      <TitlePipe title="People" state={state} />
      <div className="px-4 py-4 tablet:px-6">
        <p className="max-w-[62ch] pb-3 text-ink-2">
          Everybody with an account here. People come in by the invitation of an install’s lead. You have no right on an install as such,
          and nobody’s password is seen or chosen here.
        </p>
        <Form className="flex max-w-[640px] items-end gap-3">
          <TextInput name="q" label="Name or address" defaultValue={search} type="search" className="flex-1" />
          <Fitting>Look</Fitting>
        </Form>
      </div>
      {people.length === 0 && <p className="px-4 py-3 text-lead tablet:px-6">Nobody here is called that.</p>}
      <ul className="border-t border-line">
        {people.map(({ id, anchor, name, email, says, disabled, isAdmin, me }) => (
          <StateRow key={id} id={anchor} nut={disabled ? "na" : "done"} word={disabled ? "disabled" : "in use"}>
            <h2 className="text-lead break-words">
              <b>{name}</b>, {email}
            </h2>
            <p className="text-ink-2">
              {isAdmin && "administrator, "}
              {says}
            </p>
            <FormFaults faults={fieldsOf(anchor, actionData).faults} />
            {sent === id && (
              <Notice kind="done" title="A link for a new password is on its way." role="status">
                It is good for one hour.
              </Notice>
            )}
            <div className="flex flex-wrap gap-3 pt-2">
              {!disabled && (
                <Form method="post" preventScrollReset>
                  <input type="hidden" name="person" value={id} />
                  <Fitting name="intent" value="reset" label={`Send ${name} a link for a new password`}>
                    Send a link for a new password
                  </Fitting>
                </Form>
              )}
              {disabled ? (
                <Form method="post" preventScrollReset>
                  <input type="hidden" name="person" value={id} />
                  <Fitting name="intent" value="enable" label={`Enable the account of ${name}`}>
                    Enable
                  </Fitting>
                </Form>
              ) : (
                <details>
                  <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
                    Disable<span className="sr-only"> the account of {name}</span>
                  </summary>
                  <p className="max-w-[62ch] pb-2 text-ink-2">
                    They are signed out everywhere and told by mail. What they did and signed stays. An install whose only lead they are can
                    plan nothing until they are back.
                  </p>
                  <Form method="post" preventScrollReset>
                    <input type="hidden" name="person" value={id} />
                    <Fitting
                      name="intent"
                      value="disable"
                      label={`Disable the account of ${name} now`}
                      reason={me ? "Nobody disables their own account. Another administrator can." : undefined}
                    >
                      Disable the account
                    </Fitting>
                  </Form>
                </details>
              )}
            </div>
          </StateRow>
        ))}
      </ul>
    </main>
  );
}
