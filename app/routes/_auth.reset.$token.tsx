import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AuthTitle } from "#app/components/account/AuthTitle";
import { NewPassword } from "#app/components/account/SecretFields";
import { Fitting } from "#app/components/ui/Fitting";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { resetForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { isResetOpen, resetPassword } from "#app/lib/services/reset-password.server";
import type { Route } from "./+types/_auth.reset.$token";

export const meta: Route.MetaFunction = () => [{ title: "New password · Bladecount" }];

export async function loader({ params }: Route.LoaderArgs) {
  const open = await isResetOpen(params.token);
  return data({ open }, { status: open ? 200 : 404 });
}

export async function action({ request, params }: Route.ActionArgs) {
  const sent = await readForm(request);
  const acted = await accountAct({ sent, form: "reset", schema: resetForm, serve: (i) => resetPassword(params.token, i.newPassword) });
  return acted.done ? redirect("/sign-in?reset", 303) : data(acted.reply, { status: acted.status });
}

export default function Reset({ loaderData, actionData }: Route.ComponentProps) {
  return loaderData.open ? (
    <>
      <AuthTitle says={<p>It signs you out on every device, and ends your API tokens. You sign in with it afterwards.</p>}>
        Choose a new password
      </AuthTitle>
      <AccountForm form="reset" reply={actionData} act="Use this password">
        <NewPassword field={fieldsOf("reset", actionData).field} />
      </AccountForm>
    </>
  ) : (
    <>
      <AuthTitle says={<p>It was used, a newer password was set, or an hour has passed. Ask for a new one.</p>}>
        This link is over
      </AuthTitle>
      <Fitting size="act" href="/forgot">
        Ask for a new link
      </Fitting>
    </>
  );
}
