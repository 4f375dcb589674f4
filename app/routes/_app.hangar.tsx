import { HangarTable } from "#app/components/hangar/HangarTable";
import { NoInstalls } from "#app/components/hangar/NoInstalls";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Strip } from "#app/components/ui/Strip";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { hangarOf } from "#app/db/queries/hangar.server";
import { actorOf } from "#app/lib/auth/actor.server";
import { now } from "#app/lib/clock";
import { hangarRow, hangarView } from "#app/lib/views/hangar";
import { TEMPLATES } from "#app/lib/views/own-templates";
import { everywhereLinks } from "#app/lib/views/strip";
import type { Route } from "./+types/_app.hangar";

export const meta: Route.MetaFunction = () => [{ title: "Hangar · Bladecount" }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const { userId, name, isAdmin } = actorOf(context);
  const rows = [];
  for (const { id, roles } of await hangarOf(db(), userId)) {
    const board = await boardNow(db(), id, now());
    if (board) rows.push(hangarRow(board.e, { id: userId, roles }, board.head.recorded));
  }
  return {
    name,
    links: everywhereLinks("/hangar", isAdmin),
    view: hangarView(rows),
    search: url.searchParams.get("q")?.slice(0, 80) ?? "",
  };
}

export default function Hangar({ loaderData }: Route.ComponentProps) {
  const { name, links, view, search } = loaderData;
  const none = view.rows.length === 0;
  return (
    <div className="page">
      <Strip homeHref="/hangar" navLabel="Everywhere" links={links} person={name} />
      <main id="main">
        <TitlePipe title={view.title} state={view.state} fill={none ? 0 : 1} valve={view.waits ? "shut" : undefined} />
        {none ? <NoInstalls /> : <HangarTable key={search} rows={view.rows} search={search} newHref={NEW} />}
        <p className="px-4 py-5 tablet:px-6">
          <Fitting href={TEMPLATES} className="w-fit" note="boards that you keep to start from">
            Own templates
          </Fitting>
        </p>
      </main>
      {none && (
        <Foot says="Start with the aircraft" note="Registration, engine, a page of questions. The board comes from the answers.">
          <Fitting href={NEW} size="act" note="you become its lead">
            New install
          </Fitting>
        </Foot>
      )}
    </div>
  );
}

const NEW = "/installs/new";
