/** The bench: refusals at their fields, properties of the formulas, the sheets and the reading of their forms. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { standardAir } from "#app/lib/bench/atmosphere";
import { type Burst, burstErrors, type CrankRule, crankSummary, DEFAULT_CRANK_RULE, mayCrank } from "#app/lib/bench/crank";
import { agreeing } from "#app/lib/bench/fuel-flow";
import { capRotation, lines, slidingPull } from "#app/lib/bench/restraint";
import { PRESSURE_ALTITUDE } from "#app/lib/bench/restraint-form";
import { computeSheet, readSheetForm, SHEET_FORMS, SHEET_VERSIONS, traitInputs, valuesTaken } from "#app/lib/bench/sheet";
import { staticThrust, thrustAt } from "#app/lib/bench/thrust";
import { appliedTorque, withDrag, wrenchSetting } from "#app/lib/bench/torque";
import type { SheetKey } from "#app/lib/template/types";
import { toSI } from "#app/lib/units/convert";
import { parseEntry } from "#app/lib/units/display";

const KEYS: SheetKey[] = ["fuel-flow", "restraint", "compression"];
const deg = (n: number) => toSI(n, "deg");
const rpm = (n: number) => toSI(n, "rpm");
type Inputs = Record<string, unknown>;

const FUEL = {
  supply: "pump",
  takeoffFlow: toSI(10, "US gal/h"),
  density: toSI(6, "lb/US gal"),
  measuredAt: "return",
  noseUp: deg(15),
  fuelInTank: toSI(8, "L"),
  pumps: [{ name: "main", catches: [caught(14), caught(14)] }],
};
/** A one-gallon catch at so many gallons an hour. */
function caught(gph: number) {
  return { volume: toSI(1, "US gal"), seconds: 3600 / gph };
}
const STRAP = { name: "left", pair: "a", elevation: deg(10), azimuth: deg(-20), wll: 8000, anchor: "rated", rating: 9000 };
const RIG = {
  planned: rpm(2400),
  power: toSI(118, "hp"),
  reference: rpm(2300),
  reduction: 1,
  diameter: 1.75,
  merit: 0.75,
  pressureAltitude: 300,
  temperature: toSI(15, "°C"),
  factor: 1.5,
  mass: 500,
  slope: 0,
  wheels: "none",
  gear: "nose",
  straps: [STRAP, { ...STRAP, name: "right", azimuth: deg(20) }],
};
const TAIL = { ...RIG, gear: "tail", thrustHeight: 1.6, centreArm: 0.4, holdDown: 500, tailArm: 4.2 };
const DEAD = { name: "nose", elevation: deg(10), azimuth: 0, wll: 8000, anchor: "mass", anchorMass: 200, friction: 0.5 };
const COMPRESSION = {
  count: 2,
  supply: toSI(80, "psi"),
  orifice: toSI(0.04, "in"),
  maxLoss: 0.25,
  cylinders: [
    { name: "1", reading: toSI(76, "psi"), leak: "none" },
    { name: "2", reading: toSI(72, "psi"), leak: "rings" },
  ],
};
const GOOD: Record<SheetKey, Inputs> = { "fuel-flow": FUEL, restraint: RIG, compression: COMPRESSION };

function result(sheet: SheetKey, inputs: Inputs) {
  const done = computeSheet(sheet, inputs);
  if (!done.ok) throw new Error(JSON.stringify(done.errors));
  return done.result;
}
function fieldsOf(sheet: SheetKey, inputs: Inputs): string[] {
  const done = computeSheet(sheet, inputs);
  return done.ok ? [] : done.errors.map((error) => error.field);
}
const figureOf = (sheet: SheetKey, inputs: Inputs, label: string) =>
  result(sheet, inputs).figures.find((figure) => figure.label.includes(label))?.value;

