import { data, redirect } from "react-router";
import { LooseEndItem } from "#app/components/happenings/LooseEndItem";
import { MakeLooseEnd } from "#app/components/happenings/MakeLooseEnd";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { looseEndDetails } from "#app/db/queries/happening-details.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { actOnLooseEnds } from "#app/lib/http/loose-end-acts.server";
import { newId } from "#app/lib/ids";
import { looseEndsView } from "#app/lib/views/loose-ends";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.loose-ends";

export const meta: Route.MetaFunction = () => [{ title: "Loose ends · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  return { view: looseEndsView(e, me, await looseEndDetails(db(), installId)), formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const acted = await actOnLooseEnds(install, await readForm(request));
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${boardOf(install.installId)}/loose-ends#${acted.anchor}`, 303);
}

export default function LooseEnds({ loaderData, actionData }: Route.ComponentProps) {
  const { view, formId } = loaderData;
  const { ends, past } = view;
  return (
    <main id="main">
      <TitlePipe title={view.title} state={view.state} fill={view.fill} valve={ends.length ? "shut" : undefined} />
      {ends.length === 0 && (
        <p className="max-w-[66ch] px-4 py-5 text-lead tablet:px-6">
          What is off, capped or locked out for now stands here with the gate or run before which it must be back. Until a second person has
          seen it back it stops that gate, and every run for which no inspector has accepted it.
        </p>
      )}
      <ol>
        {ends.map((row) => (
          <LooseEndItem key={`${row.id} ${row.restored ?? ""}${row.accepted ?? ""}`} row={row} commandId={formId} reply={actionData} />
        ))}
      </ol>
      {past.length > 0 && (
        <details className="border-b border-line px-4 tablet:px-6">
          <summary className="min-h-hit py-3 font-semibold text-fitting-ink">{past.length} put back</summary>
          <ul className="pb-4">
            {past.map((p) => (
              <li key={p.id} id={p.anchor} className="py-1">
                {p.says}
              </li>
            ))}
          </ul>
        </details>
      )}
      {ends.length > 0 && (
        <Foot says="Something off, capped or locked out?" note="Write it down before you walk away from it.">
          <Fitting href="#new" size="act" note="what, how many, due before what">
            New loose end
          </Fitting>
        </Foot>
      )}
      <MakeLooseEnd key={ends.length + past.length} view={view} commandId={`${formId}-make`} reply={actionData} />
    </main>
  );
}
