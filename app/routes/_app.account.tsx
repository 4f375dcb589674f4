import { Outlet } from "react-router";
import { Strip } from "#app/components/ui/Strip";
import { actorOf } from "#app/lib/auth/actor.server";
import { everywhereLinks } from "#app/lib/views/strip";
import type { Route } from "./+types/_app.account";

/** It also makes the guard run on client navigations. Pages inside draw their own `main`. */
export function loader({ context }: Route.LoaderArgs) {
  const { name, isAdmin } = actorOf(context);
  return { name, links: everywhereLinks("/account", isAdmin) };
}

export default function Account({ loaderData }: Route.ComponentProps) {
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={loaderData.links} person={loaderData.name} />
      <Outlet />
    </div>
  );
}
