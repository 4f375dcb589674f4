import fc from "fast-check";
import { DirectedGraph } from "graphology";
import { describe, expect, test, vi } from "vitest";
import { evaluateBoard, withOpening } from "#app/lib/gates/evaluate";
import type { Blocker, BoardResult, RunResult } from "#app/lib/gates/result";
import type { Instant, Snapshot } from "#app/lib/gates/snapshot";
import { arbScene, makeScene, SOME_SYSTEMS } from "./support/arb-snapshot";
import { diceFrom } from "./support/dice";
import { BAD_NEWS } from "./support/disturbances";
import { essenceOf, naive } from "./support/naive-evaluator";
import { prerequisitesOf } from "./support/naive-items";
import { HOUR, TICK } from "./support/parts";
import { runsOf } from "./support/property-runs";

vi.setConfig({ testTimeout: 60_000 });

const YEARS = 50 * 365 * 24 * HOUR;
/** The cheap ones: one or two evaluations a board. */
const MANY = runsOf(10_000);
const SOME = runsOf(1_000);

interface Standing {
  stands: boolean;
  until: Instant | null;
}

/** Everything that can stand, by name. A run stands while it is clear. */
function standings(board: BoardResult): Map<string, Standing> {
  const found = new Map<string, Standing>();
  for (const item of Object.values(board.items)) found.set(`item ${item.id}`, item);
  for (const gate of Object.values(board.gates)) if (gate.present) found.set(`gate ${gate.id}`, gate);
  for (const run of board.runs) if (run.id) found.set(`run ${run.id}`, { stands: run.clear, until: run.until });
  found.set("release", board.release);
  return found;
}

const runsById = (board: BoardResult): Map<string, RunResult> => new Map(board.runs.flatMap((r) => (r.id ? [[r.id, r] as const] : [])));

/** What stands, holds longer or clears more than before, in words; empty where nothing has become better. */
function better(before: BoardResult, after: BoardResult): string[] {
  const found: string[] = [];
  const was = standings(before);
  for (const [name, now] of standings(after)) {
    const then = was.get(name);
    if (!now.stands || !then) continue;
    if (!then.stands) found.push(`${name} newly stands`);
    else if ((now.until ?? Number.POSITIVE_INFINITY) > (then.until ?? Number.POSITIVE_INFINITY)) found.push(`${name} stands longer`);
  }
  for (const [id, run] of runsById(after)) {
    if (run.clearance.rpm > (runsById(before).get(id)?.clearance.rpm ?? Number.POSITIVE_INFINITY))
      found.push(`run ${id} is cleared higher`);
  }
  return found;
}

function allBlockers(board: BoardResult): Blocker[] {
  const runs = [...board.runs, ...(board.next ? [board.next] : [])];
  return [
    ...Object.values(board.items).flatMap((i) => i.blockers),
    ...Object.values(board.gates).flatMap((g) => g.blockers),
    ...runs.flatMap((r) => [...r.blockers, ...r.startBlockers, ...r.reviewBlockers]),
    ...board.release.blockers,
  ];
}

function freeze<T>(value: T): T {
  if (typeof value === "object" && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(freeze);
  }
  return value;
}

