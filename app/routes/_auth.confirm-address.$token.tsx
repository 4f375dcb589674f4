import { data, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AuthTitle } from "#app/components/account/AuthTitle";
import { Fitting } from "#app/components/ui/Fitting";
import { readForm } from "#app/lib/http/form.server";
import { replyOf } from "#app/lib/schemas/form-reply";
import { confirmAddress, readAddressLink } from "#app/lib/services/change-account.server";
import type { Route } from "./+types/_auth.confirm-address.$token";

export const meta: Route.MetaFunction = () => [{ title: "New mail address · Bladecount" }];

/** Looking confirms nothing: mail programs open links too. */
export async function loader({ params }: Route.LoaderArgs) {
  const waiting = await readAddressLink(params.token);
  return data({ waiting }, { status: waiting ? 200 : 404 });
}

export async function action({ request, params }: Route.ActionArgs) {
  const sent = await readForm(request);
  const outcome = await confirmAddress(params.token);
  if (outcome.ok) return redirect("/account?address", 303);
  return data(replyOf("confirm", sent, { "": [outcome.message] }), { status: outcome.status });
}

export default function ConfirmAddress({ loaderData: { waiting }, actionData }: Route.ComponentProps) {
  return waiting ? (
    <>
      <AuthTitle
        says={
          <p>
            {waiting.name}, from now on you sign in with {waiting.address}, and mail goes there.
          </p>
        }
      >
        Is this your address?
      </AuthTitle>
      <AccountForm form="confirm" reply={actionData} act={`Use ${waiting.address}`} note="the old address is told" />
    </>
  ) : (
    <>
      <AuthTitle says={<p>It was used, or a day has passed. Ask for a new one on your account page.</p>}>This link is over</AuthTitle>
      <Fitting size="act" href="/account/address">
        To your account
      </Fitting>
    </>
  );
}
