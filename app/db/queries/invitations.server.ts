// Invitations: those of an install that nobody has answered, and the one behind a link.
import { and, asc, eq, gt, isNull } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { installs } from "#app/db/schema/installs";
import { type Invitation, invitations } from "#app/db/schema/invitations";
import { users } from "#app/db/schema/users";

export type OpenInvitation = Pick<Invitation, "id" | "email" | "role" | "sentAt" | "sendings" | "expiresAt"> & { inviter: string };

/** Unanswered ones, run out or not, the oldest first. */
export function openInvitations(reader: Reader, installId: string): Promise<OpenInvitation[]> {
  const { id, email, role, sentAt, sendings, expiresAt } = invitations;
  return reader
    .select({ id, email, role, sentAt, sendings, expiresAt, inviter: users.name })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .where(and(eq(invitations.installId, installId), isNull(invitations.outcome)))
    .orderBy(asc(invitations.createdAt));
}

export interface InvitationBehind {
  id: string;
  installId: string;
  email: string;
  role: Invitation["role"];
  invitedBy: string;
  inviter: string;
  registration: string;
  name: string;
  timeZone: string;
  expiresAt: number;
  /** The account with this address; null where there is none yet. */
  account: { id: string; disabled: boolean } | null;
}

/** The invitation whose link has this token, while it can be accepted. */
export async function invitationBehind(reader: Reader, tokenHash: string, at: number): Promise<InvitationBehind | null> {
  const [row] = await reader
    .select({
      id: invitations.id,
      installId: invitations.installId,
      email: invitations.email,
      role: invitations.role,
      invitedBy: invitations.invitedBy,
      inviter: users.name,
      registration: installs.registration,
      name: installs.name,
      timeZone: installs.timeZone,
      expiresAt: invitations.expiresAt,
    })
    .from(invitations)
    .innerJoin(users, eq(users.id, invitations.invitedBy))
    .innerJoin(installs, eq(installs.id, invitations.installId))
    .where(and(eq(invitations.tokenHash, tokenHash), isNull(invitations.outcome), gt(invitations.expiresAt, at)));
  if (!row) return null;
  const [account] = await reader.select({ id: users.id, disabledAt: users.disabledAt }).from(users).where(eq(users.email, row.email));
  return { ...row, account: account ? { id: account.id, disabled: account.disabledAt !== null } : null };
}
