// Keeps a board as a template of one's own, or throws one away. No install's record speaks of it: nothing on an install changes.
import { and, eq } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { boardTemplates } from "#app/db/schema/board-templates";
import { now } from "#app/lib/clock";
import { newId } from "#app/lib/ids";
import { remember, replayOf } from "#app/lib/services/commands.server";
import { done, notFound, type Outcome, refuse } from "#app/lib/services/outcome";
import type { OwnTemplate } from "#app/lib/template/own-template";

export const MOST_TEMPLATES = 30;
type PersonalAct = { actor: { userId: string }; commandId: string };

export function keepTemplate({ actor, commandId }: PersonalAct, body: OwnTemplate): Promise<Outcome<{ template: string }>> {
  const command = { id: commandId, userId: actor.userId, installId: "", kind: "keep-template", input: body };
  return write(async (tx) => {
    const first = await replayOf<{ template: string }>(tx, command);
    if (first) return first;
    if ((await tx.$count(boardTemplates, eq(boardTemplates.ownerId, actor.userId))) >= MOST_TEMPLATES)
      return refuse(409, "too-many-templates", `You keep ${MOST_TEMPLATES} templates, as many as one account may. Throw one away first.`);
    const id = newId();
    await tx.insert(boardTemplates).values({ id, ownerId: actor.userId, name: body.name, body, createdAt: now() });
    const outcome = done({ template: id });
    await remember(tx, command, outcome, now());
    return outcome;
  });
}

export function throwTemplateAway({ actor }: Pick<PersonalAct, "actor">, template: string): Promise<Outcome<null>> {
  return write(async (tx) => {
    const gone = await tx
      .delete(boardTemplates)
      .where(and(eq(boardTemplates.ownerId, actor.userId), eq(boardTemplates.id, template)))
      .returning({ id: boardTemplates.id });
    return gone.length ? done(null) : notFound("That template");
  });
}
