// A command is done once. Its first outcome is kept in the transaction that did it and given again to whoever repeats it.
// A refusal is not kept: it changed nothing, so the same command is judged afresh when it comes again.
import { eq } from "drizzle-orm";
import type { Reader, Tx } from "#app/db/client.server";
import { commands } from "#app/db/schema/commands";
import { canonical } from "#app/lib/record/canonical";
import { hashOf } from "#app/lib/record/chain";
import { type Outcome, refuse } from "#app/lib/services/outcome";

export interface Command {
  id: string;
  userId: string;
  installId: string;
  kind: string;
  /** What was sent, without any secret. */
  input: unknown;
}

/** The first outcome of this command, a refusal when its id was used for something else, or null when it is new. */
export async function replayOf<T>(reader: Reader, command: Command): Promise<Outcome<T> | null> {
  const [row] = await reader.select().from(commands).where(eq(commands.id, command.id));
  if (!row) return null;
  if (
    row.userId !== command.userId ||
    row.installId !== command.installId ||
    row.kind !== command.kind ||
    row.fingerprint !== fingerprint(command)
  )
    return refuse(
      409,
      "command-reused",
      "This form was sent before with something else in it, and that stands. Load the page again, then send it.",
    );
  return row.outcome as Outcome<T>;
}

export async function remember<T>(tx: Tx, command: Command, outcome: Outcome<T>, createdAt: number): Promise<void> {
  const { id, userId, installId, kind } = command;
  await tx.insert(commands).values({ id, userId, installId, kind, fingerprint: fingerprint(command), outcome, createdAt });
}

const fingerprint = (command: Command): string => hashOf(canonical(command.input ?? null));
