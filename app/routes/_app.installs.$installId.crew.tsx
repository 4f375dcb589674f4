import { parseWithZod } from "@conform-to/zod/v4";
import { data, redirect } from "react-router";
import type { z } from "zod";
import { Invitations } from "#app/components/crew/Invitations";
import { Invite } from "#app/components/crew/Invite";
import { Leave } from "#app/components/crew/Leave";
import { MemberItem } from "#app/components/crew/MemberItem";
import { ItemNut } from "#app/components/ui/ItemNut";
import { StateRow } from "#app/components/ui/StateRow";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { db } from "#app/db/client.server";
import { openInvitations } from "#app/db/queries/invitations.server";
import { readForm } from "#app/lib/http/form.server";
import { actsOf, formAct } from "#app/lib/http/form-acts.server";
import { type InstallContext, installContext } from "#app/lib/http/install.server";
import { newId } from "#app/lib/ids";
import { giveRoleForm, invitationForm, inviteForm, leaveForm } from "#app/lib/schemas/account";
import { replyOf } from "#app/lib/schemas/form-reply";
import { endRoleForm } from "#app/lib/schemas/set-up-forms";
import { invite, sendInvitationAgain, withdrawInvitation } from "#app/lib/services/invitations.server";
import { endRole, giveRole, leaveInstall } from "#app/lib/services/members.server";
import { anchorOfMember, crewPageView } from "#app/lib/views/crew";
import { anchorOfInvitation, invitationView } from "#app/lib/views/invitations";
import { boardOf } from "#app/lib/views/places";
import type { Route } from "./+types/_app.installs.$installId.crew";

export const meta: Route.MetaFunction = () => [{ title: "Crew · Bladecount" }];

export async function loader({ context, url }: Route.LoaderArgs) {
  const { e, me, installId, snapshot, now } = context.get(installContext);
  const view = crewPageView(e, me);
  // Addresses of people who are not members yet are for the leads alone.
  const open = view.may.ok ? await openInvitations(db(), installId) : [];
  return {
    view,
    invitations: open.map((row) => invitationView(row, now, snapshot.install.timeZone)),
    written: view.may.ok && url.searchParams.has("invited"),
    formId: newId(),
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const install = context.get(installContext);
  const sent = await readForm(request);
  const acts = actsOf(install);
  const crew = `${boardOf(install.installId)}/crew`;
  const intent = sent.get("intent");
  if (intent === "leave") return leave(install, sent);
  if (intent === "end-role") return end(install, sent);
  if (intent === "invite") {
    const serve = ({ commandId, ...input }: z.output<typeof inviteForm>) => invite(acts(commandId), input);
    const acted = await formAct({ sent, form: "invite", schema: inviteForm, serve, anchor: (v) => anchorOfInvitation(v.invitation) });
    return acted.done ? redirect(`${crew}?invited#${acted.anchor}`, 303) : data(acted.reply, { status: acted.status });
  }
  if (intent === "give-role") {
    const form = anchorOfMember(String(sent.get("member") ?? ""));
    const serve = ({ commandId, ...input }: z.output<typeof giveRoleForm>) => giveRole(acts(commandId), input);
    const acted = await formAct({ sent, form, schema: giveRoleForm, serve, anchor: (v) => anchorOfMember(v.member) });
    return acted.done ? redirect(`${crew}#${acted.anchor}`, 303) : data(acted.reply, { status: acted.status });
  }
  const again = intent === "send-again";
  const form = anchorOfInvitation(String(sent.get("invitation") ?? ""));
  const serve = ({ commandId, invitation }: z.output<typeof invitationForm>) =>
    (again ? sendInvitationAgain : withdrawInvitation)(acts(commandId), { invitation });
  const acted = await formAct({ sent, form, schema: invitationForm, serve, anchor: () => form });
  if (acted.done) return redirect(again ? `${crew}?invited#${acted.anchor}` : `${crew}#invitations`, 303);
  return data(acted.reply, { status: acted.status });
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

async function leave(install: InstallContext, sent: FormData) {
  const serve = ({ commandId }: z.output<typeof leaveForm>) => leaveInstall(actsOf(install)(commandId));
  const acted = await formAct({ sent, form: "leave", schema: leaveForm, serve, anchor: () => "" });
  return acted.done ? redirect("/hangar", 303) : data(acted.reply, { status: acted.status });
}

export default function Crew({ loaderData, actionData }: Route.ComponentProps) {
  const { view, invitations, written, formId } = loaderData;
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
      {view.may.ok && <Invitations invitations={invitations} written={written} formId={formId} reply={actionData} />}
      <section id="invite" aria-labelledby="invite-title" className="px-4 py-6 tablet:px-6">
        <h2 id="invite-title" className="pb-3 text-h3">
          Invite somebody
        </h2>
        {view.may.ok ? (
          <Invite key={invitations.map((i) => i.sendings).join()} commandId={`${formId}-invite`} reply={actionData} />
        ) : (
          <p className="max-w-[62ch] text-lead">{view.may.why}</p>
        )}
      </section>
      <Leave commandId={`${formId}-leave`} reply={actionData} place={view.members.find((m) => m.me)?.place ?? null} />
    </main>
  );
}