describe("every sheet", () => {
  it.each(KEYS)("%s passes on a good example, carries its caution, and shows finite figures", (sheet) => {
    const done = result(sheet, GOOD[sheet]);
    expect(done.passes).toBe(true);
    expect(done.caution).toMatch(/maker/);
    expect(done.figures.length).toBeGreaterThan(3);
    for (const figure of done.figures) expect(Number.isFinite(figure.value)).toBe(true);
    expect(SHEET_VERSIONS[sheet]).toMatch(/^\d+$/);
    expect(valuesTaken(sheet).length).toBeGreaterThan(0);
  });

  it.each(KEYS)(
    "%s: each required field left out, null, NaN, infinite or out of range is refused at that field with its label",
    (sheet) => {
      for (const asked of SHEET_FORMS[sheet].fields) {
        if (asked.optional || asked.when) continue;
        const field = asked.name === "pressure" ? PRESSURE_ALTITUDE : asked;
        for (const bad of [undefined, null, Number.NaN, Number.POSITIVE_INFINITY, 1e12, -1e12, {}]) {
          const done = computeSheet(sheet, { ...GOOD[sheet], [field.name]: bad });
          const errors = done.ok ? [] : done.errors.filter((error) => error.field === field.name);
          expect(errors, `${field.name} = ${bad}`).not.toEqual([]);
          for (const { sentence } of errors) {
            expect(sentence).toContain(field.label);
            expect(sentence).not.toMatch(/Invalid|expected|NaN/);
          }
        }
      }
    },
  );

  it.each(KEYS)("%s: whatever comes in, it answers with finite figures or with sentences, and never throws", (sheet) => {
    const { fields, groups } = SHEET_FORMS[sheet];
    const names = [...fields, ...groups.flatMap((group) => group.fields)].map((field) => field.name);
    const junk = fc.oneof(fc.double(), fc.string({ maxLength: 3 }), fc.constantFrom(null, undefined, true, [], [1], [{}], {}));
    fc.assert(
      fc.property(fc.dictionary(fc.constantFrom(...names, "pumps", "straps", "cylinders"), junk, { maxKeys: 3 }), (changes) => {
        const done = computeSheet(sheet, { ...GOOD[sheet], ...changes });
        if (done.ok) {
          expect(done.result.figures.every((figure) => Number.isFinite(figure.value))).toBe(true);
          expect(done.result.sentence).not.toMatch(/NaN|Infinity|undefined/);
        } else {
          expect(done.errors.length).toBeGreaterThan(0);
          for (const { sentence } of done.errors) expect(sentence).not.toMatch(/Invalid|NaN|Infinity|undefined/);
        }
      }),
    );
  });

  it.each(KEYS)("%s: refuses inputs that are no object, and more rows than can be meant", (sheet) => {
    expect(computeSheet(sheet, null as unknown as Inputs).ok).toBe(false);
    const list = { "fuel-flow": "pumps", restraint: "straps", compression: "cylinders" }[sheet];
    const [row] = GOOD[sheet][list] as unknown[];
    const done = computeSheet(sheet, { ...GOOD[sheet], [list]: Array(61).fill(row) });
    expect(!done.ok && done.errors.some((error) => error.field === list && error.sentence.includes("60"))).toBe(true);
  });

  it("a range is said in both systems", () => {
    const done = computeSheet("restraint", { ...RIG, diameter: 60 });
    expect(done).toEqual({
      ok: false,
      errors: [
        {
          field: "diameter",
          sentence: "Propeller diameter must be between 500 mm and 5000 mm (19.685 in and 196.85 in): check the number and its unit.",
        },
      ],
    });
  });

  it("traits decide what is not for a person to choose", () => {
    expect(traitInputs("fuel-flow", { delivery: "gravity", gear: "nose" })).toEqual({ supply: "gravity" });
    expect(traitInputs("fuel-flow", { delivery: "boost", gear: "nose" })).toEqual({ supply: "pump" });
    expect(traitInputs("restraint", { delivery: "gravity", gear: "tail" })).toEqual({ gear: "tail" });
    expect(traitInputs("compression", { delivery: "gravity", gear: "tail" })).toEqual({});
  });
});

