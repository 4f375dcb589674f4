// Writes what an edit made of the board: rows of gates and items that differ, their order, and what other answers about the install
// change beside them. Rows are updated, for they hold what is so now; what was so before is in the events.
import { eq } from "drizzle-orm";
import { gates } from "#app/db/schema/gates";
import { installs } from "#app/db/schema/installs";
import { items } from "#app/db/schema/items";
import { rungs } from "#app/db/schema/rungs";
import { values } from "#app/db/schema/values";
import { applyEdit } from "#app/lib/gates/apply-edit";
import { changesOf } from "#app/lib/gates/edit-changes";
import type { Edit } from "#app/lib/gates/edits";
import type { Gate, Item, Role, Snapshot } from "#app/lib/gates/snapshot";
import { boardsOf } from "#app/lib/gates/trait-edit";
import type { Doing } from "#app/lib/services/perform.server";
import { carryOver, same } from "#app/lib/template/carry-over";

interface Why {
  reason: string;
  /** The edit that waited; null where it counts at once. */
  proposal: string | null;
  wordsOnly: boolean;
}

/** Lets an edit count, as part of an act. It was judged before. */
export async function writeEdit(d: Doing, as: Role, edit: Edit, { reason, proposal, wordsOnly }: Why): Promise<void> {
  const { snapshot } = d.e;
  const after = applyEdit(snapshot, edit, wordsOnly);
  const changed = { gates: changedRows(snapshot.gates, after.gates), items: changedRows(snapshot.items, after.items) };
  const says = changesOf(snapshot, edit).map((c) => c.says);
  const data = { edit: plain(edit), says, reason, proposal, wordsOnly, now: plain(changed) };
  await d.record(as, { type: "board-edited", data });
  await writeGates(d, snapshot, after);
  await writeItems(d, snapshot, after);
  if (edit.kind === "traits") await writeTraits(d, after);
}

/** Data as JSON says it: without entries that are undefined. */
const plain = (data: unknown) => JSON.parse(JSON.stringify(data));

function changedRows<T extends { id: string }>(before: T[], after: T[]): T[] {
  const was = new Map(before.map((x) => [x.id, x]));
  return after.filter((x) => !same(was.get(x.id), x));
}

async function writeGates(d: Doing, before: Snapshot, after: Snapshot): Promise<void> {
  const known = new Map(before.gates.map((g) => [g.id, g]));
  const order = !same(idsOf(before.gates), idsOf(after.gates));
  for (const [position, gate] of after.gates.entries()) {
    const was = known.get(gate.id);
    if (!was) await d.tx.insert(gates).values({ ...gate, installId: d.installId, position });
    else if (order || !same(was, gate))
      await d.tx
        .update(gates)
        .set(order ? { ...gate, position } : gate)
        .where(eq(gates.id, gate.id));
  }
}

async function writeItems(d: Doing, before: Snapshot, after: Snapshot): Promise<void> {
  const known = new Map(before.items.map((i) => [i.id, i]));
  const [was, is] = [byGate(before.items), byGate(after.items)];
  for (const [gateId, list] of is) {
    const order = !same(idsOf(was.get(gateId) ?? []), idsOf(list));
    for (const [position, item] of list.entries()) {
      const old = known.get(item.id);
      const { gate, ...rest } = item;
      const row = { ...rest, gateId: gate, source: item.source ?? null };
      if (!old) await d.tx.insert(items).values({ ...row, installId: d.installId, position });
      else if (order || !same(old, item))
        await d.tx
          .update(items)
          .set(order ? { ...row, position } : row)
          .where(eq(items.id, item.id));
    }
  }
}

const idsOf = (list: (Gate | Item)[]): string[] => list.map((x) => x.id);
function byGate(list: Item[]): Map<string, Item[]> {
  const map = new Map<string, Item[]>();
  for (const item of list) map.set(item.gate, [...(map.get(item.gate) ?? []), item]);
  return map;
}

/** Ratings and limits that come or go, the ladder, the positions, and what post-run gates are made from. */
async function writeTraits(d: Doing, after: Snapshot): Promise<void> {
  const here = eq(installs.id, d.installId);
  const { before: said, after: says } = boardsOf(d.e.snapshot, after.traits);
  const [row] = await d.tx.select({ postRun: installs.postRun }).from(installs).where(here);
  if (!row) throw new Error("An install without a template");
  const { traits } = after;
  const postRun = carryOver(said.postRun, says.postRun, row.postRun);
  await d.tx.update(installs).set({ traits, postRun, positions: says.positions, leftOut: says.leftOut }).where(here);

  const install = d.installId;
  await d.tx.update(values).set({ hidden: true }).where(eq(values.installId, install));
  for (const [position, { value, source, ...def }] of after.values.entries()) {
    const row = { position, def, value, source, hidden: false };
    const target = [values.installId, values.key];
    await d.tx
      .insert(values)
      .values({ ...row, installId: install, key: def.key })
      .onConflictDoUpdate({ target, set: row });
  }
  await d.tx.update(rungs).set({ hidden: true }).where(eq(rungs.installId, install));
  for (const { key, name, rpm, share, card, crew, order } of after.rungs) {
    const row = { name, rpm, share, card, crew, position: order, hidden: false };
    const target = [rungs.installId, rungs.key];
    await d.tx
      .insert(rungs)
      .values({ ...row, installId: install, key })
      .onConflictDoUpdate({ target, set: row });
  }
}
