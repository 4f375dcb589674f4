/**
 * What stands on the run pipe, in order of flow: runs, the walk-round before the run that it is for, post-run valves,
 * service, release; and how far the flow gets.
 */
import type { LineGate, LineRun, LineStop } from "#app/components/line/types";

export type LadderItem = { key: string; fed: boolean } & (
  | { kind: "walk-round"; gate: LineGate }
  | { kind: "run"; run: LineRun }
  | { kind: "post-run"; stop: LineStop; run: LineRun }
  | { kind: "service"; stop: LineStop; run: LineRun }
  | { kind: "release"; stop: LineStop }
);

const OVER = new Set(["ended", "reviewed", "scrubbed"]);

type Unfed = LadderItem extends infer Item ? (Item extends LadderItem ? Omit<Item, "fed"> : never) : never;

/** `fed` of an item = flow reaches it. A reviewed run lets it pass; a scrubbed one is not in the way. */
export function runLadder(walkRound: LineGate | null, runs: LineRun[], release: LineStop, collected: boolean): LadderItem[] {
  const order: Unfed[] = [];
  const ahead = runs.findIndex((run) => !OVER.has(run.state));
  runs.forEach((run, i) => {
    if (run.serviceBefore) order.push({ kind: "service", key: `service ${run.id}`, stop: run.serviceBefore, run });
    if (walkRound && i === ahead) order.push({ kind: "walk-round", key: `walk-round ${walkRound.id}`, gate: walkRound });
    order.push({ kind: "run", key: `run ${run.id}`, run });
    if (run.postRun) order.push({ kind: "post-run", key: `post-run ${run.id}`, stop: run.postRun, run });
  });
  if (walkRound && ahead < 0) order.push({ kind: "walk-round", key: `walk-round ${walkRound.id}`, gate: walkRound });
  order.push({ kind: "release", key: "release", stop: release });

  let fed = collected;
  return order.map((item) => {
    const placed = { ...item, fed } as LadderItem;
    fed = fed && letsPass(placed);
    return placed;
  });
}

export function letsPass(item: LadderItem): boolean {
  switch (item.kind) {
    case "walk-round":
      return item.gate.state === "signed";
    case "run":
      return item.run.state === "reviewed" || item.run.state === "scrubbed";
    default:
      return item.stop.state === "signed";
  }
}

export const isHeld = (run: Pick<LineRun, "spade" | "state">) => run.spade || run.state === "held";
