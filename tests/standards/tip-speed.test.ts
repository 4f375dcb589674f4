/** Speed and Mach number of the propeller's tip: figures computed from the geometry and the speed of sound of the standard atmosphere. */
import { describe, expect, it } from "vitest";
import { soundSpeed, standardAir } from "#app/lib/bench/atmosphere";
import { computeBench } from "#app/lib/bench/bench";
import { MACH_CEILING, machNumber, rotationAtMach, tipSpeed } from "#app/lib/bench/tip-speed";
import { toSI } from "#app/lib/units/convert";

const ISA = standardAir(0).temperature;
const inch = (n: number) => toSI(n, "in");
const rpm = (n: number) => toSI(n, "rpm");

describe("tip speed, standing, at sea level (computed, a = 340.294 m/s)", () => {
  it.each([
    [72, 2700, 258.541, 0.7598],
    [80, 2600, 276.628, 0.8129],
    [60, 3200, 255.349, 0.7504],
  ])("%i in at %i rpm", (diameter, speed, metres, mach) => {
    const tip = tipSpeed(inch(diameter), rpm(speed));
    expect(tip).toBeCloseTo(metres, 3);
    expect(machNumber(tip, ISA)).toBeCloseTo(mach, 4);
  });

  it("forward speed adds at a right angle", () => {
    expect(tipSpeed(inch(72), rpm(2700), 70)).toBeCloseTo(Math.sqrt(258.541 ** 2 + 70 ** 2), 2);
  });

  it("ceilings: 0.85 is the low end for metal, 0.80 for wood (from memory)", () => {
    expect(MACH_CEILING).toEqual({ metal: 0.85, wood: 0.8 });
  });

  it("the speed at the ceiling gives the ceiling", () => {
    const most = rotationAtMach(0.85, inch(72), ISA, 50);
    expect(machNumber(tipSpeed(inch(72), most, 50), ISA)).toBeCloseTo(0.85, 12);
    expect(rotationAtMach(0.1, inch(72), ISA, 0.2 * soundSpeed(ISA))).toBe(0);
  });
});

const SHEET = { rotation: rpm(2700), reduction: 1, diameter: inch(72), forward: 0, temperature: ISA, blades: "metal" };
function sheet(inputs: Record<string, unknown>) {
  const done = computeBench("tip-speed", { ...SHEET, ...inputs });
  if (!done.ok) throw new Error(JSON.stringify(done.errors));
  return done.result;
}

describe("the sheet", () => {
  it("negative check: a geared engine's tip goes by the propeller's speed, not the crankshaft's", () => {
    const geared = sheet({ rotation: rpm(5500), reduction: 2.43, diameter: 1.7 });
    const mach = geared.figures.find((f) => f.label === "Mach number of the tip")?.value ?? 0;
    expect(mach).toBeCloseTo((Math.PI * 1.7 * (5500 / 60 / 2.43)) / 340.294, 4);
    expect(mach).toBeLessThan(0.62);
    expect(geared.passes).toBe(true);
  });

  it("exactly the ceiling passes, a thousandth above does not", () => {
    const at = rotationAtMach(0.85, SHEET.diameter, ISA);
    expect(sheet({ rotation: at }).passes).toBe(true);
    expect(sheet({ rotation: at * 1.001 }).passes).toBe(false);
  });

  it("wood has the lower ceiling, composite none but the maker's", () => {
    expect(sheet({ diameter: inch(80), rotation: rpm(2600), blades: "wood" }).passes).toBe(false);
    expect(sheet({ diameter: inch(80), rotation: rpm(2600) }).passes).toBe(true);
    expect(sheet({ blades: "composite" })).toMatchObject({ passes: null, sentence: expect.stringContaining("ask the propeller maker") });
    expect(sheet({ blades: "composite", ceiling: 0.7 }).passes).toBe(false);
  });
});
