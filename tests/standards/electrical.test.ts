/** Wire resistance and drop against AC 43.13-1B and the gauge's definition; battery voltages against the usual figures. */
import { describe, expect, it } from "vitest";
import { REST_VOLTS, stateOfCharge } from "#app/lib/bench/battery";
import { computeBench } from "#app/lib/bench/bench";
import { AIRCRAFT_WIRE, ALLOWED_DROP, solidResistance, voltageDrop, warmed, wireDiameter, wireResistance } from "#app/lib/bench/wire";
import { toSI } from "#app/lib/units/convert";

const ft = (n: number) => toSI(n, "ft");
const perKft = (ohmPerMetre: number) => ohmPerMetre * ft(1000);

describe("AC 43.13-1B, table 11-9 (read): copper aircraft wire, ohm/1000 ft at 20 degC", () => {
  it.each([
    [22, 16.2],
    [20, 9.88],
    [18, 6.23],
    [16, 4.81],
    [14, 3.06],
    [12, 2.02],
    [10, 1.26],
    [8, 0.7],
    [6, 0.44],
    [4, 0.28],
    [2, 0.18],
    [0, 0.12],
  ])("gauge %i: %f", (gauge, ohm) => {
    expect(perKft(wireResistance(gauge, "aircraft"))).toBeCloseTo(ohm, 9);
  });

  it("has these gauges and no others", () => {
    expect(AIRCRAFT_WIRE.map(([gauge]) => gauge)).toEqual([22, 20, 18, 16, 14, 12, 10, 8, 6, 4, 2, 0]);
    expect(() => wireResistance(9, "aircraft")).toThrow(RangeError);
  });

  it.each([
    [2, 12, 200, 0.432],
    [8, 12, 60, 0.504],
  ])("gauge %i, %i ft, %i A loses %f V one way (computed from the table)", (gauge, feet, amps, volts) => {
    expect(voltageDrop(wireResistance(gauge, "aircraft"), ft(feet), 1, amps)).toBeCloseTo(volts, 9);
  });

  it("negative check: table 11-8 prints 0.366 V for gauge 10, 19.5 ft, 20 A, an erratum; the resistance gives 0.491 (computed)", () => {
    const drop = voltageDrop(wireResistance(10, "aircraft"), ft(19.5), 1, 20);
    expect(drop).toBeCloseTo(0.491, 3);
    expect(Math.abs(drop - 0.366)).toBeGreaterThan(0.1);
  });
});

describe("American Wire Gauge (ASTM B258: 4/0 is 0.4600 in, 36 is 0.0050 in; from memory)", () => {
  it("diameters at both ends, and 39 equal steps between", () => {
    expect(wireDiameter(36)).toBeCloseTo(toSI(0.005, "in"), 12);
    expect(wireDiameter(-3)).toBeCloseTo(toSI(0.46, "in"), 12);
    expect(wireDiameter(10) / wireDiameter(11)).toBeCloseTo(92 ** (1 / 39), 12);
  });

  it.each([
    // Solid annealed copper at 20 degC, ohm/1000 ft, as wire tables of NBS Handbook 100 print it (from memory).
    [10, 0.9989],
    [14, 2.525],
    [22, 16.14],
    [0, 0.09827],
  ])("gauge %i: %f ohm/1000 ft", (gauge, ohm) => {
    expect(Math.abs(perKft(solidResistance(gauge)) / ohm - 1)).toBeLessThan(0.001);
  });

  it("aircraft wire is never more than 3 % under solid copper of its gauge, and at most 30 % above: the same wire in two tables", () => {
    for (const [gauge] of AIRCRAFT_WIRE) {
      const over = wireResistance(gauge, "aircraft") / solidResistance(gauge);
      expect(over).toBeGreaterThan(0.97);
      expect(over).toBeLessThan(1.3);
    }
  });

  it("copper gains 0.393 % per kelvin (IEC 60028, from memory)", () => {
    expect(warmed(1, toSI(20, "°C"))).toBe(1);
    expect(warmed(1, toSI(70, "°C"))).toBeCloseTo(1.1965, 12);
    expect(() => warmed(1, Number.NaN)).toThrow(RangeError);
  });
});

