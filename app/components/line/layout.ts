/**
 * From a DAG of gates to columns, lanes and headers. Pure, deterministic, no DOM: the same answer on server, tablet and
 * dossier, for the lying and the standing Line. States are not an input, so a change of state never moves the drawing.
 */
import { buildChains } from "#app/components/line/chains";
import { placeColumns } from "#app/components/line/columns";
import { at, type GateEdges, reduceGates } from "#app/components/line/graph";
import { findHeaders, type Header, orderTracks } from "#app/components/line/headers";
import { placeLanes } from "#app/components/line/lanes";

export interface LineLayout {
  /** Gate ids; every other list is in this order. */
  ids: string[];
  /** Gates that feed each gate, by number. */
  feeds: number[][];
  /** Gates that nothing else needs: they end in the collector. */
  ends: number[];
  column: number[];
  columns: number;
  lane: number[];
  lanes: number;
  /** The gate that carries a gate's lane on. */
  heir: (number | undefined)[];
  headers: Header[];
  /** Headers in the gap before each column. */
  tracks: number[];
  /** The source of the Line. */
  root: number;
  cost: number;
}

/** Lays out 1 to about 60 gates (a quarter of a second there; 20 ms for the template). Throws on an empty list. */
export function layoutLine(gates: GateEdges[]): LineLayout {
  const graph = reduceGates(gates);
  const columns = placeColumns(graph);
  const chains = buildChains(graph, columns);
  const lanes = placeLanes(graph, columns, chains);
  const headers = findHeaders(graph, columns, lanes.of);
  orderTracks(graph, columns, lanes.of, chains.heir, headers);
  return {
    ids: gates.map((gate) => gate.id),
    feeds: graph.feeds.slice(0, graph.count),
    ends: at(graph.feeds, graph.sink),
    column: columns.of.slice(0, graph.count),
    columns: columns.count,
    lane: lanes.of,
    lanes: lanes.count,
    heir: chains.heir,
    headers,
    tracks: Array.from({ length: columns.count + 1 }, (_, gap) => headers.filter((h) => h.gap === gap).length),
    root: chains.root,
    cost: lanes.cost,
  };
}

const KEPT = 50;
const kept = new Map<string, LineLayout>();

/** The same, remembered for the boards drawn last: geometry hangs on the edges alone. */
export function lineLayout(gates: GateEdges[]): LineLayout {
  const edges = JSON.stringify(gates.map(({ id, key, needs, after }) => [id, key, needs, after]));
  const known = kept.get(edges);
  if (known) return known;
  const made = layoutLine(gates);
  const [oldest] = kept.keys();
  if (kept.size >= KEPT && oldest !== undefined) kept.delete(oldest);
  kept.set(edges, made);
  return made;
}
