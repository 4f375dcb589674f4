/** An install's board as a template of one's own: definitions by key, nobody's records, and no word on where a number was read. */
import type { Snapshot } from "#app/lib/gates/snapshot";
import { OWN_TEMPLATE_SCHEMA, OWN_TEMPLATE_VERSION, type OwnTemplate, withoutSources } from "#app/lib/template/own-template";
import type { GeneratedBoard, Part } from "#app/lib/template/types";

/** @param install what the snapshot does not hold: what post-run gates are made from, and the built-in template's version. */
export function templateOf(
  s: Snapshot,
  name: string,
  install: { postRun: GeneratedBoard["postRun"]; templateVersion: string },
): OwnTemplate {
  const gates = s.gates.filter((g) => g.lookBack?.kind !== "run");
  const ofBoard = new Set(gates.map((g) => g.id));
  const items = s.items.filter((i) => ofBoard.has(i.gate));
  const gateKeys = new Map(gates.map((g) => [g.id, g.key]));
  const itemKeys = new Map(items.map((i) => [i.id, i.key]));
  const keys = (map: Map<string, string>, ids: string[]) => ids.flatMap((id) => map.get(id) ?? []);
  const withKey = (part: Part): Part =>
    part.kind === "tally" && part.of !== undefined ? { ...part, of: itemKeys.get(part.of) ?? part.of } : part;
  return {
    schema: OWN_TEMPLATE_SCHEMA,
    version: OWN_TEMPLATE_VERSION,
    name,
    templateVersion: install.templateVersion,
    traits: s.traits,
    values: Object.fromEntries(s.values.flatMap((v) => (v.value === null ? [] : [[v.key, v.value]]))),
    gates: gates.map(({ id: _, revision: __, lookBack, needs, after, ...gate }) => ({
      ...gate,
      needs: keys(gateKeys, needs),
      after: keys(gateKeys, after),
      lookBack: lookBack?.kind === "rung" ? lookBack : null,
    })),
    items: items.map(({ id: _, revision: __, gate, follows, step, parts, ...item }) => ({
      ...item,
      gate: gateKeys.get(gate) ?? "",
      follows: keys(itemKeys, follows),
      step: step && { endedBy: step.endedBy === null ? null : (itemKeys.get(step.endedBy) ?? null) },
      parts: parts.map((p) => withoutSources(withKey(p))),
      runs: null,
    })),
    postRun: { ...install.postRun, items: install.postRun.items.map((i) => ({ ...i, parts: i.parts.map(withoutSources) })) },
  };
}