describe("drop allowed, AC 43.13-1B, table 11-6", () => {
  it("0.5 V in a 14 V system, 1 V in 28 V, continuous (read); twice that for a short time (from memory)", () => {
    expect(ALLOWED_DROP).toEqual({ "14": { continuous: 0.5, intermittent: 1 }, "28": { continuous: 1, intermittent: 2 } });
  });

  const WIRE = { system: "14", use: "continuous", gauge: "awg8", conductor: "aircraft", back: "airframe", temperature: toSI(20, "°C") };
  const passes = (inputs: Record<string, unknown>) => {
    const done = computeBench("wire-drop", { ...WIRE, ...inputs });
    if (!done.ok) throw new Error(JSON.stringify(done.errors));
    return done.result.passes;
  };

  it("exactly 0.5 V passes, a thousandth more does not", () => {
    const length = ft(12);
    const current = 0.5 / (wireResistance(8, "aircraft") * length);
    expect(passes({ length, current })).toBe(true);
    expect(passes({ length, current: current * 1.001 })).toBe(false);
    expect(passes({ length, current: current * 2, system: "28" })).toBe(true);
    expect(passes({ length, current: current * 2.001, system: "28" })).toBe(false);
    expect(passes({ length, current: current * 2, use: "intermittent" })).toBe(true);
  });

  it("negative check: back by a wire of its own loses twice, so half the length is left", () => {
    const current = 0.5 / (wireResistance(8, "aircraft") * ft(12));
    expect(passes({ length: ft(12), current, back: "wire" })).toBe(false);
    expect(passes({ length: ft(6), current, back: "wire" })).toBe(true);
  });
});

describe("battery at rest: the usual figures (read in makers' papers; common practice, no standard)", () => {
  it.each([
    [12.6, 1, "over"],
    [12.4, 0.75, "within"],
    [12.2, 0.5, "within"],
    [12.5, 0.875, "within"],
    [12.1, 0.5, "under"],
  ] as const)("lead-acid, %f V", (volts, charge, side) => {
    const got = stateOfCharge("lead", volts, 1);
    expect(got.charge).toBeCloseTo(charge, 9);
    expect(got.side).toBe(side);
    expect(stateOfCharge("lead", 2 * volts, 2)).toEqual(got);
  });

  it.each([
    [13.6, 0.99],
    [13.4, 0.9],
    [13.2, 0.4],
    [13, 0.3],
    [12.8, 0.2],
  ])("lithium iron phosphate, four cells, %f V", (volts, charge) => {
    expect(stateOfCharge("lifepo4", volts, 1).charge).toBeCloseTo(charge, 9);
  });

  it("negative check: a lead voltage says nothing of lithium; 12.6 V is full for one and nearly empty for the other", () => {
    expect(stateOfCharge("lifepo4", 12.6, 1)).toEqual({ charge: REST_VOLTS.lifepo4[0]?.[1], side: "under" });
  });

  const BATTERY = { chemistry: "lead", blocks: 1, rest: 12.6, rested: 7200, leastCharge: 0.75, lowest: 9, minimum: 9 };
  const battery = (inputs: Record<string, unknown>) => computeBench("battery", { ...BATTERY, ...inputs });

  it("the computers' minimum exactly passes, a hundredth under does not, and 75 % passes exactly", () => {
    expect(battery({})).toMatchObject({ ok: true, result: { passes: true } });
    expect(battery({ lowest: 8.99 })).toMatchObject({ ok: true, result: { passes: false } });
    expect(battery({ rest: 12.4 })).toMatchObject({ ok: true, result: { passes: true } });
    expect(battery({ rest: 12.39 })).toMatchObject({ ok: true, result: { passes: false } });
  });

  it("a battery on charge (13.5 to 14.5 V, read) or just off it is refused at its field", () => {
    for (const rest of [13.5, 14.5]) expect(battery({ rest })).toMatchObject({ ok: false, errors: [{ field: "rest" }] });
    expect(battery({ rested: 7199 })).toMatchObject({ ok: false, errors: [{ field: "rested" }] });
  });
});
