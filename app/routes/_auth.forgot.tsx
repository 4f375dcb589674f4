import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AuthTitle } from "#app/components/account/AuthTitle";
import { TextInput } from "#app/components/forms/TextInput";
import { Anchor } from "#app/components/ui/Anchor";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { forgotForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { askForReset } from "#app/lib/services/reset-password.server";
import type { Route } from "./+types/_auth.forgot";

export const meta: Route.MetaFunction = () => [{ title: "Forgot the password · Bladecount" }];

export const loader = ({ url }: Route.LoaderArgs) => ({ asked: url.searchParams.has("asked") });

export async function action({ request }: Route.ActionArgs) {
  const sent = await readForm(request);
  // What is left to do is not waited for: the answer is as fast where there is no account.
  const acted = await accountAct({ sent, form: "forgot", schema: forgotForm, serve: ({ email }) => askForReset(email) });
  return acted.done ? redirect("/forgot?asked", 303) : data(acted.reply, { status: acted.status });
}

export default function Forgot({ loaderData, actionData }: Route.ComponentProps) {
  const { field } = fieldsOf("forgot", actionData);
  return loaderData.asked ? (
    <AuthTitle
      says={
        <>
          <p>
            If there is an account with the address that you entered, a mail with a link is on its way there. The link is good for one hour.
          </p>
          <p className="text-base text-ink-2">
            Nothing came? Look among the unwanted mail, check the address and <Anchor href="/forgot">ask again</Anchor>, or ask whoever
            administers this instance.
          </p>
        </>
      }
    >
      Look into your mail
    </AuthTitle>
  ) : (
    <>
      <AuthTitle says={<p>You get a mail with a link, with which you choose a new password. The signing PIN is another one and stays.</p>}>
        Forgot the password
      </AuthTitle>
      <AccountForm form="forgot" reply={actionData} act="Send me the link">
        <TextInput {...field("email")} type="email" label="E-mail" autoComplete="username" required />
      </AccountForm>
      <p className="mt-4">
        <Anchor href="/sign-in">Back to the sign-in</Anchor>
      </p>
    </>
  );
}
