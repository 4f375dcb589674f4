import { data, Form, redirect } from "react-router";
import { AccountForm } from "#app/components/account/AccountForm";
import { AuthTitle } from "#app/components/account/AuthTitle";
import { NewPassword, NewPin } from "#app/components/account/SecretFields";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { write } from "#app/db/client.server";
import { readSession, startSession } from "#app/lib/auth/session.server";
import { when } from "#app/lib/gates/when";
import { accountAct } from "#app/lib/http/account-acts.server";
import { readForm } from "#app/lib/http/form.server";
import { newPersonForm, ROLE_DOES } from "#app/lib/schemas/account";
import { fieldsOf, replyOf } from "#app/lib/schemas/form-reply";
import { acceptInvitation, joinAsNewPerson, readInvitation } from "#app/lib/services/accept-invitation.server";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_auth.invitation.$token";

export const meta: Route.MetaFunction = () => [{ title: "Invitation · Bladecount" }];

/** Looking accepts nothing: mail programs open links too. */
export async function loader({ request, params }: Route.LoaderArgs) {
  const found = await readInvitation(params.token);
  if (!found) return data({ invitation: null, reader: "nobody" as const, signedInAs: "" }, { status: 404 });
  const { account, email, inviter, registration, name, role, expiresAt, timeZone } = found;
  const actor = await readSession(request);
  const reader =
    actor && actor.userId === account?.id
      ? "invited"
      : actor
        ? "somebody else"
        : account?.disabled
          ? "disabled"
          : account
            ? "signed out"
            : "new";
  const invitation = { email, inviter, registration, name, role, does: ROLE_DOES[role], until: when(expiresAt, timeZone, true) };
  return data({ invitation, reader: reader as Reader, signedInAs: actor?.email ?? "" });
}

type Reader = "nobody" | "invited" | "somebody else" | "disabled" | "signed out" | "new";

export async function action({ request, params }: Route.ActionArgs) {
  const sent = await readForm(request);
  const actor = await readSession(request);
  if (actor) {
    const outcome = await acceptInvitation(params.token, actor);
    if (outcome.ok) return redirect(boardOf(outcome.value.install), 303);
    return data(replyOf("accept", sent, { "": [outcome.message] }), { status: outcome.status });
  }
  const acted = await accountAct({ sent, form: "join", schema: newPersonForm, serve: (input) => joinAsNewPerson(params.token, input) });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  const { install, member } = acted.value;
  const cookie = await write((tx) => startSession(tx, member, request.headers.get("User-Agent")));
  return redirect(boardOf(install), { status: 303, headers: { "Set-Cookie": cookie } });
}

export default function Invitation({ loaderData, actionData, params }: Route.ComponentProps) {
  const { invitation, reader, signedInAs } = loaderData;
  if (!invitation)
    return (
      <>
        <AuthTitle
          says={
            <p>
              The link was used, withdrawn or sent anew, or seven days have passed. Ask the lead of the install to send it again. If you
              have joined already, sign in.
            </p>
          }
        >
          This invitation is over
        </AuthTitle>
        <Fitting size="act" href="/sign-in">
          Sign in
        </Fitting>
      </>
    );
  const { email, inviter, registration, name, role, does, until } = invitation;
  const { field } = fieldsOf("join", actionData);
  const joins = `Join ${registration} as ${role}`;
  return (
    <>
      <AuthTitle
        says={
          <>
            <p>
              {inviter} asks {email} to join {registration}, {name}, as <b>{role}</b>: {does}.
            </p>
            <p className="text-base text-ink-2">The link is good to {until}. You can leave the install again at any time.</p>
          </>
        }
      >
        Join {registration}
      </AuthTitle>
      {reader === "invited" && <AccountForm form="accept" reply={actionData} act={joins} note="its lead sees that you joined" />}
      {reader === "signed out" && (
        <>
          <p className="mb-4">There is an account with this address. Sign in with it, then accept here.</p>
          <Fitting size="act" href={`/sign-in?to=${encodeURIComponent(`/invitation/${params.token}`)}`} note="you come back here">
            Sign in
          </Fitting>
        </>
      )}
      {reader === "disabled" && <p>The account with this address is disabled. Ask whoever administers this instance to enable it.</p>}
      {reader === "somebody else" && (
        <Form method="post" action="/sign-out" className="flex flex-col gap-4">
          <p>
            You are signed in as {signedInAs}, and this is for {email}. Sign out, then open the link again. If both addresses are yours, ask{" "}
            {inviter} to invite the other one.
          </p>
          <Fitting size="act">Sign out</Fitting>
        </Form>
      )}
      {reader === "new" && (
        <AccountForm form="join" reply={actionData} act={joins} note="and sign in on this browser">
          <TextInput {...field("name")} label="Your name" hint="As it is to stand under what you sign." autoComplete="name" required />
          {/* For the browser's list of passwords. */}
          <input type="hidden" name="username" autoComplete="username" defaultValue={email} />
          <NewPassword field={field} />
          <NewPin field={field} />
          <p className="text-note text-ink-2">
            This product never replaces the maker’s manual, your authority’s rules or a licensed person’s judgement.
          </p>
        </AccountForm>
      )}
    </>
  );
}
