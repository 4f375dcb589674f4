import { data, redirect, useNavigation } from "react-router";
import { AgainBand } from "#app/components/gate/AgainBand";
import { GateHead } from "#app/components/gate/GateHead";
import { ItemRow, type RowReply } from "#app/components/gate/ItemRow";
import { RecordBar } from "#app/components/gate/RecordWays";
import { Signatures } from "#app/components/gate/Signatures";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { useLive } from "#app/components/ui/useLive";
import { db } from "#app/db/client.server";
import { signatureHashes } from "#app/db/queries/signature-hashes.server";
import { actOnGate, type GateReply } from "#app/lib/http/gate-acts.server";
import { installContext } from "#app/lib/http/install.server";
import { readPhotoForm } from "#app/lib/http/multipart.server";
import { newId } from "#app/lib/ids";
import { gateView } from "#app/lib/views/gate";
import { peopleOf, toolsOf } from "#app/lib/views/gate-choices";
import { boardOf, gateOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.gates.$gateId";

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.view.name} · ${loaderData.registration}` : "Bladecount" },
];

export async function loader({ context, params }: Route.LoaderArgs) {
  const { e, me, installId, snapshot, now } = context.get(installContext);
  const view = gateView(e, params.gateId, me);
  if (!view) throw new Response("Not found", { status: 404 });
  return {
    registration: snapshot.install.registration,
    view,
    hashes: await signatureHashes(db(), params.gateId),
    units: me.units,
    tools: toolsOf(e),
    people: peopleOf(e, me.id),
    zone: e.facts.when(now).split(" ").at(-1) ?? "local time",
    setUpHref: `${boardOf(installId)}/set-up`,
    formId: newId(),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const install = context.get(installContext);
  const act = { installId: install.installId, actor: { userId: install.me.id } };
  const { form, refused } = await readPhotoForm(request, act, ["prove", "preview", "failed"]);
  const acted = await actOnGate(install, form, refused);
  if (!acted.done) return data(acted.reply, { status: acted.status });
  return redirect(gateOf(install.installId, params.gateId, acted.item), { status: 303 });
}

export default function Gate({ loaderData, actionData }: Route.ComponentProps) {
  const { view, hashes, units, tools, people, zone, setUpHref, formId } = loaderData;
  const live = useLive();
  const sending = useNavigation().formData;
  const commandId = (item: string, act: string) => `${formId}-${act}-${item}`;
  const shared = { units, tools, people, zone, setUpHref, live, commandId };
  const { foot, caution } = view;
  return (
    <>
      <main id="main">
        <GateHead name={view.name} state={view.state} valve={view.valve} part={view.part} feeds={view.feeds} onward={view.onward} />
        {caution && (
          <CautionSlab title={caution.title} sign={caution.sign}>
            {caution.text} The maker’s manual comes first.
          </CautionSlab>
        )}
        {actionData?.refusal && !actionData.item && (
          <Notice kind="refused" title="Not taken" band role="alert">
            {actionData.refusal.message}
          </Notice>
        )}
        {view.waits.map((wait) => (
          <Notice
            key={wait.sentence}
            kind="plain"
            title={wait.title}
            band
            action={<Fitting href={wait.place.href}>{wait.place.label}</Fitting>}
          >
            {wait.sentence}
          </Notice>
        ))}
        {view.again && <AgainBand again={view.again} />}
        <ol className="items">
          {view.items.map((item) => (
            <ItemRow
              key={item.id}
              item={item}
              reply={replyFor(item.id, actionData)}
              shared={shared}
              busy={sending?.get("item") === item.id}
            />
          ))}
        </ol>
        <RecordBar links={view.record} />
        <Signatures
          signatures={view.signatures.map((s) => ({ ...s, hash: s.id ? grouped(hashes[s.id]) : undefined }))}
          former={view.former}
          until={view.valve === "signed" ? view.until : null}
          commandId={commandId}
        />
      </main>
      <Foot says={foot.says} note={foot.note}>
        {foot.act && (
          <Fitting href={foot.act.href} size="act" note={foot.act.note}>
            {foot.act.label}
          </Fitting>
        )}
      </Foot>
    </>
  );
}

const grouped = (hash: string | undefined) => hash?.slice(0, 12).replace(/(.{4})(?=.)/g, "$1 ");

function replyFor(item: string, reply: GateReply | undefined): RowReply | null {
  if (reply?.item !== item) return null;
  const { typed, errors, refusal, result } = reply;
  const [first, ...rest] = refusal?.blockers ?? [];
  return {
    entry: { typed, errors },
    refusal: refusal && { title: first?.title ?? "Not taken", message: refusal.message, more: rest.map((b) => b.sentence) },
    result,
  };
}
