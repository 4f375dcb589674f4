import { Outlet, useLocation } from "react-router";
import { Anchor } from "#app/components/ui/Anchor";
import { Strip } from "#app/components/ui/Strip";
import { actorOf } from "#app/lib/auth/actor.server";
import { requireAdmin } from "#app/lib/auth/guards.server";
import { everywhereLinks } from "#app/lib/views/strip";
import type { Route } from "./+types/_app.admin";

export const middleware: Route.MiddlewareFunction[] = [requireAdmin];

/** It also makes the guard run on client navigations. Pages inside draw their own `main`. */
export function loader({ context }: Route.LoaderArgs) {
  const { name } = actorOf(context);
  return { name, links: everywhereLinks("/admin", true) };
}

const PAGES = [
  { label: "People", href: "/admin/people" },
  { label: "Mail", href: "/admin/mail" },
];

export default function Admin({ loaderData }: Route.ComponentProps) {
  const { pathname } = useLocation();
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={loaderData.links} person={loaderData.name} />
      <nav aria-label="Instance" className="flex gap-2 border-b border-line px-4 tablet:px-6">
        {PAGES.map(({ label, href }) => (
          <Anchor
            key={href}
            href={href}
            aria-current={pathname === href ? "page" : undefined}
            className="inline-block min-h-hit px-3 py-3 text-fitting-ink aria-[current]:font-bold aria-[current]:text-ink aria-[current]:no-underline"
          >
            {label}
          </Anchor>
        ))}
      </nav>
      <Outlet />
    </div>
  );
}
