import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { findFlow } from "#app/components/line/flow";
import type { GateEdges } from "#app/components/line/graph";
import { type LineLayout, layoutLine } from "#app/components/line/layout";
import { drawLying } from "#app/components/line/lying";
import { clip, textWidth, wrap } from "#app/components/line/measure";
import { runLadder } from "#app/components/line/runLadder";
import { drawStanding } from "#app/components/line/standing";
import type { LineGate } from "#app/components/line/types";
import type { ValveState } from "#app/components/ui/states";
import { fewGates, firstWeek, heldBeforeRun3, manyGates, oneGate, twoThings } from "./support/sample-line";

const STATES: ValveState[] = ["waiting", "in-work", "ready", "half-signed", "signed", "lapsed"];

/** DAGs of 1 to 22 gates: each gate may need or follow any earlier one. */
const dags = fc
  .integer({ min: 1, max: 22 })
  .chain((n) =>
    fc.tuple(
      ...Array.from({ length: n }, (_, i) =>
        fc.uniqueArray(fc.integer({ min: 0, max: Math.max(0, i - 1) }), { maxLength: Math.min(i, 4) }),
      ),
    ),
  )
  .map((needs) =>
    needs.map(
      (list, i): GateEdges => ({
        id: `g${i}`,
        key: `K${i}`,
        needs: list.filter((_, k) => k % 2 === 0).map((j) => `g${j}`),
        after: list.filter((_, k) => k % 2).map((j) => `K${j}`),
      }),
    ),
  );

const gateOf = (edges: GateEdges, state: ValveState): LineGate => ({
  ...edges,
  name: `Gate ${edges.id}`,
  short: edges.id,
  href: `/${edges.id}`,
  state,
  note: state,
  part: 0.5,
  balloon: state === "lapsed" ? 1 : null,
  full: state,
});

const place = (layout: LineLayout) => Object.fromEntries(layout.ids.map((id, i) => [id, [layout.column[i], layout.lane[i]]]));

describe("the template's board", () => {
  const layout = layoutLine(twoThings.gates);
  const names = (list: number[]) => list.map((i) => layout.ids[i]).join(" ");

  it("stands in the columns and lanes of the design's drawing", () => {
    expect(layout.columns).toBe(5);
    expect(layout.lanes).toBe(8);
    expect(place(layout)).toEqual({
      MF: [0, 2],
      EC: [1, 6],
      EL: [1, 4],
      IG: [2, 4],
      IN: [2, 5],
      IX: [1, 0],
      FS: [1, 3],
      OC: [1, 2],
      PR: [1, 1],
      FP: [2, 3],
      OP: [3, 2],
      DY: [4, 3],
      TD: [3, 1],
      FI: [2, 7],
      CR: [3, 6],
    });
    expect(layout.cost).toBeCloseTo(428.7, 6);
    expect(names(layout.ends)).toBe("IN IX DY TD CR");
  });

  it("has the design's headers, in their order", () => {
    expect(
      layout.headers.map(
        (h) => `${h.gap}/${h.track} ${h.merge ? "merge" : "split"} ${names(h.from)} > ${names(h.to)}, lanes ${h.top} to ${h.bottom}`,
      ),
    ).toEqual([
      "1/0 split MF > EC EL IX FS OC PR, lanes 0 to 6",
      "2/1 split EL > IG IN, lanes 4 to 5",
      "2/0 merge EL FS > FP, lanes 3 to 4",
      "3/0 merge IG OC PR > OP, lanes 1 to 4",
      "3/1 merge EC IG FI > CR, lanes 4 to 7",
      "4/0 merge FP OP > DY, lanes 2 to 3",
    ]);
  });

  it("does not move when states change", () => {
    for (const draw of [drawLying, drawStanding]) {
      const drawings = [twoThings, firstWeek, { ...heldBeforeRun3, walkRound: twoThings.walkRound, runs: twoThings.runs }].map(draw);
      const still = drawings.map((d) => ({
        width: d.width,
        height: d.height,
        gates: d.gates.map((g) => [g.x, g.y, g.name]),
        pipes: d.pipework.pipes,
      }));
      expect(still[1]).toEqual(still[0]);
      expect(still[2]).toEqual(still[0]);
    }
  });
});

