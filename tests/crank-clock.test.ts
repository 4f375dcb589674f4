import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { DEFAULT_CRANK_RULE as RULE } from "#app/lib/bench/crank";
import { type CrankClock, type CrankEvent, crankFace, crankStep, NO_BURSTS } from "#app/lib/bench/crank-clock";
import { runsOf } from "./support/property-runs";

const at = (seconds: number) => 1_800_000_000_000 + seconds * 1000;
function play(events: [CrankEvent["kind"], number][]): CrankClock {
  let clock = NO_BURSTS;
  for (const [kind, seconds] of events) {
    const next = crankStep(RULE, clock, { kind, at: at(seconds) });
    if (!next.ok) throw new Error(`${kind} at ${seconds} s: ${next.sentence}`);
    clock = next.clock;
  }
  return clock;
}

describe("the crank clock", () => {
  it("counts a burst, rests for 20 s, and lets the next one begin when the rest is over", () => {
    const clock = play([
      ["on", 0],
      ["off", 10],
    ]);
    expect(clock.bursts).toEqual([{ at: at(0), seconds: 10, pressureAfter: null }]);
    expect(crankFace(RULE, clock, at(10))).toMatchObject({ tone: "rest", word: "REST", figure: 20, may: { on: false } });
    expect(crankFace(RULE, clock, at(29.2))).toMatchObject({ tone: "rest", figure: 1 });
    expect(crankFace(RULE, clock, at(30))).toMatchObject({ tone: "ready", may: { on: true } });
    expect(crankStep(RULE, clock, { kind: "on", at: at(29.9) })).toMatchObject({ ok: false, sentence: expect.stringContaining("rests") });
    expect(crankStep(RULE, clock, { kind: "on", at: at(30) }).ok).toBe(true);
  });

  it("says to switch off at 10 s, and counts what was cranked all the same, with as many rests", () => {
    const on = play([["on", 0]]);
    expect(crankFace(RULE, on, at(9.9))).toMatchObject({ tone: "crank", figure: 9.9, may: { off: true } });
    expect(crankFace(RULE, on, at(10))).toMatchObject({ tone: "over", word: "OFF NOW" });
    const late = play([
      ["on", 0],
      ["off", 14],
    ]);
    expect(late.bursts[0]?.seconds).toBe(14);
    expect(crankFace(RULE, late, at(14))).toMatchObject({ tone: "rest", figure: 40 });
  });

  it("marks pressure inside a burst, once, and then says so", () => {
    const clock = play([
      ["on", 0],
      ["off", 10],
      ["on", 30],
      ["pressure", 34.5],
      ["off", 36],
    ]);
    expect(clock.bursts[1]).toEqual({ at: at(30), seconds: 6, pressureAfter: 4.5 });
    expect(crankFace(RULE, clock, at(36))).toMatchObject({ tone: "seen", word: "PRESSURE", pressure: 14.5, bursts: 2, total: 16 });
    expect(crankStep(RULE, clock, { kind: "pressure", at: at(37) }).ok).toBe(false);
  });

  it("shows a mark that is a moment younger than the face, and a clock that was set back, without breaking", () => {
    const marked = play([["on", 0], ["pressure", 2.4]]); // biome-ignore format: one line a story
    expect(crankFace(RULE, marked, at(2.3))).toMatchObject({ tone: "crank", pressure: 2.4 });
    expect(crankFace(RULE, marked, at(-5))).toMatchObject({ tone: "crank" });
    expect(crankStep(RULE, marked, { kind: "off", at: at(-5) })).toMatchObject({ ok: true });
  });

  it("gives up at 60 s of cranking without pressure: stop, and look for the cause", () => {
    const events: [CrankEvent["kind"], number][] = [];
    for (let n = 0; n < 6; n++) events.push(["on", n * 30], ["off", n * 30 + 10]);
    const clock = play(events);
    expect(crankFace(RULE, clock, at(100_000))).toMatchObject({ tone: "stop", word: "STOP", figure: null, may: { on: false } });
    expect(crankStep(RULE, clock, { kind: "on", at: at(100_000) })).toMatchObject({
      ok: false,
      sentence: expect.stringContaining("cause"),
    });
  });

  it("shortens the last burst before the give-up total", () => {
    const rule = { ...RULE, giveUpAfter: 14 };
    const clock = play([
      ["on", 0],
      ["off", 10],
      ["on", 30],
    ]);
    expect(crankFace(rule, clock, at(33.9))).toMatchObject({ tone: "crank" });
    expect(crankFace(rule, clock, at(34))).toMatchObject({ tone: "over", sentence: "4 s are over. Starter off." });
  });

  it("takes the last burst back, but not one that is on", () => {
    expect(
      crankStep(
        RULE,
        play([
          ["on", 0],
          ["off", 3],
        ]),
        { kind: "take-back", at: at(4) },
      ),
    ).toEqual({ ok: true, clock: NO_BURSTS });
    expect(crankStep(RULE, play([["on", 0]]), { kind: "take-back", at: at(4) }).ok).toBe(false);
    expect(crankStep(RULE, NO_BURSTS, { kind: "take-back", at: at(4) }).ok).toBe(false);
  });

  it("whatever is pressed when, no burst begins before its rest, bursts never overlap, and the face agrees with what is taken", () => {
    const press = fc.tuple(fc.constantFrom("on", "off", "pressure", "take-back"), fc.integer({ min: 0, max: 400 }));
    fc.assert(
      fc.property(fc.array(press, { maxLength: 60 }), (presses) => {
        let clock = NO_BURSTS;
        let tenth = 0;
        for (const [kind, wait] of presses as ["on" | "off" | "pressure" | "take-back", number][]) {
          tenth += wait;
          const now = at(tenth / 10);
          const face = crankFace(RULE, clock, now);
          const next = crankStep(RULE, clock, { kind, at: now });
          if (kind !== "take-back") expect(next.ok).toBe(face.may[kind]);
          if (next.ok) clock = next.clock;
        }
        for (const [n, burst] of clock.bursts.entries()) {
          const before = clock.bursts[n - 1];
          if (before) expect(burst.at - (before.at + before.seconds * 1000)).toBeGreaterThanOrEqual(RULE.rest * 1000 - 100);
        }
      }),
      runsOf(500),
    );
  });
});
