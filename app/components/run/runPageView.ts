/** What the run's page is drawn from: plain data, made on the server from the evaluator's answer. */
import type { ClearanceBlockProps } from "#app/components/run/ClearanceBlock";
import type { BriefProps } from "#app/components/run/MyBrief";
import type { RollRow } from "#app/components/run/RollCall";
import type { RunCardProps } from "#app/components/run/RunCardView";
import type { LadderRung } from "#app/components/run/RunTitle";
import type { StopRow } from "#app/components/run/StopList";
import type { PlanStation } from "#app/components/ui/FloorPlan";
import type { RunFindings } from "#app/lib/views/run-findings";

export interface Allowed {
  ok: boolean;
  /** Why not, and what to do next. */
  why: string;
}

export interface RunPageView {
  id: string;
  label: string;
  title: string;
  when: string;
  state: "planned" | "called" | "held" | "running" | "ended" | "reviewed" | "scrubbed";
  ladder: LadderRung[];
  gates: number;
  notice: { kind: "hold" | "done" | "danger" | "plain"; title: string; text: string } | null;
  clearance: Omit<ClearanceBlockProps, "lower"> & { lower: number | null };
  card: RunCardProps | null;
  stops: StopRow[];
  findings: RunFindings;
  roll: { title: string; entries: RollRow[]; empty: string[]; stations: PlanStation[] };
  mine: (BriefProps & { inShort: string }) | null;
  wind: { newest: string | null; limit: string; short: string };
  gear: "nose" | "tail";
  pusher: boolean;
  acts: { go: Allowed; noGo: Allowed; hold: Allowed; scrub: Allowed; plan: Allowed; wind: Allowed };
  foot: { says: string; note: string };
  onlyCrew: boolean;
  lead: boolean;
  href: string;
}
