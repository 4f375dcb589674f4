// Sends what is in the outbox. A mail is leased to one worker before it goes out, so that several processes on one database
// share the work; a worker that dies leaves a lease that runs out. At least once, always with the same Message-ID.
import { and, asc, eq, isNull, lte } from "drizzle-orm";
import { type Database, database } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { type OutboxRow, outbox } from "#app/db/schema/outbox";
import { now } from "#app/lib/clock";
import { newId } from "#app/lib/ids";
import { log } from "#app/lib/log.server";
import { LINK_MAILS } from "#app/lib/mail/outbox.server";
import { MailRefused, type SendMail, smtpSender } from "#app/lib/mail/transport.server";

const leaseMs = 120_000;
const pollMs = 1_000;
const lanes = 4;
export const mostTries = 10;

/** Milliseconds to wait after the n-th failed try: 5 s, 15 s, 45 s ... at most an hour. A GO mail is worth quick tries first. */
export const waitAfter = (tries: number): number => Math.min(5_000 * 3 ** (tries - 1), 3_600_000);

export type Drained = { sent: number; postponed: number; givenUp: number };
export type MailWorker = { drain: () => Promise<Drained>; stop: () => Promise<void> };

/** One worker. `drain` sends everything that is due now and resolves when it is through; nothing runs by itself. */
export function mailWorker(send: SendMail = smtpSender()): MailWorker {
  const me = newId();
  const store = database();
  let stopping = false;
  let working: Promise<Drained> | undefined;

  async function lane(tally: Drained): Promise<void> {
    while (!stopping) {
      const row = await lease(store, me);
      if (!row) return;
      if (row.kind === "go" && !(await goStands(store, row))) {
        await settle(store, row, me, { failedAt: now(), lastError: "The GO was over before its mail could go out, so it was not sent." });
        tally.givenUp++;
        continue;
      }
      try {
        await send(row);
        await settle(store, row, me, { sentAt: now(), lastError: null, ...withoutLink(row) });
        tally.sent++;
      } catch (error) {
        const reason = error instanceof Error ? error.message : String(error);
        const final = (error instanceof MailRefused && error.permanent) || row.tries >= mostTries;
        await settle(store, row, me, { lastError: reason, ...(final ? { failedAt: now() } : { nextTryAt: now() + waitAfter(row.tries) }) });
        log.warn({ mail: row.id, kind: row.kind, tries: row.tries, final }, final ? "a mail was given up" : "a mail will be tried again");
        if (final) tally.givenUp++;
        else tally.postponed++;
      }
    }
  }

  function drain(): Promise<Drained> {
    working ??= (async () => {
      const tally = { sent: 0, postponed: 0, givenUp: 0 };
      // Several lanes, so that one slow recipient does not hold up a crew's mail.
      await Promise.all(Array.from({ length: lanes }, () => lane(tally)));
      return tally;
    })().finally(() => {
      working = undefined;
    });
    return working;
  }

  async function stop(): Promise<void> {
    stopping = true;
    await working?.catch(() => {});
  }
  return { drain, stop };
}

/** Starts a worker that looks into the outbox every second until it is stopped. */
export function startMailWorker(send?: SendMail): MailWorker {
  const worker = mailWorker(send);
  let failing = false;
  const timer = setInterval(() => {
    worker.drain().then(
      () => {
        failing = false;
      },
      (error: unknown) => {
        // Said once, not every second: the database may be away for a while.
        if (!failing) log.error({ err: error }, "the outbox cannot be read");
        failing = true;
      },
    );
  }, pollMs);
  timer.unref();
  return {
    drain: worker.drain,
    stop() {
      clearInterval(timer);
      return worker.stop();
    },
  };
}

/** Of links only hashes are kept: what was sent with one does not stay behind in the outbox. */
function withoutLink({ kind }: OutboxRow): Partial<OutboxRow> {
  return LINK_MAILS.includes(kind) ? { text: "The link was taken out when this mail had been sent.", html: null } : {};
}

/** Whether the GO that a mail tells of is in force. Crew mails are kept apart by "kind:act:reader". */
async function goStands(store: Database, { installId, dedupeKey }: OutboxRow): Promise<boolean> {
  const board = installId === null ? null : await boardNow(store.db, installId, now());
  return board?.e.result.runs.some((r) => r.go?.id === dedupeKey.split(":")[1]) ?? false;
}

async function lease(store: Database, me: string): Promise<OutboxRow | undefined> {
  const at = now();
  const due = and(isNull(outbox.sentAt), isNull(outbox.failedAt), lte(outbox.nextTryAt, at), lte(outbox.leaseUntil, at));
  // Look before queueing for the write lock: nearly always there is nothing.
  if ((await store.db.select({ id: outbox.id }).from(outbox).where(due).limit(1)).length === 0) return undefined;
  return store.write(async (tx) => {
    const [row] = await tx.select().from(outbox).where(due).orderBy(asc(outbox.nextTryAt), asc(outbox.createdAt)).limit(1);
    if (!row) return undefined;
    const leased = { leaseUntil: at + leaseMs, leaseBy: me, tries: row.tries + 1 };
    await tx.update(outbox).set(leased).where(eq(outbox.id, row.id));
    return { ...row, ...leased };
  });
}

/** Writes down how it went, unless the lease ran out and another worker has the mail now. */
async function settle(store: Database, row: OutboxRow, me: string, outcome: Partial<OutboxRow>): Promise<void> {
  await store.write((tx) =>
    tx
      .update(outbox)
      .set({ ...outcome, leaseUntil: 0, leaseBy: null })
      .where(and(eq(outbox.id, row.id), eq(outbox.leaseBy, me))),
  );
}