describe("any board", () => {
  it("sends flow from left to right, one gate a place, lanes straight", () => {
    fc.assert(
      fc.property(dags, (gates) => {
        const layout = layoutLine(gates);
        const places = layout.ids.map((_, i) => `${layout.column[i]}/${layout.lane[i]}`);
        expect(new Set(places).size).toBe(gates.length);
        layout.feeds.forEach((feeds, v) => {
          for (const u of feeds) expect(layout.column[u]).toBeLessThan(layout.column[v] ?? -1);
        });
        layout.heir.forEach((heir, u) => {
          if (heir !== undefined) expect(layout.lane[heir]).toBe(layout.lane[u]);
        });
        expect(layout.ends.length).toBeGreaterThan(0);
      }),
      { numRuns: 60 },
    );
  });

  it("never joins two headers that mean different things", () => {
    fc.assert(
      fc.property(dags, (gates) => {
        const { headers } = layoutLine(gates);
        const tracks = headers.map((h) => `${h.gap}/${h.track}`);
        expect(new Set(tracks).size).toBe(headers.length);
        for (const header of headers) expect(header.merge ? header.to.length : header.from.length).toBe(1);
      }),
      { numRuns: 60 },
    );
  });

  it("keeps each need: what the pipes say is what the gates ask for, no more and no less", () => {
    fc.assert(
      fc.property(dags, (gates) => {
        const layout = layoutLine(gates);
        const reach = (feeds: number[][]) => {
          const up = feeds.map(() => new Set<number>());
          feeds.forEach((list, v) => {
            for (const u of list) {
              up[v]?.add(u);
              for (const w of up[u] ?? []) up[v]?.add(w);
            }
          });
          return up.map((set) => [...set].sort((a, b) => a - b));
        };
        const asked = gates.map((gate) => [...gate.needs, ...gate.after].map((name) => Number(name.slice(1))));
        expect(reach(layout.feeds)).toEqual(reach(asked));
      }),
      { numRuns: 60 },
    );
  });

  it("gives the same answer each time", () => {
    fc.assert(
      fc.property(dags, (gates) => {
        expect(layoutLine(structuredClone(gates))).toEqual(layoutLine(gates));
      }),
      { numRuns: 20 },
    );
  });

  it("fills a pipe only where everything upstream is signed, and geometry ignores states", () => {
    fc.assert(
      fc.property(dags, fc.array(fc.constantFrom(...STATES), { minLength: 22, maxLength: 22 }), (edges, states) => {
        const gates = edges.map((e, i) => gateOf(e, states[i] ?? "waiting"));
        const layout = layoutLine(gates);
        const flow = findFlow(layout, gates);
        layout.feeds.forEach((feeds, i) => {
          expect(flow.passes[i]).toBe(gates[i]?.state === "signed" && feeds.every((f) => flow.passes[f]));
        });
        const allSigned = edges.map((e) => gateOf(e, "signed"));
        const rest = { walkRound: null, runs: [], release: twoThings.release };
        expect(drawLying({ gates, ...rest }).pipework.pipes).toBe(drawLying({ gates: allSigned, ...rest }).pipework.pipes);
        expect(drawStanding({ gates, ...rest }).gates.map((g) => g.y)).toEqual(
          drawStanding({ gates: allSigned, ...rest }).gates.map((g) => g.y),
        );
      }),
      { numRuns: 25 },
    );
  });
});

describe("unusual boards", () => {
  it.each([
    ["one gate", oneGate],
    ["gates that vanished", fewGates],
    ["no runs yet", { ...twoThings, runs: [] }],
    ["no walk-round", { ...twoThings, walkRound: null }],
    ["sixty gates", manyGates(60)],
  ])("draws %s with every coordinate a number", (_, line) => {
    for (const draw of [drawLying, drawStanding]) {
      const drawn = draw(line);
      expect(drawn.gates).toHaveLength(line.gates.length);
      expect(JSON.stringify(drawn)).not.toMatch(/NaN|null,null|Infinity/);
      expect(drawn.pipework.pipes).not.toMatch(/NaN|undefined|Infinity/);
      for (const gate of drawn.gates) expect(gate.y).toBeLessThan(drawn.height);
    }
  });

  it("leaves out edges to gates that are not there, to itself, and those that close a ring", () => {
    const gates: GateEdges[] = [
      { id: "a", key: "A", needs: ["gone", "a", "c"], after: [] },
      { id: "b", key: "B", needs: ["A"], after: [] },
      { id: "c", key: "C", needs: ["b"], after: [] },
    ];
    const layout = layoutLine(gates);
    expect(layout.ids).toHaveLength(3);
    expect(layout.feeds.flat()).toHaveLength(2);
  });

  it("widens instead of letting names collide", () => {
    expect(drawLying(manyGates(60)).width).toBeGreaterThan(1180);
    expect(drawLying(twoThings).width).toBeCloseTo(1180, 6);
  });
});

describe("flow on the run pipe", () => {
  const order = (items: ReturnType<typeof runLadder>) =>
    items.map((i) => `${i.kind === "run" ? i.run.key : i.kind}${i.fed ? "*" : ""}`).join(" ");

  it("stands the walk-round just before the run that it is for, and stops at the run that is held", () => {
    const { walkRound, runs, release } = heldBeforeRun3;
    expect(order(runLadder(walkRound, runs, release, true))).toBe(
      "1* post-run* 2* post-run* walk-round* 3* post-run 4 post-run 5 post-run service 6 post-run release",
    );
  });

  it("reaches nothing while a gate is shut", () => {
    const { walkRound, runs, release } = twoThings;
    expect(runLadder(walkRound, runs, release, false).some((item) => item.fed)).toBe(false);
  });

  it("passes a scrubbed run, not an unreviewed one", () => {
    const [first, second] = twoThings.runs;
    if (!first || !second) throw new Error("the sample has runs");
    const scrubbed = runLadder(null, [{ ...first, state: "scrubbed", postRun: null }, second], twoThings.release, true);
    expect(order(scrubbed)).toBe("1* 2* post-run release");
    const ended = runLadder(null, [{ ...first, state: "ended", postRun: null }, second], twoThings.release, true);
    expect(order(ended)).toBe("1* 2 post-run release");
  });
});

describe("measuring text", () => {
  it("adds up the widths of the font", () => {
    expect(textWidth("Fuel flow and prime", 16.5)).toBeCloseTo(156.42, 2);
  });

  it("wraps at spaces and clips with an ellipsis", () => {
    expect(wrap("Fuel, oil, battery of the day", 16.5, 150)).toEqual(["Fuel, oil, battery of", "the day"]);
    expect(clip("lapsed 3 Dec", 15, 200)).toBe("lapsed 3 Dec");
    const short = clip("10 of 11 done, not sent", 15, 100);
    expect(short.endsWith("…")).toBe(true);
    expect(textWidth(short, 15)).toBeLessThanOrEqual(100);
  });
});
