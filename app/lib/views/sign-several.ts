/** One sheet for several gates that are ready: each gets a signature of its own. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { maySign } from "#app/lib/gates/signing-verdicts";
import type { SigningRole } from "#app/lib/gates/snapshot";
import { meaningOf } from "#app/lib/record/shown";
import type { UnitSystem } from "#app/lib/units/display";
import type { Viewer } from "#app/lib/views/board";
import { type SheetView, sheetView } from "#app/lib/views/sign";

export interface SeveralView {
  as: SigningRole;
  /** Roles in which this person may sign something now, with how many gates. */
  roles: { role: SigningRole; gates: number }[];
  act: string;
  meaning: string;
  sheets: SheetView[];
}

const ROLES: SigningRole[] = ["builder", "inspector", "lead"];

export function severalView(e: Evaluation, me: Viewer & { units: UnitSystem }, wanted: string | null): SeveralView {
  const ready = (as: SigningRole) =>
    Object.values(e.result.gates).filter(
      (g) => g.present && g.ready && !g.stands && maySign(e, { gate: g.id, member: me.id, as, covers: null }).ok,
    );
  const roles = ROLES.filter((r) => me.roles.includes(r)).map((role) => ({ role, gates: ready(role).length }));
  const as = (roles.find((r) => r.role === wanted) ?? roles.find((r) => r.gates > 0) ?? roles[0])?.role ?? "builder";
  return {
    as,
    roles,
    act: as === "builder" ? "Sign as builder" : `Countersign as ${as}`,
    meaning: meaningOf(as),
    sheets: me.roles.includes(as) ? ready(as).flatMap((g) => sheetView(e, g.id, me, as) ?? []) : [],
  };
}
