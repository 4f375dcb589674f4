/** Invitations that nobody has answered, as the crew page lists them for the leads. Pure. */
import type { Role } from "#app/lib/gates/snapshot";
import { when } from "#app/lib/gates/when";
import { count } from "#app/lib/gates/who";

export interface InvitationView {
  id: string;
  anchor: string;
  email: string;
  role: Role;
  says: string;
  /** Its link lets nobody in any more. */
  over: boolean;
  sendings: number;
}

export interface InvitationRow {
  id: string;
  email: string;
  role: Role;
  inviter: string;
  sentAt: number;
  sendings: number;
  expiresAt: number;
}

export const anchorOfInvitation = (id: string): string => `invitation-${id}`;

export function invitationView(
  { id, email, role, inviter, sentAt, sendings, expiresAt }: InvitationRow,
  now: number,
  zone: string,
): InvitationView {
  const over = expiresAt <= now;
  const often = sendings > 1 ? `, ${count(sendings, "time", "times")} in all` : "";
  const ends = over ? `its link ran out ${when(expiresAt, zone)}` : `the link is good to ${when(expiresAt, zone)}`;
  return {
    id,
    anchor: anchorOfInvitation(id),
    email,
    role,
    says: `sent by ${inviter} ${when(sentAt, zone)}${often}; ${ends}`,
    over,
    sendings,
  };
}
