/** Properties of the calculators over random inputs: what must never turn round, and that whatever is in range gives figures. */
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { airDensity, densityAltitude, pressureAltitude, saturationPressure, standardAir } from "#app/lib/bench/atmosphere";
import { type Chemistry, stateOfCharge } from "#app/lib/bench/battery";
import { BENCH, BENCH_KEYS, computeBench, readBenchForm } from "#app/lib/bench/bench";
import type { BenchKey } from "#app/lib/bench/bench-def";
import type { FormField, SheetForm } from "#app/lib/bench/form";
import { lines, type Strap } from "#app/lib/bench/restraint";
import { computeSheet } from "#app/lib/bench/sheet";
import { expectedRotation } from "#app/lib/bench/static-power";
import { machNumber, rotationAtMach, tipSpeed } from "#app/lib/bench/tip-speed";
import { AIRCRAFT_WIRE, voltageDrop, warmed, wireResistance } from "#app/lib/bench/wire";
import { toSI } from "#app/lib/units/convert";
import { format, parseEntry } from "#app/lib/units/display";
import { runsOf } from "./support/property-runs";

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });
const deg = (n: number) => toSI(n, "deg");

const anchor: fc.Arbitrary<Strap["anchor"]> = fc.oneof(
  between(50, 5e4).map((rating) => ({ kind: "rated" as const, rating })),
  fc.record({ mass: between(1, 5000), friction: between(0.05, 1.2) }).map((dead) => ({ kind: "mass" as const, ...dead })),
);
const strap: fc.Arbitrary<Strap> = fc.record({
  name: fc.constant("strap"),
  pair: fc.constant(null),
  elevation: between(0, deg(75)),
  azimuth: between(deg(-75), deg(75)),
  wll: between(50, 5e4),
  anchor,
});
const holdingOf = (straps: Strap[]): number => lines(straps).reduce((sum, line) => sum + line.axial, 0);
const mirrored = (one: Strap, pair: string): Strap[] => [
  { ...one, pair },
  { ...one, pair, azimuth: -one.azimuth },
];
/** Room for rounding, relative. */
const notAbove = (value: number, most: number) => expect(value).toBeLessThanOrEqual(most * (1 + 1e-12) + 1e-12);

describe("holding", () => {
  it("never grows with a steeper strap", () => {
    fc.assert(
      fc.property(strap, between(0, 1), (one, share) => {
        const steeper = { ...one, elevation: one.elevation + share * (deg(75) - one.elevation) };
        notAbove(holdingOf([steeper]), holdingOf([one]));
      }),
      runsOf(2000),
    );
  });

  it("never grows with a wider strap, to either side", () => {
    fc.assert(
      fc.property(strap, between(0, 1), (one, share) => {
        const out = Math.abs(one.azimuth) + share * (deg(75) - Math.abs(one.azimuth));
        notAbove(holdingOf([{ ...one, azimuth: out }]), holdingOf([one]));
        notAbove(holdingOf([{ ...one, azimuth: -out }]), holdingOf([one]));
      }),
      runsOf(2000),
    );
  });

  it("of a symmetric pair is twice that of one of its straps; of two such pairs twice that of one", () => {
    fc.assert(
      fc.property(strap, (one) => {
        const alone = holdingOf([one]);
        const pair = holdingOf(mirrored(one, "a"));
        expect(Math.abs(pair - 2 * alone)).toBeLessThanOrEqual(1e-12 * pair);
        const two = holdingOf([...mirrored(one, "a"), ...mirrored(one, "b")]);
        expect(Math.abs(two - 2 * pair)).toBeLessThanOrEqual(1e-12 * two);
      }),
      runsOf(1000),
    );
  });
});

