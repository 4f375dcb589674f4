/**
 * Chains: gates that share one straight lane. A gate's pipe (its net) runs on its own lane as far as the last gate that
 * it feeds; one of those, if it stands there and is free, carries the lane on. So no lane ever bends.
 */
import type { Columns } from "#app/components/line/columns";
import { at, type GateGraph } from "#app/components/line/graph";

export interface Chains {
  /** Gates of each chain in order of flow. */
  list: number[][];
  /** Chain of each gate; undefined for a root that stands apart. */
  of: (number | undefined)[];
  /** The gate that carries a gate's lane on. */
  heir: (number | undefined)[];
  /** First gate of the first column: the source of the Line. */
  root: number;
  /** A single root stands apart, in the middle lane of what it feeds. */
  rootApart: boolean;
}

/** The heir has the fewest feeds; template order breaks ties. */
export function buildChains(graph: GateGraph, columns: Columns): Chains {
  const { count, sink, feeds, fed } = graph;
  const gates = Array.from({ length: count }, (_, i) => i);
  const column = (i: number) => at(columns.of, i);
  const root = gates.findIndex((i) => column(i) === 0 && at(feeds, i).length === 0);
  const rootApart = columns.count > 1 && columns.far(root) === 1 && gates.filter((i) => column(i) === 0).length === 1;

  const list: number[][] = [];
  const of: (number | undefined)[] = gates.map(() => undefined);
  const heir: (number | undefined)[] = gates.map(() => undefined);
  for (const u of [...gates].sort((a, b) => column(a) - column(b) || a - b)) {
    if (rootApart && u === root) continue;
    const mine = of[u] ?? list.push([u]) - 1;
    of[u] = mine;
    const [next] = at(fed, u)
      .filter((v) => v !== sink && column(v) === columns.far(u) && of[v] === undefined)
      .sort((a, b) => at(feeds, a).length - at(feeds, b).length || a - b);
    if (next === undefined) continue;
    of[next] = mine;
    at(list, mine).push(next);
    heir[u] = next;
  }
  return { list, of, heir, root, rootApart };
}
