import { useSyncExternalStore } from "react";
import { Form, Link, redirect, useNavigation } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { PinStub } from "#app/components/gate/PinStub";
import { SignTag } from "#app/components/gate/SignTag";
import { Choice } from "#app/components/ui/Choice";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { refused } from "#app/lib/http/respond.server";
import { readSheet } from "#app/lib/http/sign-acts.server";
import { newId } from "#app/lib/ids";
import { signGates } from "#app/lib/services/sign-gates.server";
import { boardOf } from "#app/lib/views/places";
import { aboutPin } from "#app/lib/views/sign";
import { severalView } from "#app/lib/views/sign-several";
import type { Route } from "./+types/_app.installs.$installId.sign";

export const meta: Route.MetaFunction = () => [{ title: "Sign on one sheet · Bladecount" }];

export function loader({ context, url }: Route.LoaderArgs) {
  const { e, me, installId, snapshot } = context.get(installContext);
  return {
    several: severalView(e, me, url.searchParams.get("as")),
    kicker: `${snapshot.install.registration} ${snapshot.install.name}`,
    person: me.name,
    home: boardOf(installId),
    commandId: newId(),
  };
}

export async function action({ request, context }: Route.ActionArgs) {
  const { installId, me } = context.get(installContext);
  const read = readSheet(await readForm(request), true);
  if (!read.ok) return refused(read.refusal);
  const outcome = await signGates({ installId, actor: { userId: me.id }, commandId: read.commandId }, read.input);
  return outcome.ok ? redirect(boardOf(installId), { status: 303 }) : refused(outcome);
}

export const shouldRevalidate = () => true;

const never = () => () => {};

export default function SignSeveral({ loaderData, actionData }: Route.ComponentProps) {
  const { several, kicker, person, home, commandId } = loaderData;
  const { sheets, roles, as, act, meaning } = several;
  const busy = useNavigation().state === "submitting";
  const live = useSyncExternalStore(
    never,
    () => true,
    () => false,
  );
  const refusal = actionData?.refusal;
  const pinErrors = refusal && aboutPin(refusal.code) ? [refusal.message] : undefined;
  const stub = sheets.length ? (
    <PinStub
      key={refusal?.message}
      form="sign"
      label={act}
      note="each gate gets a signature of its own"
      errors={pinErrors}
      busy={busy}
      live={live}
    />
  ) : (
    <Notice kind="plain" title="Nothing is ready for you">
      <p>Gates that you may sign as {as} appear here once all their items stand. The board says what is left.</p>
      <Fitting href={home}>Board</Fitting>
    </Notice>
  );
  return (
    <main id="main" className="sign-page">
      <SignTag kicker={kicker} title={`${act}, on one sheet`} stub={stub}>
        {refusal && !pinErrors && (
          <Notice kind="refused" title={refusal.blockers[0]?.title ?? "Nothing was signed"} role="alert">
            <p>{refusal.message}</p>
          </Notice>
        )}
        {roles.length > 1 && (
          <nav className="sign-roles" aria-label="In which role">
            {roles.map(({ role, gates }) => (
              <Link key={role} to={`?as=${role}`} replace aria-current={role === as ? "true" : undefined}>
                as {role}, {gates}
              </Link>
            ))}
          </nav>
        )}
        {sheets.length > 0 && (
          <blockquote>
            I, <b>{person}</b>, sign each gate that is marked here. {meaning}
          </blockquote>
        )}
        <Form method="post" id="sign" action={`?as=${as}`} className="sign-gates">
          <HiddenIds commandId={commandId} also={{ as }} />
          {sheets.map((sheet) => (
            <section key={sheet.id}>
              <input type="hidden" name="sheet" value={JSON.stringify({ gate: sheet.id, covers: sheet.covers })} />
              <Choice kind="checkbox" name="gate" value={sheet.id} defaultChecked note={sheet.means[1]}>
                {sheet.name}
              </Choice>
              <details className="sign-items">
                <summary>
                  What is signed in {sheet.name}: {sheet.items.length} items
                </summary>
                <p>{sheet.sentence}</p>
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
            </section>
          ))}
        </Form>
        <Fitting href={home} className="sign-back">
          Back, not signed
        </Fitting>
      </SignTag>
    </main>
  );
}
