import { describe, expect, it } from "vitest";
import { evaluate } from "#app/lib/gates/evaluate";
import { stepsToRedoFirst } from "#app/lib/gates/steps";
import { boardView } from "#app/lib/views/board";
import { nextItem } from "#app/lib/views/board-acts";
import { gateView } from "#app/lib/views/gate";
import type { Reader } from "#app/lib/views/gate-item";
import { TICK } from "./support/parts";
import { makeBoard } from "./support/snapshots";

const builder: Reader = { id: "bo", roles: ["builder"], units: "si" };

/** Outdoors, then the purge which rests on it, then the end of "outdoors". */
function purged() {
  const board = makeBoard({
    FP: {
      items: {
        FP1: { words: "Outdoors, gear off.", step: { endedBy: "FP3" } },
        FP2: { words: "Purge the line.", systems: ["fueleng"], follows: ["FP1"] },
        FP3: { words: "Gear back on." },
      },
    },
  });
  board.proof("FP1");
  board.wait();
  board.proof("FP2");
  return board;
}
const view = (board: ReturnType<typeof purged>) => {
  const found = gateView(evaluate(board.s, board.now), "FP", builder);
  if (!found) throw new Error("no gate");
  return found;
};
const faults = (board: ReturnType<typeof purged>) =>
  stepsToRedoFirst(evaluate(board.s, board.now), "FP2").map(({ step, fault }) => [step.key, fault.kind]);

describe("a step that would not hold for work done now", () => {
  it("is named as soon as it is older than the window, and not before", () => {
    const board = purged();
    board.now = (board.current("FP1")?.counts ?? 0) + board.s.settings.stepWindow - 1;
    expect(faults(board)).toEqual([]);
    board.now += 1;
    expect(faults(board)).toEqual([["FP1", "too-old"]]);
  });

  it("is named when it is over, failed, taken back, or changed since", () => {
    const over = purged();
    over.wait().proof("FP3");
    over.wait();
    expect(faults(over)).toEqual([["FP1", "over"]]);
    const failed = purged();
    failed.wait().proof("FP1", { state: "failed" });
    expect(faults(failed)).toEqual([["FP1", "not-holding"]]);
    const back = purged();
    const step = back.current("FP1");
    if (step) back.withdraw(step);
    expect(faults(back)).toEqual([["FP1", "not-done"]]);
    const changed = purged();
    changed.find("FP1").revision = 2;
    expect(faults(changed)).toEqual([["FP1", "not-holding"]]);
  });

  it("is what a proof given then lapses by", () => {
    const board = purged();
    board.now += board.s.settings.stepWindow;
    expect(faults(board)).toEqual([["FP1", "too-old"]]);
    board.proof("FP2");
    expect(evaluate(board.s, board.now).result.items.FP2?.blockers.map((b) => b.code)).toEqual(["step-too-old"]);
  });

  it("comes first on the page and on the board, before the item that an opening made lapse", () => {
    const board = purged();
    board.now += board.s.settings.stepWindow + TICK;
    const opening = board.open(["fueleng"]);
    board.wait();
    // A system that is open comes before everything.
    expect(boardView(evaluate(board.s, board.now), builder).acts[0]?.label).toBe("Close: fuel, forward of the firewall");
    expect(view(board).items.map((i) => i.wanted)).toEqual([null, null, null]);
    opening.closed = board.now;
    board.wait();
    const page = view(board);
    const [step, purge] = page.items;
    expect(purge).toMatchObject({ nut: "lapsed", open: false });
    expect(purge?.first).toEqual([
      {
        act: "Do again first: FP1",
        href: "#item-FP1",
        sentence: "Do FP1 first: it was done more than 12 h ago, and a proof of this given now would lapse at once.",
      },
    ]);
    expect(step).toMatchObject({
      open: true,
      wanted: { sentence: "Do this again first: it was done more than 12 h ago, and FP2 rests on it." },
    });
    expect(page.foot.act).toMatchObject({ label: "Do again first: FP1", note: "FP2 rests on it", href: "#item-FP1" });
    expect(nextItem(evaluate(board.s, board.now), "FP")?.key).toBe("FP1");

    board.proof("FP1");
    board.wait();
    expect(view(board).items.map((i) => [i.key, i.open, i.first.length, i.wanted])).toEqual([
      ["FP1", false, 0, null],
      ["FP2", true, 0, null],
      ["FP3", true, 0, null],
    ]);
    expect(view(board).foot.act).toMatchObject({ label: "Do again: FP2", href: "#item-FP2" });
    board.proof("FP2");
    expect(evaluate(board.s, board.now).result.items.FP2?.state).toBe("done");
  });

  it("is not asked for where its item stands, or where nobody has begun", () => {
    const board = purged();
    board.now += board.s.settings.stepWindow + TICK;
    expect(view(board).items.map((i) => [i.key, i.first.length, i.wanted])).toEqual([
      ["FP1", 0, null],
      ["FP2", 0, null],
      ["FP3", 0, null],
    ]);
    const fresh = makeBoard({ FP: { items: { FP1: { step: { endedBy: null } }, FP2: { follows: ["FP1"] } } } });
    expect(view(fresh).items.map((i) => [i.key, i.open, i.wanted])).toEqual([
      ["FP1", true, null],
      ["FP2", false, null],
    ]);
    expect(view(fresh).foot.act?.label).toBe("Next: FP1");
  });

  it("is quoted once, without its full stop", () => {
    const board = purged();
    board.now += board.s.settings.stepWindow;
    board.proof("FP2");
    expect(evaluate(board.s, board.now).result.items.FP2?.blockers[0]?.sentence).toBe(
      "It rests on “Outdoors, gear off”, done more than 12 h before. Do that first, then this again.",
    );
  });
});