describe("fuel flow", () => {
  const pumps = (...gph: number[]) => ({ ...FUEL, pumps: [{ name: "main", catches: gph.map(caught) }] });

  it.each([
    ["exactly 1.25 times", [12.5, 12.5], true],
    ["just under", [12.49, 12.49], false],
    ["one catch only", [20], false],
    ["two that differ by more than 5 %", [14, 15], false],
    ["two within 5 %", [14, 14.6], true],
    ["a third that agrees with the second", [20, 14, 14.1], true],
    ["a third that agrees with neither", [20, 14, 17], false],
    ["newest ones too low, though the first was enough", [20, 12, 12], false],
  ])("%s", (_name, gph, passes) => {
    expect(result("fuel-flow", pumps(...gph)).passes).toBe(passes);
  });

  it("says what to do next, and which catch does not count", () => {
    expect(result("fuel-flow", pumps(14, 15)).sentence).toBe("Main: the last two catches differ by 6.9 %, more than 5 %: make another.");
    expect(result("fuel-flow", pumps(14)).sentence).toBe("Main has one catch only: make another.");
    expect(result("fuel-flow", pumps(12.49, 12.49)).sentence).toMatch(/^Main gives 1\.24 times .* less than the 1\.25 asked: look at/);
    expect(result("fuel-flow", pumps(20, 14, 14)).sentence).toContain("An earlier catch that did not agree does not count.");
  });

  it("each pump alone: one weak pump fails the sheet and is the one named", () => {
    const done = result("fuel-flow", { ...FUEL, pumps: [FUEL.pumps[0], { name: "second", catches: [caught(9), caught(9)] }] });
    expect(done.passes).toBe(false);
    expect(done.sentence).toMatch(/^Second gives 0\.90/);
  });

  it("gravity asks for more than a pump", () => {
    expect(result("fuel-flow", { ...pumps(14, 14), supply: "gravity" }).passes).toBe(false);
    expect(result("fuel-flow", { ...pumps(15, 15), supply: "gravity" }).passes).toBe(true);
  });

  it("a weighed catch is the same as its volume", () => {
    const weighed = { mass: toSI(6, "lb"), seconds: 3600 / 14 };
    const flow = (catches: unknown[]) => figureOf("fuel-flow", { ...FUEL, pumps: [{ name: "main", catches }] }, "Main: flow, mean");
    expect(flow([weighed, weighed])).toBeCloseTo(flow([caught(14), caught(14)]) ?? 0, 15);
  });

  it("computes consumption from power where the maker gives none, and asks for one of the two", () => {
    const { takeoffFlow: _, ...bare } = FUEL;
    const computed = { ...bare, power: toSI(100, "hp"), specific: toSI(0.6, "lb/(hp·h)") };
    expect(figureOf("fuel-flow", computed, "from rated power")).toBeCloseTo(toSI(10, "US gal/h"), 15);
    expect(fieldsOf("fuel-flow", bare)).toEqual(["takeoffFlow"]);
    expect(fieldsOf("fuel-flow", { ...bare, power: 80_000 })).toEqual(["specific"]);
  });

  it.each([
    ["no pump", { pumps: [] }, "pumps"],
    ["no catch", { pumps: [{ name: "main", catches: [] }] }, "pumps.0.catches"],
    ["no time", { pumps: [{ name: "main", catches: [{ volume: 0.001 }] }] }, "pumps.0.catches.0.seconds"],
    ["nothing caught", { pumps: [{ name: "main", catches: [{ seconds: 60 }] }] }, "pumps.0.catches.0.volume"],
    ["volume and weight", { pumps: [{ name: "main", catches: [{ seconds: 60, volume: 0.001, mass: 1 }] }] }, "pumps.0.catches.0.mass"],
    ["a name twice", { pumps: [FUEL.pumps[0], { ...FUEL.pumps[0], name: "MAIN" }] }, "pumps.1.name"],
    ["no name", { pumps: [{ ...FUEL.pumps[0], name: " " }] }, "pumps.0.name"],
  ])("refuses %s at its field", (_name, change, field) => {
    expect(fieldsOf("fuel-flow", { ...FUEL, ...change })).toEqual([field]);
  });

  it("property: a faster catch never turns a pass into a fail, and the newest catches agree", () => {
    const gph = fc.double({ min: 5, max: 40, noNaN: true });
    fc.assert(
      fc.property(gph, fc.double({ min: 1, max: 2, noNaN: true }), (flow, more) => {
        const before = result("fuel-flow", pumps(flow, flow)).passes;
        expect(before).toBe(flow >= 12.5 - 1e-7);
        if (before) expect(result("fuel-flow", pumps(flow * more, flow * more)).passes).toBe(true);
      }),
    );
    fc.assert(
      fc.property(fc.array(gph, { minLength: 1, maxLength: 6 }), (flows) => {
        const counted = agreeing(flows);
        expect(counted).toEqual(flows.slice(flows.length - counted.length));
        const average = counted.reduce((sum, flow) => sum + flow, 0) / counted.length;
        expect((Math.max(...counted) - Math.min(...counted)) / average).toBeLessThanOrEqual(0.05 + 1e-9);
      }),
    );
  });
});