const rig = fc.record({
  planned: between(10, 60),
  power: between(2e4, 3e5),
  reference: between(30, 100),
  reduction: fc.constant(1),
  diameter: between(1, 2.5),
  merit: between(0.5, 1),
  pressureAltitude: between(-500, 3000),
  temperature: between(250, 315),
  factor: between(1, 3),
  mass: between(150, 2000),
  slope: fc.oneof(fc.constant(0), between(0, deg(3))),
  wheels: fc.constant("none"),
  gear: fc.constant("tail"),
  thrustHeight: between(0.8, 2.5),
  centreArm: between(0.05, 1.5),
  holdDown: between(0, 3000),
  tailArm: between(2, 8),
  straps: fc
    .record({ wll: between(500, 3e4), elevation: between(0, deg(60)), azimuth: between(0, deg(60)) })
    .map((one) =>
      [1, -1].map((side) => ({ ...one, name: `${side}`, pair: "a", azimuth: side * one.azimuth, anchor: "rated", rating: one.wll })),
    ),
});
function cap(inputs: Record<string, unknown>): number {
  const done = computeSheet("restraint", inputs);
  if (!done.ok) throw new Error(JSON.stringify(done.errors));
  return done.result.cap ?? Number.NaN;
}

describe("cap rpm", () => {
  it("falls with thrust: more power, a larger propeller, denser air or a better propeller never raise it", () => {
    fc.assert(
      fc.property(rig, between(1.01, 1.5), (inputs, more) => {
        const before = cap(inputs);
        const after = [
          cap({ ...inputs, power: inputs.power * more }),
          cap({ ...inputs, diameter: inputs.diameter * more }),
          cap({ ...inputs, pressureAltitude: inputs.pressureAltitude - 100 * more }),
          cap({ ...inputs, merit: Math.min(1, inputs.merit * more) }),
        ];
        for (const lower of after) notAbove(lower, before);
        if (before > 0) expect(after[0]).toBeLessThan(before);
      }),
      runsOf(500),
    );
  });

  it("with a tailwheel is never above that of the lines alone, and the sentence names what binds", () => {
    fc.assert(
      fc.property(rig, (inputs) => {
        const linesAlone = cap({ ...inputs, gear: "nose" });
        const both = cap(inputs);
        notAbove(both, linesAlone);
        const done = computeBench("restraint", inputs);
        if (!done.ok) throw new Error("refused");
        const nose = done.result.figures.find((f) => f.label === "Cap by nosing over")?.value ?? Number.NaN;
        // The figure is in whole turns a minute, never above the cap itself.
        expect(nose).toBeLessThanOrEqual(both === linesAlone ? Number.POSITIVE_INFINITY : both + 1e-9);
        if (both < linesAlone) expect(both - nose).toBeLessThan(1 / 60 + 1e-9);
        expect(done.result.sentence.includes("nosing over")).toBe(both < linesAlone);
      }),
      runsOf(500),
    );
  });
});

describe("air", () => {
  const air = fc.record({ pressure: between(54_000, 108_000), temperature: between(273.15, 315) });

  it("moisture only thins it, and thin air is high air", () => {
    fc.assert(
      fc.property(air, between(0, 1), between(0, 1), ({ pressure, temperature }, a, b) => {
        const moist = (humidity: number) => airDensity(pressure, temperature, humidity * saturationPressure(temperature));
        const [drier, wetter] = [moist(Math.min(a, b)), moist(Math.max(a, b))];
        notAbove(wetter, drier);
        expect(densityAltitude(wetter)).toBeGreaterThanOrEqual(densityAltitude(drier) - 1e-6);
      }),
      runsOf(1000),
    );
  });

  it("altitude to pressure and back is the same altitude", () => {
    fc.assert(
      fc.property(between(-1000, 11_000), (h) => {
        expect(Math.abs(pressureAltitude(standardAir(h).pressure) - h)).toBeLessThan(1e-6);
        expect(Math.abs(densityAltitude(standardAir(h).density) - h)).toBeLessThan(1e-6);
      }),
      runsOf(500),
    );
  });
});

