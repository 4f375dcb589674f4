import { useSyncExternalStore } from "react";
import { Form, Link, redirect, useNavigation } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { PinStub } from "#app/components/gate/PinStub";
import { SignTag } from "#app/components/gate/SignTag";
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
import { aboutPin, sheetView } from "#app/lib/views/sign";
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

const never = () => () => {};

export default function Sign({ loaderData, actionData }: Route.ComponentProps) {
  const { sheet, kicker, person, leftOut, commandId } = loaderData;
  const busy = useNavigation().state === "submitting";
  const live = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const refusal = actionData?.refusal;
  const pinErrors = refusal && aboutPin(refusal.code) ? [refusal.message] : undefined;
  const stub = sheet.refusal ? (
    <p>
      <b>You cannot sign this now.</b> The reason stands on the sheet.
    </p>
  ) : (
    <PinStub key={refusal?.message} form="sign" label={sheet.act} note={sheet.name} errors={pinErrors} busy={busy} live={live} />
  );
  return (
    <main id="main" className="sign-page">
      <SignTag kicker={kicker} title={sheet.act} stub={stub}>
        {sheet.refusal && (
          <Notice
            kind="refused"
            title={sheet.refusal.title}
            action={<Fitting href={sheet.refusal.place.href}>{sheet.refusal.place.label}</Fitting>}
          >
            <p>{sheet.refusal.sentence}</p>
            {sheet.refusal.who && <p>{sheet.refusal.who}</p>}
          </Notice>
        )}
        {refusal && !pinErrors && (
          <Notice kind="refused" title={refusal.blockers[0]?.title ?? "Not signed"} role="alert">
            <p>{refusal.message}</p>
          </Notice>
        )}
        {sheet.roles.length > 1 && (
          <nav className="sign-roles" aria-label="In which role">
            {sheet.roles.map((role) => (
              <Link key={role} to={`?as=${role}`} replace aria-current={role === sheet.as ? "true" : undefined}>
                as {role}
              </Link>
            ))}
          </nav>
        )}
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
        <details className="sign-items" open={sheet.as !== "builder" && !sheet.refusal}>
          <summary>What is signed: {sheet.items.length} items</summary>
          <dl>
            {sheet.items.map((item) => (
              <div key={item.key}>
                <dt>
                  <b>{item.key}</b> {item.words}
                </dt>
                <dd>
                  {item.said} <span>{item.who}</span>
                </dd>
              </div>
            ))}
          </dl>
        </details>
        {leftOut.length > 0 && (
          <details className="sign-items" open>
            <summary>Left out of the template on this install: {leftOut.length} items</summary>
            <dl>
              {leftOut.map((item) => (
                <div key={item.key}>
                  <dt>
                    <b>{item.key}</b> {item.words}
                  </dt>
                  <dd>{item.because}</dd>
                </div>
              ))}
            </dl>
          </details>
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
        <Fitting href={sheet.gateHref} className="sign-back">
          Back, not signed
        </Fitting>
      </SignTag>
    </main>
  );
}
