import { data, Form, redirect } from "react-router";
import { AccountPage } from "#app/components/account/AccountPage";
import { AccountRow } from "#app/components/account/AccountRow";
import { Fitting } from "#app/components/ui/Fitting";
import { actorOf } from "#app/lib/auth/actor.server";
import { endedCookie, sessionsOf } from "#app/lib/auth/session.server";
import { count } from "#app/lib/gates/who";
import { readForm } from "#app/lib/http/form.server";
import { sessionForm } from "#app/lib/schemas/account";
import { endOneSession, signOutEverywhere } from "#app/lib/services/own-choices.server";
import { sessionView } from "#app/lib/views/account";
import type { Route } from "./+types/_app.account.sessions";

export const meta: Route.MetaFunction = () => [{ title: "Where you are signed in · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { userId, sessionId } = actorOf(context);
  const sessions = (await sessionsOf(userId)).map((row) => sessionView(row, sessionId));
  return { sessions: [...sessions.filter((s) => s.here), ...sessions.filter((s) => !s.here)] };
}

export async function action({ request, context }: Route.ActionArgs) {
  const { userId, sessionId } = actorOf(context);
  const sent = await readForm(request);
  const intent = sent.get("intent");
  if (intent === "others") await signOutEverywhere(userId, sessionId);
  else if (intent !== "all") {
    const one = sessionForm.safeParse(Object.fromEntries(sent));
    if (!one.success) throw data("That session is not here. Load the page again.", { status: 400 });
    await endOneSession(userId, one.data.session);
    if (one.data.session !== sessionId) return redirect("/account/sessions", 303);
  }
  if (intent === "others") return redirect("/account/sessions", 303);
  if (intent === "all") await signOutEverywhere(userId);
  return redirect("/sign-in", { status: 303, headers: { "Set-Cookie": endedCookie } });
}

export default function Sessions({ loaderData: { sessions } }: Route.ComponentProps) {
  const others = sessions.length - 1;
  return (
    <AccountPage title="Where you are signed in" state={count(sessions.length, "browser")}>
      <ul className="max-w-[860px] border-t-2 border-ink">
        {sessions.map(({ id, browser, here, says }) => (
          <AccountRow
            key={id}
            title={here ? `${browser}, this one` : browser}
            acts={
              <Form method="post">
                <input type="hidden" name="session" value={id} />
                <Fitting label={`Sign out ${browser}, ${here ? "this one" : says}`}>Sign out</Fitting>
              </Form>
            }
          >
            {says}
          </AccountRow>
        ))}
      </ul>
      <div className="flex flex-wrap gap-3">
        {others > 0 && (
          <Form method="post">
            <input type="hidden" name="intent" value="others" />
            <Fitting>Sign out all others</Fitting>
          </Form>
        )}
        <Form method="post">
          <input type="hidden" name="intent" value="all" />
          <Fitting>Sign out everywhere, here too</Fitting>
        </Form>
      </div>
      <p className="max-w-[62ch] text-ink-2">
        A browser that you do not know? Sign it out, then change your password. Each one is signed out by itself after 14 days, or 7 days
        without use.
      </p>
    </AccountPage>
  );
}
