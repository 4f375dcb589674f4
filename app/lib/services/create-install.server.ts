// Sets an install up: its board is generated from the answers about the engine and the values known so far, or made from a template of
// one's own. Whoever sets it up is its lead.

import { and, eq, gt } from "drizzle-orm";
import { write } from "#app/db/client.server";
import { gates } from "#app/db/schema/gates";
import { installs } from "#app/db/schema/installs";
import { items } from "#app/db/schema/items";
import { memberRoles, members } from "#app/db/schema/members";
import { rungs } from "#app/db/schema/rungs";
import { users } from "#app/db/schema/users";
import { values } from "#app/db/schema/values";
import { now as clock } from "#app/lib/clock";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { DEFAULT_SETTINGS } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { FIRST } from "#app/lib/record/chain";
import type { CreateInstall } from "#app/lib/schemas/set-up";
import { boardRows } from "#app/lib/services/board-rows";
import { remember, replayOf } from "#app/lib/services/commands.server";
import { done, notFound, type Outcome, refuse } from "#app/lib/services/outcome";
import { recordWriter } from "#app/lib/services/record-writer.server";
import { generate } from "#app/lib/template/generate";
import { boardFrom, type OwnTemplate } from "#app/lib/template/own-template";
import type { GeneratedBoard, ValueKey } from "#app/lib/template/types";

const DAY = 24 * 60 * 60_000;
/** Of one account; nobody builds as many, and each makes some hundred rows. */
export const INSTALLS_A_DAY = 20;

export interface NewInstall {
  install: string;
  /** What the template has and these answers leave out, with the reason. */
  leftOut: GeneratedBoard["leftOut"];
}

/** @param template its answers stand in for those of `input`, which must be the same. */
export function createInstall(
  { actor, commandId }: { actor: { userId: string }; commandId: string },
  input: CreateInstall,
  template: OwnTemplate | null = null,
): Promise<Outcome<NewInstall>> {
  const command = {
    id: commandId,
    userId: actor.userId,
    installId: "",
    kind: "create-install",
    input: template ? { ...input, template } : input,
  };
  const known: Partial<Record<ValueKey, number>> = Object.fromEntries(
    Object.entries(input.values).flatMap(([key, v]) => (v.value === null ? [] : [[key, v.value]])),
  );
  const board = template ? boardFrom(template, known) : generate(input.traits, known);
  return write(async (tx) => {
    const first = await replayOf<NewInstall>(tx, command);
    if (first) return first;
    const [person] = await tx.select({ id: users.id, name: users.name }).from(users).where(eq(users.id, actor.userId));
    if (!person) return notFound("Your account");
    const lately = await tx.$count(installs, and(eq(installs.createdBy, person.id), gt(installs.createdAt, clock() - DAY)));
    if (lately >= INSTALLS_A_DAY)
      return refuse(
        409,
        "too-many-installs",
        `You have set up ${lately} installs within 24 hours, as many as one account may. Nothing was made; set this one up tomorrow.`,
      );
    const installId = newId();
    const { registration, name, timeZone, traits } = input;
    const rows = boardRows(installId, board, input.values, newId);
    const writer = recordWriter(tx, installId, { seq: 0, hash: FIRST, recorded: 0 }, clock());
    const { now } = writer;
    await tx.insert(installs).values({
      id: installId,
      registration,
      name,
      timeZone,
      traits,
      settings: DEFAULT_SETTINGS,
      templateVersion: board.templateVersion,
      positions: board.positions,
      leftOut: board.leftOut,
      postRun: board.postRun,
      createdAt: now,
      createdBy: person.id,
    });
    await tx.insert(members).values({ installId, userId: person.id, addedAt: now, addedBy: person.id });
    await tx.insert(memberRoles).values({ id: newId(), installId, userId: person.id, role: "lead", from: now, grantedBy: person.id });
    await tx.insert(values).values(rows.values);
    await tx.insert(gates).values(rows.gates);
    await tx.insert(items).values(rows.items);
    await tx.insert(rungs).values(rows.rungs);
    const who = { by: person.id, as: "lead" as const };
    await writer.record(who, {
      type: "install-created",
      data: {
        registration,
        name,
        timeZone,
        traits: plain(traits),
        templateVersion: board.templateVersion,
        values: plain(rows.values.map(({ key, value, source }) => ({ key, value, source }))),
        gates: plain(rows.gates),
        items: plain(rows.items),
        rungs: plain(rows.rungs),
        leftOut: plain(board.leftOut),
        rulesVersion: RULES_VERSION,
      },
    });
    await writer.record(who, { type: "member-added", data: { member: person.id, name: person.name, role: "lead" } });
    const outcome = done({ install: installId, leftOut: board.leftOut });
    await remember(tx, command, outcome, now);
    return outcome;
  });
}

/** Data as JSON says it: without entries that are undefined. */
const plain = (data: unknown) => JSON.parse(JSON.stringify(data));
