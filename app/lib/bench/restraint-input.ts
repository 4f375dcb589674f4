/**
 * What the restraint sheet takes: the shape of its inputs, and which rigs are none (a lone strap to one side, a pair that is no mirror image).
 * All in SI; labels and ranges come from restraint-form.ts.
 */
import { z } from "zod";
import { amount, MOST_ROWS, notChosen, tooMany, words } from "#app/lib/bench/check";
import { atMost } from "#app/lib/bench/compare";
import type { Strap } from "#app/lib/bench/restraint";
import { RESTRAINT_FIELD as F, PRESSURE_ALTITUDE } from "#app/lib/bench/restraint-form";
import { toSI } from "#app/lib/units/convert";

/** How far the straps of a pair may differ from mirror images, and a lone strap from the centreline. Common practice, no source. */
const SYMMETRY = toSI(5, "deg");

const strapBase = {
  name: words(F.name),
  pair: words(F.pair).optional(),
  elevation: amount(F.elevation),
  azimuth: amount(F.azimuth),
  wll: amount(F.wll),
};
const strapSchema = z.discriminatedUnion(
  "anchor",
  [
    z.object({ ...strapBase, anchor: z.literal("rated"), rating: amount(F.rating) }),
    z.object({ ...strapBase, anchor: z.literal("mass"), anchorMass: amount(F.anchorMass), friction: amount(F.friction) }),
  ],
  { error: () => notChosen(F.anchor) },
);
type StrapInput = z.infer<typeof strapSchema>;

const noStraps = "Enter at least one strap: brakes and chocks alone are not a restraint.";
const common = z.object({
  planned: amount(F.planned),
  power: amount(F.power),
  reference: amount(F.reference),
  reduction: amount(F.reduction),
  diameter: amount(F.diameter),
  merit: amount(F.merit),
  pressureAltitude: amount(PRESSURE_ALTITUDE),
  temperature: amount(F.temperature),
  factor: amount(F.factor),
  mass: amount(F.mass),
  slope: amount(F.slope),
  straps: z
    .array(strapSchema, { error: () => noStraps })
    .min(1, noStraps)
    .max(MOST_ROWS, tooMany("straps"))
    .superRefine((straps, at) => {
      straps.forEach((strap, index) => {
        const sentence = pairError(straps, strap);
        if (sentence) at.addIssue({ code: "custom", path: [index, "pair"], message: sentence });
      });
    }),
});
const wheels = z.discriminatedUnion(
  "wheels",
  [
    z.object({ wheels: z.literal("none") }),
    z.object({ wheels: z.literal("credited"), wheelFriction: amount(F.wheelFriction), wheelMass: amount(F.wheelMass) }),
  ],
  { error: () => notChosen(F.wheels) },
);
const gear = z.discriminatedUnion(
  "gear",
  [
    z.object({ gear: z.literal("nose") }),
    z.object({
      gear: z.literal("tail"),
      thrustHeight: amount(F.thrustHeight),
      centreArm: amount(F.centreArm),
      holdDown: amount(F.holdDown),
      tailArm: amount(F.tailArm),
    }),
  ],
  { error: () => notChosen(F.gear) },
);
export const restraintSchema = z.intersection(z.intersection(common, wheels), gear).superRefine((inputs, at) => {
  if (inputs.wheels === "credited" && !atMost(inputs.wheelMass, inputs.mass)) {
    at.addIssue({
      code: "custom",
      path: ["wheelMass"],
      message: "The wheels cannot carry more than the aircraft: enter the load on the braked or chocked wheels.",
    });
  }
});

/** Even sharing holds only for mirror images, and a lone strap off the centreline would swing the aircraft round. */
function pairError(straps: readonly StrapInput[], strap: StrapInput): string | null {
  if (strap.pair === undefined) {
    return atMost(Math.abs(strap.azimuth), SYMMETRY)
      ? null
      : "One strap to a side swings the aircraft round: rig its like on the other side and give both the same pair letter.";
  }
  const mates = straps.filter((other) => other !== strap && other.pair?.toLowerCase() === strap.pair?.toLowerCase());
  const [mate] = mates;
  if (!mate || mates.length > 1)
    return `A pair has two straps, pair ${strap.pair} has ${mates.length + 1}: give the same letter to one left and one right strap.`;
  const mirrored = atMost(Math.abs(strap.azimuth + mate.azimuth), SYMMETRY) && atMost(Math.abs(strap.elevation - mate.elevation), SYMMETRY);
  return mirrored
    ? null
    : `The straps of pair ${strap.pair} are not mirror images (within 5°), so they do not share evenly: move an anchor; left is negative, right positive.`;
}

/** A row of the form as a strap; the letter of a pair counts whatever its case. */
export function toStrap(input: StrapInput): Strap {
  const { name, elevation, azimuth, wll } = input;
  const anchor: Strap["anchor"] =
    input.anchor === "rated" ? { kind: "rated", rating: input.rating } : { kind: "mass", mass: input.anchorMass, friction: input.friction };
  return { name, pair: input.pair?.toLowerCase() ?? null, elevation, azimuth, wll, anchor };
}

export type RestraintInputs = z.infer<typeof restraintSchema>;