describe("tip, static speed, wire and battery", () => {
  it("the tip goes faster with rpm, diameter and forward speed; the speed at a Mach number gives that number", () => {
    fc.assert(
      fc.property(between(0.5, 5), between(1, 100), between(0, 100), between(1.001, 2), (diameter, turns, forward, more) => {
        const tip = tipSpeed(diameter, turns, forward);
        expect(tipSpeed(diameter * more, turns, forward)).toBeGreaterThan(tip);
        expect(tipSpeed(diameter, turns * more, forward)).toBeGreaterThan(tip);
        expect(tipSpeed(diameter, turns, forward + more)).toBeGreaterThan(tip);
        const at = rotationAtMach(0.8, diameter, 288.15, forward);
        expect(machNumber(tipSpeed(diameter, at, forward), 288.15)).toBeCloseTo(0.8, 9);
      }),
      runsOf(500),
    );
  });

  it("the trend to another day and back is the first speed", () => {
    const densities = between(0.6, 1.7);
    fc.assert(
      fc.property(between(20, 100), densities, densities, fc.constantFrom("natural", "boosted"), (rotation, a, b, breathing) => {
        const there = expectedRotation({ rotation, density: a }, b, breathing);
        expect(expectedRotation({ rotation: there, density: b }, a, breathing)).toBeCloseTo(rotation, 9);
      }),
      runsOf(500),
    );
  });

  it("a thicker wire, a shorter or a cooler one never loses more", () => {
    const gauges = AIRCRAFT_WIRE.map(([gauge]) => gauge);
    fc.assert(
      fc.property(fc.nat(gauges.length - 2), between(0.1, 50), between(0.01, 1000), between(0, 100), (index, length, current, warmer) => {
        const per = (n: number, as: "aircraft" | "solid") => wireResistance(gauges[n] ?? 0, as);
        for (const as of ["aircraft", "solid"] as const)
          expect(voltageDrop(per(index + 1, as), length, 1, current)).toBeLessThan(voltageDrop(per(index, as), length, 1, current));
        expect(voltageDrop(per(index, "solid"), length, 2, current)).toBeCloseTo(
          2 * voltageDrop(per(index, "solid"), length, 1, current),
          9,
        );
        expect(warmed(1, 273.15 + warmer)).toBeGreaterThanOrEqual(warmed(1, 273.15));
      }),
      runsOf(500),
    );
  });

  it("a higher rest voltage never means less charge", () => {
    fc.assert(
      fc.property(fc.constantFrom<Chemistry>("lead", "lifepo4"), between(10, 15), between(10, 15), (chemistry, a, b) => {
        const [low, high] = [stateOfCharge(chemistry, Math.min(a, b), 1), stateOfCharge(chemistry, Math.max(a, b), 1)];
        expect(low.charge).toBeLessThanOrEqual(high.charge);
        expect(high.charge).toBeGreaterThanOrEqual(0);
        expect(high.charge).toBeLessThanOrEqual(1);
      }),
      runsOf(500),
    );
  });
});

/** Text of a field as a person would send it: inside its range mostly, else at an end, empty or no number. */
function typed(field: FormField): fc.Arbitrary<string> {
  if (field.kind === "choice")
    return fc.oneof(
      { weight: 9, arbitrary: fc.constantFrom(...field.options.map((o) => o.value)) },
      { weight: 1, arbitrary: fc.constant("odd") },
    );
  if (field.kind === "text") return fc.constantFrom("left", "right", "a", "1", "2", "");
  const { min, max, quantity } = field;
  const inside = (quantity === "count" ? fc.integer({ min, max }) : between(min, max)).map(String);
  const some = field.preset === null ? inside : fc.oneof(inside, fc.constant(String(field.preset)));
  return fc.oneof({ weight: 12, arbitrary: some }, { weight: 1, arbitrary: fc.constantFrom(String(min), String(max), "", "x") });
}

function sentForm(form: SheetForm): fc.Arbitrary<Map<string, string[]>> {
  const rows = form.groups.map((group) =>
    fc
      .array(fc.tuple(...group.fields.map(typed)), { maxLength: 3 })
      .map((sent) => group.fields.map((f, i) => [`${group.name}.${f.name}`, sent.map((row) => row[i] ?? "")] as const)),
  );
  const plain = fc.tuple(...form.fields.map(typed)).map((texts) => form.fields.map((f, i) => [f.name, [texts[i] ?? ""]] as const));
  return fc.tuple(plain, ...rows).map((parts) => new Map<string, string[]>(parts.flat().map(([name, texts]) => [name, [...texts]])));
}

