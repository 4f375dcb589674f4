/** "Cleared to N rpm": the least of plan, redline, findings and restraint; it names which one binds. */
import { restraintCap } from "#app/lib/gates/evidence";
import type { Facts } from "#app/lib/gates/facts";
import type { Clearance, ClearanceLimit } from "#app/lib/gates/result";

/**
 * @param planned highest crankshaft speed of the plan, 1/s, null = none yet (counts as 0).
 * @param required ids of the gates whose restraint sheets count; a sheet that does not stand allows 0.
 */
export function clearanceOf(facts: Facts, planned: number | null, required: string[], planLabel: string): Clearance {
  const limits: ClearanceLimit[] = [{ kind: "plan", id: "plan", label: planLabel, rpm: planned ?? 0 }];
  const redline = facts.values.get("redline");
  limits.push({ kind: "redline", id: "redline", label: redline?.value ? "redline" : "redline, not entered", rpm: redline?.value ?? 0 });
  for (const f of facts.snapshot.findings)
    if (f.severity !== "watch" && !f.closed)
      // A grounding finding allows nothing: sharpened from a limiting one it must not raise the figure.
      limits.push({ kind: "finding", id: f.id, label: `finding: ${f.words}`, rpm: f.severity === "limiting" ? (f.cap ?? 0) : 0 });
  for (const gate of required)
    for (const { item, current, result } of facts.gateFacts.get(gate)?.items ?? []) {
      const cap = restraintCap(facts, item, current);
      if (cap === undefined) continue;
      const stands = result?.stands ?? false;
      limits.push({
        kind: "restraint",
        id: item.id,
        label: stands ? "straps and surface" : "restraint sheet, does not stand",
        rpm: stands ? (cap ?? 0) : 0,
      });
    }
  const order = ["plan", "redline", "finding", "restraint"];
  limits.sort((a, b) => order.indexOf(a.kind) - order.indexOf(b.kind) || (a.id < b.id ? -1 : 1));
  let binds = limits[0] as ClearanceLimit;
  for (const limit of limits) if (limit.rpm < binds.rpm) binds = limit;
  return { rpm: binds.rpm, binds, limits };
}

/** Revolutions per second as whole rpm, rounded down: a figure that clears must never round up. */
export const rpmText = (perSecond: number): string => `${Math.floor(perSecond * 60 + 1e-6).toLocaleString("en")} rpm`;