describe("restraint", () => {
  it("passes while the cap reaches the plan, and gives the cap", () => {
    const { cap } = result("restraint", RIG);
    if (cap === null) throw new Error("no cap");
    expect(result("restraint", { ...RIG, planned: cap }).passes).toBe(true);
    expect(result("restraint", { ...RIG, planned: cap * 1.001 }).passes).toBe(false);
    expect(result("restraint", { ...RIG, planned: cap * 1.001 }).cap).toBe(cap);
  });

  it("by hand: two straps of 8000 N at 10 and 20 degrees, 300 m, 15 degC, 118 hp on 1.75 m", () => {
    const density = standardAir(300).pressure / (287.0529 * 288.15);
    const thrust = 0.75 ** (2 / 3) * (2 * density * (Math.PI / 4) * 1.75 ** 2 * (118 * 745.69987) ** 2) ** (1 / 3);
    const holding = 2 * 8000 * Math.cos(deg(10)) * Math.cos(deg(20));
    expect((result("restraint", RIG).cap ?? 0) * 60).toBeCloseTo(2300 * Math.sqrt(holding / (1.5 * thrust)), 3);
  });

  it("dead mass by hand: 200 kg at mu 0.5 and 10 degrees holds 915 N times the cosine", () => {
    const inputs = { ...RIG, straps: [DEAD] };
    expect(figureOf("restraint", inputs, "nose: may take (limit: anchor)")).toBeCloseTo(slidingPull(200, 0.5, deg(10)), 9);
    expect(Math.round(figureOf("restraint", inputs, "nose: may take") ?? 0)).toBe(915);
    expect(result("restraint", inputs).passes).toBe(false);
    expect(result("restraint", inputs).sentence).toMatch(/^Holds up to \d+ rpm only \(limit: the lines\), planned 2400 rpm: add or better/);
  });

  it("the weaker side governs both of a pair", () => {
    const anchor = (rating: number) => ({ kind: "rated", rating }) as const;
    const strap = (name: string, rating: number, azimuth: number) => ({
      name,
      pair: "a",
      elevation: 0.1,
      azimuth,
      wll: 8000,
      anchor: anchor(rating),
    });
    const [left, right] = lines([strap("left", 3000, -0.3), strap("right", 9000, 0.32)]);
    expect(left?.force).toBe(3000);
    expect(right?.force).toBe(3000);
    expect(right?.by).toBe("pair");
    expect(left?.axial).toBeCloseTo(right?.axial ?? 0, 9);
    expect(left?.axial).toBeCloseTo(3000 * Math.cos(0.1) * Math.cos(0.32), 9);
  });

  it("the cap is 0 where the slope alone is more than the rig holds, and the sentence says so", () => {
    const weak = { ...STRAP, pair: undefined, azimuth: 0, wll: 500 };
    const done = result("restraint", { ...RIG, slope: deg(15), straps: [weak] });
    expect(done.cap).toBe(0);
    expect(done.passes).toBe(false);
    expect(done.sentence).toMatch(/^Holds at no speed/);
  });

  it("wheels count only when credited, with their own load", () => {
    const without = result("restraint", RIG).cap ?? 0;
    const credited = { ...RIG, wheels: "credited", wheelFriction: 0.3, wheelMass: 400 };
    expect(figureOf("restraint", credited, "Brakes")).toBeCloseTo(0.3 * 400 * 9.80665, 9);
    expect(result("restraint", credited).cap).toBeGreaterThan(without);
    expect(result("restraint", { ...RIG, wheelFriction: 0.3, wheelMass: 400 }).cap).toBe(without);
    expect(fieldsOf("restraint", { ...credited, wheelMass: 501 })).toEqual(["wheelMass"]);
    expect(fieldsOf("restraint", { ...RIG, wheels: "credited" })).toEqual(["wheelFriction", "wheelMass"]);
  });

  it("tailwheel: nosing over has its own cap and the lower one counts", () => {
    const light = { ...TAIL, holdDown: 0 };
    const nose = result("restraint", light);
    const thrust = figureOf("restraint", light, "Thrust at the reference speed") ?? 0;
    expect(nose.cap).toBeCloseTo(rpm(2300) * Math.sqrt((500 * 9.80665 * 0.4) / (1.5 * thrust * 1.6)), 9);
    expect(nose.cap).toBeLessThan(result("restraint", RIG).cap ?? 0);
    expect(nose.sentence).toContain("hold the tail down harder");
    expect(result("restraint", { ...TAIL, holdDown: 50_000 }).cap).toBe(result("restraint", RIG).cap);
    expect(fieldsOf("restraint", { ...RIG, gear: "tail" })).toEqual(["thrustHeight", "centreArm", "holdDown", "tailArm"]);
  });

  it("geared: planned and cap stay crankshaft speeds, the propeller's is shown", () => {
    const geared = { ...RIG, planned: rpm(5000), reference: rpm(5200), reduction: 2.5 };
    expect(figureOf("restraint", geared, "Propeller speed")).toBeCloseTo(rpm(2000), 12);
    expect(result("restraint", geared).cap).toBeCloseTo(((result("restraint", RIG).cap ?? 0) * 5200) / 2300, 9);
  });

  it.each([
    ["no strap", [], "straps"],
    ["half a pair", [STRAP], "straps.0.pair"],
    ["three in a pair", [STRAP, { ...STRAP, azimuth: deg(20) }, STRAP], "straps.0.pair"],
    ["both of a pair to the left", [STRAP, STRAP], "straps.0.pair"],
    ["a pair of unlike elevation", [STRAP, { ...STRAP, azimuth: deg(20), elevation: deg(30) }], "straps.0.pair"],
    ["a lone strap to one side", [{ ...STRAP, pair: undefined }], "straps.0.pair"],
    ["no anchor", [{ ...DEAD, anchor: undefined }], "straps.0.anchor"],
    ["a dead mass without friction", [{ ...DEAD, friction: undefined }], "straps.0.friction"],
    ["a rated point without rating", [{ ...DEAD, anchor: "rated" }], "straps.0.rating"],
    ["a strap straight up", [{ ...DEAD, elevation: deg(90) }], "straps.0.elevation"],
    ["a strap without load limit", [{ ...DEAD, wll: 0 }], "straps.0.wll"],
  ])("refuses %s at its field", (_name, straps, field) => {
    expect(fieldsOf("restraint", { ...RIG, straps })[0]).toBe(field);
  });

  it("property: what makes it harder never raises the cap, what helps never lowers it", () => {
    const worse: [keyof typeof TAIL, number][] = [
      ["power", 1],
      ["diameter", 1],
      ["merit", 1],
      ["factor", 1],
      ["slope", 1],
      ["temperature", -1],
      ["pressureAltitude", -1],
      ["reference", -1],
      ["thrustHeight", 1],
      ["centreArm", -1],
      ["holdDown", -1],
    ];
    const step: Partial<Record<keyof typeof TAIL, number>> = { slope: 0.01, temperature: 10, pressureAltitude: 500 };
    fc.assert(
      fc.property(fc.constantFrom(...worse), fc.double({ min: 0.01, max: 0.2, noNaN: true }), ([name, sign], share) => {
        const value = TAIL[name] as number;
        const by = (step[name] ?? value) * share * sign;
        expect(result("restraint", { ...TAIL, [name]: value + by }).cap ?? 0).toBeLessThanOrEqual(
          (result("restraint", TAIL).cap ?? 0) + 1e-12,
        );
      }),
    );
    fc.assert(
      fc.property(fc.double({ min: 100, max: 20_000, noNaN: true }), fc.double({ min: 0, max: 5000, noNaN: true }), (wll, more) => {
        const cap = (limit: number) =>
          result("restraint", { ...RIG, straps: RIG.straps.map((strap) => ({ ...strap, wll: limit })) }).cap ?? 0;
        expect(cap(wll + more)).toBeGreaterThanOrEqual(cap(wll));
      }),
    );
  });

  it("property: at the cap, factor x thrust + slope is what the rig holds", () => {
    const d = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(d(10, 100), d(500, 10_000), d(1, 3), d(0, 2e4), d(0, 3000), (reference, thrust, factor, holding, steady) => {
        const cap = capRotation(reference, thrust, factor, holding, steady);
        expect(factor * thrustAt(cap, reference, thrust) + steady).toBeCloseTo(Math.max(holding, steady), 5);
      }),
    );
  });

  it("kernels throw instead of giving NaN", () => {
    expect(() => staticThrust(-1, 2, 1.2, 0.7)).toThrow(RangeError);
    expect(() => staticThrust(1e5, 2, 1.2, 1.1)).toThrow(RangeError);
    expect(() => slidingPull(100, 0.5, Math.PI / 2)).toThrow(RangeError);
    expect(() => capRotation(0, 1, 1, 1, 0)).toThrow(RangeError);
  });
});

