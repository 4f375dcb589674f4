import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { ValueItem } from "#app/components/set-up/ValueItem";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { leftOutOf } from "#app/db/queries/left-out.server";
import { readForm } from "#app/lib/http/form.server";
import { installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { replyOf } from "#app/lib/schemas/form-reply";
import { valueForm } from "#app/lib/schemas/set-up-forms";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { boardOf } from "#app/lib/views/places";
import { anchorOfValue, setUpView } from "#app/lib/views/set-up";
import type { Route } from "./+types/_app.installs.$installId.set-up";

export const meta: Route.MetaFunction = () => [{ title: "Set-up · Bladecount" }];

export async function loader({ context }: Route.LoaderArgs) {
  const { e, me, installId } = context.get(installContext);
  return {
    view: setUpView(e, me, me.units),
    leftOut: await leftOutOf(db(), installId),
    home: boardOf(installId),
    formId: newId(),
    waiting: e.snapshot.editsWaiting.length,
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const { snapshot, me, installId } = context.get(installContext);
  const sent = await readForm(request);
  const value = snapshot.values.find((v) => v.key === sent.get("key"));
  if (!value) throw data("That rating or limit is not here. Load the page again.", { status: 404 });
  const form = anchorOfValue(value.key);
  const submission = parseWithZod(sent, { schema: valueForm(value, me.units) });
  if (submission.status !== "success") return data(replyOf(form, sent, submission.reply().error), { status: 400 });
  const { commandId, ...input } = submission.value;
  const outcome = await confirmValue({ installId, actor: { userId: me.id }, commandId }, input);
  if (!outcome.ok) return data(replyOf(form, sent, { "": [outcome.message] }), { status: outcome.status });
  return redirect(`${boardOf(installId)}/set-up#${form}`, 303);
}

export default function SetUp({ loaderData, actionData }: Route.ComponentProps) {
  const { view, leftOut, home, formId, waiting } = loaderData;
  return (
    <>
      <main id="main">
        <TitlePipe
          title="Set-up"
          state={view.state}
          fill={view.fill}
          aside={
            <>
              <Fitting href={`${home}/set-up/board`}>
                Board editor{waiting > 0 && `, ${waiting} ${waiting === 1 ? "waits" : "wait"}`}
              </Fitting>
              <Fitting href={`${home}/set-up/answers`}>Answers</Fitting>
              <Fitting href={`${home}/crew`}>Crew</Fitting>
              <Fitting href={`${home}/crib`}>Crib</Fitting>
            </>
          }
        />
        <CautionSlab title="the maker’s manual comes first.">
          What stands here as a starting point is no limit of your engine. Read each one in the engine, propeller or kit maker’s papers, and
          write down where. Local rules and licensed judgement come before this page too.
        </CautionSlab>
        {!view.may.ok && (
          <Notice kind="plain" title="You can read these" band>
            {view.may.why}
          </Notice>
        )}
        {view.groups.map((group) => (
          <section key={group.key} aria-labelledby={`group-${group.key}`}>
            <div className="border-b-2 border-ink px-4 pt-6 pb-3 tablet:px-6">
              <h2 id={`group-${group.key}`} className="text-h3">
                {group.title}
              </h2>
              <p className="max-w-[72ch] text-ink-2">{group.says}</p>
            </div>
            <ul>
              {group.rows.map((row) => (
                <ValueItem
                  key={`${row.key} ${row.value} ${row.typedSource}`}
                  row={row}
                  commandId={`${formId}-${row.key}`}
                  reply={actionData}
                  next={row.anchor === view.next?.anchor && !actionData}
                  may={view.may.ok}
                />
              ))}
            </ul>
          </section>
        ))}
        <LeftOut items={leftOut} />
      </main>
      <Foot
        says={view.next ? `Next: ${view.next.label}` : "What stops the runs is confirmed"}
        note={view.next?.left ? `Then ${view.next.left} more that stop the runs.` : undefined}
      >
        {view.next ? (
          <Fitting href={`#${view.next.anchor}`} size="act" note="read it in the maker’s papers">
            Go to it
          </Fitting>
        ) : (
          <Fitting href={home} size="act" note="where the install stands">
            Board
          </Fitting>
        )}
      </Foot>
    </>
  );
}

function LeftOut({ items }: { items: { key: string; words: string; because: string }[] }) {
  if (!items.length) return null;
  return (
    <details className="px-4 py-4 tablet:px-6">
      <summary className="min-h-hit py-3 text-lead font-semibold text-fitting-ink">
        {items.length === 1 ? "1 item" : `${items.length} items`} of the template left out here
      </summary>
      <p className="max-w-[72ch] py-2 text-ink-2">
        The answers at set-up leave these out. An inspector sees the list at the first countersignature: look whether one is missed.
      </p>
      <ul>
        {items.map((item) => (
          <li key={item.key} className="grid gap-x-4 border-t border-line py-2 tablet:grid-cols-[72px_minmax(0,1.4fr)_minmax(0,1fr)]">
            <span className="fig font-bold">{item.key}</span>
            <span>{item.words}</span>
            <span className="text-ink-2">{item.because}</span>
          </li>
        ))}
      </ul>
    </details>
  );
}
