/**
 * What holds an aircraft against its own propeller: straps, their anchors, wheels; and the speed up to which it holds.
 * Source: statics and Coulomb friction. Angles in rad: elevation = strap above the ground, azimuth = off the centreline.
 */
import { needNotNegative, needPositive } from "#app/lib/bench/compare";

/** Standard acceleration of gravity, m/s² (exact). */
export const GRAVITY = 9.80665;

/** Demand over steady thrust, for gusts and surges. Common practice, no source. */
export const DEMAND_FACTOR = 1.5;

export interface Strap {
  name: string;
  /** The two straps of a pair (left, right) share this name; null = on its own, along the centreline. */
  pair: string | null;
  elevation: number;
  /** Right positive, left negative. */
  azimuth: number;
  /** Working load limit of the strap with all its fittings, N. */
  wll: number;
  /** A rated point (N), or a dead mass (kg) on a surface with friction. */
  anchor: { kind: "rated"; rating: number } | { kind: "mass"; mass: number; friction: number };
}

export interface Line {
  name: string;
  /** Pull that this line may take, N. */
  force: number;
  /** What ends it first. */
  by: "strap" | "anchor" | "pair";
  /** Its part along the aircraft, N. */
  axial: number;
}

/**
 * Pull (N) at which a dead mass begins to slide: F cos e = mu (m g - F sin e), so F = mu m g / (cos e + mu sin e).
 * mass (kg), friction mu, elevation e (rad, 0 to under 90 deg; it lifts the mass). RangeError outside.
 */
export function slidingPull(mass: number, friction: number, elevation: number): number {
  needPositive({ mass, friction });
  needAcute({ elevation });
  return (friction * mass * GRAVITY) / (Math.cos(elevation) + friction * Math.sin(elevation));
}

/** Load (N) in each of `n` equal straps that hold `force` (N) along the aircraft: F / (n cos e cos a). */
export function strapLoad(force: number, n: number, elevation: number, azimuth: number): number {
  needPositive({ n });
  needNotNegative({ force });
  needAcute({ elevation, azimuth });
  return force / (n * Math.cos(elevation) * Math.cos(azimuth));
}

/** What braked or chocked wheels hold (N): mu x the load on those wheels (kg) x g, never the whole aircraft's weight. */
export function wheelHolding(friction: number, mass: number): number {
  needNotNegative({ friction, mass });
  return friction * mass * GRAVITY;
}

/** Part of the weight (N) that pulls the aircraft forward where the ground falls by `slope` (rad) toward the nose: m g sin(s). */
export function slopePull(mass: number, slope: number): number {
  needPositive({ mass });
  needAcute({ slope });
  return mass * GRAVITY * Math.sin(slope);
}

/**
 * Each line's share: F = min(working load limit, anchor), along the aircraft F cos e cos a.
 * A symmetric pair shares evenly, so the weaker pull and the worse angle of the two count for both.
 */
export function lines(straps: readonly Strap[]): Line[] {
  const alone = straps.map(lineAlone);
  return alone.map((line, index) => {
    const pair = straps[index]?.pair ?? null;
    if (pair === null) return line;
    const mates = alone.filter((_, other) => straps[other]?.pair === pair);
    const force = Math.min(...mates.map((mate) => mate.force));
    const part = Math.min(...mates.map((mate) => mate.axial / mate.force));
    return { ...line, force, by: line.force > force ? "pair" : line.by, axial: force * part };
  });
}

function lineAlone({ name, elevation, azimuth, wll, anchor }: Strap): Line {
  needPositive({ wll });
  needAcute({ elevation, azimuth });
  const hold = anchor.kind === "rated" ? anchor.rating : slidingPull(anchor.mass, anchor.friction, elevation);
  needPositive({ hold });
  const force = Math.min(wll, hold);
  return { name, force, by: hold < wll ? "anchor" : "strap", axial: force * Math.cos(elevation) * Math.cos(azimuth) };
}

/**
 * Crankshaft speed (1/s) up to which `holding` lasts: n_ref sqrt((holding - steady) / (factor T_ref)); 0 where nothing is left.
 * Forces in N, or moments in N·m on all three (nose-over). `steady` does not depend on speed (slope).
 */
export function capRotation(reference: number, referenceThrust: number, factor: number, holding: number, steady: number): number {
  needPositive({ reference, referenceThrust, factor });
  needNotNegative({ holding, steady });
  return reference * Math.sqrt(Math.max(0, holding - steady) / (factor * referenceThrust));
}

/**
 * Moment (N·m) about the main wheels' ground contact that keeps a tailwheel aircraft's tail down:
 * m g cos(s) x + F_tail l_tail. mass (kg), slope s (rad), x = contact to centre of gravity (m), hold-down at the tail (N) and its arm (m).
 * Straps at the main gear are not credited: they pull near the contact point.
 */
export function rightingMoment(mass: number, slope: number, centreArm: number, holdDown: number, tailArm: number): number {
  needPositive({ mass });
  needNotNegative({ centreArm, holdDown, tailArm });
  needAcute({ slope });
  return mass * GRAVITY * Math.cos(slope) * centreArm + holdDown * tailArm;
}

function needAcute(angles: Record<string, number>): void {
  for (const [name, angle] of Object.entries(angles)) {
    if (!(Math.abs(angle) < Math.PI / 2)) throw new RangeError(`${name} must be under 90 degrees, got ${angle} rad`);
  }
}
