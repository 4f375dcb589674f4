/** From items to gates: complete, ready, signed, and the blockers that say why not. */
import type { Facts } from "#app/lib/gates/facts";
import { soonest } from "#app/lib/gates/items";
import type { Blocker, GateResult, GateState, ItemResult } from "#app/lib/gates/result";
import { coversNow, doersOf, fillPolicy, holding, wasSigned } from "#app/lib/gates/signing";
import type { Gate, Instant, SystemKey } from "#app/lib/gates/snapshot";
import { blocker, count, ownerOf } from "#app/lib/gates/who";

/** Findings and loose ends by what they stop, worked out once. */
export interface Hindrances {
  grounding: Map<SystemKey, Facts["snapshot"]["findings"]>;
  dueGate: Map<string, Facts["snapshot"]["looseEnds"]>;
}

export function hindrances(facts: Facts): Hindrances {
  const grounding: Hindrances["grounding"] = new Map();
  for (const f of facts.snapshot.findings)
    if (f.severity === "grounding" && !f.closed) grounding.set(f.system, [...(grounding.get(f.system) ?? []), f]);
  const dueGate: Hindrances["dueGate"] = new Map();
  for (const l of facts.snapshot.looseEnds)
    if (l.due.kind === "gate" && !l.confirmed) dueGate.set(l.due.gate, [...(dueGate.get(l.due.gate) ?? []), l]);
  return { grounding, dueGate };
}

/** @param inCircle the gate waits for itself: it never stands. @param results gates evaluated before, which hold all that it waits for. */
export function evaluateGate(
  facts: Facts,
  gate: Gate,
  items: ItemResult[],
  waitsFor: string[],
  results: Map<string, GateResult>,
  hinder: Hindrances,
  inCircle: boolean,
): GateResult {
  const own = facts.itemsOf.get(gate.id) ?? [];
  const blockers: Blocker[] = items.flatMap((i) => i.blockers);
  if (!gate.lookBack) blockers.push(...groundingBlockers(facts, gate, hinder), ...looseEndBlockers(facts, gate, hinder));
  const complete = blockers.length === 0;

  const missing = waitsFor.filter((id) => !results.get(id)?.stands);
  for (const id of missing) {
    const other = facts.gates.get(id);
    blockers.push(
      blocker({
        code: "gate-waits",
        subject: ["gate", id],
        title: `Waits for ${other?.name ?? "another gate"}`,
        page: "gate",
        id,
        sentence: inCircle
          ? `${gate.name} and ${other?.name} wait for each other. A lead must take one edge away in the template.`
          : `${other?.name ?? "Another gate"} must stand signed first.`,
        owner: ownerOf(facts, inCircle ? ["lead"] : ["builder", "inspector", "lead"]),
      }),
    );
  }
  const ready = complete && missing.length === 0 && !inCircle;

  const covers = coversNow(own, items);
  const signed = fillPolicy(facts, gate, holding(facts, gate, covers));
  const stands = ready && signed.length === gate.policy.length;
  if (ready && !stands) blockers.push(signatureBlocker(facts, gate, signed.length, covers, signed[0]?.by));

  const waiting = missing.length > 0 || inCircle;
  let state: GateState;
  if (stands) state = "signed";
  else if (ready && signed.length) state = "half signed";
  else if (ready) state = "ready";
  else if (!complete && wasSigned(facts, gate)) state = "lapsed";
  else state = waiting ? "waiting" : "in work";

  let until: Instant | null = null;
  if (stands) {
    for (const i of items) until = soonest(until, i.until);
    for (const id of waitsFor) until = soonest(until, results.get(id)?.until ?? null);
  }
  return {
    id: gate.id,
    state,
    present: true,
    complete,
    ready,
    stands,
    until,
    covers,
    holding: signed.map((s) => s.id),
    done: items.filter((i) => i.stands).length,
    of: items.length,
    prerequisites: waitsFor,
    blockers,
  };
}

/** A gate that is not on the board: hidden, or without items. */
export const absentGate = (gate: Gate): GateResult => ({
  id: gate.id,
  state: "waiting",
  present: false,
  complete: false,
  ready: false,
  stands: false,
  until: null,
  covers: [],
  holding: [],
  done: 0,
  of: 0,
  prerequisites: [],
  blockers: [],
});

function groundingBlockers(facts: Facts, gate: Gate, hinder: Hindrances): Blocker[] {
  if (!hinder.grounding.size) return [];
  const systems = new Set((facts.itemsOf.get(gate.id) ?? []).flatMap((i) => i.systems));
  return [...systems]
    .flatMap((s) => hinder.grounding.get(s) ?? [])
    .map((f) =>
      blocker({
        code: "grounding",
        subject: ["finding", f.id],
        title: `Grounding finding: ${f.words}`,
        page: "findings",
        id: f.id,
        sentence: f.fixed ? "Fixed; an inspector must look and close it." : "A builder fixes it and says how, then an inspector closes it.",
        owner: f.fixed ? ownerOf(facts, ["inspector"], [f.fixed.by]) : ownerOf(facts, ["builder", "inspector"]),
      }),
    );
}

function looseEndBlockers(facts: Facts, gate: Gate, hinder: Hindrances): Blocker[] {
  return (hinder.dueGate.get(gate.id) ?? []).map((l) =>
    blocker({
      code: "loose-end",
      subject: ["loose-end", l.id],
      title: `Loose end: ${l.what}`,
      page: "loose-ends",
      id: l.id,
      sentence: l.restored
        ? "Restored; a second person must look and confirm."
        : "It is due before this gate. Restore it, and have a second person confirm it.",
      owner: l.restored ? ownerOf(facts, ["builder", "inspector", "lead"], [l.restored.by]) : ownerOf(facts, ["builder", "inspector"]),
    }),
  );
}

function signatureBlocker(facts: Facts, gate: Gate, filled: number, covers: GateResult["covers"], first: string | undefined): Blocker {
  const roles = gate.policy[filled] ?? ["inspector"];
  const barred = filled ? [...doersOf(facts, covers), ...(first ? [first] : [])] : [];
  const who = roles.join(" or ");
  return blocker({
    code: "not-signed",
    subject: ["gate", gate.id],
    page: "gate",
    id: gate.id,
    title: `${gate.name} waits for ${filled ? "the second signature" : "a signature"}`,
    sentence: filled
      ? `The first signature is there. The ${who} who countersigns did none of its items.`
      : `All ${count(covers.length, "item")} stand. The ${who} signs.`,
    owner: ownerOf(facts, roles as [(typeof roles)[number], ...typeof roles], barred),
  });
}
