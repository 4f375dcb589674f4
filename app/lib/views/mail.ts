/** The install's mail as its page lists it: to whom, what, when, and what became of it. Pure. */
import { count } from "#app/lib/gates/who";
import type { May } from "#app/lib/views/may";
import { dayWhen, timeOrWhen } from "#app/lib/views/run-words";

export interface MailRow {
  id: string;
  kind: string;
  /** Of the record that it tells about. */
  act: string;
  to: string;
  name: string | null;
  subject: string;
  createdAt: number;
  state: "sent" | "waiting" | "given up";
  sentAt: number | null;
  nextTryAt: number;
  tries: number;
  lastError: string | null;
}

export interface MailLine {
  id: string;
  anchor: string;
  to: string;
  state: MailRow["state"];
  /** "sent 5 Dec 09:21 CET, after 3 tries". */
  words: string;
  /** What the mail server said. */
  error: string | null;
  /** Where it was given up: whether the reader may send it again. */
  again: May | null;
}

/** One act's mails: the same subject to several people. */
export interface MailGroup {
  id: string;
  subject: string;
  written: string;
  lines: MailLine[];
}

export interface MailView {
  state: string;
  /** Share that was sent, 0 to 1. */
  sent: number;
  lost: number;
  groups: MailGroup[];
}

export const anchorOfMail = (id: string): string => `mail-${id}`;

export function mailView(rows: MailRow[], now: number, timeZone: string, again: (row: MailRow) => May): MailView {
  const of = (state: MailRow["state"]) => rows.filter((r) => r.state === state).length;
  const [sent, waiting, lost] = [of("sent"), of("waiting"), of("given up")];
  const parts = [sent ? `${sent} sent` : "", waiting ? `${waiting} not through yet` : "", lost ? `${lost} given up` : ""];
  const groups = new Map<string, MailGroup>();
  for (const row of rows) {
    const key = `${row.act || row.createdAt} ${row.subject}`;
    const group = groups.get(key) ?? { id: row.id, subject: row.subject, written: dayWhen(row.createdAt, timeZone), lines: [] };
    group.lines.push(line(row, now, timeZone, again));
    groups.set(key, group);
  }
  return {
    state: parts.filter(Boolean).join(", ") || "nothing has been sent yet",
    sent: rows.length ? sent / rows.length : 0,
    lost,
    groups: [...groups.values()],
  };
}

function line(row: MailRow, now: number, timeZone: string, again: (row: MailRow) => May): MailLine {
  const { id, state, name, to } = row;
  return {
    id,
    anchor: anchorOfMail(id),
    state,
    to: name ? `${name}, ${to}` : to,
    words: words(row, now, timeZone),
    error: state === "sent" ? null : row.lastError,
    again: state === "given up" ? again(row) : null,
  };
}

function words(row: MailRow, now: number, timeZone: string): string {
  const tries = row.tries > 1 ? `, after ${row.tries} tries` : "";
  switch (row.state) {
    case "sent":
      return `sent ${timeOrWhen(row.sentAt ?? row.createdAt, now, timeZone)}${tries}`;
    case "given up":
      return `given up after ${count(row.tries, "try", "tries")}: tell the person yourself`;
    default:
      return row.tries === 0
        ? "waits to be sent"
        : `not through yet after ${count(row.tries, "try", "tries")}, next try ${timeOrWhen(row.nextTryAt, now, timeZone)}`;
  }
}
