import { data, redirect } from "react-router";
import { CameFromLine } from "#app/components/happenings/CameFromLine";
import { OpeningForm } from "#app/components/happenings/OpeningForm";
import { OpeningItem } from "#app/components/happenings/OpeningItem";
import { Fitting } from "#app/components/ui/Fitting";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { openingDetails } from "#app/db/queries/happening-details.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { actOnOpenings } from "#app/lib/http/opening-acts.server";
import { newId } from "#app/lib/ids";
import { openingsView } from "#app/lib/views/openings";
import { boardOf } from "#app/lib/views/places";
import { cameFrom } from "#app/lib/views/record-links";
import type { Route } from "./+types/_app.installs.$installId.openings";

export const meta: Route.MetaFunction = () => [{ title: "Openings · Bladecount" }];

export async function loader({ context, request }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  const { search, searchParams } = new URL(request.url);
  return { view: openingsView(e, me, await openingDetails(db(), installId)), came: cameFrom(e, searchParams), search, formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const acted = await actOnOpenings(install, await readForm(request));
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  const { back } = cameFrom(install.e, new URL(request.url).searchParams);
  return redirect(acted.opened && back ? back.href : `${boardOf(install.installId)}/openings#${acted.anchor}`, 303);
}

export default function Openings({ loaderData, actionData, params }: Route.ComponentProps) {
  const { view, came, search, formId } = loaderData;
  const item = { commandId: formId, reply: actionData };
  const count = view.open.length + view.past.length;
  return (
    <main id="main">
      <TitlePipe
        title="Openings"
        state={view.state}
        fill={view.fill}
        then="What was opened up or disturbed. Every proof of it lapses and is done again once it is closed."
      />
      <CameFromLine back={came.back} says={came.systems.length ? "Its systems are chosen below." : ""} />
      {view.open.length > 0 && (
        <section aria-labelledby="open-now" className="border-b-2 border-ink">
          <h2 id="open-now" className="sr-only">
            Open now
          </h2>
          <ul>
            {view.open.map((row) => (
              <OpeningItem key={`${row.id} ${row.state}`} row={row} {...item} />
            ))}
          </ul>
        </section>
      )}
      <OpeningForm
        key={`${count} ${search}`}
        view={view}
        chosen={came.systems}
        search={search}
        commandId={`${formId}-open`}
        reply={actionData}
      />
      {view.past.length > 0 && (
        <section aria-labelledby="past" className="border-t-2 border-ink">
          <h2 id="past" className="px-4 pt-5 pb-3 text-h3 tablet:px-6">
            Closed
          </h2>
          <div className="flex flex-wrap items-center gap-x-6 gap-y-2 px-4 pb-4 tablet:px-6">
            <p>What has to be proved again stands on the board.</p>
            <Fitting href={boardOf(params.installId)}>Board</Fitting>
          </div>
          <ul className="border-t border-line">
            {view.past.map((row) => (
              <OpeningItem key={`${row.id} ${row.state}`} row={row} {...item} />
            ))}
          </ul>
        </section>
      )}
    </main>
  );
}
