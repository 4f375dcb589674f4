/**
 * Headers: pipes across lanes in the gap before a column. Targets with one and the same single feed share a header
 * (a split); a gate with several feeds has its own (a merge), so that a tee never says more than the DAG.
 */
import type { Columns } from "#app/components/line/columns";
import { at, type GateGraph } from "#app/components/line/graph";

export interface Header {
  /** The column it stands before. */
  gap: number;
  /** Place among the headers of its gap, from the left. */
  track: number;
  merge: boolean;
  from: number[];
  to: number[];
  /** Lanes that it spans. */
  top: number;
  bottom: number;
}

/** All headers for a given assignment of lanes, each still on track 0. */
export function findHeaders(graph: GateGraph, columns: Columns, lane: readonly number[]): Header[] {
  const found: Header[] = [];
  for (let gap = 1; gap < columns.count; gap++) {
    const here = new Map<string, Header>();
    for (let v = 0; v < graph.count; v++) {
      const from = at(graph.feeds, v);
      if (columns.of[v] !== gap || from.length === 0) continue;
      const merge = from.length > 1;
      const key = merge ? `into ${v}` : `from ${from[0]}`;
      const header = here.get(key) ?? { gap, track: 0, merge, from, to: [], top: 0, bottom: 0 };
      header.to.push(v);
      here.set(key, header);
    }
    for (const header of here.values()) {
      const lanes = [...header.from, ...header.to].map((i) => at(lane, i));
      header.top = Math.min(...lanes);
      header.bottom = Math.max(...lanes);
      if (header.bottom > header.top) found.push(header);
    }
  }
  return found;
}

const TOUCHES_FOREIGN_END = 999;
const CROSSES = 9;
/** All orders are tried up to this many headers in a gap (720 orders); beyond it single moves have to do. */
const MOST_PERMUTED = 6;

/** Gives each header its track: the order in a gap that crosses least and never touches the end of a foreign pipe. */
export function orderTracks(
  graph: GateGraph,
  columns: Columns,
  lane: readonly number[],
  heir: readonly (number | undefined)[],
  headers: Header[],
): void {
  for (let gap = 1; gap < columns.count; gap++) {
    const here = headers.filter((h) => h.gap === gap);
    let best = here;
    let least = Number.POSITIVE_INFINITY;
    const consider = (order: Header[]) => {
      const cost = costOfOrder(order, gap);
      if (cost >= least - 1e-9) return false;
      least = cost;
      best = [...order];
      return true;
    };
    if (here.length <= MOST_PERMUTED) permutations([...here], consider);
    else singleMoves(here, consider);
    best.forEach((header, track) => {
      header.track = track;
    });
  }

  function costOfOrder(order: Header[], gap: number): number {
    let cost = 0;
    order.forEach((header, track) => {
      for (let w = 0; w < graph.count; w++) {
        const l = at(lane, w);
        if (l < header.top || l > header.bottom || header.from.includes(w) || header.to.includes(w)) continue;
        const price = l === header.top || l === header.bottom ? TOUCHES_FOREIGN_END : CROSSES;
        const column = at(columns.of, w);
        // a net from the left is there at this track if it goes on to a later one or past the gap
        if (column < gap) {
          const lastUse = Math.max(-1, ...order.map((other, i) => (other.from.includes(w) ? i : -1)));
          const next = heir[w];
          if (columns.far(w) > gap || lastUse > track || (next !== undefined && columns.of[next] === gap)) cost += price;
        }
        // a gate of this column: its inlet lies right of its own header
        if (column === gap) {
          const own = order.findIndex((other) => other.to.includes(w));
          if (own >= 0 && own < track) cost += price;
        }
      }
    });
    return cost;
  }
}

function permutations<T>(list: T[], use: (order: T[]) => void, fixed = 0): void {
  if (fixed === list.length) {
    use(list);
    return;
  }
  for (let j = fixed; j < list.length; j++) {
    swap(list, fixed, j);
    permutations(list, use, fixed + 1);
    swap(list, fixed, j);
  }
}

/** Moves one element at a time for as long as `better` takes the new order. */
function singleMoves<T>(start: T[], better: (order: T[]) => boolean): void {
  let order = start;
  better(order);
  for (let moving = true; moving; ) {
    moving = false;
    for (let i = 0; i < order.length; i++)
      for (let j = 0; j < order.length; j++) {
        if (i === j) continue;
        const moved = [...order];
        moved.splice(j, 0, ...moved.splice(i, 1));
        if (better(moved)) {
          order = moved;
          moving = true;
        }
      }
  }
}

function swap<T>(list: T[], i: number, j: number): void {
  [list[i], list[j]] = [at(list, j), at(list, i)];
}
