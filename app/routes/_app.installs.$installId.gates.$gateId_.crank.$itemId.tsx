import { CrankClockPage } from "#app/components/crank/CrankClockPage";
import { installContext } from "#app/lib/http/install.server";
import { crankView } from "#app/lib/views/crank";
import type { Route } from "./+types/_app.installs.$installId.gates.$gateId_.crank.$itemId";

export const meta: Route.MetaFunction = () => [{ title: "Crank clock · Bladecount" }];

export function loader({ context, params }: Route.LoaderArgs) {
  const { e } = context.get(installContext);
  const view = crankView(e, params.itemId);
  if (!view || view.gate !== params.gateId) throw new Response("Not found", { status: 404 });
  return { view };
}

export default function Crank({ loaderData }: Route.ComponentProps) {
  return <CrankClockPage view={loaderData.view} />;
}
