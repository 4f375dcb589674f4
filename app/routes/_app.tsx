import { Outlet } from "react-router";
import { RouteError } from "#app/components/ui/RouteError";
import { actorOf } from "#app/lib/auth/actor.server";
import { requireUser } from "#app/lib/auth/guards.server";
import type { Route } from "./+types/_app";

export const middleware: Route.MiddlewareFunction[] = [requireUser];

/** The person, for every page behind sign-in. It also makes the guard run on client navigations. */
export function loader({ context }: Route.LoaderArgs) {
  const { userId, name, units, isAdmin } = actorOf(context);
  return { person: { userId, name, units, isAdmin } };
}

export default function App() {
  return <Outlet />;
}

export function ErrorBoundary() {
  return <RouteError />;
}
