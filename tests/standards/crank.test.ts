/** The crank clock against starter makers' printed duty cycles. */
import { describe, expect, it } from "vitest";
import { type Burst, DEFAULT_CRANK_RULE, mayCrank } from "#app/lib/bench/crank";

const T0 = 1_700_000_000_000;
/** Full bursts with the shortest rests between. */
const set = (n: number, seconds = 10, from = T0): Burst[] =>
  Array.from({ length: n }, (_, i) => ({ at: from + i * (seconds + 20) * 1000, seconds, pressureAfter: null }));

describe("starter duty: 10 s on, 20 s rest, up to 6 times, then 30 min (starter makers' instructions, read; theirs comes first)", () => {
  it("is the default, with a give-up total of 60 s (common practice, no source)", () => {
    expect(DEFAULT_CRANK_RULE).toEqual({ on: 10, rest: 20, tries: 6, longRest: 1800, giveUpAfter: 60 });
  });

  it("the first burst may last 10 s", () => {
    expect(mayCrank(DEFAULT_CRANK_RULE, [], T0)).toEqual({ may: true, seconds: 10, left: 6 });
  });

  it("rests 20 s after a burst, to the millisecond", () => {
    const end = T0 + 10_000;
    expect(mayCrank(DEFAULT_CRANK_RULE, set(1), end + 19_999)).toMatchObject({ may: false, reason: "rest", at: end + 20_000 });
    expect(mayCrank(DEFAULT_CRANK_RULE, set(1), end + 20_000)).toEqual({ may: true, seconds: 10, left: 5 });
  });

  it("rests 30 min after six, then a new set", () => {
    const rule = { ...DEFAULT_CRANK_RULE, giveUpAfter: 600 };
    const end = T0 + (5 * 30 + 10) * 1000;
    expect(mayCrank(rule, set(6), end + 1_799_999)).toMatchObject({ may: false, reason: "long-rest", at: end + 1_800_000 });
    expect(mayCrank(rule, set(6), end + 1_800_000)).toEqual({ may: true, seconds: 10, left: 6 });
  });

  it("negative check: the long rest is not the short one, and a seventh burst is not allowed", () => {
    const rule = { ...DEFAULT_CRANK_RULE, giveUpAfter: 600 };
    expect(mayCrank(rule, set(6), T0 + 160_000 + 20_000).may).toBe(false);
  });
});
