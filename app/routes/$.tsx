import { RouteError } from "#app/components/ui/RouteError";

// Catches every address that no route has, so that the answer passes the same middleware as all others.
export function loader() {
  throw new Response("Not found", { status: 404 });
}

export function action() {
  throw new Response("Not found", { status: 404 });
}

export default function NotFound() {
  return null;
}

export function ErrorBoundary() {
  return <RouteError />;
}
