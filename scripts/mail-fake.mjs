// A mail server for development, the demo and tests: it takes every mail over SMTP, delivers none, keeps them in memory and
// in a folder, and shows its inbox as a web page and as JSON. It can be told to refuse, to be slow and to hang up.
import { mkdirSync, readdirSync, readFileSync, writeFileSync } from "node:fs";
import { createServer } from "node:http";
import { join, resolve } from "node:path";
import { pathToFileURL } from "node:url";
import PostalMime from "postal-mime";
import { SMTPServer } from "smtp-server";
import { inboxPage, messagePage } from "./mail-fake-pages.mjs";

/**
 * @typedef {object} Faults
 * @property {(address: string) => number | undefined} [refuse] an SMTP code (450, 550 ...) for a recipient, or undefined to take it
 * @property {number} [slowMs] wait before a mail is acknowledged
 * @property {"before" | "after"} [cut] hang up in the middle of the data, or after the mail is kept but before it is acknowledged
 */

/**
 * Starts it. Port 0 picks a free one.
 * @param {{ smtpPort?: number, httpPort?: number, host?: string, folder?: string }} [options]
 */
export async function startMailFake({ smtpPort = 0, httpPort = 0, host = "127.0.0.1", folder } = {}) {
  /** @type {Faults} */
  const faults = {};
  /** @type {Awaited<ReturnType<typeof readMessage>>[]} */
  const messages = [];
  if (folder) {
    mkdirSync(folder, { recursive: true });
    for (const name of readdirSync(folder)
      .filter((n) => n.endsWith(".eml"))
      .sort()) {
      messages.push(await readMessage(name.slice(0, -4), readFileSync(join(folder, name)), []));
    }
  }
  const sockets = new Map();
  const smtp = new SMTPServer({
    disabledCommands: ["AUTH", "STARTTLS"],
    logger: false,
    onConnect(session, done) {
      const connection = [...smtp.connections].find((c) => c.session?.id === session.id || c.id === session.id);
      sockets.set(session.id, connection?._socket);
      done();
    },
    onClose: (session) => void sockets.delete(session.id),
    onRcptTo(address, _session, done) {
      const code = faults.refuse?.(address.address);
      done(code ? Object.assign(new Error(code < 500 ? "Try again later" : "No such mailbox"), { responseCode: code }) : undefined);
    },
    onData(stream, session, done) {
      const chunks = [];
      const cut = faults.cut;
      stream.on("data", (chunk) => {
        chunks.push(chunk);
        if (cut === "before") sockets.get(session.id)?.destroy();
      });
      stream.on("end", async () => {
        if (cut === "before") return;
        if (faults.slowMs) await new Promise((r) => setTimeout(r, faults.slowMs));
        const raw = Buffer.concat(chunks);
        const id = `${String(Date.now()).padStart(14, "0")}-${String(messages.length + 1).padStart(5, "0")}`;
        const recipients = session.envelope.rcptTo.map((r) => r.address);
        if (folder) writeFileSync(join(folder, `${id}.eml`), raw);
        messages.push(await readMessage(id, raw, recipients));
        if (cut === "after") sockets.get(session.id)?.destroy();
        else done();
      });
    },
  });
  // A client that vanishes is one of the faults on purpose, not a reason to stop.
  smtp.on("error", () => {});
  const web = createServer((request, response) => answer(request, response, messages));
  await new Promise((ready) => smtp.listen(smtpPort, host, () => ready(undefined)));
  await new Promise((ready) => web.listen(httpPort, host, () => ready(undefined)));
  const portOf = (server) => /** @type {import("node:net").AddressInfo} */ (server.address()).port;
  return {
    messages,
    faults,
    smtpPort: portOf(smtp.server),
    url: `http://${host}:${portOf(web)}`,
    async close() {
      web.closeAllConnections();
      for (const socket of sockets.values()) socket?.destroy();
      await Promise.all([new Promise((done) => smtp.close(() => done(undefined))), new Promise((done) => web.close(done))]);
    },
  };
}

/** @param {string} id @param {Buffer} raw @param {string[]} recipients */
async function readMessage(id, raw, recipients) {
  const mail = await PostalMime.parse(raw);
  return {
    id,
    recipients,
    to: (mail.to ?? []).map((a) => a.address ?? "").filter(Boolean),
    from: mail.from?.address ?? "",
    subject: mail.subject ?? "",
    date: mail.date ?? "",
    messageId: mail.messageId ?? "",
    inReplyTo: mail.inReplyTo ?? "",
    references: mail.references ?? "",
    text: mail.text ?? "",
    html: mail.html ?? "",
    headers: mail.headers.map((h) => ({ name: h.originalKey ?? h.key, value: h.value })),
    attachments: mail.attachments.map((a) => ({
      name: a.filename ?? "unnamed",
      type: a.mimeType,
      method: a.method,
      content: Buffer.from(/** @type {ArrayBuffer} */ (a.content)).toString("base64"),
    })),
  };
}

/** @typedef {Awaited<ReturnType<typeof readMessage>>} Message */

/** @param {import("node:http").IncomingMessage} request @param {import("node:http").ServerResponse} response @param {Message[]} messages */
function answer(request, response, messages) {
  const send = (status, type, body, extra = {}) => {
    response.writeHead(status, { "Content-Type": type, "X-Content-Type-Options": "nosniff", "Cache-Control": "no-store", ...extra });
    response.end(body);
  };
  const html = "text/html; charset=utf-8";
  const page = { "Content-Security-Policy": "default-src 'none'; style-src 'unsafe-inline'; frame-src 'self'" };
  const [, kind, id, part] = new URL(request.url ?? "/", "http://inbox").pathname.split("/");
  if (kind === "") return send(200, html, inboxPage(messages), page);
  if (kind === "messages.json") return send(200, "application/json; charset=utf-8", JSON.stringify(messages));
  const message = kind === "messages" ? messages.find((m) => m.id === id) : undefined;
  if (!message) return send(404, html, inboxPage(messages), page);
  if (part === undefined) return send(200, html, messagePage(message), page);
  // The mail's own HTML: no script, no request to anywhere, its own opaque origin.
  if (part === "html")
    return send(200, html, message.html, {
      "Content-Security-Policy": "sandbox; default-src 'none'; style-src 'unsafe-inline'; img-src data:",
    });
  const file = message.attachments[Number(part)];
  if (!file) return send(404, "text/plain; charset=utf-8", "No such file.");
  return send(200, "application/octet-stream", Buffer.from(file.content, "base64"), {
    "Content-Disposition": `attachment; filename*=UTF-8''${encodeURIComponent(file.name)}`,
  });
}

if (process.argv[1] && import.meta.url === pathToFileURL(process.argv[1]).href) {
  const folder = resolve(process.env.DATA_DIR ?? "data", "inbox");
  const fake = await startMailFake({
    smtpPort: Number(process.env.SMTP_PORT ?? 2525),
    httpPort: Number(process.env.INBOX_PORT ?? 2580),
    folder,
  });
  console.log(`Mail fake: takes mail on port ${fake.smtpPort}, inbox at ${fake.url}/`);
  for (const signal of ["SIGTERM", "SIGINT"]) process.once(signal, () => fake.close().then(() => process.exit(0)));
}
