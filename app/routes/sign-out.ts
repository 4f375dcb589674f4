import { redirect } from "react-router";
import { write } from "#app/db/client.server";
import { endedCookie, endSession, readSession } from "#app/lib/auth/session.server";
import type { Route } from "./+types/sign-out";

// A link changes nothing: signing out takes the button.
export function loader() {
  throw redirect("/");
}

export async function action({ request }: Route.ActionArgs) {
  const actor = await readSession(request);
  if (actor) await write((tx) => endSession(tx, actor.userId, actor.sessionId));
  throw redirect("/sign-in", { status: 303, headers: { "Set-Cookie": endedCookie } });
}
