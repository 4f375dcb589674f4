import { useContext } from "react";
import { Links, Meta, Outlet, Scripts, ScrollRestoration, useRouteLoaderData } from "react-router";
import { RouteError } from "#app/components/ui/RouteError";
import { TraceContext } from "#app/components/ui/trace";
import { everyRequest, ownOriginOnly } from "#app/lib/http/middleware.server";
import { readTheme } from "#app/lib/http/theme.server";
import type { Route } from "./+types/root";
import stylesheet from "./app.css?url";

export const middleware: Route.MiddlewareFunction[] = [everyRequest, ownOriginOnly];

export const links: Route.LinksFunction = () => [
  { rel: "stylesheet", href: stylesheet },
  { rel: "icon", href: "/favicon.svg", type: "image/svg+xml" },
];

export const meta: Route.MetaFunction = () => [{ title: "Bladecount" }];

export function loader({ request }: Route.LoaderArgs) {
  return { theme: readTheme(request) };
}

export function Layout({ children }: { children: React.ReactNode }) {
  const theme = useRouteLoaderData<typeof loader>("root")?.theme ?? "auto";
  const trace = useContext(TraceContext);
  return (
    <html lang="en" data-theme={theme === "auto" ? undefined : theme} data-trace={trace}>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <Meta />
        {/* Style sheets are our own files and need no nonce; a browser hides it, and hydration would find it missing. */}
        <Links nonce="" />
      </head>
      <body>
        <a className="skip-link" href="#main">
          To the work
        </a>
        {children}
        <ScrollRestoration />
        <Scripts />
      </body>
    </html>
  );
}

export default function Root() {
  return <Outlet />;
}

export function ErrorBoundary() {
  return <RouteError />;
}
