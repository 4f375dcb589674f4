// Plans a run of a rung, or changes the plan of one that was not started: a new version, which the crew has to acknowledge anew.
// A new time or place alone is no new version, for neither changes what anybody does.
import { eq } from "drizzle-orm";
import { planVersions, runs } from "#app/db/schema/runs";
import { defaultRequired } from "#app/lib/gates/gate-limits";
import { mayPlanRun } from "#app/lib/gates/plan-verdicts";
import type { PlanVersion, Rung } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { canonical } from "#app/lib/record/canonical";
import type { PlanRun } from "#app/lib/schemas/run";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

export interface Planned {
  run: string;
  label: string;
  version: number;
}

export function planRun(act: Act, input: PlanRun): Promise<Outcome<Planned>> {
  return perform({ ...act, kind: "plan-run", input }, async (d) => {
    const { plannedStart, place } = input;
    const refusal = refusalOf(mayPlanRun(d.e, { run: input.run, rung: input.rung, member: d.member.id, plan: input }));
    if (refusal) return refusal;
    const rung = d.e.facts.rungs.find((r) => r.key === input.rung);
    const run = d.e.snapshot.runs.find((r) => r.id === input.run);
    if (!rung) throw new Error("A plan was allowed on a rung that is not there");

    const id = run?.id ?? newId();
    const label = run?.label ?? labelOf(d, rung);
    const plan = planOf(d, rung, input);
    const newest = run && [...run.plans].sort((a, b) => a.version - b.version).at(-1);
    const version = (newest?.version ?? 0) + (newest && sameDuty(newest, plan) ? 0 : 1);
    const base = await d.record("lead", {
      type: "run-planned",
      data: { run: id, rung: rung.key, label, place, plannedStart, version, ...plan, card: JSON.parse(canonical(plan.card)) },
    });
    if (run) await d.tx.update(runs).set({ plannedStart, place }).where(eq(runs.id, id));
    else await d.tx.insert(runs).values({ id, installId: d.installId, rung: rung.key, label, place, plannedStart });
    if (version !== newest?.version) await d.tx.insert(planVersions).values({ ...base, runId: id, version, ...plan });
    return done({ run: id, label, version });
  });
}

type Plan = Omit<PlanVersion, "version" | "recorded">;

/** The card is the rung's, the gates are those that its runs require: asking for less would be an inspector's to accept. */
function planOf(d: Doing, rung: Rung, { rpm, positions, windLimit, gustLimit }: PlanRun): Plan {
  return { rpm, card: rung.card, positions, windLimit, gustLimit, requiredGates: defaultRequired(d.e.facts, rung) };
}

const sameDuty = ({ version: _, recorded: __, ...old }: PlanVersion, plan: Plan): boolean => canonical(old) === canonical(plan);

/** "2", then "2b", "2c". */
function labelOf(d: Doing, rung: Rung): string {
  const before = d.e.snapshot.runs.filter((r) => r.rung === rung.key).length;
  return before === 0 ? rung.key : `${rung.key}${before < 26 ? String.fromCharCode(97 + before) : `-${before + 1}`}`;
}