describe("bad news and time", () => {
  test.each(Object.keys(BAD_NEWS) as (keyof typeof BAD_NEWS)[])("%s never makes anything stand, hold longer or clear more", (news) => {
    const scene = fc.gen().map((g) => {
      const dice = diceFrom(g);
      const { board, snapshot, at } = makeScene(dice);
      const before = structuredClone(snapshot);
      if (dice.chance(50)) board.now = at;
      BAD_NEWS[news](dice, board);
      return { before, after: snapshot, at };
    });
    fc.assert(
      fc.property(scene, ({ before, after, at }) => {
        expect(better(evaluateBoard(before, at), evaluateBoard(after, at))).toEqual([]);
      }),
      runsOf(1_250),
    );
  });

  test("time alone never makes anything stand, hold longer or clear more", () => {
    fc.assert(
      fc.property(arbScene(), fc.integer({ min: 1, max: 200 }), ({ snapshot, at }, ticks) => {
        expect(better(evaluateBoard(snapshot, at), evaluateBoard(snapshot, at + ticks * TICK))).toEqual([]);
      }),
      MANY,
    );
  });

  test("what stands does so until its `until`, not longer, and for ever where there is none", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        const now = [...standings(evaluateBoard(snapshot, at))].filter(([, x]) => x.stands);
        const cache = new Map<Instant, Map<string, Standing>>();
        const standsAt = (name: string, instant: Instant) => {
          const board = cache.get(instant) ?? standings(evaluateBoard(snapshot, instant));
          cache.set(instant, board);
          return board.get(name)?.stands;
        };
        for (const [name, { until }] of now) {
          if (until !== null) expect(until, name).toBeGreaterThan(at);
          expect(standsAt(name, until === null ? at + YEARS : until - 1), `${name} before ${until}`).toBe(true);
          if (until !== null) expect(standsAt(name, until), `${name} at ${until}`).toBe(false);
        }
      }),
      SOME,
    );
  });
});

describe("preview of an opening", () => {
  test("is what the board shows after it, and leaves the snapshot alone", () => {
    const scene = fc.gen().map((g) => {
      const dice = diceFrom(g);
      const { board, snapshot, at } = makeScene(dice);
      const before = structuredClone(snapshot);
      board.now = at;
      const opening = board.open(dice.some(SOME_SYSTEMS, 40));
      if (dice.chance(50)) opening.closed = at;
      return { before, opening, after: snapshot, at };
    });
    fc.assert(
      fc.property(scene, ({ before, opening, after, at }) => {
        expect(evaluateBoard(withOpening(freeze(before), opening), at)).toEqual(evaluateBoard(after, at));
      }),
      SOME,
    );
  });
});

describe("order and repetition", () => {
  /** The same records, each list in another order; definitions (gates, items, rungs) keep theirs, since it is shown. */
  function shuffled(snapshot: Snapshot, order: <T>(list: T[]) => T[]): Snapshot {
    const s = structuredClone(snapshot);
    return {
      ...s,
      proofs: order(s.proofs),
      confirmations: order(s.confirmations),
      acceptances: order(s.acceptances),
      keeps: order(s.keeps),
      signatures: order(s.signatures),
      openings: order(s.openings),
      looseEnds: order(s.looseEnds).map((l) => ({ ...l, accepted: order(l.accepted) })),
      findings: order(s.findings),
      releaseSignatures: order(s.releaseSignatures),
      tools: order(s.tools).map((t) => ({ ...t, checks: order(t.checks) })),
      extinguishers: order(s.extinguishers),
      members: order(s.members),
      values: order(s.values),
      runs: order(s.runs).map((r) => ({
        ...r,
        plans: order(r.plans),
        acks: order(r.acks),
        answers: order(r.answers),
        winds: order(r.winds),
        acts: order(r.acts),
      })),
    };
  }

  test("the order of records does not matter", () => {
    fc.assert(
      fc.property(arbScene(), fc.infiniteStream(fc.nat()), ({ snapshot, at }, stream) => {
        const order = <T>(list: T[]): T[] =>
          list
            .map((value) => ({ value, key: stream.next().value ?? 0 }))
            .sort((a, b) => a.key - b.key)
            .map(({ value }) => value);
        const byLabel = (board: BoardResult) => ({
          ...board,
          runs: [...board.runs].sort((a, b) => ((a.id ?? "") < (b.id ?? "") ? -1 : 1)),
        });
        expect(byLabel(evaluateBoard(shuffled(snapshot, order), at))).toEqual(byLabel(evaluateBoard(snapshot, at)));
      }),
      SOME,
    );
  });

  test("the same snapshot and instant give the same answer, and nothing in it is changed", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        expect(evaluateBoard(freeze(snapshot), at)).toEqual(evaluateBoard(structuredClone(snapshot), at));
      }),
      SOME,
    );
  });
});

