/**
 * The gates' DAG, reduced to the pipes that must be drawn. Gates are numbers in template order; one more number,
 * `sink`, stands for the collector before the run pipe, which everything flows into.
 */
export interface GateEdges {
  id: string;
  key: string;
  needs: string[];
  after: string[];
}

export interface GateGraph {
  count: number;
  sink: number;
  /** Gates that feed each gate (and the sink), template order. */
  feeds: number[][];
  /** What each gate feeds; the sink has the highest number, so it comes last. */
  fed: number[][];
}

/**
 * Union of `needs` and `after`, then transitive reduction: a pipe only where no longer way says the same.
 * Edges to gates that are not there, to itself, or that would close a ring are left out of the drawing.
 */
export function reduceGates(gates: GateEdges[]): GateGraph {
  const number = new Map<string, number>();
  for (const [i, gate] of gates.entries()) number.set(gate.key, i);
  // an id wins over another gate's key
  for (const [i, gate] of gates.entries()) number.set(gate.id, i);
  const direct = gates.map((gate, i) => {
    const found = [...gate.needs, ...gate.after].map((name) => number.get(name)).filter((p): p is number => p !== undefined && p !== i);
    return [...new Set(found)].sort((a, b) => a - b);
  });
  const above = ancestors(direct);
  const feeds = direct.map((all) => all.filter((p) => !all.some((q) => q !== p && at(above, q).has(p))));
  const sink = gates.length;
  const isFed = new Set(feeds.flat());
  feeds.push(gates.map((_, i) => i).filter((i) => !isFed.has(i)));
  const fed: number[][] = feeds.map(() => []);
  feeds.forEach((list, v) => {
    for (const u of list) at(fed, u).push(v);
  });
  return { count: sink, sink, feeds, fed };
}

/** All gates upstream of each; takes edges that would close a ring out of `direct` on the way. */
function ancestors(direct: number[][]): Set<number>[] {
  const done: (Set<number> | undefined)[] = direct.map(() => undefined);
  const open = new Set<number>();
  const visit = (v: number): Set<number> => {
    const known = done[v];
    if (known) return known;
    open.add(v);
    direct[v] = at(direct, v).filter((p) => !open.has(p));
    const all = new Set<number>();
    for (const p of at(direct, v)) {
      all.add(p);
      for (const q of visit(p)) all.add(q);
    }
    open.delete(v);
    done[v] = all;
    return all;
  };
  return direct.map((_, v) => visit(v));
}

/** Element that is known to be there: indices come from the same list. */
export function at<T>(list: readonly T[], i: number): T {
  const found = list[i];
  if (found === undefined) throw new RangeError(`no element ${i} of ${list.length}`);
  return found;
}
