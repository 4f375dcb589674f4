import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import { AddMember } from "#app/components/crew/AddMember";
import { MemberItem } from "#app/components/crew/MemberItem";
import { ItemNut } from "#app/components/ui/ItemNut";
import { StateRow } from "#app/components/ui/StateRow";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { readForm } from "#app/lib/http/form.server";
import { type InstallContext, installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { replyOf } from "#app/lib/schemas/form-reply";
import { addMemberForm, endRoleForm } from "#app/lib/schemas/set-up-forms";
import { addMember, endRole } from "#app/lib/services/members.server";
import { anchorOfMember, crewPageView } from "#app/lib/views/crew";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.crew";

export const meta: Route.MetaFunction = () => [{ title: "Crew · Bladecount" }];

export function loader({ context }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  return { view: crewPageView(e, me), formId: newId() };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const sent = await readForm(request);
  return sent.get("intent") === "end-role" ? end(install, sent) : add(install, sent);
}

async function add({ installId, me }: InstallContext, sent: FormData) {
  const submission = parseWithZod(sent, { schema: addMemberForm });
  if (submission.status !== "success") return data(replyOf("add", sent, submission.reply().error), { status: 400 });
  const { commandId, ...input } = submission.value;
  const outcome = await addMember({ installId, actor: { userId: me.id }, commandId }, input);
  if (outcome.ok) return redirect(`${boardOf(installId)}/crew#${anchorOfMember(outcome.value.member)}`, 303);
  const errors: Record<string, string[]> =
    outcome.code === "not-found"
      ? { email: ["Nobody has an account here with that address. Check its spelling, or ask the administrator to open an account for it."] }
      : { "": [outcome.message] };
  return data(replyOf("add", sent, errors), { status: outcome.status });
}

async function end({ installId, me }: InstallContext, sent: FormData) {
  const form = anchorOfMember(String(sent.get("member") ?? ""));
  const submission = parseWithZod(sent, { schema: endRoleForm });
  if (submission.status !== "success") throw data("That role is not here. Load the page again.", { status: 400 });
  const { commandId, ...input } = submission.value;
  const outcome = await endRole({ installId, actor: { userId: me.id }, commandId }, input);
  if (!outcome.ok) return data(replyOf(form, sent, { "": [outcome.message] }), { status: outcome.status });
  const out = input.member === me.id && me.roles.length === 1;
  return redirect(out ? "/hangar" : `${boardOf(installId)}/crew#${form}`, 303);
}

export default function Crew({ loaderData, actionData }: Route.ComponentProps) {
  const { view, formId } = loaderData;
  return (
    <main id="main">
      <TitlePipe title="Crew" state={view.state} fill={view.fill} />
      <section aria-labelledby="needs">
        <h2 id="needs" className="border-b border-line px-4 py-3 text-lead tablet:px-6">
          What the runs and signatures need
        </h2>
        <ul>
          {view.needs
            .filter((need) => !need.met)
            .map((need) => (
              <StateRow key={need.key} nut="todo" word={need.word} open>
                <h3 className="text-lead">{need.title}</h3>
                <p className="text-ink-2">{need.says}</p>
              </StateRow>
            ))}
        </ul>
        <ul className="grid gap-x-6 gap-y-2 px-4 py-3 tablet:grid-cols-2 tablet:px-6">
          {view.needs
            .filter((need) => need.met)
            .map((need) => (
              <li key={need.key} className="grid grid-cols-[36px_minmax(0,1fr)] gap-x-3">
                <ItemNut state="done" size={36} />
                <p>
                  {need.title}, <b>{need.word}</b>: <span className="text-ink-2">{need.says}</span>
                </p>
              </li>
            ))}
        </ul>
      </section>
      <section aria-labelledby="members">
        <h2 id="members" className="border-b-2 border-ink px-4 pt-6 pb-3 text-h3 tablet:px-6">
          Members
        </h2>
        <ul>
          {view.members.map((member) => (
            <MemberItem
              key={`${member.id} ${member.roles.length}`}
              member={member}
              commandId={`${formId}-${member.id}`}
              reply={actionData}
              may={view.may.ok}
            />
          ))}
        </ul>
        {view.former.length > 0 && (
          <p className="px-4 py-3 text-ink-2 tablet:px-6">
            No longer members: {view.former.map((f) => `${f.name} (${f.says})`).join("; ")}. Their work stays in the record.
          </p>
        )}
      </section>
      <section id="add" aria-labelledby="add-title" className="px-4 py-6 tablet:px-6">
        <h2 id="add-title" className="pb-3 text-h3">
          Add somebody
        </h2>
        {view.may.ok ? (
          <AddMember key={view.members.flatMap((m) => m.roles).length} commandId={`${formId}-add`} reply={actionData} />
        ) : (
          <p className="max-w-[62ch] text-lead">{view.may.why}</p>
        )}
      </section>
    </main>
  );
}
