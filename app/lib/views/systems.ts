/** The systems of an install as a person chooses and reads them, and the presets that fit it. Pure. */

import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems } from "#app/lib/gates/facts";
import { inSentence } from "#app/lib/gates/who";
import { OPENING_PRESETS, SYSTEM_NAMES } from "#app/lib/template/systems";
import { SYSTEMS, type SystemKey } from "#app/lib/template/types";

export interface SystemChoice {
  value: SystemKey;
  label: string;
}

/** Those that an item of the board names, in the template's order; the bay is always there. */
export function systemsOn(e: Evaluation): SystemChoice[] {
  const used = new Set<SystemKey>(["bay"]);
  for (const item of allItems(e.facts)) for (const system of item.systems) used.add(system);
  return SYSTEMS.filter((s) => used.has(s)).map((value) => ({ value, label: SYSTEM_NAMES[value] }));
}

/** Common work of which every system is on this install. `systems` leaves the bay out where another is named: it opens with any. */
export function presetsOn(e: Evaluation): { key: string; name: string; systems: SystemKey[] }[] {
  const used = new Set(systemsOn(e).map((s) => s.value));
  return OPENING_PRESETS.filter((p) => p.systems.every((s) => used.has(s))).map(({ key, name, systems }) => ({
    key,
    name,
    systems: withoutBay(systems),
  }));
}

const withoutBay = (systems: SystemKey[]): SystemKey[] => (systems.length > 1 ? systems.filter((s) => s !== "bay") : systems);

/** "Fuel, forward of the firewall; induction": names hold commas, so they are parted by semicolons. */
export function systemWords(systems: SystemKey[]): string {
  const names = withoutBay([...new Set(systems)]).map((s) => SYSTEM_NAMES[s]);
  return names.map((name, i) => (i ? inSentence(name) : name)).join("; ");
}
