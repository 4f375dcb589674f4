import { afterEach, describe, expect, it } from "vitest";
import { setClock } from "#app/lib/clock";
import { type Workshop, workshop } from "../support/workshop";

let w: Workshop;
afterEach(() => {
  setClock(w.clock.before);
});

describe("from nothing to the first start", () => {
  it("works every gate", async () => {
    w = await workshop();
    await w.readyForRun();
    const e = await w.board();
    console.log(
      e.result.gates &&
        Object.values(e.result.gates)
          .map((g) => [e.snapshot.gates.find((x) => x.id === g.id)?.key, g.state, g.blockers[0]?.sentence].join(" "))
          .join("\n"),
    );
    console.log(e.result.next?.blockers.map((b) => `${b.title}: ${b.sentence}`).join("\n"));
    expect(1).toBe(1);
  }, 60_000);
});
