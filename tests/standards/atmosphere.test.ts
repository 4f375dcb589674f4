/** Standard atmosphere and air density against published tables. */
import psychrolib from "psychrolib";
import { describe, expect, it } from "vitest";
import {
  airDensity,
  densityAltitude,
  pressureAltitude,
  saturationPressure,
  soundSpeed,
  standardAir,
  stationPressure,
} from "#app/lib/bench/atmosphere";
import { computeBench } from "#app/lib/bench/bench";
import { fromSI, toSI } from "#app/lib/units/convert";

psychrolib.SetUnitSystem(psychrolib.SI);

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

describe("psychrolib (ASHRAE formulas) says the same", () => {
  it.each([0, 1000, 2000, 5000, 8000, 10_000])("standard air at %i ft: pressure within 0.3 Pa, temperature to a thousandth", (feet) => {
    const metres = toSI(feet, "ft");
    const air = standardAir(metres);
    expect(Math.abs(air.pressure - psychrolib.GetStandardAtmPressure(metres))).toBeLessThan(0.3);
    expect(fromSI(air.temperature, "°C")).toBeCloseTo(psychrolib.GetStandardAtmTemperature(metres), 3);
  });

  it("saturated vapour over water within 0.3 % from 1 to 45 degC", () => {
    for (let t = 1; t <= 45; t += 1) expect(Math.abs(saturationPressure(celsius(t)) / psychrolib.GetSatVapPres(t) - 1)).toBeLessThan(0.003);
  });

  it("moist air within 0.02 % over temperature, humidity and pressure", () => {
    for (const t of [0.5, 10, 20, 30, 40])
      for (const humidity of [0.1, 0.5, 0.8, 1])
        for (const pressure of [70_000, 85_000, 101_325]) {
          const ratio = psychrolib.GetHumRatioFromRelHum(t, humidity, pressure);
          const density = airDensity(pressure, celsius(t), humidity * saturationPressure(celsius(t)));
          expect(Math.abs(density / psychrolib.GetMoistAirDensity(t, ratio, pressure) - 1)).toBeLessThan(0.0002);
        }
  });

  it("negative check: dew point is not humidity; at saturation both say the same", () => {
    const t = celsius(25);
    const byDew = airDensity(101_325, t, saturationPressure(celsius(15)));
    const ratio = psychrolib.GetHumRatioFromTDewPoint(15, 101_325);
    expect(Math.abs(byDew / psychrolib.GetMoistAirDensity(25, ratio, 101_325) - 1)).toBeLessThan(0.0002);
    expect(byDew).toBeGreaterThan(airDensity(101_325, t, saturationPressure(t)));
  });
});

describe("altimeter setting (definition of the altimeter, ICAO Doc 7488, from memory)", () => {
  it("1013.25 hPa: the pressure at the field is that of standard air at its elevation", () => {
    expect(stationPressure(101_325, toSI(5000, "ft"))).toBeCloseTo(84_307.3, 0);
  });

  it("at sea level the setting is the pressure, and 1 hPa is about 27 ft there", () => {
    expect(stationPressure(99_000, 0)).toBeCloseTo(99_000, 6);
    expect(fromSI(pressureAltitude(101_225), "ft")).toBeCloseTo(27.3, 0);
  });
});

describe("the sheet", () => {
  const altitude = (inputs: Record<string, unknown>, label: string) => {
    const done = computeBench("atmosphere", inputs);
    if (!done.ok) throw new Error(JSON.stringify(done.errors));
    return fromSI(done.result.figures.find((f) => f.label === label)?.value ?? Number.NaN, "ft");
  };

  it("a standard day has its elevation as pressure and density altitude", () => {
    const air = standardAir(toSI(5000, "ft"));
    const inputs = { known: "setting", setting: 101_325, elevation: toSI(5000, "ft"), temperature: air.temperature, moisture: "none" };
    expect(altitude(inputs, "Pressure altitude")).toBeCloseTo(5000, 6);
    expect(altitude(inputs, "Density altitude")).toBeCloseTo(5000, 6);
  });

  it("NOAA's example as above: 850 hPa, 30 degC, dew point 15 degC, within 25 ft of 7795.9", () => {
    const inputs = { known: "station", pressure: 85_000, temperature: celsius(30), moisture: "dew", dewPoint: celsius(15) };
    expect(Math.abs(altitude(inputs, "Density altitude") - 7795.9)).toBeLessThan(25);
  });

  it("a dew point above the temperature is refused at its field", () => {
    const inputs = { known: "station", pressure: 85_000, temperature: celsius(10), moisture: "dew", dewPoint: celsius(15) };
    expect(computeBench("atmosphere", inputs)).toMatchObject({ ok: false, errors: [{ field: "dewPoint" }] });
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
