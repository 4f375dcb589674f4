// The clock's part for the crib: leads and builders get one mail some days before a calibration, a look or a service runs out, and
// another when few are left. Each is written once for its thing, date and lead time, however often this looks.
import { and, eq, gt, inArray, isNull, lte } from "drizzle-orm";
import { db, type Tx, write } from "#app/db/client.server";
import { snapshotNow } from "#app/db/queries/snapshot-cache.server";
import { extinguisherChecks, toolChecks } from "#app/db/schema/crib";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";
import { now } from "#app/lib/clock";
import { env } from "#app/lib/env.server";
import { type DueSoon, dueSoon, LEADS } from "#app/lib/gates/crib-dues";
import type { Snapshot } from "#app/lib/gates/snapshot";
import { composeDueMail } from "#app/lib/mail/compose/due";
import { enqueue } from "#app/lib/mail/outbox.server";

const DAY = 86_400_000;

/** Looks at every install with a date that is near. Returns how many mails were written. */
export async function remindDue(): Promise<number> {
  let written = 0;
  for (const installId of await installsWithDates(now())) {
    const found = await snapshotNow(db(), installId);
    if (!found) continue;
    const wanted = wantedOf(found.snapshot, now());
    if ((await unwritten(db(), wanted)).length) written += await write((tx) => remind(tx, installId));
  }
  return written;
}

/** Those where some date lies within the longest lead time, whether it still counts or not. */
async function installsWithDates(at: number): Promise<string[]> {
  const until = at + Math.max(...LEADS) * DAY;
  const [tools, bottles] = await Promise.all([
    db()
      .selectDistinct({ id: toolChecks.installId })
      .from(toolChecks)
      .where(and(gt(toolChecks.due, at), lte(toolChecks.due, until))),
    db()
      .selectDistinct({ id: extinguisherChecks.installId })
      .from(extinguisherChecks)
      .where(and(gt(extinguisherChecks.due, at), lte(extinguisherChecks.due, until))),
  ]);
  return [...new Set([...tools, ...bottles].map((r) => r.id))];
}

interface Wanted {
  due: DueSoon;
  member: string;
  key: string;
}

/** One for each date and each present lead or builder. */
function wantedOf(s: Snapshot, at: number): Wanted[] {
  const keepers = s.members.filter((m) => m.roles.some((r) => (r.role === "lead" || r.role === "builder") && r.to === null));
  return dueSoon(s, at).flatMap((due) =>
    keepers.map(({ id }) => ({ due, member: id, key: `due:${due.kind}-${due.id}-${due.ends}-${due.lead}:${id}` })),
  );
}

/** Those that are not written yet and go to somebody who wants them. */
async function unwritten(reader: Pick<Tx, "select">, wanted: Wanted[]): Promise<Wanted[]> {
  if (!wanted.length) return [];
  const keys = wanted.map((w) => w.key);
  const rows = await reader.select({ key: outbox.dedupeKey }).from(outbox).where(inArray(outbox.dedupeKey, keys));
  const there = new Set(rows.map((r) => r.key));
  const members = [...new Set(wanted.map((w) => w.member))];
  const people = await reader
    .select({ id: users.id, mailOff: users.mailOff })
    .from(users)
    .where(and(inArray(users.id, members), isNull(users.disabledAt)));
  const willing = new Set(people.filter((p) => !p.mailOff.includes("due")).map((p) => p.id));
  return wanted.filter((w) => !there.has(w.key) && willing.has(w.member));
}

/** Judged again where it is written: somebody may have entered a check in between. */
async function remind(tx: Tx, installId: string): Promise<number> {
  const found = await snapshotNow(tx, installId);
  if (!found) return 0;
  const at = now();
  const { snapshot, head } = found;
  const missing = await unwritten(tx, wantedOf(snapshot, at));
  let written = 0;
  for (const { due, member, key } of missing) {
    const [reader] = await tx.select({ name: users.name, email: users.email }).from(users).where(eq(users.id, member));
    if (!reader) continue;
    const board = `${env.appOrigin ?? `http://${env.host}:${env.port}`}/installs/${installId}`;
    const mail = composeDueMail(
      { install: snapshot.install, due, at, used: usedFor(snapshot, due), head, links: { crib: `${board}/crib`, board } },
      reader,
    );
    await enqueue(tx, { kind: "due", installId, to: { userId: member, address: reader.email }, ...mail, dedupeKey: key });
    written++;
  }
  return written;
}

/** Keys of the items that were proved with the tool and not taken back. */
function usedFor(s: Snapshot, due: DueSoon): string[] {
  const items = new Set(s.proofs.filter((p) => p.tools.includes(due.id) && !p.withdrawn).map((p) => p.item));
  return s.items.filter((i) => items.has(i.id) && !i.hidden).map((i) => i.key);
}
