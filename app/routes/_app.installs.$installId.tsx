import { Outlet, useLocation } from "react-router";
import { RouteError } from "#app/components/ui/RouteError";
import { Strip } from "#app/components/ui/Strip";
import { installContext, requireMember } from "#app/lib/http/install.server";
import { boardOf, nameIn } from "#app/lib/views/places";
import { stripOf } from "#app/lib/views/strip";
import type { Route } from "./+types/_app.installs.$installId";

export const middleware: Route.MiddlewareFunction[] = [requireMember];

/** It also makes the guard run on client navigations. Pages inside draw their own `main` and foot. */
export function loader({ context }: Route.LoaderArgs) {
  const { snapshot, me, now, e } = context.get(installContext);
  const { registration, name } = snapshot.install;
  return {
    registration,
    ship: name,
    person: nameIn(snapshot, me.id),
    role: me.roles.join(", "),
    home: boardOf(snapshot.install.id),
    ...stripOf(e, now),
  };
}

export default function Install({ loaderData }: Route.ComponentProps) {
  const { registration, ship, person, role, home, links, asOf } = loaderData;
  const { pathname } = useLocation();
  const under = (href: string) =>
    href === home
      ? pathname === home || pathname.startsWith(`${home}/gates`) || pathname === `${home}/openings` || pathname === `${home}/sign`
      : pathname.startsWith(href) || (href === `${home}/build-up` && pathname.startsWith(`${home}/runs`));
  return (
    <div className="page">
      <Strip
        homeHref="/hangar"
        registration={registration}
        ship={ship}
        navLabel="Install"
        links={links.map((link) => ({ ...link, current: under(link.href) }))}
        person={person}
        role={role}
        saved={asOf}
      />
      <Outlet />
    </div>
  );
}

export function ErrorBoundary() {
  return <RouteError />;
}
