import { desc, eq } from "drizzle-orm";
import { data, Form, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AccountPage } from "#app/components/account/AccountPage";
import { AccountRow } from "#app/components/account/AccountRow";
import { PresentPassword } from "#app/components/account/SecretFields";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { db } from "#app/db/client.server";
import { apiTokens } from "#app/db/schema/api-tokens";
import { actorOf } from "#app/lib/auth/actor.server";
import { now } from "#app/lib/clock";
import { count } from "#app/lib/gates/who";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { newId } from "#app/lib/ids";
import { endTokenForm, SCOPES, TOKEN_DAYS, tokenForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { endApiToken, makeApiToken } from "#app/lib/services/api-tokens.server";
import { SCOPE_WORDS, tokenView } from "#app/lib/views/account";
import type { Route } from "./+types/_app.account.tokens";

export const meta: Route.MetaFunction = () => [{ title: "API tokens · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { userId } = actorOf(context);
  const rows = await db().select().from(apiTokens).where(eq(apiTokens.userId, userId)).orderBy(desc(apiTokens.createdAt));
  return { formId: newId(), tokens: rows.map((row) => tokenView(row, now())) };
}

export async function action({ request, context }: Route.ActionArgs) {
  const actor = actorOf(context);
  const sent = await readForm(request);
  if (sent.get("intent") === "end") {
    const one = endTokenForm.safeParse(Object.fromEntries(sent));
    if (!one.success) throw data("That token is not here. Load the page again.", { status: 400 });
    await endApiToken(actor.userId, one.data.token);
    return redirect("/account/tokens", 303);
  }
  const acted = await accountAct({
    sent,
    form: "token",
    schema: tokenForm,
    // Whatever records reads as well: nothing can be recorded on a board that is not seen.
    serve: ({ commandId, days, may, name, password }) =>
      makeApiToken({ actor, commandId }, { name, password, days: Number(days), scopes: may === "record" ? ["read", "record"] : ["read"] }),
  });
  // The one answer that shows it: no address leads back to it.
  return acted.done
    ? data({ made: acted.value.token, reply: undefined })
    : data({ made: "", reply: acted.reply }, { status: acted.status });
}

export default function Tokens({ loaderData, actionData }: Route.ComponentProps) {
  const { formId, tokens } = loaderData;
  const reply = actionData?.reply;
  const { field } = fieldsOf("token", reply);
  return (
    <AccountPage title="API tokens" state={tokens.length ? count(tokens.length, "token") : "no program asks in your name"}>
      {actionData?.made && (
        <Notice kind="done" title="This is the token. Copy it now: it is shown this once." role="status">
          <output className="fig block py-2 text-base break-all select-all">{actionData.made}</output>
          Keep it like a password. A program sends it as “Authorization: Bearer”, followed by the token.
        </Notice>
      )}
      {tokens.length > 0 && (
        <ul className="max-w-[860px] border-t-2 border-ink">
          {tokens.map(({ id, name, may, says, over }) => (
            <AccountRow
              key={id}
              title={name}
              acts={
                <Form method="post">
                  <input type="hidden" name="intent" value="end" />
                  <input type="hidden" name="token" value={id} />
                  <Fitting label={`${over ? "Remove" : "End"} the token ${name}`}>{over ? "Remove" : "End it"}</Fitting>
                </Form>
              }
            >
              <b>{may}</b>; {says}
            </AccountRow>
          ))}
        </ul>
      )}
      <section aria-labelledby="new">
        <h2 id="new" className="pb-3 text-h3">
          A new token
        </h2>
        <AccountForm key={tokens.length} form="token" reply={reply} commandId={formId} act="Make the token" note="it is shown once">
          <TextInput {...field("name")} label="What it is for" hint="Such as the display in the hangar." maxLength={60} required />
          <ChoiceGroup
            {...field("may", "read")}
            label="What it may do"
            options={SCOPES.map((value) => ({ value, ...SCOPE_WORDS[value] }))}
            stacked
          />
          <ChoiceGroup {...field("days", "90")} label="Good for" options={TOKEN_DAYS.map((value) => ({ value, label: `${value} days` }))} />
          <PresentPassword field={field} />
        </AccountForm>
      </section>
    </AccountPage>
  );
}
