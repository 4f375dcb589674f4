import { bladePath } from "#app/components/ui/bladePath";
import type { RunState } from "#app/components/ui/states";

const LOOK: Record<RunState, string> = {
  planned: "",
  next: "blade-next",
  called: "blade-next",
  held: "blade-next",
  running: "blade-running",
  ended: "blade-ended",
  reviewed: "blade-done",
  scrubbed: "blade-scrubbed",
};

interface BladeProps {
  /** Drawing units from root to tip; share of rated speed times the longest. */
  length: number;
  width?: number;
  state?: RunState;
}

/** One run: a blade, root at 0,0, pointing up. A group for use inside an svg. */
export function Blade({ length, width = 23, state = "planned" }: BladeProps) {
  return <path className={`blade ${LOOK[state]}`} d={bladePath(length, width)} />;
}
