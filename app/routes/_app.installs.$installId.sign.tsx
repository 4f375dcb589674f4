import { Form, redirect } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { doneBy, SignedItems } from "#app/components/gate/SignedItems";
import { SignPage } from "#app/components/gate/SignPage";
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

export default function SignSeveral({ loaderData, actionData }: Route.ComponentProps) {
  const { several, kicker, person, home, commandId } = loaderData;
  const { sheets, roles, as, act, meaning } = several;
  const instead = sheets.length === 0 && (
    <Notice kind="plain" title="Nothing is ready for you">
      <p>Gates that you may sign as {as} appear here once all their items stand. The board says what is left.</p>
      <Fitting href={home}>Board</Fitting>
    </Notice>
  );
  return (
    <SignPage
      kicker={kicker}
      title={`${act}, on one sheet`}
      act={act}
      note="each gate gets a signature of its own"
      instead={instead || null}
      refusal={actionData?.refusal}
      refusedTitle="Nothing was signed"
      roles={roles.map(({ role, gates }) => ({ role, label: `as ${role}, ${gates}` }))}
      as={as}
      back={home}
    >
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
            <SignedItems title={`What is signed in ${sheet.name}: ${sheet.signed}`} items={doneBy(sheet.items)}>
              <p>{sheet.sentence}</p>
            </SignedItems>
          </section>
        ))}
      </Form>
    </SignPage>
  );
}
