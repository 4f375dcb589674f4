import { data, redirect } from "react-router";
import { CameFromLine } from "#app/components/happenings/CameFromLine";
import { FindingItem } from "#app/components/happenings/FindingItem";
import { RaiseFinding } from "#app/components/happenings/RaiseFinding";
import { SEVERITY_DOES } from "#app/components/happenings/SeverityFields";
import { SeveritySign } from "#app/components/happenings/SeveritySign";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { findingDetails } from "#app/db/queries/happening-details.server";
import { actOnFindings } from "#app/lib/http/finding-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { readPhotoForm } from "#app/lib/http/multipart.server";
import { newId } from "#app/lib/ids";
import { findingsView, SEVERITIES } from "#app/lib/views/findings";
import { boardOf } from "#app/lib/views/places";
import { backTo, cameFrom } from "#app/lib/views/record-links";
import type { Route } from "./+types/_app.installs.$installId.findings";

export const meta: Route.MetaFunction = () => [{ title: "Findings · Bladecount" }];

export async function loader({ context, request }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  const came = cameFrom(e, new URL(request.url).searchParams);
  return { view: findingsView(e, me, await findingDetails(db(), installId)), came, formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const act = { installId: install.installId, actor: { userId: install.me.id } };
  const { form, refused } = await readPhotoForm(request, act, ["raise"]);
  const came = cameFrom(install.e, new URL(request.url).searchParams);
  const acted = await actOnFindings(install, form, refused[0]?.message ?? null, came.where);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${boardOf(install.installId)}/findings${backTo(came)}#${acted.anchor}`, 303);
}

export default function Findings({ loaderData, actionData }: Route.ComponentProps) {
  const { view, came, formId } = loaderData;
  const { open, closed } = view;
  const item = { commandId: formId, reply: actionData };
  return (
    <main id="main">
      <TitlePipe
        title={view.title}
        state={view.state}
        fill={view.fill}
        held={view.held}
        valve={open.length && !view.held ? "shut" : undefined}
      />
      <CameFromLine back={came.back} says="" />
      {open.length + closed.length === 0 && <WhatTheyAre />}
      {open.length > 0 && (
        <section aria-labelledby="not-closed">
          <h2 id="not-closed" className="sr-only">
            Not closed
          </h2>
          <ul>
            {open.map((row) => (
              <FindingItem key={`${row.id} ${row.told.length}`} row={row} {...item} />
            ))}
          </ul>
        </section>
      )}
      {closed.length > 0 && (
        <details className="border-b border-line">
          <summary className="min-h-hit px-4 py-4 text-lead font-semibold text-fitting-ink tablet:px-6">
            <h2 className="inline text-lead">{closed.length} closed</h2>
          </summary>
          <ul className="border-t border-line">
            {closed.map((row) => (
              <FindingItem key={row.id} row={row} {...item} />
            ))}
          </ul>
        </details>
      )}
      {open.length + closed.length > 0 && (
        <Foot says="See something? Write it down" note="Anyone may raise a finding. Bad news always counts.">
          <Fitting href="#new" size="act" note="words, how bad, a photo">
            New finding
          </Fitting>
        </Foot>
      )}
      <RaiseFinding key={open.length + closed.length} view={view} came={came} commandId={`${formId}-raise`} reply={actionData} />
    </main>
  );
}

function WhatTheyAre() {
  return (
    <section aria-label="What a finding is" className="px-4 py-6 tablet:px-6">
      <ul className="grid max-w-[980px] gap-6 tablet:grid-cols-3">
        {SEVERITIES.map((severity) => (
          <li key={severity}>
            <SeveritySign severity={severity} />
            <b className="mt-2 block text-lead">{severity}</b>
            <span className="text-ink-2">{SEVERITY_DOES[severity]}</span>
          </li>
        ))}
      </ul>
    </section>
  );
}
