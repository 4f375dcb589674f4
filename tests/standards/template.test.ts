/** Template defaults that have a published source. The engine, propeller or kit maker's value comes first. */
import { describe, expect, it } from "vitest";
import { generate } from "#app/lib/template/generate";
import type { GeneratedBoard, Traits } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { fromSI, toSI } from "#app/lib/units/convert";
import { SAMPLES } from "../support/sample-traits";

function criterion(board: GeneratedBoard, key: string) {
  const part = board.items.find((item) => item.key === key)?.parts.find((one) => one.kind === "measure");
  if (part?.kind !== "measure") throw new Error(`${key} measures nothing`);
  return part.criterion;
}
const see = (traits: Traits, rung: string, title: string) =>
  generate(traits)
    .rungs.find(({ key }) => key === rung)
    ?.card.steps.find((step) => step.title === title);

describe("propeller", () => {
  // 14 CFR 23.925 before amendment 23-64: 7 in with a nosewheel, 9 in with a tailwheel. The defaults are rounded up to whole mm.
  it.each([
    ["nose", SAMPLES.boostedConstantSpeed, 7],
    ["tail", SAMPLES.handStartedTaildragger, 9],
  ] as const)("ground clearance, %swheel", (_, traits, inches) => {
    const { band, basis } = criterion(generate(traits), "PR6");
    const asked = fromSI(band?.min ?? 0, "in");
    expect(asked).toBeGreaterThanOrEqual(inches);
    expect(asked - inches).toBeLessThan(0.05);
    expect(basis).toMatchObject({ kind: "standard", source: expect.stringContaining("23.925") });
  });

  // AC 20-37 as taught: 1/16 in for metal; 1/8 in for wood is weakly sourced.
  it.each([
    ["metal", 1 / 16],
    ["wood", 1 / 8],
  ] as const)("track, %s blades", (blades, inches) => {
    const { band } = criterion(generate({ ...SAMPLES.boostedConstantSpeed, blades }), "PR5");
    expect(Math.abs((band?.max ?? 0) - toSI(inches, "in"))).toBeLessThan(toSI(0.05, "mm"));
  });

  it("track of composite blades is the maker's", () => {
    expect(criterion(generate({ ...SAMPLES.boostedConstantSpeed, blades: "composite" }), "PR5")).toMatchObject({
      band: null,
      basis: { kind: "maker" },
    });
  });
});

describe("engine running", () => {
  const preset = (traits: Traits, key: string) => valueDefs(traits).find((def) => def.key === key)?.preset;

  // Starter makers' instructions, as read: 10 s on, 20 s rest, up to 6 times, then 30 min.
  it("starter duty", () => {
    const traits = SAMPLES.boostedConstantSpeed;
    expect([preset(traits, "starterOn"), preset(traits, "starterRest"), preset(traits, "starterTries")]).toEqual([10, 20, 6]);
    expect(see(traits, "1", "Start")?.see).toMatch(/10 s, rest 20 s, 6 tries at most, then 30 min/);
  });

  // Makers' manuals, as read: 60 °C oil before power, 50 °C for small geared engines.
  it("oil temperature before power", () => {
    expect(preset(SAMPLES.boostedConstantSpeed, "oilTempForPower")).toBeCloseTo(333.15, 9);
    expect(preset(SAMPLES.gearedElectronicInjection, "oilTempForPower")).toBeCloseTo(323.15, 9);
  });

  // Makers' manuals, as read: pressure inside 10 s, above minimum inside 30 s; drop 175, difference 50; idle mixture rise 10 to 50 rpm.
  it("pressure, drops and mixture rise on the cards", () => {
    const traits = SAMPLES.boostedConstantSpeed;
    expect(see(traits, "1", "Oil pressure")?.see).toMatch(/10 s.*30 s/);
    expect(see(traits, "2", "Each ignition alone")?.see).toMatch(/175 rpm.*50 rpm/);
    expect(see(traits, "2", "Mixture rise")?.see).toMatch(/10 to 50 rpm/);
  });

  // 14 CFR 121.219: not more than one part of carbon monoxide in 20,000 of air.
  it("carbon monoxide", () => {
    const step = see(SAMPLES.diesel, "3", "Cockpit air");
    const ppm = Number(/(\d+) ppm/.exec(step?.see ?? "")?.[1]);
    expect(ppm).toBe(Math.round(1e6 / 20_000));
    expect(step?.source).toBe("14 CFR 121.219");
  });
});

// FAA-H-8083-30: a fire guard at every start, CO2 of at least 5 lb.
it("extinguishers", () => {
  const item = generate(SAMPLES.diesel).items.find(({ key }) => key === "FI1");
  expect(item?.words).toMatch(/CO2 of 5 lb/);
  expect(item?.source).toMatch(/FAA-H-8083-30/);
});

// FAA-H-8083-32: screens for metal after the first ground run.
it("oil screen after the first run", () => {
  const item = generate(SAMPLES.boostedConstantSpeed).postRun.items.find(({ key }) => key === "PO10");
  expect(item).toMatchObject({ runs: ["1"], source: "FAA-H-8083-32" });
});
