import fc from "fast-check";
import { type Unit as MathUnit, unit as mathUnit } from "mathjs";
import { describe, expect, it } from "vitest";
import { fromSI, measures, symbolOf, toSI, UNITS, type Unit } from "#app/lib/units/convert";
import { displayUnit, format, formatBand, parseEntry } from "#app/lib/units/display";
import { type Quantity, SI } from "#app/lib/units/quantity";

const QUANTITIES = Object.keys(SI) as Quantity[];
const ALL_UNITS = Object.keys(UNITS) as Unit[];

describe("conversion", () => {
  // Second opinion: mathjs has its own table of units. Relative 1e-9.
  const opinions: [Unit, MathUnit, string][] = [
    ["in-lb", mathUnit(1, "lbf inch"), "N m"],
    ["ft-lb", mathUnit(1, "lbf ft"), "N m"],
    ["psi", mathUnit(1, "psi"), "Pa"],
    ["bar", mathUnit(1, "bar"), "Pa"],
    ["hPa", mathUnit(1, "hPa"), "Pa"],
    ["kPa", mathUnit(1, "kPa"), "Pa"],
    ["US gal", mathUnit(231, "cuin"), "m^3"],
    ["L", mathUnit(1, "L"), "m^3"],
    ["L/min", mathUnit(1, "L/minute"), "m^3/s"],
    ["US gal/h", mathUnit(231, "cuin/hour"), "m^3/s"],
    ["lb/h", mathUnit(1, "lbm/hour"), "kg/s"],
    ["kg/h", mathUnit(1, "kg/hour"), "kg/s"],
    ["in", mathUnit(1, "inch"), "m"],
    ["ft", mathUnit(1, "ft"), "m"],
    ["mm", mathUnit(1, "mm"), "m"],
    ["ft²", mathUnit(1, "sqft"), "m^2"],
    ["lb", mathUnit(1, "lbm"), "kg"],
    ["lbf", mathUnit(1, "lbf"), "N"],
    ["deg", mathUnit(1, "deg"), "rad"],
    ["min", mathUnit(1, "minute"), "s"],
    ["psi/min", mathUnit(1, "psi/minute"), "Pa/s"],
    ["hp", mathUnit(550, "lbf ft/s"), "W"],
    ["lb/(hp·h)", mathUnit(1 / (550 * 3600), "lbm/(lbf ft)"), "kg/J"],
  ];
  it.each(opinions)("%s agrees with a second table", (unit, opinion, si) => {
    const expected = opinion.toNumber(si);
    expect(Math.abs(toSI(1, unit) / expected - 1)).toBeLessThan(1e-9);
  });

  it.each([
    ["°C", "degC"],
    ["°F", "degF"],
  ] as const)("%s as a reading agrees with a second table", (unit, name) => {
    for (const value of [-40, 0, 59, 212]) expect(toSI(value, unit)).toBeCloseTo(mathUnit(value, name).toNumber("K"), 9);
  });

  it("a difference of temperature has no offset", () => {
    expect(toSI(3, "Δ°C")).toBe(3);
    expect(toSI(9, "Δ°F")).toBeCloseTo(5, 12);
  });

  it("turns per second and per minute", () => {
    expect(toSI(2700, "rpm")).toBeCloseTo(45, 12);
  });

  it("there and back is the same number", () => {
    fc.assert(
      fc.property(fc.constantFrom(...ALL_UNITS), fc.double({ min: -1e6, max: 1e6, noNaN: true }), (unit, value) => {
        expect(fromSI(toSI(value, unit), unit)).toBeCloseTo(value, 6);
      }),
    );
  });
});

