import { Form, redirect } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { doneBy, SignedItems } from "#app/components/gate/SignedItems";
import { SignPage } from "#app/components/gate/SignPage";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { ValveSign } from "#app/components/ui/ValveSign";
import { db } from "#app/db/client.server";
import { leftOutOf } from "#app/db/queries/left-out.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { refused } from "#app/lib/http/respond.server";
import { readSheet } from "#app/lib/http/sign-acts.server";
import { newId } from "#app/lib/ids";
import { signGates } from "#app/lib/services/sign-gates.server";
import { gateOf } from "#app/lib/views/places";
import { sheetView } from "#app/lib/views/sign";
import type { Route } from "./+types/_app.installs.$installId.gates.$gateId_.sign";

export const meta: Route.MetaFunction = ({ loaderData }) => [
  { title: loaderData ? `${loaderData.sheet.act}: ${loaderData.sheet.name}` : "Bladecount" },
];

export async function loader({ context, params, url }: Route.LoaderArgs) {
  const { e, me, installId, snapshot } = context.get(installContext);
  const sheet = sheetView(e, params.gateId, me, url.searchParams.get("as"));
  if (!sheet) throw new Response("Not found", { status: 404 });
  // What the template has and this install leaves out is shown once, before the first countersignature of all.
  const first = sheet.as !== "builder" && !snapshot.signatures.some((s) => s.as !== "builder");
  const { registration, name } = snapshot.install;
  return {
    sheet,
    kicker: `${registration} ${name}, gate ${sheet.name}`,
    person: me.name,
    leftOut: first ? await leftOutOf(db(), installId) : [],
    commandId: newId(),
  };
}

export async function action({ request, context, params }: Route.ActionArgs) {
  const { installId, me } = context.get(installContext);
  const read = readSheet(await readForm(request), false);
  if (!read.ok) return refused(read.refusal);
  const outcome = await signGates({ installId, actor: { userId: me.id }, commandId: read.commandId }, read.input);
  return outcome.ok ? redirect(`${gateOf(installId, params.gateId)}#signatures`, { status: 303 }) : refused(outcome);
}

/** A refusal changes what may be signed: the sheet is read again. */
export const shouldRevalidate = () => true;

export default function Sign({ loaderData, actionData }: Route.ComponentProps) {
  const { sheet, kicker, person, leftOut, commandId } = loaderData;
  const instead = sheet.refusal && (
    <p>
      <b>You cannot sign this now.</b> The reason stands on the sheet.
    </p>
  );
  return (
    <SignPage
      kicker={kicker}
      title={sheet.act}
      act={sheet.act}
      note={sheet.name}
      instead={instead}
      refusal={actionData?.refusal}
      refusedTitle="Not signed"
      roles={sheet.roles.map((role) => ({ role, label: `as ${role}` }))}
      as={sheet.as}
      before={
        sheet.refusal && (
          <Notice
            kind="refused"
            title={sheet.refusal.title}
            action={<Fitting href={sheet.refusal.place.href}>{sheet.refusal.place.label}</Fitting>}
          >
            <p>{sheet.refusal.sentence}</p>
            {sheet.refusal.who && <p>{sheet.refusal.who}</p>}
          </Notice>
        )
      }
      back={sheet.gateHref}
    >
      <Form method="post" id="sign" action={`?as=${sheet.as}`}>
        <HiddenIds commandId={commandId} also={{ as: sheet.as, sheet: JSON.stringify({ gate: sheet.id, covers: sheet.covers }) }} />
      </Form>
      {!sheet.refusal && (
        <>
          <blockquote>
            I, <b>{person}</b>, {sheet.sentence}
          </blockquote>
          <h2>What it means</h2>
          <ul className="sign-means">
            <li>{sheet.meaning}</li>
            {sheet.means.map((line) => (
              <li key={line}>{line}</li>
            ))}
            {sheet.earlier.map((line) => (
              <li key={line}>{line}.</li>
            ))}
          </ul>
        </>
      )}
      <SignedItems title={`What is signed: ${sheet.signed}`} open={sheet.as !== "builder" && !sheet.refusal} items={doneBy(sheet.items)} />
      {leftOut.length > 0 && (
        <SignedItems
          title={`Left out of the template on this install: ${leftOut.length} items`}
          open
          items={leftOut.map(({ key, words, because }) => ({ key, words, says: because }))}
        />
      )}
      {!sheet.refusal && (
        <p className="sign-turn">
          <ValveSign state={sheet.valve} fed size={84} />
          <svg width="48" height="22" viewBox="0 0 48 22" aria-hidden="true">
            <path d="M0 11H44M35 3l9 8-9 8" />
          </svg>
          <ValveSign state={sheet.after} fed size={84} />
        </p>
      )}
    </SignPage>
  );
}