describe("compression", () => {
  it("names the leaking cylinder, where it leaks, and what comes next", () => {
    const cylinders = [COMPRESSION.cylinders[0], { name: "2", reading: toSI(58, "psi"), leak: "exhaust" }];
    const done = result("compression", { ...COMPRESSION, cylinders });
    expect(done.passes).toBe(false);
    expect(done.sentence).toMatch(
      /^More than 25 % is lost: cylinder 2 loses 27\.5 % \(exhaust valve or port\)\. Run the engine at least 3 min/,
    );
    expect(figureOf("compression", { ...COMPRESSION, cylinders }, "Spread")).toBeCloseTo(toSI(18, "psi"), 6);
  });

  it.each([
    ["fewer readings than cylinders", { count: 3 }, "cylinders"],
    ["a looser limit without a source", { maxLoss: 0.3 }, "limitFrom"],
    [
      "a cylinder above the supply",
      { cylinders: [COMPRESSION.cylinders[0], { name: "2", reading: toSI(81, "psi"), leak: "none" }] },
      "cylinders.1.reading",
    ],
    ["a cylinder twice", { cylinders: [COMPRESSION.cylinders[0], COMPRESSION.cylinders[0]] }, "cylinders.1.name"],
    ["no leak stated", { cylinders: [COMPRESSION.cylinders[0], { name: "2", reading: 5e5 }] }, "cylinders.1.leak"],
    ["half a cylinder", { count: 1.5 }, "count"],
  ])("refuses %s at its field", (_name, change, field) => {
    expect(fieldsOf("compression", { ...COMPRESSION, ...change })).toEqual([field]);
  });

  it("a maker's looser limit counts with its source", () => {
    const cylinders = COMPRESSION.cylinders.map((cylinder) => ({ ...cylinder, reading: toSI(57, "psi") }));
    expect(result("compression", { ...COMPRESSION, cylinders, maxLoss: 0.3, limitFrom: "engine manual p. 12" }).passes).toBe(true);
    expect(result("compression", { ...COMPRESSION, cylinders }).passes).toBe(false);
  });

  it("property: a better reading never turns a pass into a fail", () => {
    const psi = fc.double({ min: 0, max: 80, noNaN: true });
    const passes = (reading: number) =>
      result("compression", { ...COMPRESSION, count: 1, cylinders: [{ name: "1", reading: toSI(reading, "psi"), leak: "none" }] }).passes;
    fc.assert(fc.property(psi, psi, (a, b) => !passes(Math.min(a, b)) || passes(Math.max(a, b))));
  });
});

