// The way out: SMTP, as the settings name it. Every wait has a limit well under the worker's lease.
import { createTransport } from "nodemailer";
import type { OutboxRow } from "#app/db/schema/outbox";
import { type Env, env } from "#app/lib/env.server";

/** Hands one mail to the server. Rejects with what went wrong; `permanent` on the error says that trying again is no use. */
export type SendMail = (row: OutboxRow) => Promise<void>;

export class MailRefused extends Error {
  constructor(
    message: string,
    readonly permanent: boolean,
  ) {
    super(message);
  }
}

export type SmtpOptions = Env["smtp"] & { from: string; waitMs?: number };

/** A sender over SMTP. `waitMs` limits each of connecting, greeting and silence, in milliseconds. */
export function smtpSender(
  { host, port, secure, user, password, from, waitMs = 15_000 }: SmtpOptions = { ...env.smtp, from: env.mailFrom },
): SendMail {
  const transport = createTransport({
    host,
    port,
    secure,
    auth: user ? { user, pass: password ?? "" } : undefined,
    connectionTimeout: waitMs,
    greetingTimeout: waitMs,
    socketTimeout: waitMs,
    // A mail carries what its row holds and nothing else of this machine.
    disableFileAccess: true,
    disableUrlAccess: true,
  });
  return async (row) => {
    const calendar = row.attachments.find((a) => a.method !== undefined);
    try {
      await transport.sendMail({
        from,
        to: { name: "", address: row.toAddress },
        subject: row.subject,
        text: row.text,
        html: row.html ?? undefined,
        messageId: row.messageId,
        inReplyTo: row.inReplyTo ?? undefined,
        references: row.references,
        date: new Date(row.createdAt),
        headers: { "Auto-Submitted": "auto-generated" },
        icalEvent: calendar && { method: calendar.method, filename: calendar.name, content: Buffer.from(calendar.content, "base64") },
        attachments: row.attachments
          .filter((a) => a !== calendar)
          .map((a) => ({ filename: a.name, contentType: a.type, content: Buffer.from(a.content, "base64") })),
      });
    } catch (error) {
      throw new MailRefused(sayWhy(error), isPermanent(error));
    }
  };
}

type SmtpError = { code?: string; responseCode?: number; response?: string; message?: string };

/** The server took the connection and refused this recipient or this message for good (5xx). Source: RFC 5321, 4.2.1. */
function isPermanent(error: unknown): boolean {
  const { code, responseCode } = error as SmtpError;
  return (code === "EENVELOPE" || code === "EMESSAGE") && (responseCode ?? 0) >= 500;
}

function sayWhy(error: unknown): string {
  const { code, responseCode, response, message } = error as SmtpError;
  if (responseCode) return `The mail server answered: ${response ?? responseCode}`;
  if (code === "EDNS" || /ECONNREFUSED|ENOTFOUND|EHOSTUNREACH|ENETUNREACH/.test(message ?? "")) return "The mail server cannot be reached.";
  if (code === "ETIMEDOUT") return "The mail server did not answer in time.";
  return `The connection to the mail server broke: ${message ?? code ?? "no reason given"}`;
}
