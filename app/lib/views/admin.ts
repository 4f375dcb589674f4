/** The instance's people and mail as its administrators see them. Pure. Times in UTC: an instance is at no place. */
import { when } from "#app/lib/gates/when";
import { count } from "#app/lib/gates/who";

export interface PersonView {
  id: string;
  anchor: string;
  name: string;
  email: string;
  says: string;
  disabled: boolean;
  isAdmin: boolean;
  me: boolean;
}

interface PersonRow {
  id: string;
  name: string;
  email: string;
  isAdmin: boolean;
  hasPin: boolean;
  createdAt: number;
  disabledAt: number | null;
  lastSeenAt: number | null;
}

export const anchorOfPerson = (id: string): string => `person-${id}`;

export function personView(row: PersonRow, me: string): PersonView {
  const { id, name, email, isAdmin, hasPin, createdAt, disabledAt, lastSeenAt } = row;
  const parts = [
    `here since ${when(createdAt, "UTC", true)}`,
    lastSeenAt === null ? "not signed in now" : `last seen ${when(lastSeenAt, "UTC")}`,
    ...(hasPin ? [] : ["no signing PIN"]),
    ...(disabledAt === null ? [] : [`disabled ${when(disabledAt, "UTC")}`]),
  ];
  return { id, anchor: anchorOfPerson(id), name, email, says: parts.join(", "), disabled: disabledAt !== null, isAdmin, me: id === me };
}

export function peopleState(people: PersonView[]): string {
  const disabled = people.filter((p) => p.disabled).length;
  return `${count(people.length, "person", "people")}${disabled ? `, ${disabled} disabled` : ""}`;
}

export interface InstanceMailView {
  id: string;
  anchor: string;
  to: string;
  what: string;
  says: string;
  error: string | null;
  /** Whether it can be tried again from here. */
  again: boolean;
}

interface MailRow {
  id: string;
  kind: string;
  to: string;
  subject: string;
  createdAt: number;
  sentAt: number | null;
  nextTryAt: number;
  tries: number;
  lastError: string | null;
  state: "sent" | "waiting" | "given up";
}

const KIND: Record<string, string> = {
  go: "GO",
  "no-go": "No-go",
  hold: "HOLD",
  scrub: "SCRUB",
  "runs-out": "What runs out",
  due: "Dates in the crib",
  invitation: "Invitation",
};

export function instanceMailView(row: MailRow): InstanceMailView {
  const { id, kind, to, subject, createdAt, sentAt, nextTryAt, tries, lastError, state } = row;
  const end =
    state === "sent"
      ? `sent ${when(sentAt ?? createdAt, "UTC")}`
      : state === "given up"
        ? "given up"
        : tries
          ? `next try ${when(nextTryAt, "UTC")}`
          : "waits to be sent";
  const often = tries > 1 || state === "given up" ? `, ${count(tries, "try", "tries")}` : "";
  const what = subject || `${KIND[kind] ?? "A mail"}, of an install`;
  return {
    id,
    anchor: `mail-${id}`,
    to,
    what,
    says: `written ${when(createdAt, "UTC")}, ${end}${often}`,
    error: state === "sent" ? null : lastError,
    again: state === "given up" && kind !== "go",
  };
}
