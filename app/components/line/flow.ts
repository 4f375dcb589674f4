/**
 * Where the flow gets to. It passes a gate that is signed and that the flow reaches: it stops at the first shut valve,
 * and what stands downstream of a lapsed gate stays dry although its own handle lies along the pipe.
 */
import { at } from "#app/components/line/graph";
import type { LineLayout } from "#app/components/line/layout";
import type { LineGate } from "#app/components/line/types";

export interface Flow {
  /** Flow passes this gate. */
  passes: boolean[];
  /** Pressure stands at this gate: every gate that it needs passes. */
  fed: boolean[];
  /** Flow comes out of the collector: every end passes. */
  collected: boolean;
}

export function findFlow(layout: LineLayout, gates: LineGate[]): Flow {
  const passes: (boolean | undefined)[] = gates.map(() => undefined);
  const visit = (i: number): boolean => {
    const known = passes[i];
    if (known !== undefined) return known;
    const found = at(gates, i).state === "signed" && at(layout.feeds, i).every(visit);
    passes[i] = found;
    return found;
  };
  const all = gates.map((_, i) => visit(i));
  return { passes: all, fed: layout.feeds.map((feeds) => feeds.every((i) => at(all, i))), collected: layout.ends.every((i) => at(all, i)) };
}
