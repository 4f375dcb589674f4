// The gate that looks back on one run: made when the run starts, with the items that its rung asks for. The release needs it.
import { eq } from "drizzle-orm";
import { gates } from "#app/db/schema/gates";
import { installs } from "#app/db/schema/installs";
import { items } from "#app/db/schema/items";
import type { Run } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { gateRow, itemRow } from "#app/lib/services/board-rows";
import type { Doing } from "#app/lib/services/perform.server";

/** Makes the run's post-run gate, or brings back the one that went with a start taken back. Returns the gate's id and what was made. */
export async function makePostRunGate(d: Doing, run: Run): Promise<{ gate: string; made: unknown }> {
  const { snapshot } = d.e;
  const before = snapshot.gates.find((g) => g.lookBack?.kind === "run" && g.lookBack.run === run.id);
  if (before) {
    await d.tx.update(gates).set({ hidden: false }).where(eq(gates.id, before.id));
    return { gate: before.id, made: null };
  }
  const [row] = await d.tx.select({ postRun: installs.postRun }).from(installs).where(eq(installs.id, d.installId));
  if (!row) throw new Error("An install without a template");
  const { gate: def, items: defs, policyByRung } = row.postRun;
  const mine = defs.filter((i) => i.runs === null || i.runs.includes(run.rung));
  const gateIds = new Map(snapshot.gates.map((g) => [g.key, g.id]));
  const itemIds = new Map(mine.map((i) => [i.key, newId()]));
  const release = snapshot.gates.find((g) => g.requiredBy.kind === "release" && !g.lookBack);
  const position = (await releasePosition(d, release?.id)) - 1;

  const id = newId();
  const named = {
    ...def,
    key: `${def.key} ${run.label}`,
    name: `${def.name} ${run.label}`.replace("the run", "run"),
    short: `After run ${run.label}`.slice(0, 16),
  };
  const gate = {
    ...gateRow(d.installId, named, position, { id, lookBack: { kind: "run", run: run.id } }, gateIds),
    policy: policyByRung[run.rung] ?? def.policy,
  };
  const rows = mine.map((i, n) => itemRow(d.installId, i, n, { id: itemIds.get(i.key) ?? newId(), gateId: id }, itemIds));
  await d.tx.insert(gates).values(gate);
  await d.tx.insert(items).values(rows);
  if (release)
    await d.tx
      .update(gates)
      .set({ needs: [...release.needs, id] })
      .where(eq(gates.id, release.id));
  return { gate: id, made: { gate, items: rows } };
}

/** A start taken back takes its post-run gate with it. Returns the gate's id, null where there is none. */
export async function hidePostRunGate(d: Doing, runId: string): Promise<string | null> {
  const gate = d.e.snapshot.gates.find((g) => g.lookBack?.kind === "run" && g.lookBack.run === runId);
  if (!gate) return null;
  await d.tx.update(gates).set({ hidden: true }).where(eq(gates.id, gate.id));
  return gate.id;
}

/** Post-run gates stand just before the release on the Line. */
async function releasePosition(d: Doing, release: string | undefined): Promise<number> {
  if (release === undefined) return d.e.snapshot.gates.length + 1;
  const [row] = await d.tx.select({ position: gates.position }).from(gates).where(eq(gates.id, release));
  return row?.position ?? d.e.snapshot.gates.length + 1;
}
