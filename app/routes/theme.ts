import { eq } from "drizzle-orm";
import { data, redirect } from "react-router";
import { write } from "#app/db/client.server";
import { users } from "#app/db/schema/users";
import { readSession } from "#app/lib/auth/session.server";
import { readForm } from "#app/lib/http/form.server";
import { returnPath } from "#app/lib/http/return-path";
import { themeChoice, themeCookie } from "#app/lib/http/theme.server";
import type { Route } from "./+types/theme";

export async function action({ request }: Route.ActionArgs) {
  const form = await readForm(request);
  const theme = themeChoice.safeParse(form.get("theme"));
  if (!theme.success) throw data("Choose apron, hangar, or as the tablet says.", { status: 400 });
  const actor = await readSession(request);
  if (actor) await write((tx) => tx.update(users).set({ theme: theme.data }).where(eq(users.id, actor.userId)));
  const headers = { "Set-Cookie": themeCookie(theme.data) };
  const to = form.get("to");
  // Without scripts the form names the page to come back to; a fetcher stays where it is.
  return typeof to === "string" ? redirect(returnPath(to, "/"), { status: 303, headers }) : data(null, { headers });
}
