// From a generated board to rows: keys become ids, in gates' edges, in what items follow and in the tallies that look at another item.
import type { gates } from "#app/db/schema/gates";
import type { items } from "#app/db/schema/items";
import type { rungs } from "#app/db/schema/rungs";
import type { values } from "#app/db/schema/values";
import type { GateDef, GeneratedBoard, ItemDef, Part } from "#app/lib/template/types";

type Ids = ReadonlyMap<string, string>;
type GateRow = typeof gates.$inferInsert;
type ItemRow = typeof items.$inferInsert;

export interface BoardRows {
  gates: GateRow[];
  items: ItemRow[];
  rungs: (typeof rungs.$inferInsert)[];
  values: (typeof values.$inferInsert)[];
}

/** @param known SI by value key; where nothing is known a preset stands in, unconfirmed. @param newId makes each row's id. */
export function boardRows(
  installId: string,
  board: GeneratedBoard,
  known: Record<string, { value: number | null; source: string | null }>,
  newId: () => string,
): BoardRows {
  const gateIds = new Map(board.gates.map((g) => [g.key, newId()]));
  const itemIds = new Map(board.items.map((i) => [i.key, newId()]));
  return {
    gates: board.gates.map((g, n) =>
      gateRow(installId, g, n, { id: idOf(gateIds, g.key), lookBack: g.lookBack?.kind === "rung" ? g.lookBack : null }, gateIds),
    ),
    items: board.items.map((i, n) => itemRow(installId, i, n, { id: idOf(itemIds, i.key), gateId: idOf(gateIds, i.gate) }, itemIds)),
    rungs: board.rungs.map((r, position) => ({ installId, position, ...r })),
    values: board.values.map((def, position) => ({
      installId,
      key: def.key,
      position,
      def,
      value: known[def.key]?.value ?? def.preset,
      source: known[def.key]?.value == null ? null : (known[def.key]?.source ?? null),
    })),
  };
}

/** A gate's row. Edges to gates that are not on the board were passed on by the generator; one that is left is dropped. */
export function gateRow(
  installId: string,
  def: GateDef,
  position: number,
  own: { id: string; lookBack: GateRow["lookBack"] },
  gateIds: Ids,
): GateRow {
  const { needs, after, lookBack: _, ...rest } = def;
  return { ...rest, ...own, installId, position, needs: idsOf(gateIds, needs), after: idsOf(gateIds, after) };
}

export function itemRow(installId: string, def: ItemDef, position: number, own: { id: string; gateId: string }, itemIds: Ids): ItemRow {
  const { gate: _, runs: __, follows, step, parts, ...rest } = def;
  return {
    ...rest,
    ...own,
    installId,
    position,
    follows: idsOf(itemIds, follows),
    step: step && { endedBy: step.endedBy === null ? null : (itemIds.get(step.endedBy) ?? null) },
    parts: parts.map((part) => withIds(part, itemIds)),
  };
}

/** A tally that counts back in looks at the item that took out. */
export function withIds(part: Part, itemIds: Ids): Part {
  return part.kind === "tally" && part.of !== undefined ? { ...part, of: idOf(itemIds, part.of) } : part;
}

const idsOf = (ids: Ids, keys: string[]): string[] => keys.flatMap((key) => ids.get(key) ?? []);

function idOf(ids: Ids, key: string): string {
  const id = ids.get(key);
  if (id === undefined) throw new Error(`The template names ${key}, which is not on this board`);
  return id;
}
