/** From items to gates: complete, ready, signed, and the blockers that say why not. */
import type { Facts } from "#app/lib/gates/facts";
import { soonest } from "#app/lib/gates/items";
import type { Blocker, GateResult, GateState, ItemResult } from "#app/lib/gates/result";
import { coversNow, doersOf, holding, wasSigned } from "#app/lib/gates/signing";
import type { Gate, Instant, SystemKey } from "#app/lib/gates/snapshot";
import { blocker, count, findingOwner, looseEndOwner, ownerOf } from "#app/lib/gates/who";
import type { GateFacts } from "#app/lib/gates/work-facts";

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
  of: GateFacts,
  waitsFor: string[],
  results: Map<string, GateResult>,
  hinder: Hindrances,
  inCircle: boolean,
): GateResult {
  const { gate } = of;
  const blockers: Blocker[] = [];
  let done = 0;
  let until: Instant | null = null;
  for (const { result } of of.items) {
    const { stands, until: ends, blockers: own } = result as ItemResult;
    if (stands) {
      done++;
      until = soonest(until, ends);
    } else blockers.push(...own);
  }
  if (!gate.lookBack) blockers.push(...groundingBlockers(facts, of, hinder), ...looseEndBlockers(facts, gate, hinder));
  const complete = blockers.length === 0;

  const missing: string[] = [];
  for (const id of waitsFor) {
    const other = results.get(id);
    if (other?.stands) until = soonest(until, other.until);
    else missing.push(id);
  }
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
          ? `${gate.name} waits, directly or through others, for gates that form a circle. A lead must take one edge away in the template.`
          : `${other?.name ?? "Another gate"} must stand signed first.`,
        owner: ownerOf(facts, inCircle ? ["lead"] : ["builder", "inspector", "lead"]),
      }),
    );
  }
  const ready = complete && missing.length === 0 && !inCircle;

  const covers = coversNow(of);
  const signed = holding(facts, of, covers);
  const stands = ready && signed.length === gate.policy.length;
  if (ready && !stands) blockers.push(signatureBlocker(facts, gate, signed.length, covers, signed[0]?.by));

  const waiting = missing.length > 0 || inCircle;
  let state: GateState;
  if (stands) state = "signed";
  else if (ready && signed.length) state = "half signed";
  else if (ready) state = "ready";
  else if (!complete && wasSigned(facts, of)) state = "lapsed";
  else state = waiting ? "waiting" : "in work";

  return {
    id: gate.id,
    state,
    present: true,
    complete,
    ready,
    stands,
    until: stands ? until : null,
    covers,
    holding: signed.map((s) => s.id),
    done,
    of: of.items.length,
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

function groundingBlockers(facts: Facts, of: GateFacts, hinder: Hindrances): Blocker[] {
  if (!hinder.grounding.size) return [];
  const systems = new Set(of.items.flatMap((i) => i.item.systems));
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
        owner: findingOwner(facts, f),
      }),
    );
}

function looseEndBlockers(facts: Facts, gate: Gate, hinder: Hindrances): Blocker[] {
  if (!hinder.dueGate.size) return [];
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
      owner: looseEndOwner(facts, l),
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