/** Numbers as SI, so that ranges are hit and not units. */
const parse = (text: string) => {
  const si = Number(text);
  return text !== "" && Number.isFinite(si) ? { ok: true as const, si } : { ok: false as const, sentence: `"${text}" is not a number.` };
};

describe("every calculator of the bench", () => {
  const computed: Partial<Record<BenchKey, number>> = {};

  it.each(BENCH_KEYS)(
    "%s: a form gives finite figures with sentences, or sentences at fields that the form has; never NaN, never a throw",
    (key) => {
      const { form } = BENCH[key];
      const names = new Set([
        ...form.fields.map((f) => f.name),
        ...form.groups.flatMap((g) => [g.name, ...g.fields.map((f) => `${g.name}.${f.name}`)]),
      ]);
      fc.assert(
        fc.property(sentForm(form), (sent) => {
          const read = readBenchForm(key, sent, parse);
          if (!read.ok) {
            for (const { field, sentence } of read.errors) {
              expect(names).toContain(field.replace(/\.\d+(?=\.|$)/, ""));
              expect(sentence).toMatch(/^[“"A-Z0-9].{15,}[.]$/);
              expect(sentence).not.toMatch(/NaN|Infinity|undefined|null/);
            }
            return;
          }
          const done = computeBench(key, read.inputs);
          if (!done.ok) throw new Error(`read but not computed: ${JSON.stringify(done.errors)}`);
          computed[key] = (computed[key] ?? 0) + 1;
          const { figures, margin, rule, sentence, caution } = done.result;
          for (const { label, value } of [...figures, ...(margin ? [margin] : []), ...(rule ? [rule] : [])]) {
            expect(Number.isFinite(value), `${label}: ${value}`).toBe(true);
            expect(label).not.toBe("");
          }
          expect(sentence).not.toMatch(/NaN|Infinity|undefined|null/);
          expect(sentence).toMatch(/\.$/);
          expect(caution.length).toBeGreaterThan(60);
          if (margin && done.result.passes !== null)
            expect([key, done.result.passes || margin.value <= 0 || otherReason(key)]).toEqual([key, true]);
        }),
        runsOf(800),
      );
      // The generator reaches results, not refusals alone; a rig of random straps is hardly ever symmetric and has its own properties above.
      if (key !== "restraint") expect(computed[key] ?? 0).toBeGreaterThan(0);
    },
  );

  it.each(BENCH_KEYS)("%s: has question, criterion and source, and presets inside their ranges", (key) => {
    const { answers, criterion, source, form } = BENCH[key];
    expect(answers).toMatch(/\?$/);
    for (const text of [criterion, source, form.caution, form.formula]) expect(text).toMatch(/\.$/);
    for (const field of [...form.fields, ...form.groups.flatMap((g) => g.fields)]) {
      expect(field.help).toMatch(/\.$/);
      if (field.kind !== "quantity") continue;
      expect(field.min).toBeLessThan(field.max);
      if (field.preset !== null) expect(field.preset >= field.min && field.preset <= field.max).toBe(true);
    }
  });
});

describe("ranges", () => {
  const amounts = BENCH_KEYS.flatMap((key) => {
    const { fields, groups } = BENCH[key].form;
    return [...fields, ...groups.flatMap((g) => g.fields)].flatMap((f) =>
      f.kind === "quantity" ? [[`${key} ${f.name}`, f] as const] : [],
    );
  });

  it.each(amounts)("both ends of %s can be typed, in both systems", (_name, field) => {
    for (const units of ["si", "us"] as const)
      for (const end of [field.min, field.max]) {
        const as = field.as?.[units];
        const entry = parseEntry(format(field.quantity, end, units, as).value, field.quantity, units, as);
        expect(entry.ok || entry.sentence).toBe(true);
      }
  });
});

/** Sheets with a second criterion beside the margin's: catches that disagree, charge of a battery, rest of a starter, the table's highest torque. */
const otherReason = (key: BenchKey): boolean => ["fuel-flow", "battery", "crank", "torque"].includes(key);