describe("torque", () => {
  const IN_LINE = { wrenchLength: 0.4, extension: 0.05, angle: 0 };

  it.each([
    ["torque", () => wrenchSetting(0, IN_LINE)],
    ["setting", () => appliedTorque(Number.NaN, IN_LINE)],
    ["wrenchLength", () => wrenchSetting(20, { ...IN_LINE, wrenchLength: 0 })],
    ["extension", () => wrenchSetting(20, { ...IN_LINE, extension: -0.4 })],
    ["extension", () => wrenchSetting(20, { ...IN_LINE, extension: Number.POSITIVE_INFINITY })],
    ["angle", () => wrenchSetting(20, { ...IN_LINE, angle: Number.NaN })],
    ["drag", () => withDrag({ min: 1, max: 2 }, -1)],
  ])("refuses at %s", (field, call) => {
    const done = call();
    expect(!done.ok && done.errors[0]?.field).toBe(field);
    expect(!done.ok && done.errors[0]?.sentence).toMatch(/: \w/);
  });

  it("leaves an open end of a band open", () => {
    expect(withDrag({ min: null, max: 20 }, 2)).toEqual({ ok: true, result: { min: null, max: 22 } });
  });

  it("property: setting the wrench as told gives the fastener its torque; a longer adapter asks for less", () => {
    const d = (min: number, max: number) => fc.double({ min, max, noNaN: true });
    fc.assert(
      fc.property(d(1, 500), d(0.1, 1.5), d(-0.09, 0.5), d(0, Math.PI / 3), (torque, wrenchLength, extension, angle) => {
        const setting = wrenchSetting(torque, { wrenchLength, extension, angle });
        const back = setting.ok ? appliedTorque(setting.result, { wrenchLength, extension, angle }) : setting;
        expect(back.ok && back.result).toBeCloseTo(torque, 6);
        const longer = wrenchSetting(torque, { wrenchLength, extension: extension + 0.1, angle });
        expect(setting.ok && longer.ok && longer.result < setting.result).toBe(true);
      }),
    );
  });
});

