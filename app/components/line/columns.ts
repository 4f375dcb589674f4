/**
 * Which column each gate stands in: as far left as it can, then right where that saves lanes and pipe.
 */
import { at, type GateGraph } from "#app/components/line/graph";

const MOST_ROUNDS = 20;

export interface Columns {
  /** Column of each gate; the sink's is the number of columns. */
  of: number[];
  count: number;
  /** Last column that a gate's own pipe must reach. */
  far: (gate: number) => number;
}

/**
 * Longest path from the sources, then gates with slack are moved right, one at a time, last gate first, while
 * 6 x most lanes in a column + 0.5 x sum of lanes squared + 0.3 x pipe + 1.3 x columns moved falls.
 * A gate that needs nothing stands next to what needs it.
 */
export function placeColumns(graph: GateGraph): Columns {
  const { count, sink, feeds, fed } = graph;
  const earliest = longestPaths(feeds);
  const columns = at(earliest, sink);
  const latest = latestColumns(graph, columns);
  const of = [...earliest];
  const far = (u: number) => Math.max(at(of, u) + 1, ...at(fed, u).map((v) => at(of, v)));

  const cost = () => {
    const lanes = new Array<number>(columns + 1).fill(0);
    let sum = 0;
    for (let u = 0; u < count; u++) {
      const [from, to] = [at(of, u), far(u)];
      for (let k = from; k < to; k++) lanes[k] = at(lanes, k) + 1;
      sum += 1.3 * (from - at(earliest, u)) + (to - from) * 0.3;
    }
    for (const n of lanes) sum += n * n * 0.5;
    return sum + Math.max(...lanes) * 6;
  };

  for (let moved = true, round = 0; moved && round < MOST_ROUNDS; round++) {
    moved = false;
    for (let u = count - 1; u >= 0; u--) {
      if (earliest[u] === latest[u]) continue;
      const low = at(feeds, u).length ? 1 + Math.max(...at(feeds, u).map((p) => at(of, p))) : at(earliest, u);
      const high = Math.min(...at(fed, u).map((v) => at(of, v))) - 1;
      let best = at(of, u);
      let least = cost();
      for (let k = low; k <= high; k++) {
        of[u] = k;
        const c = cost();
        if (c < least - 1e-9) {
          best = k;
          least = c;
          moved = true;
        }
      }
      of[u] = best;
    }
  }

  for (let u = 0; u < count; u++) {
    if (at(feeds, u).length) continue;
    const next = Math.min(...at(fed, u).map((v) => at(of, v)));
    if (at(of, u) > 0 || next > 1) of[u] = Math.max(at(earliest, u), next - 1);
  }
  return { of, count: columns, far };
}

function longestPaths(feeds: number[][]): number[] {
  const depth: (number | undefined)[] = feeds.map(() => undefined);
  const visit = (v: number): number => {
    const known = depth[v];
    if (known !== undefined) return known;
    const up = at(feeds, v);
    const found = up.length ? 1 + Math.max(...up.map(visit)) : 0;
    depth[v] = found;
    return found;
  };
  return feeds.map((_, v) => visit(v));
}

function latestColumns({ fed, sink }: GateGraph, columns: number): number[] {
  const latest: (number | undefined)[] = fed.map(() => undefined);
  latest[sink] = columns;
  const visit = (u: number): number => {
    const known = latest[u];
    if (known !== undefined) return known;
    const found = Math.min(columns - 1, ...at(fed, u).map((v) => visit(v) - 1));
    latest[u] = found;
    return found;
  };
  return fed.map((_, u) => visit(u));
}
