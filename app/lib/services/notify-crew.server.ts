// Puts the crew's mail about a run into the outbox, in the transaction of the act that it tells about.
// Read by everybody with a position on the run, and by every lead; what runs out before it by leads and builders.
import { and, eq, gt, inArray, isNull } from "drizzle-orm";
import type { Tx } from "#app/db/client.server";
import { installs } from "#app/db/schema/installs";
import { outbox } from "#app/db/schema/outbox";
import { runs } from "#app/db/schema/runs";
import { users } from "#app/db/schema/users";
import { env } from "#app/lib/env.server";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Blocker, RunResult } from "#app/lib/gates/result";
import type { Role, RunAct, Snapshot } from "#app/lib/gates/snapshot";
import type { RunMailKind, RunMailModel } from "#app/lib/mail/compose/model";
import { composeRunMail } from "#app/lib/mail/compose/run-mail";
import { enqueue } from "#app/lib/mail/outbox.server";
import type { MailChoice } from "#app/lib/schemas/account";

export interface CrewNews {
  kind: RunMailKind;
  /** Of the record that the mail tells about; one mail a record and reader. */
  actId: string;
  /** The board as it is with that record in it. */
  e: Evaluation;
  runId: string;
  by: string;
  reason: string;
  auto: boolean;
  goEnds: number | null;
  stops: Blocker[];
  head: { seq: number; hash: string };
}

/** For so long a HOLD of a run that is held already is no news to who was mailed about it, ms. */
const HOLD_IS_NEWS_FOR = 2 * 60_000;

/** The standing words of product and card: nothing here replaces whoever has the last word on the aircraft. */
const CAUTIONS = [
  "The maker's manuals, the local rules and the judgement of licensed people come before this mail.",
  "A propeller is live, always. Anyone may call STOP.",
];

export async function notifyCrew(tx: Tx, news: CrewNews): Promise<void> {
  const { snapshot, result } = news.e;
  const run = snapshot.runs.find((r) => r.id === news.runId);
  const judged = result.runs.find((r) => r.id === news.runId);
  if (!run || !judged) throw new Error("News of a run that the board does not know");
  const model = await modelOf(tx, news, run, judged);
  const holders = (...roles: Role[]) =>
    snapshot.members.filter((m) => m.roles.some((r) => roles.includes(r.role) && r.to === null)).map((m) => m.id);
  // What runs out is for those who can do it again; everything else is for whoever may come, and for the leads.
  const ids =
    news.kind === "runs-out" ? holders("lead", "builder") : [...new Set([...model.crew.map((c) => c.member), ...holders("lead")])];
  const people = await tx
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      units: users.units,
      mailOff: users.mailOff,
      disabledAt: users.disabledAt,
    })
    .from(users)
    .where(inArray(users.id, ids));
  const readers = people.filter((p) => model.crew.some((c) => c.member === p.id && news.kind !== "runs-out") || wants(p, news.kind));
  const go = run.acts
    .filter((a) => a.act === "go" && a.id !== news.actId)
    .sort((a, b) => a.seq - b.seq)
    .at(-1);
  const told = news.kind === "hold" ? await toldOfHold(tx, news, run.acts) : [];
  for (const reader of readers) {
    if (told.includes(reader.id)) continue;
    const mail = composeRunMail(news.kind, model, { member: reader.id, name: reader.name, units: reader.units });
    const answers = go ? await messageIdOf(tx, `go:${go.id}:${reader.id}`) : undefined;
    await enqueue(tx, {
      kind: news.kind,
      installId: snapshot.install.id,
      to: { userId: reader.id, address: reader.email },
      ...mail,
      inReplyTo: answers,
      references: answers ? [answers] : [],
      dedupeKey: `${news.kind}:${news.actId}:${reader.id}`,
    });
  }
}

/** Of mails about runs on which somebody holds no place. Whoever holds one is told, whatever they chose. */
const wants = ({ mailOff, disabledAt }: { mailOff: MailChoice[]; disabledAt: number | null }, kind: RunMailKind): boolean =>
  disabledAt === null && !mailOff.includes(kind === "runs-out" ? "runs-out" : "runs");

/** Who was mailed just now that this run is held, with no GO since. */
async function toldOfHold(tx: Tx, { actId, e }: CrewNews, acts: RunAct[]): Promise<(string | null)[]> {
  const called = Math.max(0, ...acts.filter((a) => a.act === "go").map((a) => a.seq));
  const holds = acts.filter((a) => a.act === "hold" && a.id !== actId && a.seq > called).map((a) => a.id);
  const lately = and(
    eq(outbox.installId, e.snapshot.install.id),
    eq(outbox.kind, "hold"),
    gt(outbox.createdAt, e.at - HOLD_IS_NEWS_FOR),
    isNull(outbox.failedAt),
  );
  const mails = await tx.select({ reader: outbox.toUserId, key: outbox.dedupeKey }).from(outbox).where(lately);
  return mails.filter((m) => holds.some((id) => m.key === `hold:${id}:${m.reader}`)).map((m) => m.reader);
}

async function messageIdOf(tx: Tx, dedupeKey: string): Promise<string | undefined> {
  const [row] = await tx.select({ messageId: outbox.messageId }).from(outbox).where(eq(outbox.dedupeKey, dedupeKey));
  return row?.messageId;
}

async function modelOf(tx: Tx, news: CrewNews, run: Snapshot["runs"][number], judged: RunResult): Promise<RunMailModel> {
  const { snapshot } = news.e;
  const { install } = snapshot;
  const [stored] = await tx.select({ positions: installs.positions }).from(installs).where(eq(installs.id, install.id));
  const [row] = await tx.select({ place: runs.place }).from(runs).where(eq(runs.id, run.id));
  const plan = [...run.plans].sort((a, b) => a.version - b.version).at(-1);
  if (!plan || !stored || !row) throw new Error("News of a run without a plan");
  const nameOf = (id: string) => snapshot.members.find((m) => m.id === id)?.name ?? "a former member";
  const wind = [...run.winds].sort((a, b) => a.seq - b.seq).at(-1);
  const base = `${env.appOrigin ?? `http://${env.host}:${env.port}`}/installs/${install.id}`;
  return {
    install,
    run: {
      id: run.id,
      label: run.label,
      rung: snapshot.rungs.find((r) => r.key === run.rung)?.name ?? run.rung,
      place: row.place,
      plannedStart: run.plannedStart,
      rpm: plan.rpm,
      version: plan.version,
    },
    clearance: judged.clearance,
    wind: {
      limit: plan.windLimit,
      gustLimit: plan.gustLimit,
      newest: wind ? { speed: wind.speed, gust: wind.gust, recorded: wind.recorded } : null,
    },
    crew: [...new Set(plan.positions.map((p) => p.member))].map((member) => ({
      member,
      name: nameOf(member),
      positions: plan.positions.flatMap((p) => (p.member === member ? stored.positions.filter((d) => d.key === p.position) : [])),
    })),
    card: plan.card,
    limits: snapshot.values
      .filter((v) => v.card && v.limit)
      .map((v) => ({ label: v.label, quantity: v.quantity, value: v.value, confirmed: v.source !== null })),
    stops: news.stops.map((b) => ({ title: b.title, sentence: b.sentence, who: b.owner.members.map(nameOf), next: b.owner.next })),
    goEnds: news.goEnds,
    act: { by: nameOf(news.by), at: news.e.at, reason: news.reason, auto: news.auto },
    head: news.head,
    links: { run: `${base}/runs/${run.id}`, board: base },
    cautions: CAUTIONS,
  };
}
