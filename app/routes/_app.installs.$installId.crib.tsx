import { data, redirect } from "react-router";
import { AddExtinguisher, AddTool } from "#app/components/crib/AddForms";
import { BottleItem } from "#app/components/crib/BottleItem";
import { DueList } from "#app/components/crib/DueList";
import { ToolItem } from "#app/components/crib/ToolItem";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { cribTold } from "#app/db/queries/crib.server";
import { actOnCrib } from "#app/lib/http/crib-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { readPhotoForm } from "#app/lib/http/multipart.server";
import { newId } from "#app/lib/ids";
import { format } from "#app/lib/units/display";
import { cribView } from "#app/lib/views/crib";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.crib";

export const meta: Route.MetaFunction = () => [{ title: "Crib · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  return {
    view: cribView(e, me.id, me.units, await cribTold(db(), installId)),
    unit: format("mass", 1, me.units).unit,
    zone: e.facts.when(e.at).split(" ").at(-1) ?? "local time",
    formId: newId(),
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const act = { installId: install.installId, actor: { userId: install.me.id } };
  const { form, refused } = await readPhotoForm(request, act, ["good-check", "bad-check"]);
  const acted = await actOnCrib(install, form, refused[0]?.message ?? null);
  if (!acted) throw data("This page does not know that form. Load it again; nothing was changed.", { status: 400 });
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(`${boardOf(install.installId)}/crib#${acted.anchor}`, 303);
}

export default function Crib({ loaderData, actionData }: Route.ComponentProps) {
  const { view, unit, zone, formId } = loaderData;
  const { tools, bottles, enough, may } = view;
  return (
    <main id="main">
      <TitlePipe title="Crib" state={view.state} fill={view.fill} then={`Every date ends with its day, ${zone}.`} />
      {!may.ok && (
        <Notice kind="plain" title="You can read the crib" band>
          {may.why} You may still say that a tool was found out of tolerance, or take an extinguisher out of use.
        </Notice>
      )}
      <DueList rows={view.due} />
      <section aria-labelledby="tools">
        <h2 id="tools" className="border-b-2 border-ink px-4 pt-5 pb-3 text-h3 tablet:px-6">
          Measuring tools
        </h2>
        {tools.length === 0 && (
          <p className="max-w-[66ch] px-4 py-4 text-lead tablet:px-6">
            Torque wrenches, gauges and meters stand here with the day to which each is calibrated. A torque is proved with a tool from
            here; past its date, or found out of tolerance, what was measured with it lapses.
          </p>
        )}
        <ul>
          {tools.map((row) => (
            <ToolItem key={`${row.id} ${row.rev}`} row={row} view={view} commandId={`${formId}-${row.id}`} reply={actionData} />
          ))}
        </ul>
        {may.ok && <AddTool key={tools.length} commandId={`${formId}-tool`} reply={actionData} first={tools.length === 0} />}
      </section>
      <section aria-labelledby="bottles" className="border-t-2 border-ink">
        <CautionSlab title="an extinguisher out of date may not work." sign="fire">
          Two class B bottles in date are the least for a run, one of them CO2 of 5 lb (2.27 kg) or a clean agent. What the engine and kit
          makers, the site and the fire service ask for comes first.
        </CautionSlab>
        <h2 id="bottles" className="border-b-2 border-ink px-4 pt-5 pb-3 text-h3 tablet:px-6">
          Extinguishers
        </h2>
        {enough && (
          <Notice
            kind={enough.ok ? "done" : "plain"}
            title={enough.ok ? "The fire stand-by can count on these" : "Not enough for a run"}
            band
          >
            {enough.says}
          </Notice>
        )}
        <ul>
          {bottles.map((row) => (
            <BottleItem key={`${row.id} ${row.rev}`} row={row} view={view} commandId={`${formId}-${row.id}`} reply={actionData} />
          ))}
        </ul>
        {may.ok && (
          <AddExtinguisher
            key={bottles.length}
            commandId={`${formId}-bottle`}
            reply={actionData}
            first={bottles.length === 0}
            unit={unit}
          />
        )}
      </section>
    </main>
  );
}
