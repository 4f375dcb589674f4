/** Every conversion against the exact definitions and two other libraries' tables. */
import fc from "fast-check";
import quantity from "js-quantities";
import { unit as mathUnit } from "mathjs";
import { describe, expect, it } from "vitest";
import { fromSI, toSI, UNITS, type Unit } from "#app/lib/units/convert";
import { runsOf } from "../support/property-runs";

const off = (value: number, expected: number): number => Math.abs(value / expected - 1);

describe("mathjs has the same factor to 1e-9", () => {
  it.each<[Unit, string, string]>([
    ["in-lb", "lbf inch", "N m"],
    ["ft-lb", "lbf ft", "N m"],
    ["psi", "psi", "Pa"],
    ["bar", "bar", "Pa"],
    ["US gal", "231 cuin", "m^3"],
    ["US gal/h", "231 cuin/hour", "m^3/s"],
    ["lb/h", "lbm/hour", "kg/s"],
    ["in", "inch", "m"],
    ["ft", "ft", "m"],
    ["ft/s", "ft/s", "m/s"],
    ["ft²", "sqft", "m^2"],
    ["lb", "lbm", "kg"],
    ["lbf", "lbf", "N"],
    ["deg", "deg", "rad"],
    ["psi/min", "psi/minute", "Pa/s"],
    ["hp", "550 lbf ft/s", "W"],
    ["g/(kW·h)", "g/(kW hour)", "kg/J"],
    ["mΩ", "milliohm", "ohm"],
  ])("1 %s", (unit, other, si) => {
    expect(off(toSI(1, unit), mathUnit(/^\d/.test(other) ? other : `1 ${other}`).toNumber(si))).toBeLessThan(1e-9);
  });
});

describe("js-quantities has the same factor to 1e-6 (its psi is 4e-7 off)", () => {
  it.each<[Unit, string, string]>([
    ["in-lb", "lbf*in", "N*m"],
    ["ft-lb", "lbf*ft", "N*m"],
    ["psi", "psi", "Pa"],
    ["bar", "bar", "Pa"],
    ["hp", "hp", "W"],
    ["US gal", "gal", "m3"],
    ["US gal/h", "gal/h", "m3/s"],
    ["lb/US gal", "lbs/gal", "kg/m3"],
    ["kt", "kt", "m/s"],
    ["in", "in", "m"],
    ["ft", "ft", "m"],
    ["ft/s", "ft/s", "m/s"],
    ["ft²", "ft2", "m2"],
    ["lb", "lbs", "kg"],
    ["lb/h", "lbs/h", "kg/s"],
    ["lbf", "lbf", "N"],
    ["deg", "deg", "rad"],
    ["min", "min", "s"],
  ])("1 %s", (unit, other, si) => {
    expect(off(toSI(1, unit), quantity(`1 ${other}`).to(si).scalar)).toBeLessThan(1e-6);
  });

  it("temperatures", () => {
    for (const fahrenheit of [-40, 0, 59, 212])
      expect(toSI(fahrenheit, "°F")).toBeCloseTo(quantity(`${fahrenheit} tempF`).to("tempK").scalar, 6);
  });
});

describe("exact definitions (computed)", () => {
  it.each<[Unit, number]>([
    ["in-lb", 0.1129848290276167],
    ["ft-lb", 1.3558179483314003],
    ["psi", 6894.757293168],
    ["hp", 745.6998715822702],
    ["US gal", 3.785411784e-3],
    ["lb", 0.45359237],
  ])("1 %s", (unit, si) => {
    expect(off(toSI(1, unit), si)).toBeLessThan(1e-13);
  });

  it("NIST SP 811 prints these to seven digits (from memory)", () => {
    const printed = (unit: Unit) => toSI(1, unit).toExponential(6);
    expect([printed("in-lb"), printed("ft-lb"), printed("psi"), printed("hp")]).toEqual([
      "1.129848e-1",
      "1.355818e+0",
      "6.894757e+3",
      "7.456999e+2",
    ]);
  });

  it("3.0 bar of injection pressure is 43.5113 psi; flow through an orifice grows by 1.08012 to 3.5 bar, as the root of the pressure", () => {
    expect(fromSI(toSI(3, "bar"), "psi")).toBeCloseTo(43.5113, 4);
    expect(Math.sqrt(toSI(3.5, "bar") / toSI(3, "bar"))).toBeCloseTo(1.08012, 5);
  });

  it("avgas at 6.0 lb/US gal (read) is 0.719 kg/L", () => {
    expect(toSI(6, "lb/US gal") / 1000).toBeCloseTo(0.719, 3);
  });

  it("1 lb/(hp h) = 608.277 g/(kW h) (read)", () => {
    expect(fromSI(toSI(1, "lb/(hp·h)"), "g/(kW·h)")).toBeCloseTo(608.277, 3);
  });
});

describe("properties", () => {
  const units = Object.keys(UNITS) as Unit[];
  // Numbers that can be meant: near the least binary number there is no relative precision.
  const value = fc.double({ min: -1e6, max: 1e6, noNaN: true }).map((n) => (Math.abs(n) < 1e-9 ? 0 : n));

  it("there and back is the same number within 1e-12 of it; with an offset, of the offset", () => {
    fc.assert(
      fc.property(fc.constantFrom(...units), value, (unit, given) => {
        const { offset = 0, factor } = UNITS[unit] as { offset?: number; factor: number };
        const scale = Math.max(Math.abs(given), Math.abs(offset / factor));
        expect(Math.abs(fromSI(toSI(given, unit), unit) - given)).toBeLessThanOrEqual(1e-12 * scale);
        const si = toSI(given, unit);
        expect(Math.abs(toSI(fromSI(si, unit), unit) - si)).toBeLessThanOrEqual(1e-12 * Math.max(Math.abs(si), offset));
      }),
      runsOf(5000),
    );
  });

  it("keeps the order of numbers", () => {
    fc.assert(
      fc.property(fc.constantFrom(...units), value, value, (unit, a, b) => {
        if (a < b) expect(toSI(a, unit)).toBeLessThanOrEqual(toSI(b, unit));
      }),
      runsOf(1000),
    );
  });
});
