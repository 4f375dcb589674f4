// A lead asks somebody by mail to join. Nothing that the lead is told tells whether the address belongs to an account: the link in
// the mail does what fits. Links are good for seven days and for one person.
import { and, eq, isNull } from "drizzle-orm";
import { db } from "#app/db/client.server";
import { memberOf } from "#app/db/queries/membership.server";
import { type Invitation, invitations } from "#app/db/schema/invitations";
import { users } from "#app/db/schema/users";
import { askedTooOften } from "#app/lib/auth/throttle.server";
import { tokenHash } from "#app/lib/auth/token.server";
import { env } from "#app/lib/env.server";
import { mayInvite } from "#app/lib/gates/set-up-verdicts";
import { when } from "#app/lib/gates/when";
import { newId, newToken } from "#app/lib/ids";
import { composeLetter } from "#app/lib/mail/compose/letter";
import { enqueue } from "#app/lib/mail/outbox.server";
import { ROLE_DOES } from "#app/lib/schemas/account";
import type { AddMember } from "#app/lib/schemas/set-up";
import { ownWork } from "#app/lib/services/members.server";
import { done, notFound, type Outcome, type Refusal, refusalOf, refuse } from "#app/lib/services/outcome";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

const DAY = 86_400_000;
export const INVITATION_LASTS = 7 * DAY;
/** Unanswered ones of an install at a time. */
export const MOST_INVITATIONS = 50;

/** Invites an address. One that is invited for this role already gets a new link, and the old one no longer counts. */
export async function invite(act: Act, input: AddMember): Promise<Outcome<{ invitation: string }>> {
  const refusal = await tooOften(act, input.email);
  if (refusal) return refusal;
  return perform({ ...act, kind: "invite", input }, async (d) => {
    const no = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (no) return no;
    const { email, role } = input;
    const [me] = await d.tx.select({ email: users.email }).from(users).where(eq(users.id, d.member.id));
    const own = ownWork(me?.email === email, role);
    if (own) return own;
    const open = and(eq(invitations.installId, d.installId), isNull(invitations.outcome));
    const [there] = await d.tx
      .select()
      .from(invitations)
      .where(and(open, eq(invitations.email, email), eq(invitations.role, role)));
    if (there) return renew(d, there);
    if ((await d.tx.$count(invitations, open)) >= MOST_INVITATIONS)
      return refuse(409, "too-many", `${MOST_INVITATIONS} invitations are open here, as many as there may be. Withdraw one first.`);
    const token = newToken();
    const row = {
      id: newId(),
      installId: d.installId,
      email,
      role,
      invitedBy: d.member.id,
      createdAt: d.now,
      sentAt: d.now,
      sendings: 1,
      expiresAt: d.now + INVITATION_LASTS,
    };
    await d.tx.insert(invitations).values({ ...row, tokenHash: tokenHash(token) });
    await mail(d, row, token);
    return done({ invitation: row.id });
  });
}

/** A new link for the same invitation, good for seven days again; the old one no longer counts. */
export async function sendInvitationAgain(act: Act, input: { invitation: string }): Promise<Outcome<{ invitation: string }>> {
  const [row] = await db()
    .select({ email: invitations.email })
    .from(invitations)
    .where(and(eq(invitations.id, input.invitation), eq(invitations.installId, act.installId)));
  const refusal = row ? await tooOften(act, row.email) : null;
  if (refusal) return refusal;
  return perform({ ...act, kind: "send-invitation-again", input }, async (d) => {
    const no = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (no) return no;
    const open = await openOne(d, input.invitation);
    return open ? renew(d, open) : gone;
  });
}

/** Its link lets nobody in any more. */
export function withdrawInvitation(act: Act, input: { invitation: string }): Promise<Outcome<{ invitation: string }>> {
  return perform({ ...act, kind: "withdraw-invitation", input }, async (d) => {
    const no = refusalOf(mayInvite(d.e, { member: d.member.id }));
    if (no) return no;
    const open = await openOne(d, input.invitation);
    if (!open) return gone;
    await d.tx.update(invitations).set({ outcome: "withdrawn", settledAt: d.now }).where(eq(invitations.id, open.id));
    return done({ invitation: open.id });
  });
}

const gone = notFound("That invitation");

/** Whoever may not invite here uses up nobody's mails; that they may not is said where the act is judged. */
async function tooOften({ installId, actor: { userId } }: Act, email: string): Promise<Refusal | null> {
  const member = await memberOf(db(), installId, userId);
  if (!member?.roles.includes("lead")) return null;
  const wait = await askedTooOften("invitation", email, userId);
  return wait ? refuse(429, "too-often", wait) : null;
}

async function openOne(d: Doing, id: string): Promise<Invitation | undefined> {
  const [row] = await d.tx
    .select()
    .from(invitations)
    .where(and(eq(invitations.id, id), eq(invitations.installId, d.installId), isNull(invitations.outcome)));
  return row;
}

/** In the name of whoever sends it again: they answer for the role. */
async function renew(d: Doing, row: Invitation): Promise<Outcome<{ invitation: string }>> {
  const own = await isOwn(d, row);
  if (own) return own;
  const token = newToken();
  const next = { invitedBy: d.member.id, sentAt: d.now, sendings: row.sendings + 1, expiresAt: d.now + INVITATION_LASTS };
  await d.tx
    .update(invitations)
    .set({ ...next, tokenHash: tokenHash(token) })
    .where(eq(invitations.id, row.id));
  await mail(d, { ...row, ...next }, token);
  return done({ invitation: row.id });
}

async function isOwn(d: Doing, { email, role }: Invitation): Promise<Refusal | null> {
  const [me] = await d.tx.select({ email: users.email }).from(users).where(eq(users.id, d.member.id));
  return ownWork(me?.email === email, role);
}

type Sent = Pick<Invitation, "id" | "email" | "role" | "sendings" | "expiresAt">;

function mail(d: Doing, { id, email, role, sendings, expiresAt }: Sent, token: string) {
  const { registration, name, timeZone } = d.e.snapshot.install;
  const letter = composeLetter({
    subject: `${d.member.name} invites you to ${registration}, ${name}`,
    reader: email,
    lead: [
      `${d.member.name} asks you to join the install ${registration}, ${name}, as ${role}.`,
      "You are not a member yet. Open the link, read what it says, and accept.",
    ],
    rows: [
      { head: "Role", text: `${role}: ${ROLE_DOES[role]}` },
      { head: "Link good to", text: `${when(expiresAt, timeZone, true)}, once` },
    ],
    button: { label: "See the invitation", href: `${env.baseUrl}/invitation/${token}` },
    small: [
      "The board shows whether a homebuilt aircraft's engine is ready to be run, and who has proved what. Without an account you choose a name, a password and a signing PIN first.",
      "If you do not know who this is, do nothing: without your yes you join nothing, and the link runs out by itself. Give the link to nobody: whoever has it can answer for you.",
    ],
  });
  // No user id, whether there is one or not: the install's list of mails shows it with a name.
  return enqueue(d.tx, {
    kind: "invitation",
    installId: d.installId,
    to: { address: email },
    ...letter,
    dedupeKey: `invitation:${id}-${sendings}`,
  });
}
