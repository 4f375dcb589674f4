// How every act on an install is done: one transaction in which the person's membership is asked, the board is evaluated at the
// instant of the act, the act is judged and written, its event is chained, and GO turns into HOLD where it no longer holds.
// Nothing is awaited in it but the transaction.
import { type Tx, write } from "#app/db/client.server";
import { loadSnapshot } from "#app/db/queries/load-snapshot.server";
import { type CurrentMember, memberOf } from "#app/db/queries/membership.server";
import { snapshotNow } from "#app/db/queries/snapshot-cache.server";
import { now as clock } from "#app/lib/clock";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import type { Role } from "#app/lib/gates/snapshot";
import type { EventBody } from "#app/lib/record/events";
import { type Command, remember, replayOf } from "#app/lib/services/commands.server";
import { notFound, type Outcome, type Refusal } from "#app/lib/services/outcome";
import { type RecordBase, type RecordWriter, recordWriter } from "#app/lib/services/record-writer.server";
import { holdWhatIsNotClear } from "#app/lib/services/write-hold.server";

/** Who acts on which install. `commandId` comes from the form: the same one is done once. */
export interface Act {
  installId: string;
  actor: { userId: string };
  commandId: string;
}

export type NamedAct = Act & { kind: string; input: unknown };

export const commandOf = ({ installId, actor, commandId, kind, input }: NamedAct): Command => ({
  id: commandId,
  userId: actor.userId,
  installId,
  kind,
  input,
});

export interface Doing {
  tx: Tx;
  installId: string;
  /** The board just before the act, at `now`. */
  e: Evaluation;
  now: number;
  member: CurrentMember;
  writer: RecordWriter;
  /** Chains an event in this member's name and returns the columns of the record that it tells about. */
  record: (as: Role, body: EventBody, id?: string) => Promise<RecordBase>;
}

class Refused extends Error {
  constructor(readonly refusal: Refusal) {
    super(refusal.message);
  }
}

/**
 * Does one act. `work` returns `done(value)` or a refusal; a refusal leaves nothing behind.
 * A repeated command returns what its first time returned. Not a member: 404.
 */
export async function perform<T>(act: NamedAct, work: (doing: Doing) => Promise<Outcome<T>>): Promise<Outcome<T>> {
  try {
    return await write((tx) => inTransaction(tx, commandOf(act), work));
  } catch (error) {
    if (error instanceof Refused) return error.refusal;
    throw error;
  }
}

async function inTransaction<T>(tx: Tx, command: Command, work: (doing: Doing) => Promise<Outcome<T>>): Promise<Outcome<T>> {
  const { installId, userId } = command;
  const member = await memberOf(tx, installId, userId);
  if (!member) return notFound("That install");
  const first = await replayOf<T>(tx, command);
  if (first) return first;
  const { writer, e } = await beginRecord(tx, installId);
  const record: Doing["record"] = (as, body, id) => writer.record({ by: userId, as }, body, id);
  const outcome = await work({ tx, installId, e, now: writer.now, member, writer, record });
  if (!outcome.ok) throw new Refused(outcome);
  if (e.result.runs.some((r) => r.go || r.goLost)) {
    const who = { by: userId, as: member.roles[0] ?? "crew" };
    await holdWhatIsNotClear({ tx, writer, e: await evaluateIn(tx, installId, writer.now), who });
  }
  await remember(tx, command, outcome, writer.now);
  return outcome;
}

/** At the start of a transaction: the board as it is, and a writer at the end of its record. */
export async function beginRecord(tx: Tx, installId: string): Promise<{ writer: RecordWriter; e: Evaluation }> {
  const found = await snapshotNow(tx, installId);
  if (!found) throw new Error("No such install");
  const writer = recordWriter(tx, installId, found.head, clock());
  return { writer, e: evaluate(found.snapshot, writer.now) };
}

/** The board with what this transaction has written. */
export async function evaluateIn(tx: Tx, installId: string, at: number): Promise<Evaluation> {
  const snapshot = await loadSnapshot(tx, installId);
  if (!snapshot) throw new Error("A member of an install that is not there");
  return evaluate(snapshot, at);
}
