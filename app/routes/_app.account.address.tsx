import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AccountPage } from "#app/components/account/AccountPage";
import { PresentPassword } from "#app/components/account/SecretFields";
import { TextInput } from "#app/components/forms/TextInput";
import { Notice } from "#app/components/ui/Notice";
import { actorOf } from "#app/lib/auth/actor.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { newId } from "#app/lib/ids";
import { addressForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { askForAddress } from "#app/lib/services/change-account.server";
import type { Route } from "./+types/_app.account.address";

export const meta: Route.MetaFunction = () => [{ title: "Mail address · Bladecount" }];

export const loader = ({ context, url }: Route.LoaderArgs) => ({
  formId: newId(),
  email: actorOf(context).email,
  asked: url.searchParams.has("asked"),
});

export async function action({ request, context }: Route.ActionArgs) {
  const actor = actorOf(context);
  const acted = await accountAct({
    sent: await readForm(request),
    form: "address",
    schema: addressForm,
    serve: ({ commandId, ...input }) => askForAddress({ actor, commandId }, input),
  });
  return acted.done ? redirect("/account/address?asked", 303) : data(acted.reply, { status: acted.status });
}

export default function Address({ loaderData, actionData }: Route.ComponentProps) {
  const { formId, email, asked } = loaderData;
  const { field } = fieldsOf("address", actionData);
  return (
    <AccountPage title="Mail address" state={email}>
      {asked && !actionData && (
        <Notice kind="done" title="A link is on its way to the new address." role="status">
          Open it within 24 hours and confirm. Until then {email} stays, which was told of it. If nothing comes, check the address; it may
          also belong to another account here.
        </Notice>
      )}
      <AccountForm form="address" reply={actionData} commandId={formId} act="Send the link" note="the old address is told">
        <TextInput
          {...field("email")}
          type="email"
          label="New mail address"
          hint="It counts once you have opened the link that goes there."
          autoComplete="email"
          required
        />
        <PresentPassword field={field} />
      </AccountForm>
    </AccountPage>
  );
}
