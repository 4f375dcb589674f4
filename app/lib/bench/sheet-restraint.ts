/**
 * The restraint sheet: does the rig hold the aircraft at the planned speed, and up to which speed would it.
 * All rotation is crankshaft speed; the propeller's is that over the reduction ratio. Formulas and sources: restraint.ts, thrust.ts.
 */
import { z } from "zod";
import { airDensity, pressureAltitude, standardAir } from "#app/lib/bench/atmosphere";
import { amount, check, MOST_ROWS, notChosen, type Outcome, tooMany, words } from "#app/lib/bench/check";
import { atMost } from "#app/lib/bench/compare";
import { capRotation, type Line, lines, rightingMoment, type Strap, slopePull, wheelHolding } from "#app/lib/bench/restraint";
import { RESTRAINT_FIELD as F, PRESSURE_ALTITUDE, RESTRAINT_FORM } from "#app/lib/bench/restraint-form";
import { figure, type SheetDef, type SheetFigure, type SheetResult, use } from "#app/lib/bench/sheet-result";
import { inducedVelocity, powerAt, staticThrust, thrustAt } from "#app/lib/bench/thrust";
import { fromSI, toSI } from "#app/lib/units/convert";

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
const schema = z.intersection(z.intersection(common, wheels), gear).superRefine((inputs, at) => {
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

function toStrap(input: StrapInput): Strap {
  const { name, elevation, azimuth, wll } = input;
  const anchor: Strap["anchor"] =
    input.anchor === "rated" ? { kind: "rated", rating: input.rating } : { kind: "mass", mass: input.anchorMass, friction: input.friction };
  return { name, pair: input.pair?.toLowerCase() ?? null, elevation, azimuth, wll, anchor };
}

const ENDED_BY: Record<Line["by"], string> = { strap: "strap", anchor: "anchor", pair: "the weaker side of its pair" };
const inRpm = (rotation: number, round: (n: number) => number): string => `${round(fromSI(rotation, "rpm"))} rpm`;
/** The cap is never shown higher than it is. */
const capText = (rotation: number): string => inRpm(rotation, (n) => Math.floor(n + 1e-6));

function compute(inputs: unknown): Outcome<SheetResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const { planned, power, reference, diameter, factor, mass, slope } = value;
  const density = airDensity(standardAir(value.pressureAltitude).pressure, value.temperature);
  const thrustReference = staticThrust(power, diameter, density, value.merit);
  const thrust = thrustAt(planned, reference, thrustReference);
  const held = lines(value.straps.map(toStrap));
  const wheelForce = value.wheels === "credited" ? wheelHolding(value.wheelFriction, value.wheelMass) : 0;
  const holding = held.reduce((sum, line) => sum + line.axial, wheelForce);
  const steady = slopePull(mass, slope);
  const lineCap = capRotation(reference, thrustReference, factor, holding, steady);
  const demand = factor * thrust + steady;

  const nose: SheetFigure[] = [];
  let noseCap = Number.POSITIVE_INFINITY;
  if (value.gear === "tail") {
    // The slope's pull is taken at the height of the thrust line, near which the centre of gravity lies.
    const righting = rightingMoment(mass, slope, value.centreArm, value.holdDown, value.tailArm);
    noseCap = capRotation(reference, thrustReference * value.thrustHeight, factor, righting, steady * value.thrustHeight);
    nose.push(
      figure("Moment that tips it on its nose, at the planned rpm", "torque", demand * value.thrustHeight),
      figure("Moment that keeps the tail down", "torque", righting),
      figure("Cap by nosing over", "rotation", noseCap),
    );
  }
  const cap = Math.min(lineCap, noseCap);
  return {
    ok: true,
    result: {
      passes: cap >= planned,
      sentence: sentenceFor(cap, planned, noseCap < lineCap),
      cap,
      figures: [
        figure("Air density", "density", density),
        figure("Thrust at the reference speed", "force", thrustReference),
        figure("Thrust at the planned rpm", "force", thrust),
        figure("Pull of the slope", "force", steady),
        figure("Demand at the planned rpm", "force", demand),
        ...held.map((line) => figure(`${line.name}: may take (limit: ${ENDED_BY[line.by]})`, "force", line.force)),
        ...held.map((line) => figure(`${line.name}: holds along the aircraft`, "force", line.axial)),
        ...(value.wheels === "credited" ? [figure("Brakes and chocks", "force", wheelForce)] : []),
        figure("Holding", "force", holding),
        // A shortfall is a figure of its own, so that no force is shown below zero.
        holding >= demand ? figure("Margin", "force", holding - demand) : figure("Short by", "force", demand - holding),
        figure("Cap by the lines", "rotation", lineCap),
        ...nose,
        figure("Propeller speed at the planned rpm", "rotation", planned / value.reduction),
        figure("Power the propeller takes at the planned rpm", "power", powerAt(planned, reference, power)),
        figure("Wind behind the propeller at the planned rpm", "speed", 2 * inducedVelocity(thrust, diameter, density)),
      ],
      caution: RESTRAINT_FORM.caution,
    },
  };
}

function sentenceFor(cap: number, planned: number, byNose: boolean): string {
  const plan = inRpm(planned, Math.round);
  const limit = byNose ? "nosing over" : "the lines";
  const better = byNose ? "hold the tail down harder" : "add or better the straps and anchors";
  if (cap >= planned) return `Holds up to ${capText(cap)}, planned ${plan}; ${limit} would give first.`;
  if (cap === 0) return `Holds at no speed (limit: ${limit}): ${better}, or find level ground, before any run.`;
  return `Holds up to ${capText(cap)} only (limit: ${limit}), planned ${plan}: ${better}, or plan a lower run.`;
}

/** The form asks for the pressure, which a gauge shows; reading it has kept it inside the range of the atmosphere. */
function fromForm({ pressure, ...rest }: Record<string, unknown>) {
  const inputs = typeof pressure === "number" ? { ...rest, pressureAltitude: pressureAltitude(pressure) } : rest;
  return { inputs, locate: (path: string) => (path === PRESSURE_ALTITUDE.name ? F.pressure.name : path) };
}

export const RESTRAINT: SheetDef = {
  version: "1",
  uses: (inputs) => [
    use("rated power", inputs.power, "ratedPower"),
    use("rated or static speed", inputs.reference, "staticRpmMin", "ratedRpm"),
    use("propeller diameter", inputs.diameter, "propDiameter"),
    use("reduction ratio", inputs.reduction, "reductionRatio"),
    use("mass", inputs.mass, "mass"),
  ],
  takes: ["ratedPower", "ratedRpm", "staticRpmMin", "propDiameter", "reductionRatio", "mass"],
  form: RESTRAINT_FORM,
  compute,
  fromForm,
};
