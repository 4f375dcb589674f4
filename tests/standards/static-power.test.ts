/** Static speed, power and thrust with the density of the air. */
import { describe, expect, it } from "vitest";
import { standardAir } from "#app/lib/bench/atmosphere";
import { computeBench } from "#app/lib/bench/bench";
import { expectedRotation, powerRatio, staticSpeedShare, thrustRatio, torqueShare } from "#app/lib/bench/static-power";
import { powerAt, thrustAt } from "#app/lib/bench/thrust";
import { toSI } from "#app/lib/units/convert";

const air = (feet: number) => standardAir(toSI(feet, "ft"));
const rpm = (n: number) => toSI(n, "rpm");

describe("Gagg and Ferrar (from memory): power 1.132 sigma - 0.132", () => {
  it("static speed hardly moves: 0.9893 of sea level at 5000 ft (computed)", () => {
    expect(staticSpeedShare(air(5000).density, "natural")).toBeCloseTo(0.9893, 4);
  });

  it("thrust does move: with density times speed squared", () => {
    const [low, high] = [air(0).density, air(5000).density];
    const then = { rotation: 40, density: low };
    const now = { rotation: expectedRotation(then, high, "natural"), density: high };
    expect(thrustRatio(now, then)).toBeCloseTo(torqueShare(high, "natural"), 5);
    expect(thrustRatio(now, then)).toBeCloseTo(0.8434, 4);
  });

  it("is 1 at sea level, and a boosted engine turns faster in thin air", () => {
    expect(torqueShare(1.225, "natural")).toBeCloseTo(1, 12);
    expect(staticSpeedShare(1, "boosted")).toBeCloseTo(Math.sqrt(1.225), 12);
  });

  it("negative check: the torque share is not the density ratio, which reads power too high", () => {
    const sigma = air(5000).density / 1.225;
    expect(torqueShare(air(5000).density, "natural")).toBeLessThan(sigma - 0.01);
  });
});

describe("fixed pitch at rest: T ~ rho n^2, P ~ rho n^3 (similarity of propellers)", () => {
  it("2300 to 2600 rpm: thrust x 1.27788, power x 1.44456 (computed)", () => {
    expect(thrustAt(2600, 2300, 1)).toBeCloseTo(1.27788, 5);
    expect(powerAt(2600, 2300, 1)).toBeCloseTo(1.44456, 5);
    expect(powerRatio(2600, 2300)).toBeCloseTo(1.44456, 5);
    expect(thrustRatio({ rotation: 2600, density: 1 }, { rotation: 2300, density: 1 })).toBeCloseTo(1.27788, 5);
  });
});

describe("the sheet", () => {
  const day = air(0);
  const RUN = {
    breathing: "natural",
    rotationThen: rpm(2300),
    pressureThen: day.pressure,
    temperatureThen: day.temperature,
    rotationNow: rpm(2300),
    pressureNow: day.pressure,
    temperatureNow: day.temperature,
    drop: 0.02,
  };
  const passes = (inputs: Record<string, unknown>) => {
    const done = computeBench("static-power", { ...RUN, ...inputs });
    if (!done.ok) throw new Error(JSON.stringify(done.errors));
    return done.result.passes;
  };

  it("on the same day exactly 2 % less passes, a turn less does not", () => {
    expect(passes({ rotationNow: rpm(2300 * 0.98) })).toBe(true);
    expect(passes({ rotationNow: rpm(2253) })).toBe(false);
  });

  it("what thin air takes is not a fault, and in thick air the same speed is one", () => {
    const high = air(5000);
    const atHeight = { pressureNow: high.pressure, temperatureNow: high.temperature };
    expect(passes({ ...atHeight, rotationNow: rpm(2300 * 0.9893 * 0.981) })).toBe(true);
    expect(passes({ ...atHeight, rotationNow: rpm(2300 * 0.9893 * 0.979) })).toBe(false);
  });

  it("the install's least static speed counts whatever the earlier run was", () => {
    expect(passes({ rotationThen: rpm(2200), rotationNow: rpm(2240), least: rpm(2250) })).toBe(false);
    expect(passes({ rotationThen: rpm(2200), rotationNow: rpm(2250), least: rpm(2250) })).toBe(true);
  });
});
