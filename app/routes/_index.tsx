import { redirect } from "react-router";
import { readSession } from "#app/lib/auth/session.server";
import type { Route } from "./+types/_index";

export async function loader({ request }: Route.LoaderArgs) {
  throw redirect((await readSession(request)) ? "/hangar" : "/sign-in");
}

export default function Index() {
  return null;
}
