// Who works on an install: people come in with a role, which is ended by a lead or by themselves. All of it is in the record.
import { and, eq, inArray, isNull } from "drizzle-orm";
import { memberRoles, members } from "#app/db/schema/members";
import { users } from "#app/db/schema/users";
import { mayInvite } from "#app/lib/gates/set-up-verdicts";
import type { Role } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import type { AddMember, EndRole } from "#app/lib/schemas/set-up";
import { done, notFound, type Outcome, type Refusal, refusalOf, refuse } from "#app/lib/services/outcome";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

/** Gives a person who has an account a role here, without asking them: invitations and members' further roles end in it. */
export function addMember(act: Act, input: AddMember): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "add-member", input }, async (d) => {
    const { email, role } = input;
    const refusal = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const [person] = await d.tx
      .select({ id: users.id, name: users.name })
      .from(users)
      .where(and(eq(users.email, email), isNull(users.disabledAt)));
    return person ? letIn(d, person, role) : notFound("An account with that address");
  });
}

/** Gives a member a further role. */
export function giveRole(act: Act, input: EndRole): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "give-role", input }, async (d) => {
    const refusal = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const here = d.e.snapshot.members.find((m) => m.id === input.member && m.roles.some((r) => r.to === null));
    return here ? letIn(d, { id: here.id, name: here.name }, input.role) : notFound("That member");
  });
}

/** In the transaction of an act that is done in a lead's name: the person holds the role from now on. */
export async function letIn(d: Doing, person: { id: string; name: string }, role: Role): Promise<Outcome<{ member: string }>> {
  const refusal = refusalOf(mayInvite(d.e, { member: d.member.id })) ?? ownWork(d.member.id === person.id, role);
  if (refusal) return refusal;
  const held = await d.tx
    .select({ id: memberRoles.id })
    .from(memberRoles)
    .where(
      and(eq(memberRoles.installId, d.installId), eq(memberRoles.userId, person.id), eq(memberRoles.role, role), isNull(memberRoles.to)),
    );
  if (held.length > 0) return refuse(409, "already", `${person.name} is ${role} here already.`);
  await d.record("lead", { type: "member-added", data: { member: person.id, name: person.name, role } });
  await d.tx
    .insert(members)
    .values({ installId: d.installId, userId: person.id, addedAt: d.now, addedBy: d.member.id })
    .onConflictDoNothing();
  await d.tx
    .insert(memberRoles)
    .values({ id: newId(), installId: d.installId, userId: person.id, role, from: d.now, grantedBy: d.member.id });
  return done({ member: person.id });
}

export const ownWork = (oneself: boolean, role: Role): Refusal | null =>
  oneself && role === "inspector"
    ? refuse(403, "own-work", "Nobody makes themselves the inspector. Another lead must, or invite somebody else as inspector.")
    : null;

/** Ends a role. What the person did in it stays; without any role they are no longer a member. */
export function endRole(act: Act, input: EndRole): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "end-role", input }, async (d) => {
    const refusal = refusalOf(mayInvite(d.e, { member: d.member.id })) ?? (await lastLead(d, input.member, [input.role]));
    if (refusal) return refusal;
    return (await close(d, "lead", input)) ? done({ member: input.member }) : notFound("That role");
  });
}

/** A member leaves: all their roles end. */
export function leaveInstall(act: Act): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "leave-install", input: {} }, async (d) => {
    const { id, roles } = d.member;
    const refusal = await lastLead(d, id, roles);
    if (refusal) return refusal;
    for (const role of roles) await close(d, role, { member: id, role });
    return done({ member: id });
  });
}

async function close(d: Doing, as: Role, { member, role }: EndRole): Promise<boolean> {
  const ended = await d.tx
    .update(memberRoles)
    .set({ to: d.now })
    .where(and(eq(memberRoles.installId, d.installId), eq(memberRoles.userId, member), eq(memberRoles.role, role), isNull(memberRoles.to)))
    .returning({ id: memberRoles.id });
  if (ended.length) await d.record(as, { type: "role-ended", data: { member, name: d.e.facts.members.get(member)?.name ?? "", role } });
  return ended.length > 0;
}

/** Whoever cannot sign in any more leads nothing: only leads whose accounts are in use are counted. */
async function lastLead(d: Doing, member: string, roles: Role[]): Promise<Refusal | null> {
  if (!roles.includes("lead")) return null;
  const leads = d.e.snapshot.members.filter((m) => m.roles.some((r) => r.role === "lead" && r.to === null)).map((m) => m.id);
  if (!leads.includes(member)) return null;
  const others = leads.filter((id) => id !== member);
  const able = others.length ? await d.tx.$count(users, and(inArray(users.id, others), isNull(users.disabledAt))) : 0;
  return able ? null : refuse(409, "order", "An install needs a lead. Make somebody else lead first.");
}