describe("crank clock", () => {
  const T0 = 1_700_000_000_000;
  const burst = (at: number, seconds: number, pressureAfter: number | null = null): Burst => ({
    at: T0 + at * 1000,
    seconds,
    pressureAfter,
  });
  const when = (seconds: number) => T0 + seconds * 1000;

  it("gives up at the total, without a time to go on", () => {
    const bursts = [0, 30, 60, 90, 120, 150].map((at) => burst(at, 10));
    expect(mayCrank(DEFAULT_CRANK_RULE, bursts, when(9000))).toMatchObject({ may: false, reason: "give-up", at: null });
    expect(crankSummary(bursts, 60)).toEqual({ bursts: 6, total: 60, pressure: null, gaveUp: true });
  });

  it("shortens the last burst to what is left of the total", () => {
    const bursts = [0, 30, 60, 90, 120].map((at) => burst(at, 10));
    expect(mayCrank({ ...DEFAULT_CRANK_RULE, giveUpAfter: 54 }, bursts, when(200))).toEqual({ may: true, seconds: 4, left: 1 });
  });

  it("sums cranking and time to pressure, in any order of records, and lifts the give-up", () => {
    const bursts = [burst(40, 8, 3), burst(0, 10), burst(80, 10)];
    expect(crankSummary(bursts, 60)).toEqual({ bursts: 3, total: 28, pressure: { sinceFirst: 43, cranking: 13 }, gaveUp: false });
    expect(mayCrank({ ...DEFAULT_CRANK_RULE, giveUpAfter: 20 }, bursts, when(200))).toEqual({ may: true, seconds: 10, left: 3 });
  });

  it("pressure after the give-up total does not undo it", () => {
    expect(crankSummary([burst(0, 10), burst(40, 10, 6)], 15).gaveUp).toBe(true);
    expect(crankSummary([burst(0, 10), burst(40, 10, 5)], 15).gaveUp).toBe(false);
  });

  it("an over-long burst counts as several, and rests as long", () => {
    expect(mayCrank(DEFAULT_CRANK_RULE, [burst(0, 25)], when(25 + 59.999))).toMatchObject({ may: false, reason: "rest", at: when(85) });
    expect(mayCrank(DEFAULT_CRANK_RULE, [burst(0, 25)], when(85))).toEqual({ may: true, seconds: 10, left: 3 });
  });

  it("a running burst is named, and its rest is in the time", () => {
    expect(mayCrank(DEFAULT_CRANK_RULE, [burst(0, 10)], when(4))).toMatchObject({ may: false, reason: "running", at: when(30) });
  });

  it.each([
    ["no length", [burst(0, 0)], "Burst 1 must have lasted"],
    ["no number", [burst(0, Number.NaN)], "Burst 1 must have lasted"],
    ["no time", [burst(Number.NaN, 5)], "Burst 1 has no time"],
    ["pressure after its end", [burst(0, 5, 6)], "Burst 1: pressure"],
    ["overlap", [burst(0, 10), burst(9, 5)], "Burst 2 begins before burst 1 ended"],
  ])("refuses a record with %s", (_name, bursts, sentence) => {
    expect(burstErrors(bursts)[0]).toContain(sentence);
    expect(mayCrank(DEFAULT_CRANK_RULE, bursts, when(100))).toMatchObject({ may: false, reason: "record", at: null });
    expect(() => crankSummary(bursts, 60)).toThrow(RangeError);
  });

  it("throws for a rule that is no rule", () => {
    for (const change of [{ on: 0 }, { tries: 1.5 }, { tries: 0 }, { longRest: 5 }, { rest: Number.NaN }]) {
      expect(() => mayCrank({ ...DEFAULT_CRANK_RULE, ...change }, [], T0)).toThrow(RangeError);
    }
  });

  it("property: following the clock never breaks the duty; what it allows stays allowed; when it names a time, that time is right", () => {
    const rules = fc.record({
      on: fc.integer({ min: 2, max: 30 }),
      rest: fc.integer({ min: 0, max: 60 }),
      tries: fc.integer({ min: 1, max: 6 }),
      longRest: fc.integer({ min: 60, max: 1800 }),
      giveUpAfter: fc.constant(10_000),
    });
    const steps = fc.array(fc.record({ wait: fc.integer({ min: 0, max: 2000 }), share: fc.double({ min: 0.1, max: 1, noNaN: true }) }), {
      maxLength: 20,
    });
    fc.assert(
      fc.property(rules, steps, (rule: CrankRule, moves) => {
        const bursts: Burst[] = [];
        let now = T0;
        let inSet = 0;
        for (const { wait, share } of moves) {
          now += wait * 1000;
          let state = mayCrank(rule, bursts, now);
          if (!state.may) {
            if (state.at === null) throw new Error("no time named");
            expect(state.at).toBeGreaterThan(now);
            expect(mayCrank(rule, bursts, state.at - 1).may).toBe(false);
            now = state.at;
            state = mayCrank(rule, bursts, now);
          }
          expect(state.may).toBe(true);
          expect(mayCrank(rule, bursts, now + 3_600_000).may).toBe(true);
          const last = bursts.at(-1);
          const gap = last ? now - (last.at + last.seconds * 1000) : Number.POSITIVE_INFINITY;
          expect(gap).toBeGreaterThanOrEqual(rule.rest * 1000);
          inSet = gap >= rule.longRest * 1000 ? 1 : inSet + 1;
          expect(inSet).toBeLessThanOrEqual(rule.tries);
          const seconds = Math.max(1, Math.round(share * rule.on));
          bursts.push({ at: now, seconds, pressureAfter: null });
          now += seconds * 1000;
        }
      }),
    );
  });
});

