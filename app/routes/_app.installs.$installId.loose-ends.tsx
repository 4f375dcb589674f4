import { data, redirect } from "react-router";
import { CameFromLine } from "#app/components/happenings/CameFromLine";
import { Claims, LooseEndItem } from "#app/components/happenings/LooseEndItem";
import { MakeLooseEnd } from "#app/components/happenings/MakeLooseEnd";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { looseEndDetails } from "#app/db/queries/happening-details.server";
import { installContext } from "#app/lib/http/install.server";
import { actOnLooseEnds } from "#app/lib/http/loose-end-acts.server";
import { readPhotoForm } from "#app/lib/http/multipart.server";
import { newId } from "#app/lib/ids";
import { looseEndsView } from "#app/lib/views/loose-ends";
import { boardOf } from "#app/lib/views/places";
import { backTo, cameFrom } from "#app/lib/views/record-links";
import type { Route } from "./+types/_app.installs.$installId.loose-ends";

export const meta: Route.MetaFunction = () => [{ title: "Loose ends · Bladecount" }];

export async function loader({ context, request }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  const came = cameFrom(e, new URL(request.url).searchParams);
  return { view: looseEndsView(e, me, await looseEndDetails(db(), installId)), came, formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const act = { installId: install.installId, actor: { userId: install.me.id } };
  const { form, refused } = await readPhotoForm(request, act, ["make"]);
  const acted = await actOnLooseEnds(install, form, refused[0]?.message ?? null);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(
    `${boardOf(install.installId)}/loose-ends${backTo(cameFrom(install.e, new URL(request.url).searchParams))}#${acted.anchor}`,
    303,
  );
}

export default function LooseEnds({ loaderData, actionData }: Route.ComponentProps) {
  const { view, came, formId } = loaderData;
  const { ends, past } = view;
  return (
    <main id="main">
      <TitlePipe title={view.title} state={view.state} fill={view.fill} valve={ends.length ? "shut" : undefined} />
      <CameFromLine back={came.back} says={came.asks ? "What its item asks for is filled in below." : ""} />
      {ends.length === 0 && (
        <p className="max-w-[66ch] px-4 py-5 text-lead tablet:px-6">
          What is off, capped or locked out for now stands here with the gate or run before which it must be back. Until a second person has
          seen it back it stops that gate, and every run for which no inspector has accepted it.
        </p>
      )}
      <ol>
        {ends.map((row) => (
          <LooseEndItem
            key={`${row.id} ${row.restored ?? ""}${row.accepted ?? ""}${row.claims.length}`}
            row={row}
            commandId={formId}
            reply={actionData}
          />
        ))}
      </ol>
      {past.length > 0 && (
        <details className="border-b border-line px-4 tablet:px-6">
          <summary className="min-h-hit py-3 font-semibold text-fitting-ink">{past.length} put back</summary>
          <ul className="pb-4">
            {past.map((p) => (
              <li key={p.id} id={p.anchor} className="flex flex-col gap-2 py-1">
                {p.says}
                <Claims claims={p.claims} commandId={formId} reply={actionData} />
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
      <MakeLooseEnd
        key={`${ends.length + past.length} ${came.value} ${came.asks?.item}`}
        view={view}
        came={came}
        commandId={`${formId}-make`}
        reply={actionData}
      />
    </main>
  );
}
