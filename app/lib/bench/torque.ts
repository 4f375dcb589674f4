/**
 * Torque wrenches with an adapter on the end, and the drag of self-locking nuts.
 * Source: AC 43.13-1B, chapter 7; torques in N·m, lengths in m, angles in rad. The maker's value comes first.
 */
import type { Outcome } from "#app/lib/bench/check";
import type { Band } from "#app/lib/units/quantity";

export interface Adapter {
  /** From the middle of the handle to the middle of the drive, m. */
  wrenchLength: number;
  /** From the drive to the fastener, m: positive lengthens the wrench, negative folds back over it. */
  extension: number;
  /** Angle of the adapter to the wrench, rad; 0 = in line, a right angle needs no correction. */
  angle: number;
}

/**
 * What to set (N·m) so that the fastener gets `torque`: T_w = T_a L / (L + E cos(angle)).
 * Refused at its field: torque, wrench length not above 0, or an adapter that folds back past the handle.
 */
export function wrenchSetting(torque: number, adapter: Adapter): Outcome<number> {
  return withRatio("torque", torque, adapter, (ratio) => torque / ratio);
}

/** What the fastener gets (N·m) when the wrench shows `setting`: T_a = T_w (L + E cos(angle)) / L. Refusals as in `wrenchSetting`. */
export function appliedTorque(setting: number, adapter: Adapter): Outcome<number> {
  return withRatio("setting", setting, adapter, (ratio) => setting * ratio);
}

function withRatio(field: string, torque: number, adapter: Adapter, value: (ratio: number) => number): Outcome<number> {
  const refuse = (at: string, sentence: string): Outcome<number> => ({ ok: false, errors: [{ field: at, sentence }] });
  const { wrenchLength, extension, angle } = adapter;
  if (!(Number.isFinite(torque) && torque > 0)) return refuse(field, "The torque must be above 0: enter the value for the fastener.");
  if (!(Number.isFinite(wrenchLength) && wrenchLength > 0)) {
    return refuse("wrenchLength", "The wrench length must be above 0: measure from the middle of the handle to the middle of the drive.");
  }
  if (!Number.isFinite(angle)) return refuse("angle", "The angle of the adapter must be a number: 0 in line, 90 at a right angle.");
  const effective = wrenchLength + extension * Math.cos(angle);
  if (!Number.isFinite(effective)) return refuse("extension", "The adapter length must be a number: 0 without an adapter.");
  if (effective <= 0)
    return refuse("extension", "The adapter folds back past the handle, so the wrench cannot turn the fastener: use a shorter one.");
  return { ok: true, result: value(effective / wrenchLength) };
}

/**
 * Band on the wrench for a self-locking nut: what it takes to turn the nut before it seats (`drag`, N·m, measured) is added to both ends
 * (AC 43.13-1B, paragraph 7-40d). Refused when drag is negative or no number.
 */
export function withDrag(band: Band, drag: number): Outcome<Band> {
  if (!(Number.isFinite(drag) && drag >= 0)) {
    return {
      ok: false,
      errors: [{ field: "drag", sentence: "The drag torque must be 0 or more: read it on the wrench while the nut still runs down free." }],
    };
  }
  const add = (end: number | null) => (end === null ? null : end + drag);
  return { ok: true, result: { min: add(band.min), max: add(band.max) } };
}
