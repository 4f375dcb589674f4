/** Thrust at rest, friction and straps against momentum theory, statics and published figures. */
import { describe, expect, it } from "vitest";
import { airDensity, standardAir } from "#app/lib/bench/atmosphere";
import { GRAVITY, lines, slidingPull, strapLoad, wheelHolding } from "#app/lib/bench/restraint";
import { inducedVelocity, powerAt, staticThrust, thrustAt } from "#app/lib/bench/thrust";
import { fromSI, toSI } from "#app/lib/units/convert";

const deg = (n: number) => toSI(n, "deg");
const inch = (n: number) => toSI(n, "in");
const hp = (n: number) => toSI(n, "hp");
const RHO = 1.225;

describe("thrust at rest, T = (2 rho A (FM P)^2)^(1/3): momentum theory (read); figures computed", () => {
  it.each([
    [2, 100_000, RHO, 4253.8, 3511.4],
    [1.8, hp(100), RHO, 3260.7, 2691.6],
    [inch(60), hp(80), RHO, 2514.8, 2076.0],
    [inch(72), hp(160), RHO, 4508.0, 3721.3],
    [inch(72), hp(160), 1.0555, 4289.7, 3541.1],
    [inch(74), hp(180), RHO, 4966.2, 4099.5],
  ])("%f m, %f W, %f kg/m3", (diameter, power, density, ideal, real) => {
    expect(staticThrust(power, diameter, density, 1)).toBeCloseTo(ideal, 1);
    expect(staticThrust(power, diameter, density, 0.75)).toBeCloseTo(real, 1);
  });

  it("figure of merit 0.75 keeps 0.82548 of ideal thrust", () => {
    expect(staticThrust(1e5, 2, RHO, 0.75) / staticThrust(1e5, 2, RHO, 1)).toBeCloseTo(0.82548, 5);
  });

  it("negative check: the figure of merit is a ratio of powers, so thrust does not fall to 0.75", () => {
    expect(staticThrust(1e5, 2, RHO, 0.75) / staticThrust(1e5, 2, RHO, 1)).not.toBeCloseTo(0.75, 1);
  });

  it("induced velocity 23.509 m/s for 2 m, 100 kW", () => {
    expect(inducedVelocity(staticThrust(1e5, 2, RHO, 1), 2, RHO)).toBeCloseTo(23.509, 3);
  });

  it("5000 ft standard air: 72 in, 160 hp gives 4289.7 N ideal by way of the atmosphere", () => {
    const air = standardAir(toSI(5000, "ft"));
    expect(Math.abs(staticThrust(hp(160), inch(72), airDensity(air.pressure, air.temperature), 1) - 4289.7)).toBeLessThan(0.2);
  });

  it("is not under the low end of the field rule of 4 to 5 lbf per hp (read): the estimate errs toward more thrust", () => {
    const perHp = fromSI(staticThrust(hp(180), inch(74), RHO, 0.75), "lbf") / 180;
    expect(perHp).toBeGreaterThan(4);
    expect(perHp).toBeLessThan(5.5);
  });

  it("same blade, 2300 to 2600 rpm: thrust x 1.27788, power x 1.44456 (computed)", () => {
    expect(thrustAt(2600, 2300, 1)).toBeCloseTo(1.27788, 5);
    expect(powerAt(2600, 2300, 1)).toBeCloseTo(1.44456, 5);
  });
});

describe("straps: statics (computed)", () => {
  it.each([
    [15, 621.2],
    [30, 692.8],
    [45, 848.5],
    [60, 1200],
  ])("600 lbf on one strap at %i degrees", (angle, load) => {
    expect(strapLoad(600, 1, deg(angle), 0)).toBeCloseTo(load, 1);
    expect(strapLoad(600, 1, 0, deg(angle))).toBeCloseTo(load, 1);
  });

  it("3721 N x 2 on two straps, 15 degrees down and 30 out: 4449 N = 1000.1 lbf each", () => {
    const thrust = staticThrust(hp(160), inch(72), RHO, 0.75);
    expect(Math.round(thrust)).toBe(3721);
    const each = strapLoad(thrust * 2, 2, deg(15), deg(30));
    expect(Math.round(each)).toBe(4449);
    expect(fromSI(each, "lbf")).toBeCloseTo(1000.1, 1);
  });

  it("the lines of such a pair hold what loads them to their limit", () => {
    const anchor = { kind: "rated", rating: 10_000 } as const;
    const pair = [30, -30].map((a) => ({ name: `${a}`, pair: "a", elevation: deg(15), azimuth: deg(a), wll: 4449, anchor }));
    const holding = lines(pair).reduce((sum, line) => sum + line.axial, 0);
    expect(strapLoad(holding, 2, deg(15), deg(30))).toBeCloseTo(4449, 9);
  });
});

describe("friction (Coulomb; computed)", () => {
  it("200 kg of sandbags, mu 0.5, 10 degrees: 915 N", () => {
    expect(slidingPull(200, 0.5, deg(10))).toBeCloseTo((0.5 * 200 * 9.80665) / (0.9848 + 0.0868), 0);
    expect(Math.round(slidingPull(200, 0.5, deg(10)))).toBe(915);
  });

  it.each([
    [0.3, 16.7],
    [0.5, 26.57],
  ])("mu %f: least pull starts the slide at atan(mu) = %f degrees", (mu, angle) => {
    const pulls = Array.from({ length: 6000 }, (_, i) => ({ at: i / 100, pull: slidingPull(100, mu, deg(i / 100)) }));
    const least = pulls.reduce((low, here) => (here.pull < low.pull ? here : low));
    expect(Math.abs(least.at - angle)).toBeLessThan(0.01);
  });

  it("1100 lb on braked mains, mu 0.30: 330 lbf, slides under 837 lbf; the load on those wheels counts, not the aircraft's weight", () => {
    const holds = fromSI(wheelHolding(0.3, toSI(1100, "lb")), "lbf");
    expect(holds).toBeCloseTo(330, 9);
    expect(holds).toBeLessThan(fromSI(staticThrust(hp(160), inch(72), RHO, 0.75), "lbf"));
    expect(fromSI(staticThrust(hp(160), inch(72), RHO, 0.75), "lbf")).toBeCloseTo(836.6, 1);
  });

  it("negative check: a strap that rises makes a dead mass slide sooner than mu m g", () => {
    expect(slidingPull(200, 0.5, deg(10))).toBeLessThan(0.5 * 200 * GRAVITY);
  });
});
