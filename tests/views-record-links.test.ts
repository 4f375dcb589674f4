import { describe, expect, it } from "vitest";
import { type Evaluation, evaluate } from "#app/lib/gates/evaluate";
import { againOf } from "#app/lib/views/gate-again";
import { cameFrom, recordLinks } from "#app/lib/views/record-links";
import { runFindings } from "#app/lib/views/run-findings";
import { type Board, makeBoard, signAll } from "./support/snapshots";

const judged = (board: Board) => evaluate(board.s, board.now);
const gates = () =>
  makeBoard({
    MF: { name: "Mount", items: { m1: { systems: ["mount"] }, m2: { systems: ["mount", "bay"] } } },
    OP: {
      name: "Oil prime",
      needs: ["MF"],
      items: {
        o1: { systems: ["ign", "oil"], offersLooseEnd: { what: "Coils made safe", system: "ign", dueGate: "DY" } },
        o2: { systems: ["oil"], offersLooseEnd: { what: "Pitch held", system: "prop", dueRung: "1" } },
      },
    },
    DY: { name: "Day check", requiredBy: { kind: "runs" }, needs: ["OP"], items: { d1: { systems: ["site"] } } },
  });
const read = (e: Evaluation, href: string) => cameFrom(e, new URL(href, "http://here").searchParams);

describe("links to where bad news is written down", () => {
  it("carry the systems of the gate or of the item, and the way back", () => {
    const e = judged(gates());
    const gate = recordLinks(e, { kind: "gate", id: "OP" });
    expect(gate.opening.href).toMatch(/\/openings\?systems=oil,ign&from=gate:OP$/);
    expect(read(e, gate.opening.href)).toMatchObject({ systems: ["oil", "ign"], back: { label: "Oil prime" }, where: "at gate Oil prime" });
    const item = recordLinks(e, { kind: "item", id: "m2" });
    expect(read(e, item.opening.href)).toMatchObject({ systems: ["mount", "bay"], back: { label: "Mount, m2" } });
    expect(item.opening.href).not.toContain("#");
    expect(read(e, item.finding.href)).toMatchObject({ systems: ["mount"], where: "at item m2 of Mount" });
    expect(recordLinks(e, { kind: "board", id: null }).opening.href).toMatch(/\/openings\?from=board$/);
  });

  it("lead an item's offer into the form: what, system, due before which gate or run", () => {
    const e = judged(gates());
    const coils = recordLinks(e, { kind: "item", id: "o1" }).looseEnd;
    expect(coils.label).toBe("Loose end: coils made safe");
    expect(read(e, coils.href)).toMatchObject({ systems: ["ign"], asks: { item: "o1", what: "Coils made safe", due: "gate:DY" } });
    expect(read(e, recordLinks(e, { kind: "item", id: "o2" }).looseEnd.href).asks?.due).toBe("rung:1");
    expect(read(e, recordLinks(e, { kind: "item", id: "d1" }).looseEnd.href).asks).toBeNull();
  });

  it("take nothing from an address that this install does not have", () => {
    const e = judged(gates());
    expect(read(e, "/openings?systems=oil,coolant,nonsense&from=gate:nope&asks=m1")).toEqual({
      systems: ["oil"],
      value: "",
      back: null,
      where: null,
      asks: null,
    });
    expect(read(e, "/openings?from=https://elsewhere.example").back).toBeNull();
  });
});

describe("a gate that lapsed", () => {
  it("says what to do again and why, and signing it again brings back what only waited", () => {
    const board = signAll(gates()).wait();
    expect(againOf(judged(board), "MF")).toBeNull();
    board.open(["mount"], { closed: board.now, reason: "bolt out" });
    const e = judged(board);
    const again = againOf(e, "MF");
    expect(again?.causes).toMatchObject([{ sentence: expect.stringMatching(/bolt out/), items: [{ key: "m1" }, { key: "m2" }] }]);
    expect(again?.back).toEqual(["Oil prime", "Day check"]);
    expect(againOf(e, "OP")).toBeNull();
    board.wait();
    for (const id of ["m1", "m2"]) board.proof(id);
    board.signGate("MF");
    const after = judged(board);
    expect(["MF", "OP", "DY"].map((id) => after.result.gates[id]?.stands)).toEqual([true, true, true]);
  });

  it("names no gate that has something of its own to do", () => {
    const board = signAll(gates()).wait();
    board.open(["mount", "oil"], { closed: board.now });
    expect(againOf(judged(board), "MF")?.back).toEqual([]);
    expect(againOf(judged(board), "OP")?.back).toEqual(["Day check"]);
  });
});

describe("the findings of a run", () => {
  it("are those that stop it or cap it below its plan, the hardest first", () => {
    const board = signAll(gates()).wait();
    const run = board.run("1");
    const plan = board.plan(run).rpm;
    board.finding("watch");
    board.finding("limiting", { cap: plan + 1 });
    const low = board.finding("limiting", { cap: plan / 2 });
    const ground = board.finding("grounding");
    board.finding("grounding", { closed: board.record("close", { by: "di", as: "inspector" }) });
    const view = runFindings(judged(board), run.id);
    expect(view.list.map((f) => f.id)).toEqual([ground.id, low.id]);
    expect(view.list.map((f) => f.tag)).toEqual(["F-4", "F-3"]);
    expect(view.list[0]?.does).toBe("stops every run");
    expect(view.list[1]?.does).toMatch(/^caps it at [\d,]+ rpm$/);
    expect(view.raise.href).toMatch(new RegExp(`/findings\\?from=run:${run.id}#new$`));
  });
});
