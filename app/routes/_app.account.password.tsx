import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AccountPage } from "#app/components/account/AccountPage";
import { NewPassword, PresentPassword } from "#app/components/account/SecretFields";
import { actorOf } from "#app/lib/auth/actor.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { newId } from "#app/lib/ids";
import { passwordForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { changePassword } from "#app/lib/services/change-account.server";
import type { Route } from "./+types/_app.account.password";

export const meta: Route.MetaFunction = () => [{ title: "Password · Bladecount" }];

export const loader = () => ({ formId: newId() });

export async function action({ request, context }: Route.ActionArgs) {
  const actor = actorOf(context);
  const acted = await accountAct({
    sent: await readForm(request),
    form: "password",
    schema: passwordForm,
    serve: ({ commandId, ...input }) => changePassword({ actor, commandId }, { ...input, name: actor.name, email: actor.email }),
  });
  return acted.done ? redirect("/account?password", 303) : data(acted.reply, { status: acted.status });
}

export default function Password({ loaderData, actionData }: Route.ComponentProps) {
  const { field } = fieldsOf("password", actionData);
  return (
    <AccountPage title="Password" state="signs you out everywhere else">
      <AccountForm form="password" reply={actionData} commandId={loaderData.formId} act="Change the password" note="a mail tells you of it">
        <PresentPassword field={field} />
        <NewPassword field={field} />
      </AccountForm>
    </AccountPage>
  );
}
