/** What has to be done again in a gate and why, and which gates only wait for it: those come back by themselves. Pure. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemsIn } from "#app/lib/gates/facts";
import { anchorOf } from "#app/lib/views/places";

export interface AgainView {
  /** Each reason once, with the items that lapsed by it. */
  causes: { sentence: string; items: { key: string; anchor: string }[] }[];
  /** Names of gates that stand signed again as soon as this one does. */
  back: string[];
}

/** Null where nothing in the gate has lapsed. */
export function againOf(e: Evaluation, gateId: string): AgainView | null {
  const causes = new Map<string, AgainView["causes"][number]>();
  for (const item of itemsIn(e.facts, gateId)) {
    const result = e.result.items[item.id];
    const sentence = result?.state === "lapsed" ? result.blockers[0]?.sentence : undefined;
    if (!sentence) continue;
    const cause = causes.get(sentence) ?? { sentence, items: [] };
    cause.items.push({ key: item.key, anchor: anchorOf(item.id) });
    causes.set(sentence, cause);
  }
  return causes.size ? { causes: [...causes.values()], back: waitingFor(e, gateId) } : null;
}

/** Gates whose items stand and whose signatures hold, and which wait for this gate and for nothing else but each other. */
function waitingFor(e: Evaluation, gateId: string): string[] {
  const back = new Set([gateId]);
  const waiting = Object.values(e.result.gates).filter((g) => {
    const policy = e.facts.gates.get(g.id)?.policy.length ?? 0;
    return g.state === "waiting" && g.complete && policy > 0 && g.holding.length === policy;
  });
  for (let before = 0; before < back.size; ) {
    before = back.size;
    for (const g of waiting) if (g.prerequisites.every((id) => e.result.gates[id]?.stands || back.has(id))) back.add(g.id);
  }
  back.delete(gateId);
  return [...back].map((id) => e.facts.gates.get(id)?.name ?? "another gate");
}
