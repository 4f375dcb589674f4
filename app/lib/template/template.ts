/**
 * The whole template in one value: what `generate` reads and `validate` checks.
 */
import { AFTER_RUN_GATES, BEFORE_RUN_GATES, type GateRow, POST_RUN_GATE } from "#app/lib/template/gates";
import { AFTER_RUN_ITEMS, POST_RUN_ITEMS } from "#app/lib/template/items-after-run";
import { INSTALLATION_ITEMS } from "#app/lib/template/items-installation";
import { DAY_ITEMS } from "#app/lib/template/items-of-the-day";
import { PRIME_ITEMS } from "#app/lib/template/items-prime";
import { SUPPLY_ITEMS } from "#app/lib/template/items-supply";
import type { ItemRow } from "#app/lib/template/rows";

export interface Template {
  gates: GateRow[];
  items: ItemRow[];
  postRunGate: GateRow;
  postRunItems: ItemRow[];
}

export const TEMPLATE: Template = {
  gates: [...BEFORE_RUN_GATES, ...AFTER_RUN_GATES],
  items: [...INSTALLATION_ITEMS, ...SUPPLY_ITEMS, ...PRIME_ITEMS, ...DAY_ITEMS, ...AFTER_RUN_ITEMS],
  postRunGate: POST_RUN_GATE,
  postRunItems: POST_RUN_ITEMS,
};

/** Gates whose killer items are printed on the run card. */
export const CARD_GATES = ["CR", "TD", "FI", "WR"];

/** The gate an item belongs to: the letters of its key. */
export function gateOf(itemKey: string): string {
  return itemKey.replace(/\d+$/, "");
}