describe("a gate that stands signed", () => {
  /** Needs and after of every gate, absent ones included: reachability passes through them. */
  function graphOf(snapshot: Snapshot): DirectedGraph {
    const graph = new DirectedGraph();
    for (const gate of snapshot.gates) graph.mergeNode(gate.id);
    for (const gate of snapshot.gates) {
      for (const id of [...gate.needs, ...gate.after, ...(gate.eachRun ? prerequisitesOf(snapshot, gate) : [])])
        graph.mergeEdge(gate.id, id);
    }
    return graph;
  }
  function reachable(graph: DirectedGraph, from: string): Set<string> {
    const found = new Set<string>();
    const queue = [from];
    for (let id = queue.pop(); id !== undefined; id = queue.pop()) {
      for (const next of graph.outNeighbors(id)) {
        if (!found.has(next)) queue.push(next);
        found.add(next);
      }
    }
    return found;
  }

  test("has every item and every prerequisite, near and far, standing", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        const board = evaluateBoard(snapshot, at);
        const graph = graphOf(snapshot);
        for (const gate of Object.values(board.gates).filter((g) => g.present && g.stands)) {
          const items = snapshot.items.filter((i) => i.gate === gate.id && !i.hidden);
          expect(items.filter((i) => !board.items[i.id]?.stands).map((i) => i.id)).toEqual([]);
          const before = [...reachable(graph, gate.id)].filter((id) => board.gates[id]?.present);
          expect(before.filter((id) => !board.gates[id]?.stands)).toEqual([]);
        }
      }),
      MANY,
    );
  });

  test("both evaluators agree on items, gates, rungs, runs and release", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        expect(essenceOf(evaluateBoard(snapshot, at))).toEqual(naive(snapshot, at));
      }),
      SOME,
    );
  });
});

describe("reasons", () => {
  test("whatever does not stand has a blocker; whatever stands has none", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        const board = evaluateBoard(snapshot, at);
        const rows: [string, boolean, Blocker[]][] = [
          ...Object.values(board.items).map((i): [string, boolean, Blocker[]] => [`item ${i.id}`, i.stands, i.blockers]),
          ...Object.values(board.gates)
            .filter((g) => g.present)
            .map((g): [string, boolean, Blocker[]] => [`gate ${g.id} ${g.state}`, g.stands, g.blockers]),
          ...board.runs.map((r): [string, boolean, Blocker[]] => [`run ${r.label} ${r.state}`, r.clear, r.blockers]),
          ["release", board.release.stands, board.release.blockers],
        ];
        expect(rows.filter(([, stands, blockers]) => stands !== (blockers.length === 0)).map(([name]) => name)).toEqual([]);
        for (const run of board.runs) {
          if (run.state === "ended") expect(run.reviewBlockers, run.label).not.toEqual([]);
          if (run.state === "reviewed") expect(run.reviewBlockers, run.label).toEqual([]);
        }
      }),
      MANY,
    );
  });

  test("every blocker speaks, leads somewhere and names who can clear it or what comes first", () => {
    fc.assert(
      fc.property(arbScene(), ({ snapshot, at }) => {
        const active = (id: string) =>
          snapshot.members.some((m) => m.id === id && m.roles.some((r) => r.from <= at && (r.to === null || at < r.to)));
        for (const blocker of allBlockers(evaluateBoard(snapshot, at))) {
          const { title, sentence, owner, link } = blocker;
          const dead = owner.members.length === 0 && !owner.next?.trim();
          const strangers = owner.members.filter((id) => !active(id));
          if (!title.trim() || !sentence.trim() || !link.page || dead || strangers.length > 0) expect(blocker).toBe("a way out");
        }
      }),
      MANY,
    );
  });
});
