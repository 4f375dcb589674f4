/** Wrench settings and the standard table against AC 43.13-1B and technical manuals. */
import { unit as mathUnit } from "mathjs";
import { describe, expect, it } from "vitest";
import { appliedTorque, withDrag, wrenchSetting } from "#app/lib/bench/torque";
import { standardTorque, TORQUE_TABLE } from "#app/lib/bench/torque-table";
import { fromSI, toSI } from "#app/lib/units/convert";

const inLb = (n: number) => toSI(n, "in-lb");
const adapter = (length: number, extension: number, degrees = 0) => ({
  wrenchLength: toSI(length, "in"),
  extension: toSI(extension, "in"),
  angle: toSI(degrees, "deg"),
});
function value(outcome: ReturnType<typeof wrenchSetting>): number {
  if (!outcome.ok) throw new Error(outcome.errors[0]?.sentence);
  return outcome.result;
}

describe("adapter on a wrench: T_w = T_a L / (L + A)", () => {
  it.each([
    ["AC 43.13-1B, chapter 7 (read)", 135, 10, 1.5, 117.39],
    ["AC 43.13-1B, chapter 7 (read)", 135, 10, -1.5, 158.82],
    ["TM 1-1500-204-23-9 (read)", 300, 10, 4, 214.29],
    ["from the formula (computed)", 50, 16, 2, 44.44],
  ])("%s: %f in-lb, %f in, %f in", (_source, torque, length, extension, setting) => {
    expect(fromSI(value(wrenchSetting(inLb(torque), adapter(length, extension))), "in-lb")).toBeCloseTo(setting, 2);
  });

  it("40 lb-ft with 12 in and 4 in: 30 (read)", () => {
    expect(fromSI(value(wrenchSetting(toSI(40, "ft-lb"), adapter(12, 4))), "ft-lb")).toBeCloseTo(30, 9);
  });

  it("TM 9-254 (read): set 60 with 12 in and 2 in applies 70", () => {
    expect(value(appliedTorque(60, adapter(12, 2)))).toBeCloseTo(70, 9);
  });

  it("angled adapter counts A cos(angle) (read); at a right angle nothing is corrected", () => {
    expect(value(wrenchSetting(100, adapter(10, 2, 60)))).toBeCloseTo(value(wrenchSetting(100, adapter(10, 1))), 9);
    expect(value(wrenchSetting(100, adapter(10, 2, 90)))).toBeCloseTo(100, 9);
    expect(value(wrenchSetting(100, adapter(10, 2, 180)))).toBeCloseTo(value(wrenchSetting(100, adapter(10, -2))), 9);
  });

  it("negative check: dividing by 1 + A in feet is wrong; 100 ft-lb, 9 in on 18 in is 66.67, not 57.14 (computed)", () => {
    const setting = fromSI(value(wrenchSetting(toSI(100, "ft-lb"), adapter(18, 9))), "ft-lb");
    expect(setting).toBeCloseTo(66.67, 2);
    expect(setting).not.toBeCloseTo(57.14, 0);
  });
});

describe("torque units", () => {
  it.each([
    // Exact unit definitions (computed); NIST SP 811 prints the first six or seven digits (from memory).
    ["in-lb", 0.1129848290276167, "1 lbf in", "N m"],
    ["ft-lb", 1.3558179483314, "1 lbf ft", "N m"],
    ["psi", 6894.757293168, "1 psi", "Pa"],
    ["hp", 745.6998715822702, "1 hp", "W"],
    ["US gal", 0.003785411784, "1 gal", "m^3"],
    ["lb", 0.45359237, "1 lbm", "kg"],
  ] as const)("1 %s", (unit, si, other, otherUnit) => {
    expect(toSI(1, unit) / si).toBeCloseTo(1, 12);
    // A second opinion; its own constants agree to about 1e-6 only.
    expect(mathUnit(other).toNumber(otherUnit) / si).toBeCloseTo(1, 5);
  });

  it("160-190 in-lb = 18.0776-21.4671 N m (computed)", () => {
    expect(inLb(160)).toBeCloseTo(18.0776, 4);
    expect(inLb(190)).toBeCloseTo(21.4671, 4);
  });
});

describe("AC 43.13-1B, table 7-1, in-lb, dry cadmium threads (read)", () => {
  // thread, tension, shear, highest in tension; "" = public copies differ or not given.
  const TABLE = `
    8-36 12-15 7-9 20|10-32 20-25 12-15 40|1/4-28 50-70 30-40 100|5/16-24 100-140 60-85 225|3/8-24 160-190 95-110 390
    7/16-20 450-500 270-300 840|1/2-20 480-690 290-410 1100|9/16-18 800-1000 480-600 1600|5/8-18 1100-1300 ? 2400
    3/4-16 2300-2500 1300-1500 5000|7/8-14 2500-3000 1500-1800 7000|1-14 3700-5500 2200-3300 10000
    1-1/8-12 5000-7000 3000-4200 15000|1-1/4-12 9000-11000 5400-6600 25000
    8-32 12-15 7-9 ?|10-24 20-25 12-15 ?|1/4-20 40-50 25-30 ?|5/16-18 80-90 48-55 ?|3/8-16 160-185 ? ?|7/16-14 235-255 140-155 ?
    1/2-13 400-480 240-290 ?|9/16-12 500-700 300-420 ?|5/8-11 700-900 420-540 ?|3/4-10 1150-1600 700-950 ?|7/8-9 2200-3000 1300-1800 ?`;
  const rows = TABLE.trim()
    .split(/[|\n]/)
    .map((row) => row.trim().split(" "));

  it("has these rows and no others", () => {
    expect(TORQUE_TABLE.map((row) => row.thread)).toEqual(rows.map(([thread]) => thread));
    expect(new Set(TORQUE_TABLE.map((row) => row.thread)).size).toBe(25);
  });

  it.each(rows)("%s", (thread = "", tension = "", shear = "", most = "") => {
    const shown = (nut: "tension" | "shear") => {
      const band = standardTorque(thread, nut);
      return band ? `${Math.round(fromSI(band.min ?? 0, "in-lb"))}-${Math.round(fromSI(band.max ?? 0, "in-lb"))}` : "?";
    };
    expect(shown("tension")).toBe(tension);
    expect(shown("shear")).toBe(shear);
    expect(String(TORQUE_TABLE.find((row) => row.thread === thread)?.maxTension ?? "?")).toBe(most);
  });

  it("gives nothing for a thread it does not have", () => {
    expect(standardTorque("M8x1.25", "tension")).toBeNull();
  });

  it("paragraph 7-40d (read): the drag of a self-locking nut is added to both ends", () => {
    const band = standardTorque("3/8-24", "tension") ?? { min: null, max: null };
    const dragged = withDrag(band, inLb(14));
    expect(dragged.ok && [dragged.result.min, dragged.result.max].map((end) => Math.round(fromSI(end ?? 0, "in-lb")))).toEqual([174, 204]);
  });
});