describe("display", () => {
  it("has a fitting unit for every quantity and system", () => {
    for (const quantity of QUANTITIES) {
      for (const system of ["si", "us"] as const) expect(measures(displayUnit(quantity, system), quantity)).toBe(true);
    }
  });

  it.each<[Quantity, number, "si" | "us", string]>([
    ["torque", 22, "si", "22 N·m"],
    ["torque", toSI(160, "in-lb"), "us", "160 in-lb"],
    ["voltage", 10, "si", "10.0 V"],
    ["voltage", 12.45, "us", "12.45 V"],
    ["temperature", 323.15, "si", "50 °C"],
    ["temperature", 323.15, "us", "122 °F"],
    ["temperature", 268.15, "si", "−5 °C"],
    ["temperatureDifference", 3, "us", "5.4 °F"],
    ["rotation", 45, "si", "2700 rpm"],
    ["volume", 0.02, "us", "5.28 US gal"],
    ["length", 0.0016, "us", "0.063 in"],
    ["angle", Math.PI / 600, "si", "0.3 deg"],
    ["fraction", 0.05, "si", "5 %"],
    ["count", 12, "si", "12"],
    ["torque", -0.0001, "si", "0 N·m"],
  ])("%s %f in %s reads %s", (quantity, si, system, text) => {
    expect(format(quantity, si, system).text).toBe(text);
  });

  it("shows another unit of the same quantity where asked, and no other", () => {
    expect(format("fraction", 50e-6, "si", "ppm").text).toBe("50 ppm");
    expect(format("time", 3600, "us", "min").text).toBe("60 min");
    expect(() => format("time", 1, "si", "kPa")).toThrow("does not measure");
  });

  it("never prints a number that is none", () => {
    expect(format("torque", Number.NaN, "si")).toEqual({ text: "no value", value: "", unit: "N·m" });
  });

  it("says a band in words", () => {
    expect(formatBand("torque", { min: 22, max: 26 }, "si")).toBe("22 to 26 N·m");
    expect(formatBand("voltage", { min: 10, max: null }, "si")).toBe("at least 10.0 V");
    expect(formatBand("voltage", { min: null, max: 0.1 }, "us")).toBe("at most 0.1 V");
    expect(formatBand("pressure", { min: -2000, max: 2000 }, "si")).toBe("within 2 kPa either way of zero");
    expect(formatBand("count", { min: 6, max: 6 }, "si")).toBe("exactly 6");
    expect(formatBand("volume", { min: null, max: null }, "si")).toBe("no limit");
    expect(formatBand("torque", null, "si")).toBe("maker's number, not entered yet");
  });
});

describe("entry", () => {
  const si = (text: string, quantity: Quantity, system: "si" | "us" = "si", as?: Unit) => {
    const entry = parseEntry(text, quantity, system, as);
    return entry.ok ? entry.si : entry.sentence;
  };

  it.each<[string, Quantity, "si" | "us", number]>([
    ["22", "torque", "si", 22],
    ["22,5", "torque", "si", 22.5],
    [" 22.5 N·m ", "torque", "si", 22.5],
    ["160in-lb", "torque", "us", 160 * 0.1129848290276167],
    ["50 °C", "temperature", "si", 323.15],
    ["−5", "temperature", "si", 268.15],
    ["2 700", "rotation", "si", 45],
    ["2\u2009700", "rotation", "si", 45],
    [".1", "voltage", "si", 0.1],
    ["0,125", "length", "si", 0.000125],
    ["4", "count", "us", 4],
  ])("%j for %s in %s is taken", (text, quantity, system, expected) => {
    expect(si(text, quantity, system)).toBeCloseTo(expected, 9);
  });

  it.each<[string, Quantity, RegExp]>([
    ["", "torque", /Nothing is entered: type a number in N·m/],
    ["   ", "voltage", /Nothing is entered/],
    ["NaN", "torque", /is not a number/],
    ["about 20", "torque", /is not a number/],
    ["Infinity", "torque", /is not a number/],
    ["1e3", "torque", /is not a number/],
    ["22 in-lb", "torque", /takes N·m/],
    ["1,234", "torque", /two ways: type 1234 or 1.234/],
    ["1,234.5", "torque", /more than one/],
    ["12 5", "torque", /is not a number/],
    ["-3", "torque", /between 0 and 5000 N·m/],
    ["99999999", "torque", /cannot be right/],
    ["-300", "temperature", /cannot be right/],
    ["2.5", "count", /whole number/],
    ["N·m", "torque", /is not a number/],
  ])("%j for %s is refused with a sentence", (text, quantity, sentence) => {
    expect(si(text, quantity)).toMatch(sentence);
  });

  it("takes minutes where minutes are asked", () => {
    expect(si("60", "time", "si", "min")).toBe(3600);
  });

  it("reads back what it shows", () => {
    fc.assert(
      fc.property(
        fc.constantFrom<Quantity>("torque", "voltage", "temperature", "volume", "rotation", "mass"),
        fc.constantFrom("si", "us"),
        fc.double({ min: 190, max: 400, noNaN: true }),
        (quantity, system, value) => {
          const scaled = quantity === "volume" ? value / 1e4 : value;
          const shown = format(quantity, scaled, system);
          const entry = parseEntry(shown.text, quantity, system);
          expect(entry.ok && format(quantity, entry.si, system).text).toBe(shown.text);
        },
      ),
    );
  });

  it("every symbol belongs to its unit", () => {
    for (const unit of ALL_UNITS) expect(symbolOf(unit)).toBe(unit === "1" ? "" : unit.replace("Δ", ""));
  });
});
