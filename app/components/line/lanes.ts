/**
 * Which lane each gate lies on: chains in some order take the first lane that is free over their columns, and the
 * order that climbs and crosses least is looked for.
 */
import type { Chains } from "#app/components/line/chains";
import type { Columns } from "#app/components/line/columns";
import { at, type GateGraph } from "#app/components/line/graph";
import { findHeaders } from "#app/components/line/headers";

export interface Lanes {
  /** Lane of each gate, 0 at the top. */
  of: number[];
  count: number;
  /** Cost of the order that was taken. */
  cost: number;
}

const COST = { lane: 24, climb: 10, cross: 42, crossEnding: 16, fromTemplateOrder: 0.15 };
const SWEEPS = 6;

/**
 * Starts: template order, its reverse, six barycentre sweeps from each; each is polished by single moves until nothing
 * falls; least cost wins. Many chains: fewer starts, shorter moves.
 */
export function placeLanes(graph: GateGraph, columns: Columns, chains: Chains): Lanes {
  const place = (order: number[]) => assign(order, graph, columns, chains);
  const judge = (order: number[]) => {
    const { of, count } = place(order);
    let cost = count * COST.lane;
    for (const header of findHeaders(graph, columns, of)) {
      cost += (header.bottom - header.top) * COST.climb;
      for (let w = 0; w < graph.count; w++) {
        const lane = at(of, w);
        if (lane <= header.top || lane >= header.bottom || header.from.includes(w)) continue;
        const far = columns.far(w);
        if (at(columns.of, w) >= header.gap || far < header.gap) continue;
        const heir = chains.heir[w];
        if (far === header.gap && heir !== undefined && header.to.includes(heir)) continue;
        cost += far > header.gap ? COST.cross : COST.crossEnding;
      }
    }
    order.forEach((chain, i) => {
      cost += Math.abs(chain - i) * COST.fromTemplateOrder;
    });
    return cost;
  };

  const n = chains.list.length;
  const reach = n > 12 ? 3 : n;
  let starts = startingOrders(graph, chains);
  if (n > 8)
    starts = starts
      .map((order) => ({ order, cost: judge(order) }))
      .sort((a, b) => a.cost - b.cost)
      .slice(0, n > 12 ? 3 : 6)
      .map((start) => start.order);

  let best = at(starts, 0);
  let least = Number.POSITIVE_INFINITY;
  for (const start of starts) {
    const { order, cost } = polish(start, reach, judge);
    if (cost < least - 1e-9) {
      least = cost;
      best = order;
    }
  }
  return { ...place(best), cost: least };
}

function assign(order: number[], graph: GateGraph, columns: Columns, chains: Chains): { of: number[]; count: number } {
  const of = new Array<number>(graph.count).fill(0);
  const busy: [number, number][][] = [];
  for (const i of order) {
    const chain = at(chains.list, i);
    const from = at(columns.of, at(chain, 0));
    const to = columns.far(at(chain, chain.length - 1)) - 1;
    let lane = 0;
    while (busy[lane]?.some(([a, b]) => from <= b && a <= to)) lane++;
    busy[lane] = [...(busy[lane] ?? []), [from, to]];
    for (const gate of chain) of[gate] = lane;
  }
  if (chains.rootApart) {
    const fed = at(graph.fed, chains.root)
      .map((v) => at(of, v))
      .sort((a, b) => a - b);
    of[chains.root] = at(fed, (fed.length - 1) >> 1);
  }
  return { of, count: busy.length };
}

function startingOrders(graph: GateGraph, chains: Chains): number[][] {
  const near = chains.list.map((chain, i) => {
    const gates = new Set(chain.flatMap((u) => [...at(graph.feeds, u), ...at(graph.fed, u)]));
    return [...gates].map((g) => chains.of[g]).filter((c): c is number => c !== undefined && c !== i);
  });
  // 60 % mean of the neighbours' places, 40 % its own
  const sweep = (order: number[]) => {
    const place: number[] = [];
    order.forEach((chain, i) => {
      place[chain] = i;
    });
    return order
      .map((chain) => {
        const around = at(near, chain);
        const own = at(place, chain);
        const pull = around.length ? (around.reduce((sum, c) => sum + at(place, c), 0) / around.length) * 0.6 + own * 0.4 : own;
        return { chain, pull };
      })
      .sort((a, b) => a.pull - b.pull || a.chain - b.chain)
      .map((entry) => entry.chain);
  };
  const template = chains.list.map((_, i) => i);
  const reversed = [...template].reverse();
  const starts = [template, reversed];
  for (let from of [template, reversed])
    for (let i = 0; i < SWEEPS; i++) {
      from = sweep(from);
      starts.push(from);
    }
  return starts;
}

/** Single moves, at most `reach` places, until none of them makes the order cheaper. */
function polish(start: number[], reach: number, judge: (order: number[]) => number): { order: number[]; cost: number } {
  let order = start;
  let cost = judge(order);
  for (let better = true; better; ) {
    better = false;
    for (let i = 0; i < order.length; i++)
      for (let j = Math.max(0, i - reach); j < Math.min(order.length, i + reach + 1); j++) {
        if (i === j) continue;
        const moved = [...order];
        moved.splice(j, 0, ...moved.splice(i, 1));
        const c = judge(moved);
        if (c < cost - 1e-9) {
          order = moved;
          cost = c;
          better = true;
        }
      }
  }
  return { order, cost };
}
