import { describe, expect, it } from "vitest";
import { holdFace, oilFace } from "#app/lib/bench/live-clock";

const t0 = 1_800_000_000_000;
const at = (s: number) => t0 + s * 1000;

describe("oil pressure after the start", () => {
  const none = { shows: null, above: null };
  it("must show within 10 s: at 10 s it is STOP", () => {
    expect(oilFace(t0, none, at(9.9))).toMatchObject({ word: "shows", left: 1 });
    expect(oilFace(t0, none, at(10))).toMatchObject({ word: "stop", sentence: expect.stringContaining("No oil pressure in 10 s. STOP") });
  });
  it("must be above its least within 30 s of the start, not of its first showing", () => {
    const shows = { shows: at(8), above: null };
    expect(oilFace(t0, shows, at(29))).toMatchObject({ word: "above", left: 1 });
    expect(oilFace(t0, shows, at(30))).toMatchObject({ word: "stop" });
    expect(oilFace(t0, { shows: at(8), above: at(30) }, at(90))).toMatchObject({ word: "good" });
    expect(oilFace(t0, { shows: at(8), above: at(31) }, at(90))).toMatchObject({ word: "stop" });
  });
  it("is good once it is above, whether or not somebody marked that it shows", () => {
    expect(oilFace(t0, { shows: null, above: at(6) }, at(50))).toMatchObject({ word: "good", sentence: "Above its least after 6 s." });
  });
});

describe("a step that is held", () => {
  it("counts what is held and what is left, and says when it is over", () => {
    expect(holdFace(90, t0, at(30.5))).toEqual({ held: 30, left: 60, over: false });
    expect(holdFace(90, t0, at(90))).toEqual({ held: 90, left: 0, over: true });
    expect(holdFace(null, t0, at(5))).toEqual({ held: 5, left: 0, over: false });
    expect(holdFace(90, at(5), t0)).toEqual({ held: 0, left: 95, over: false });
  });
});