describe("reading a sheet's form", () => {
  const parse = (text: string, quantity: Parameters<typeof parseEntry>[1], as?: { us: Parameters<typeof parseEntry>[3] }) =>
    parseEntry(text, quantity, "us", as?.us);
  const form = (entries: Record<string, string | string[]>) =>
    new Map(Object.entries(entries).map(([name, value]) => [name, [value].flat()]));
  const FUEL_FORM = {
    supply: "pump",
    takeoffFlow: "10",
    power: "",
    specific: "0.55",
    density: "6",
    measuredAt: "return",
    noseUp: "15",
    fuelInTank: "2",
    "catches.pump": ["main", "second", "Main", "second", "main"],
    "catches.volume": ["1", "1", "", "1", ""],
    "catches.mass": ["", "", "6", "", ""],
    "catches.seconds": ["257", "270", "256", "271", ""],
  };

  it("groups catches by pump, leaves out what is empty, skips rows with presets only", () => {
    const read = readSheetForm("fuel-flow", form(FUEL_FORM), parse);
    if (!read.ok) throw new Error(JSON.stringify(read.errors));
    expect(read.inputs).not.toHaveProperty("power");
    const pumps = read.inputs.pumps as typeof FUEL.pumps;
    expect(pumps.map((pump) => [pump.name, pump.catches.map((row) => row.seconds)])).toEqual([
      ["main", [257, 256]],
      ["second", [270, 271]],
    ]);
    expect(result("fuel-flow", read.inputs).passes).toBe(true);
  });

  it("says what is wrong at the row as it was sent", () => {
    const bad = form({
      ...FUEL_FORM,
      noseUp: "steep",
      "catches.pump": ["main", "main", "", "b"],
      "catches.volume": ["", "1", "1", "1"],
      "catches.mass": ["", "", "", "6"],
      "catches.seconds": ["", "250", "260", "270"],
    });
    const read = readSheetForm("fuel-flow", bad, parse);
    expect(!read.ok && read.errors.map((error) => error.field)).toEqual(["noseUp", "catches.2.pump"]);
    const both = readSheetForm(
      "fuel-flow",
      form({
        ...FUEL_FORM,
        "catches.pump": ["main", "main", "b", "b"],
        "catches.volume": ["", "1", "1", "1"],
        "catches.mass": ["", "", "", "6"],
        "catches.seconds": ["", "250", "260", "270"],
      }),
      parse,
    );
    expect(!both.ok && both.errors.map((error) => error.field)).toEqual(["catches.3.mass"]);
    const none = readSheetForm("fuel-flow", form({ ...FUEL_FORM, "catches.volume": [], "catches.mass": [], "catches.seconds": [] }), parse);
    expect(!none.ok && none.errors).toEqual([
      { field: "catches", sentence: "Enter the catches of at least one pump, or of the tank by gravity." },
    ]);
  });

  const RIG_FORM = {
    planned: "2400",
    power: "118",
    reference: "2300",
    reduction: "1",
    diameter: "69",
    merit: "0.75",
    pressure: "28.87",
    temperature: "59",
    factor: "1.5",
    mass: "1100",
    slope: "0",
    wheels: "none",
    wheelFriction: "nonsense",
    wheelMass: "",
    gear: "nose",
    "straps.name": ["left", "right"],
    "straps.pair": ["a", "A"],
    "straps.elevation": ["10", "10"],
    "straps.azimuth": ["-20", "20"],
    "straps.wll": ["2000", "2000"],
    "straps.anchor": ["rated", "mass"],
    "straps.rating": ["2000", ""],
    "straps.anchorMass": ["", "1000"],
    "straps.friction": ["", "0.5"],
  };

  it("asks only what the choices ask, row by row, and reads the pressure in inches of mercury", () => {
    const read = readSheetForm("restraint", form(RIG_FORM), parse);
    if (!read.ok) throw new Error(JSON.stringify(read.errors));
    expect(read.inputs).not.toHaveProperty("wheelFriction");
    expect(standardAir(Number(read.inputs.pressureAltitude)).pressure).toBeCloseTo(28.87 * 3386.388640341, 2);
    const thin = readSheetForm("restraint", form({ ...RIG_FORM, pressure: "2" }), parse);
    expect(!thin.ok && thin.errors.map((error) => error.field)).toEqual(["pressure"]);
    expect(!thin.ok && thin.errors[0]?.sentence).toMatch(/^Air pressure at the field must be between .* hPa \(.* inHg\)/);
    expect((read.inputs.straps as object[])[1]).not.toHaveProperty("rating");
    expect(computeSheet("restraint", read.inputs).ok).toBe(true);
  });

  it("refuses a choice that is none, and a field that a choice asks for", () => {
    const read = readSheetForm("restraint", form({ ...RIG_FORM, wheels: "credited", gear: "ski", "straps.rating": ["", ""] }), parse);
    expect(!read.ok && read.errors.map((error) => error.field)).toEqual(["wheelFriction", "wheelMass", "gear", "straps.0.rating"]);
    expect(!read.ok && read.errors[2]?.sentence).toBe('Landing gear: choose "nosewheel" or "tailwheel".');
  });

  it("the presets of a form alone are not a sheet", () => {
    for (const sheet of KEYS) expect(readSheetForm(sheet, new Map(), parse).ok).toBe(false);
  });

  it("every preset lies in its field's range, and every condition names a choice that comes before it", () => {
    for (const sheet of KEYS) {
      for (const fields of [SHEET_FORMS[sheet].fields, ...SHEET_FORMS[sheet].groups.map((group) => group.fields)]) {
        fields.forEach((field, index) => {
          if (field.kind === "quantity" && field.preset !== null) expect(field.preset >= field.min && field.preset <= field.max).toBe(true);
          const { when } = field;
          if (when)
            expect(
              fields
                .slice(0, index)
                .some(
                  (other) =>
                    other.kind === "choice" && other.name === when.field && other.options.some((option) => option.value === when.is),
                ),
            ).toBe(true);
        });
        expect(new Set(fields.map((field) => field.name)).size).toBe(fields.length);
      }
    }
  });
});
