/** The run pipe itself: from the collector's outlet down through everything that stands on it. Serves both Lines. */
import type { Stretch } from "#app/components/line/pipes";
import { type LadderItem, letsPass } from "#app/components/line/runLadder";

export interface PlacedItem {
  item: LadderItem;
  y: number;
}

export interface LadderSizes {
  walkRound: number;
  run: number;
  service: number;
  release: number;
  /** Half the length of the walk-round's valve, and of a small one. */
  half: number;
  smallHalf: number;
}

/** Places items from `top` down: post-run valves stand on the border between two runs. */
export function placeLadder(items: LadderItem[], top: number, sizes: LadderSizes): PlacedItem[] {
  let y = top;
  return items.map((item) => {
    const start = y;
    switch (item.kind) {
      case "walk-round":
        y += sizes.walkRound;
        return { item, y: start + sizes.walkRound / 2 - 4 };
      case "run":
        y += sizes.run;
        return { item, y: start + sizes.run / 2 - 2 };
      case "service":
        y += sizes.service;
        return { item, y: start + sizes.service * 0.64 };
      case "release":
        y += sizes.release;
        return { item, y: start + sizes.release * 0.62 };
      default:
        return { item, y: start };
    }
  });
}

/** Stretches of the run pipe at `x`, from `from` down. */
export function ladderPipe(placed: PlacedItem[], x: number, from: number, collected: boolean, sizes: LadderSizes): Stretch[] {
  const stretches: Stretch[] = [];
  let last = from;
  let full = collected;
  for (const { item, y } of placed) {
    const half = item.kind === "walk-round" ? sizes.half : item.kind === "post-run" || item.kind === "service" ? sizes.smallHalf : 0;
    stretches.push({ from: [x, last], to: [x, y - half], full });
    last = y + half;
    full = full && letsPass(item);
  }
  return stretches;
}
