// How a person changes their own account: the password first where the change is one that somebody at a tablet left signed in must
// not make, then one transaction. A repeated command is done once. A refusal leaves nothing behind.
import { and, eq, isNull } from "drizzle-orm";
import { db, type Tx, write } from "#app/db/client.server";
import { type User, users } from "#app/db/schema/users";
import { checkPassword } from "#app/lib/auth/reauth.server";
import { now } from "#app/lib/clock";
import { when } from "#app/lib/gates/when";
import { composeLetter } from "#app/lib/mail/compose/letter";
import { enqueue } from "#app/lib/mail/outbox.server";
import { remember, replayOf } from "#app/lib/services/commands.server";
import { notFound, type Outcome, type Refusal, refuse } from "#app/lib/services/outcome";

export interface OwnAct {
  actor: { userId: string; sessionId: string };
  commandId: string;
}

class Refused extends Error {
  constructor(readonly refusal: Refusal) {
    super(refusal.message);
  }
}

/** @param password asked for again; left out where the change needs none. */
export async function onOwnAccount<T>(
  { actor, commandId, kind, password }: OwnAct & { kind: string; password?: string },
  work: (tx: Tx, me: User, at: number) => Promise<Outcome<T>>,
): Promise<Outcome<T>> {
  const command = { id: commandId, userId: actor.userId, installId: "", kind, input: {} };
  const first = await replayOf<T>(db(), command);
  if (first) return first;
  if (password !== undefined) {
    const check = await checkPassword(actor.userId, password);
    if (!check.ok) return refuse(check.status, check.code, check.message);
  }
  try {
    return await write(async (tx) => {
      const done = await replayOf<T>(tx, command);
      if (done) return done;
      const [me] = await tx
        .select()
        .from(users)
        .where(and(eq(users.id, actor.userId), isNull(users.disabledAt)));
      if (!me) return notFound("Your account");
      const at = now();
      const outcome = await work(tx, me, at);
      if (!outcome.ok) throw new Refused(outcome);
      await remember(tx, command, outcome, at);
      return outcome;
    });
  } catch (error) {
    if (error instanceof Refused) return error.refusal;
    throw error;
  }
}

/** Tells a person by mail that something about their account was changed, so that they know when it was not by them. */
export function tellOfChange(
  tx: Tx,
  person: Pick<User, "id" | "name" | "email">,
  news: { key: string; at: number; subject: string; lead: string[]; notYou?: string },
) {
  const letter = composeLetter({
    subject: news.subject,
    reader: person.name,
    lead: news.lead,
    rows: [{ head: "When", text: when(news.at, "UTC", true) }],
    small: [
      news.notYou ??
        "If this was not you, ask for a new password at the sign-in (“Forgot the password?”): that ends every session. Then tell the lead of your install.",
    ],
  });
  return enqueue(tx, { kind: "account", to: { userId: person.id, address: person.email }, ...letter, dedupeKey: `account:${news.key}` });
}
