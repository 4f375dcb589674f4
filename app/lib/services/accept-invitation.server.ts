// The yes to an invitation, by whoever reads the invited address: somebody with an account under it, or a new person who makes one.
// It is done in the name of the lead who invited, who must be lead still; the role is in the record as given by them.
import { and, eq, gt, isNull } from "drizzle-orm";
import { db } from "#app/db/client.server";
import { type InvitationBehind, invitationBehind } from "#app/db/queries/invitations.server";
import { invitations } from "#app/db/schema/invitations";
import { users } from "#app/db/schema/users";
import { hash } from "#app/lib/auth/hash.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { hashPin, judgePin } from "#app/lib/auth/pin.server";
import { isToken, tokenHash } from "#app/lib/auth/token.server";
import { now } from "#app/lib/clock";
import { newId } from "#app/lib/ids";
import { tryLink } from "#app/lib/services/link-try.server";
import { letIn } from "#app/lib/services/members.server";
import { done, type Outcome, refuse } from "#app/lib/services/outcome";
import { type Doing, perform } from "#app/lib/services/perform.server";

export interface Joined {
  install: string;
  member: string;
}

export interface NewPerson {
  name: string;
  newPassword: string;
  pin: string;
}

/** What a link leads to; null where it leads to nothing (any more). */
export const readInvitation = async (token: string): Promise<InvitationBehind | null> =>
  isToken(token) ? invitationBehind(db(), tokenHash(token), now()) : null;

/** The yes of somebody who is signed in with the invited address. */
export const acceptInvitation = (token: string, actor: { userId: string }): Promise<Outcome<Joined>> => tryLink(() => accept(token, actor));

async function accept(token: string, actor: { userId: string }): Promise<Outcome<Joined>> {
  const found = await readInvitation(token);
  if (!found) return ranOut;
  if (found.account?.id !== actor.userId)
    return refuse(403, "other-person", `This invitation is for ${found.email}. Sign out, then open the link again.`);
  return join(found, token, async (d) => {
    const [person] = await d.tx.select({ id: users.id, name: users.name }).from(users).where(eq(users.id, actor.userId));
    return person ?? null;
  });
}

/** The yes of somebody who has no account yet: it is made, with the invited address, and joins. */
export const joinAsNewPerson = (token: string, person: NewPerson): Promise<Outcome<Joined>> => tryLink(() => joinNew(token, person));

async function joinNew(token: string, { name, newPassword, pin }: NewPerson): Promise<Outcome<Joined>> {
  const found = await readInvitation(token);
  if (!found) return ranOut;
  if (found.account) return haveAccount;
  const { email } = found;
  const [password, digits] = [judgePassword(newPassword, { name, email }), judgePin(pin)];
  if (!password.ok) return refuse(422, "password-weak", password.message);
  if (!digits.ok) return refuse(422, "pin-weak", digits.message);
  const [passwordHash, pinHash] = [await hash(newPassword), await hashPin(pin)];
  return join(found, token, async (d) => {
    const person = { id: newId(), name };
    const made = await d.tx
      .insert(users)
      .values({ ...person, email, passwordHash, pinHash, createdAt: d.now })
      .onConflictDoNothing({ target: users.email })
      .returning({ id: users.id });
    return made.length ? person : null;
  });
}

type Person = { id: string; name: string };

async function join(found: InvitationBehind, token: string, personIn: (d: Doing) => Promise<Person | null>): Promise<Outcome<Joined>> {
  const { id, installId, invitedBy, role } = found;
  const outcome = await perform<Joined>(
    { installId, actor: { userId: invitedBy }, commandId: newId(), kind: "accept-invitation", input: { invitation: id } },
    async (d) => {
      const claimed = await d.tx
        .update(invitations)
        .set({ outcome: "accepted", settledAt: d.now })
        .where(
          and(
            eq(invitations.id, id),
            eq(invitations.tokenHash, tokenHash(token)),
            isNull(invitations.outcome),
            gt(invitations.expiresAt, d.now),
          ),
        )
        .returning({ id: invitations.id });
      if (!claimed.length) return ranOut;
      const person = await personIn(d);
      if (!person) return haveAccount;
      const joined = await letIn(d, person, role);
      // Somebody gave them the role in the meantime: then the yes changes nothing.
      return joined.ok || joined.code === "already" ? done({ install: installId, member: person.id }) : joined;
    },
  );
  if (outcome.ok || (outcome.code !== "not-found" && outcome.code !== "not-your-role")) return outcome;
  return refuse(
    409,
    "inviter-gone",
    `${found.inviter} is not lead of this install any more, so this invitation lets nobody in. Ask a lead there for a new one.`,
  );
}

const ranOut = refuse(
  409,
  "link-over",
  "This link is over: it was used, withdrawn, sent anew, or has run out. Ask the lead of the install for a new one.",
);
const haveAccount = refuse(409, "have-account", "There is an account with this address now. Open the link again and sign in.");
