import { eq } from "drizzle-orm";
import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AccountPage } from "#app/components/account/AccountPage";
import { NewPin, PresentPassword } from "#app/components/account/SecretFields";
import { db } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { actorOf } from "#app/lib/auth/actor.server";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { newId } from "#app/lib/ids";
import { pinForm } from "#app/lib/schemas/account";
import { fieldsOf } from "#app/lib/schemas/form-reply";
import { setPin } from "#app/lib/services/change-account.server";
import type { Route } from "./+types/_app.account.pin";

export const meta: Route.MetaFunction = () => [{ title: "Signing PIN · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const [me] = await db()
    .select({ pinHash: users.pinHash })
    .from(users)
    .where(eq(users.id, actorOf(context).userId));
  return { formId: newId(), hasPin: Boolean(me?.pinHash) };
}

export async function action({ request, context }: Route.ActionArgs) {
  const actor = actorOf(context);
  const acted = await accountAct({
    sent: await readForm(request),
    form: "pin",
    schema: pinForm,
    serve: ({ commandId, password, pin }) => setPin({ actor, commandId }, { password, pin }),
  });
  return acted.done ? redirect("/account?pin", 303) : data(acted.reply, { status: acted.status });
}

export default function Pin({ loaderData, actionData }: Route.ComponentProps) {
  const { formId, hasPin } = loaderData;
  const { field } = fieldsOf("pin", actionData);
  return (
    <AccountPage title="Signing PIN" state={hasPin ? "set" : "not set: you cannot sign"}>
      <AccountForm
        form="pin"
        reply={actionData}
        commandId={formId}
        act={hasPin ? "Change the PIN" : "Set the PIN"}
        note="what you signed stays signed"
      >
        <PresentPassword field={field} />
        <NewPin field={field} />
      </AccountForm>
    </AccountPage>
  );
}
