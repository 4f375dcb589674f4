import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { db, write } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { now, setClock } from "#app/lib/clock";
import { enqueue, type Mail, tryAgain } from "#app/lib/mail/outbox.server";
import { smtpSender } from "#app/lib/mail/transport.server";
import { mailWorker, mostTries, waitAfter } from "#app/lib/mail/worker.server";
import { startMailFake } from "../../scripts/mail-fake.mjs";
import { handClock } from "../support/clock";
import { freshDatabase } from "../support/db";

const from = "Bladecount <board@bladecount.example>";
const base: Mail = {
  kind: "no-go",
  installId: "i1",
  to: { address: "crew@n0100.example" },
  subject: "GO for run 1",
  text: "GO.",
  dedupeKey: "go:1",
};
const send = (mail: Partial<Mail> = {}) => write((tx) => enqueue(tx, { ...base, ...mail }));
const rowOf = async (id: string) => (await db().select().from(outbox).where(eq(outbox.id, id)))[0];

describe("mail over SMTP", () => {
  let fake: Awaited<ReturnType<typeof startMailFake>>;
  let clock: ReturnType<typeof handClock>;
  const sender = (waitMs?: number) =>
    smtpSender({ host: "127.0.0.1", port: fake.smtpPort, secure: false, user: undefined, password: undefined, from, waitMs });
  const worker = () => mailWorker(sender());

  beforeEach(async () => {
    await freshDatabase();
    fake = await startMailFake();
    clock = handClock(Date.UTC(2026, 11, 3, 9, 0));
  });
  afterEach(async () => {
    setClock(clock.before);
    await fake.close();
  });

  it("delivers text, HTML, a calendar entry and a file, with a Message-ID that is its own", async () => {
    const ics = "BEGIN:VCALENDAR\r\nVERSION:2.0\r\nPRODID:-//t//t//EN\r\nMETHOD:REQUEST\r\nEND:VCALENDAR\r\n";
    const { messageId } = await send({
      html: "<p>GO.</p>",
      attachments: [
        { name: "run-1.ics", type: "text/calendar", method: "REQUEST", content: Buffer.from(ics).toString("base64") },
        { name: "card.pdf", type: "application/pdf", content: Buffer.from("%PDF-").toString("base64") },
      ],
      inReplyTo: "<before@bladecount.example>",
      references: ["<first@bladecount.example>", "<before@bladecount.example>"],
    });
    expect(await worker().drain()).toEqual({ sent: 1, postponed: 0, givenUp: 0 });
    const [mail] = fake.messages;
    expect(mail).toMatchObject({
      recipients: ["crew@n0100.example"],
      subject: "GO for run 1",
      messageId,
      inReplyTo: "<before@bladecount.example>",
    });
    expect(mail?.text.trim()).toBe("GO.");
    expect(mail?.html.trim()).toBe("<p>GO.</p>");
    expect(mail?.references).toBe("<first@bladecount.example> <before@bladecount.example>");
    expect(mail?.attachments.map((a) => [a.type, a.method]).sort()).toEqual(
      [
        ["application/ics", undefined],
        ["application/pdf", undefined],
        ["text/calendar", "REQUEST"],
      ].sort(),
    );
  });

  it("shows its inbox, and serves a mail's HTML in a sandbox", async () => {
    await send({ subject: "<b>GO</b>", html: "<script>1</script>" });
    await worker().drain();
    const page = await (await fetch(fake.url)).text();
    expect(page).toContain("&lt;b&gt;GO&lt;/b&gt;");
    const messages = (await (await fetch(`${fake.url}/messages.json`)).json()) as { id: string }[];
    const html = await fetch(`${fake.url}/messages/${messages[0]?.id}/html`);
    expect(html.headers.get("Content-Security-Policy")).toMatch(/^sandbox; default-src 'none'/);
  });

  it("sends nothing of a transaction that was rolled back", async () => {
    await expect(
      write(async (tx) => {
        await enqueue(tx, base);
        throw new Error("no");
      }),
    ).rejects.toThrow("no");
    expect(await worker().drain()).toEqual({ sent: 0, postponed: 0, givenUp: 0 });
  });

  it("makes one mail of two with one key, and sends each once when two workers share the outbox", async () => {
    const first = await send();
    expect(await send({ subject: "again" })).toEqual(first);
    for (let i = 2; i <= 20; i++) await send({ dedupeKey: `go:${i}` });
    const tallies = await Promise.all([worker().drain(), worker().drain()]);
    expect(tallies[0].sent + tallies[1].sent).toBe(20);
    expect(new Set(fake.messages.map((m) => m.messageId)).size).toBe(20);
    expect(fake.messages).toHaveLength(20);
  });

  it("lets no one write a second header", async () => {
    await send({ subject: "GO\r\nBcc: all@n0100.example\u2028x" });
    await worker().drain();
    expect(fake.messages[0]?.subject).toBe("GO Bcc: all@n0100.example x");
    expect(fake.messages[0]?.headers.filter((h) => h.name.toLowerCase() === "bcc")).toEqual([]);
    await expect(send({ to: { address: "a@n0100.example, b@n0100.example" }, dedupeKey: "two" })).rejects.toThrow("one plain mail address");
  });

  it("gives up at once on a recipient that is refused for good, and still reaches the others", async () => {
    fake.faults.refuse = (address) => (address.startsWith("gone") ? 550 : undefined);
    const gone = await send({ to: { address: "gone@n0100.example" }, dedupeKey: "a" });
    await send({ dedupeKey: "b" });
    expect(await worker().drain()).toEqual({ sent: 1, postponed: 0, givenUp: 1 });
    expect(await rowOf(gone.id)).toMatchObject({
      sentAt: null,
      failedAt: now(),
      lastError: "The mail server answered: 550 No such mailbox",
    });

    fake.faults.refuse = undefined;
    expect(await write((tx) => tryAgain(tx, { id: gone.id, installId: "another" }))).toBe(false);
    expect(await write((tx) => tryAgain(tx, { id: gone.id, installId: "i1" }))).toBe(true);
    expect(await worker().drain()).toEqual({ sent: 1, postponed: 0, givenUp: 0 });
  });

  it("tries a recipient that is refused for now again, later and later, and gives up after the last try", async () => {
    fake.faults.refuse = () => 450;
    const { id } = await send();
    for (let tries = 1; tries < mostTries; tries++) {
      expect(await worker().drain()).toEqual({ sent: 0, postponed: 1, givenUp: 0 });
      expect((await rowOf(id))?.nextTryAt).toBe(now() + waitAfter(tries));
      expect(await worker().drain()).toEqual({ sent: 0, postponed: 0, givenUp: 0 });
      clock.add(waitAfter(tries));
    }
    expect(await worker().drain()).toEqual({ sent: 0, postponed: 0, givenUp: 1 });
  });

  it("keeps mail while no server is there", async () => {
    const port = fake.smtpPort;
    await fake.close();
    const { id } = await send();
    expect(
      await mailWorker(smtpSender({ host: "127.0.0.1", port, secure: false, user: undefined, password: undefined, from })).drain(),
    ).toMatchObject({ postponed: 1 });
    expect((await rowOf(id))?.lastError).toBe("The mail server cannot be reached.");
    fake = await startMailFake({ smtpPort: port });
    clock.add(waitAfter(1));
    expect(await worker().drain()).toMatchObject({ sent: 1 });
  });

  it("does not wait for ever for a slow server", async () => {
    fake.faults.slowMs = 1_000;
    const { id } = await send();
    expect(await mailWorker(sender(100)).drain()).toMatchObject({ postponed: 1 });
    expect((await rowOf(id))?.lastError).toBe("The mail server did not answer in time.");
  });

  it("sends again after a hang-up in mid-message, with the same Message-ID", async () => {
    const { messageId } = await send();
    fake.faults.cut = "before";
    expect(await worker().drain()).toMatchObject({ postponed: 1 });
    expect(fake.messages).toHaveLength(0);
    fake.faults.cut = "after";
    clock.add(waitAfter(1));
    expect(await worker().drain()).toMatchObject({ postponed: 1 });
    fake.faults.cut = undefined;
    clock.add(waitAfter(2));
    expect(await worker().drain()).toMatchObject({ sent: 1 });
    expect(fake.messages.map((m) => m.messageId)).toEqual([messageId, messageId]);
  });

  it("takes over a mail whose worker died, when its lease has run out", async () => {
    const { id } = await send();
    await write((tx) =>
      tx
        .update(outbox)
        .set({ leaseBy: "dead", leaseUntil: now() + 120_000 })
        .where(eq(outbox.id, id)),
    );
    expect(await worker().drain()).toMatchObject({ sent: 0 });
    clock.add(120_000);
    expect(await worker().drain()).toMatchObject({ sent: 1 });
  });
});
