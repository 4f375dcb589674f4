// Enters or confirms a rating or limit, with where it was read. Every item that uses it gets a new revision where the value changes,
// and the ladder's speeds follow.
import { and, eq } from "drizzle-orm";
import { installs } from "#app/db/schema/installs";
import { items } from "#app/db/schema/items";
import { rungs } from "#app/db/schema/rungs";
import { values } from "#app/db/schema/values";
import { isInspectorsToChange, mayConfirmValue } from "#app/lib/gates/set-up-verdicts";
import type { Item } from "#app/lib/gates/snapshot";
import type { ConfirmValue } from "#app/lib/schemas/set-up";
import { withIds } from "#app/lib/services/board-rows";
import { done, invalid, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";
import { carryOver, same } from "#app/lib/template/carry-over";
import { generate } from "#app/lib/template/generate";
import type { GeneratedBoard, ItemDef, Part, ValueKey } from "#app/lib/template/types";
import { valueFault } from "#app/lib/template/values";

type Revised = { item: string; revision: number }[];

export function confirmValue(act: Act, input: ConfirmValue): Promise<Outcome<{ revised: Revised }>> {
  return perform({ ...act, kind: "confirm-value", input }, async (d) => {
    const { key, value, source } = input;
    const known = d.e.snapshot.values.find((v) => v.key === key);
    const changes = known?.value !== value;
    const refusal = refusalOf(mayConfirmValue(d.e, { member: d.member.id, value: { key, changes } }));
    if (refusal) return refusal;
    if (!known) throw new Error("A value was allowed that is not there");
    const fault = valueFault(known, value);
    if (fault) return invalid(fault);
    const revised = changes ? await carryThrough(d, known.key, value) : [];
    const as = changes && isInspectorsToChange(d.e, key) ? "inspector" : roleOf(d.member, "lead", "builder", "inspector");
    await d.record(as, { type: "value-confirmed", data: { key, value, source, revised } });
    await d.tx
      .update(values)
      .set({ value, source })
      .where(and(eq(values.installId, d.installId), eq(values.key, known.key)));
    return done({ revised });
  });
}

/** What the board says anew because of this value. */
async function carryThrough(d: Doing, key: ValueKey, value: number): Promise<Revised> {
  const { snapshot } = d.e;
  const now = Object.fromEntries(snapshot.values.flatMap((v) => (v.value === null ? [] : [[v.key, v.value]])));
  const before = generate(snapshot.traits, now);
  const after = generate(snapshot.traits, { ...now, [key]: value });
  await carryLadder(d, before, after);

  const ids = new Map(snapshot.items.map((i) => [i.key, i.id]));
  const defsBefore = new Map(before.items.map((i) => [i.key, i]));
  const revised: Revised = [];
  for (const def of after.items) {
    const was = defsBefore.get(def.key);
    const item = snapshot.items.find((i) => i.id === ids.get(def.key) && !isOfRun(d, i));
    if (!was || !item) continue;
    const parts = partsNow(was, def, item, ids);
    if (same(parts, item.parts) && !item.parts.some((p) => usesLimit(p, key))) continue;
    const revision = item.revision + 1;
    await d.tx.update(items).set({ parts, revision }).where(eq(items.id, item.id));
    revised.push({ item: item.id, revision });
  }
  return revised;
}

function partsNow(was: ItemDef, def: ItemDef, item: Item, ids: ReadonlyMap<string, string>): Part[] {
  const named = (parts: Part[]) => parts.map((p) => withIds(p, ids));
  return carryOver(named(was.parts), named(def.parts), item.parts);
}

/** A post-run gate's definition is fixed when its run starts. */
const isOfRun = (d: Doing, item: Item): boolean => d.e.snapshot.gates.find((g) => g.id === item.gate)?.lookBack?.kind === "run";

const usesLimit = (part: Part, key: ValueKey): boolean =>
  (part.kind === "measure" || part.kind === "torque") && (part.criterion.limit?.key === key || part.criterion.otherLimit?.key === key);

async function carryLadder(d: Doing, before: GeneratedBoard, after: GeneratedBoard): Promise<void> {
  for (const rung of after.rungs) {
    const was = before.rungs.find((r) => r.key === rung.key);
    const stored = d.e.snapshot.rungs.find((r) => r.key === rung.key);
    if (!was || !stored || same(was, rung)) continue;
    const { rpm, card, crew } = carryOver(
      { rpm: was.rpm, card: was.card, crew: was.crew },
      { rpm: rung.rpm, card: rung.card, crew: rung.crew },
      { rpm: stored.rpm, card: stored.card, crew: stored.crew },
    );
    await d.tx
      .update(rungs)
      .set({ rpm, card, crew })
      .where(and(eq(rungs.installId, d.installId), eq(rungs.key, rung.key)));
  }
  const [row] = await d.tx.select({ postRun: installs.postRun }).from(installs).where(eq(installs.id, d.installId));
  if (row && !same(before.postRun, after.postRun))
    await d.tx
      .update(installs)
      .set({ postRun: carryOver(before.postRun, after.postRun, row.postRun) })
      .where(eq(installs.id, d.installId));
}
