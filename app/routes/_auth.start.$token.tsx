import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AuthTitle } from "#app/components/account/AuthTitle";
import { NewPassword, NewPin } from "#app/components/account/SecretFields";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { write } from "#app/db/client.server";
import { startSession } from "#app/lib/auth/session.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { firstPersonForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { isStartOpen, makeFirstPerson } from "#app/lib/services/first-person.server";
import type { Route } from "./+types/_auth.start.$token";

export const meta: Route.MetaFunction = () => [{ title: "First account · Bladecount" }];

export async function loader({ params }: Route.LoaderArgs) {
  const open = await isStartOpen(params.token);
  return data({ open }, { status: open ? 200 : 404 });
}

export async function action({ request, params }: Route.ActionArgs) {
  const sent = await readForm(request);
  const acted = await accountAct({ sent, form: "start", schema: firstPersonForm, serve: (input) => makeFirstPerson(params.token, input) });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  const cookie = await write((tx) => startSession(tx, acted.value.userId, request.headers.get("User-Agent")));
  return redirect("/hangar", { status: 303, headers: { "Set-Cookie": cookie } });
}

export default function Start({ loaderData, actionData }: Route.ComponentProps) {
  const { field } = fieldsOf("start", actionData);
  return loaderData.open ? (
    <>
      <AuthTitle
        says={
          <p>
            You administer this instance: its people and its mail. On an install that gives you no right; there you are what its lead makes
            you.
          </p>
        }
      >
        The first account
      </AuthTitle>
      <AccountForm form="start" reply={actionData} act="Open the account" note="the link is over then">
        <TextInput {...field("name")} label="Your name" hint="As it is to stand under what you sign." autoComplete="name" required />
        <TextInput {...field("email")} type="email" label="E-mail" hint="You sign in with it." autoComplete="username" required />
        <NewPassword field={field} />
        <NewPin field={field} />
        <p className="text-note text-ink-2">
          This product never replaces the maker’s manual, your authority’s rules or a licensed person’s judgement.
        </p>
      </AccountForm>
    </>
  ) : (
    <>
      <AuthTitle
        says={<p>It was used, or the server was started again and printed a newer one. Somebody with an account can invite you.</p>}
      >
        This link is over
      </AuthTitle>
      <Fitting size="act" href="/sign-in">
        Sign in
      </Fitting>
    </>
  );
}
