/**
 * Computed items and the conditions of the release for the second evaluator: nobody ticks them, they follow from the records.
 */
import type { Gate, Instant, Item, Snapshot } from "#app/lib/gates/snapshot";
import type { ComputedRule } from "#app/lib/template/types";
import { endOf, itemsOf, logIsDealtWith, nextRung, presentGates, settlingRuns } from "./naive-facts";

const FIVE_POUNDS = 5 * 0.45359237;

function ruleHolds(s: Snapshot, rule: ComputedRule, gate: Gate, at: Instant): boolean {
  switch (rule) {
    case "extinguishers":
      return extinguishersHold(s, at);
    case "loose-ends":
      return s.looseEnds.every((l) => l.confirmed !== null || looseEndAccepted(s, l, nextRung(s)?.key ?? null));
    case "log": {
      const look = gate.lookBack;
      const run = look?.kind === "run" ? s.runs.find((r) => r.id === look.run) : look ? settlingRuns(s, look.rung).at(-1) : undefined;
      return run !== undefined && endOf(run) !== null && logIsDealtWith(run);
    }
    case "release-record":
      return s.findings.every((f) => f.closed) && s.looseEnds.every((l) => l.confirmed) && allConfirmed(s);
    case "release-openings":
      return noOpeningSinceRun(s);
  }
}
/** Whether a computed item holds at `at`: every rule that its parts name. */
export const computedHolds = (s: Snapshot, gate: Gate, item: Item, at: Instant): boolean =>
  item.parts.every((part) => part.kind !== "computed" || ruleHolds(s, part.rule, gate, at));

function extinguishersHold(s: Snapshot, at: Instant): boolean {
  const fit = s.extinguishers.filter(
    (e) =>
      !e.withdrawn && e.classB && e.agent !== "water" && e.lookDue !== null && at < e.lookDue && e.serviceDue !== null && at < e.serviceDue,
  );
  return fit.length >= 2 && fit.some((e) => e.agent === "clean" || (e.agent === "co2" && e.charge >= FIVE_POUNDS));
}

/** Accepted for this rung; from its due rung on it cannot be. */
export function looseEndAccepted(s: Snapshot, end: Snapshot["looseEnds"][number], rungKey: string | null): boolean {
  const { due } = end;
  const order = (key: string | null) => s.rungs.find((r) => r.key === key)?.order ?? Number.POSITIVE_INFINITY;
  if (due.kind === "rung" && order(rungKey) >= order(due.rung)) return false;
  return end.accepted.some((a) => a.rung === rungKey && a.as === "inspector");
}

export function allConfirmed(s: Snapshot): boolean {
  const limits = s.values.filter((v) => v.limit).every((v) => v.value !== null && v.source !== null);
  const killers = presentGates(s)
    .flatMap((g) => itemsOf(s, g))
    .filter((i) => i.killer);
  const bands = killers.flatMap((i) => i.parts).flatMap((p) => (p.kind === "measure" || p.kind === "torque" ? [p.criterion] : []));
  return limits && bands.every((c) => c.source !== null);
}

const AFTER_RUN_SYSTEMS: string[] = ["fuelsup", "fueleng", "oil", "oilfill", "coolant", "drive", "prop"];

export function noOpeningSinceRun(s: Snapshot): boolean {
  const newest = Math.max(...s.runs.map((r) => endOf(r) ?? Number.NEGATIVE_INFINITY));
  const count = s.openings.filter((o) => o.mistake === null && o.systems.some((system) => AFTER_RUN_SYSTEMS.includes(system)));
  return count.every((o) => o.closed !== null && o.closed < newest);
}
