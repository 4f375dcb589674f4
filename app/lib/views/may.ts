/** A verdict as a page shows it: allowed, or the reason that stands on the act instead. Pure. */
import type { Verdict } from "#app/lib/gates/result";

export interface May {
  ok: boolean;
  why: string;
}

export const mayOf = (verdict: Verdict): May =>
  verdict.ok ? { ok: true, why: "" } : { ok: false, why: verdict.blockers[0]?.sentence ?? "Not now." };
