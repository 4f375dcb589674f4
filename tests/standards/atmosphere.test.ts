/** Standard atmosphere and air density against published tables. */
import { describe, expect, it } from "vitest";
import { airDensity, densityAltitude, pressureAltitude, saturationPressure, soundSpeed, standardAir } from "#app/lib/bench/atmosphere";
import { fromSI, toSI } from "#app/lib/units/convert";

const celsius = (n: number) => toSI(n, "°C");

describe("standard atmosphere: computed from the ISA constants (ISO 2533, U.S. Standard Atmosphere 1976), geopotential", () => {
  it.each([
    [0, 101325.0, 15.0, 1.225, 340.294],
    [1000, 97716.6, 13.019, 1.18955, 339.122],
    [2000, 94212.9, 11.038, 1.1549, 337.946],
    [5000, 84307.3, 5.094, 1.05555, 334.394],
    [8000, 75262.4, -0.85, 0.96287, 330.803],
    [10000, 69681.6, -4.812, 0.90464, 328.387],
  ])("%i ft", (feet, pressure, temperature, density, sound) => {
    const air = standardAir(toSI(feet, "ft"));
    expect(Math.abs(air.pressure - pressure)).toBeLessThan(0.1);
    expect(Math.abs(fromSI(air.temperature, "°C") - temperature)).toBeLessThan(0.001);
    expect(Math.abs(air.density - density)).toBeLessThan(0.00001);
    expect(Math.abs(air.soundSpeed - sound)).toBeLessThan(0.001);
  });

  it.each([
    // U.S. Standard Atmosphere 1976, table by geometric altitude (read in a handbook's reprint).
    [1000, 281.65, 1.1117, 336.4],
    [2000, 275.15, 1.0066, 332.5],
  ])("handbook table at %i m geometric", (geometric, temperature, density, sound) => {
    const earth = 6_356_766;
    const air = standardAir((earth * geometric) / (earth + geometric));
    expect(Math.abs(air.temperature - temperature)).toBeLessThan(0.01);
    expect(air.density).toBeCloseTo(density, 4);
    expect(air.soundSpeed).toBeCloseTo(sound, 1);
  });
});

describe("humid air: computed, agrees with a psychrometric library to its last printed digit", () => {
  it.each([
    [30, 0.5, 1.1552],
    [35, 0.8, 1.12625],
  ])("%i degC, relative humidity %f, 101325 Pa", (temperature, humidity, density) => {
    const t = celsius(temperature);
    expect(Math.abs(airDensity(101_325, t, humidity * saturationPressure(t)) - density)).toBeLessThan(0.0002);
  });

  it("is lighter than dry air, never heavier", () => {
    const t = celsius(30);
    expect(airDensity(101_325, t, 2000)).toBeLessThan(airDensity(101_325, t));
  });

  it("density altitude within 25 ft of NOAA's formula (computed: 30 degC, dew point 15 degC, 850 hPa gives 7795.9 ft)", () => {
    const rho = airDensity(85_000, celsius(30), saturationPressure(celsius(15)));
    // That formula reads 18.9 ft high on a standard day, hence the room.
    expect(Math.abs(fromSI(densityAltitude(rho), "ft") - 7795.9)).toBeLessThan(25);
  });
});

describe("the way back", () => {
  it.each([-500, 0, 1234, 5000, 10_999])("pressure and density altitude of standard air at %i m", (h) => {
    const air = standardAir(h);
    expect(pressureAltitude(air.pressure)).toBeCloseTo(h, 6);
    expect(densityAltitude(air.density)).toBeCloseTo(h, 6);
  });

  it("refuses what the formulas do not cover", () => {
    expect(() => standardAir(11_001)).toThrow(RangeError);
    expect(() => standardAir(Number.NaN)).toThrow(RangeError);
    expect(() => pressureAltitude(15_000)).toThrow(RangeError);
    expect(() => densityAltitude(0)).toThrow(RangeError);
    expect(() => airDensity(101_325, 0)).toThrow(RangeError);
    expect(() => airDensity(1000, 300, 1000)).toThrow(RangeError);
    expect(() => saturationPressure(celsius(80))).toThrow(RangeError);
    expect(() => soundSpeed(-1)).toThrow(RangeError);
  });
});
