// Who works on an install: a lead lets people in with a role, and ends a role. Both are in the record.
import { and, eq, isNull } from "drizzle-orm";
import { memberRoles, members } from "#app/db/schema/members";
import { users } from "#app/db/schema/users";
import { mayInvite } from "#app/lib/gates/set-up-verdicts";
import { newId } from "#app/lib/ids";
import type { AddMember, EndRole } from "#app/lib/schemas/set-up";
import { done, notFound, type Outcome, refusalOf, refuse } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

/** Gives a person who has an account a role here. */
export function addMember(act: Act, input: AddMember): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "add-member", input }, async (d) => {
    const refusal = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { email, role } = input;
    const [person] = await d.tx
      .select({ id: users.id, name: users.name })
      .from(users)
      .where(and(eq(users.email, email), isNull(users.disabledAt)));
    if (!person) return notFound("An account with that address");
    if (person.id === d.member.id && role === "inspector")
      return refuse(403, "own-work", "Nobody makes themselves the inspector. Another lead must, or invite somebody else as inspector.");
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
  });
}

/** Ends a role. What the person did in it stays; without any role they are no longer a member. */
export function endRole(act: Act, input: EndRole): Promise<Outcome<{ member: string }>> {
  return perform({ ...act, kind: "end-role", input }, async (d) => {
    const refusal = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { member, role } = input;
    const leads = d.e.snapshot.members.filter((m) => m.roles.some((r) => r.role === "lead" && r.to === null));
    if (role === "lead" && leads.length === 1 && leads[0]?.id === member)
      return refuse(409, "order", "An install needs a lead. Make somebody else lead first.");
    const ended = await d.tx
      .update(memberRoles)
      .set({ to: d.now })
      .where(
        and(eq(memberRoles.installId, d.installId), eq(memberRoles.userId, member), eq(memberRoles.role, role), isNull(memberRoles.to)),
      )
      .returning({ id: memberRoles.id });
    if (ended.length === 0) return notFound("That role");
    await d.record("lead", { type: "role-ended", data: { member, name: d.e.facts.members.get(member)?.name ?? "", role } });
    return done({ member });
  });
}
