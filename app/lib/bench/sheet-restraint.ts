/**
 * The restraint sheet: does the rig hold the aircraft at the planned speed, and up to which speed would it.
 * All rotation is crankshaft speed; the propeller's is that over the reduction ratio. Formulas and sources: restraint.ts, thrust.ts.
 */
import { AIR_DENSITY } from "#app/lib/bench/air-fields";
import { airDensity, pressureAltitude, standardAir } from "#app/lib/bench/atmosphere";
import { check, type Outcome } from "#app/lib/bench/check";
import { capRotation, type Line, lines, rightingMoment, slopePull, wheelHolding } from "#app/lib/bench/restraint";
import { RESTRAINT_FIELD as F, PRESSURE_ALTITUDE, RESTRAINT_FORM } from "#app/lib/bench/restraint-form";
import { type RestraintInputs, restraintSchema, toStrap } from "#app/lib/bench/restraint-input";
import { figure, type SheetDef, type SheetFigure, type SheetResult, use } from "#app/lib/bench/sheet-result";
import { inducedVelocity, powerAt, staticThrust, thrustAt } from "#app/lib/bench/thrust";
import { fromSI, toSI } from "#app/lib/units/convert";

const ENDED_BY: Record<Line["by"], string> = { strap: "strap", anchor: "anchor", pair: "the weaker side of its pair" };
const inRpm = (rotation: number, round: (n: number) => number): string => `${round(fromSI(rotation, "rpm"))} rpm`;
/** A cap is never shown higher than it is: whole turns below it. */
const wholeRpm = (rotation: number): number => toSI(Math.floor(fromSI(rotation, "rpm") + 1e-6), "rpm");
const capText = (rotation: number): string => inRpm(wholeRpm(rotation), Math.round);

export interface RestraintNumbers {
  /** kg/m³ */
  density: number;
  /** Steady thrust at the reference speed and at the planned one, N. */
  thrustReference: number;
  thrust: number;
  lines: Line[];
  wheelForce: number;
  /** What the rig holds along the aircraft, pull of the slope, and demand at the planned speed, N. */
  holding: number;
  steady: number;
  demand: number;
  /** Crankshaft speeds, 1/s: by the lines, by nosing over (null = cannot nose over), and the lower of the two. */
  lineCap: number;
  nose: { cap: number; tipping: number; righting: number } | null;
  cap: number;
}

/** Every figure of the sheet from inputs that `restraintSchema` has taken. */
export function restraintNumbers(value: RestraintInputs): RestraintNumbers {
  const { planned, reference, diameter, factor, mass, slope } = value;
  const density = airDensity(standardAir(value.pressureAltitude).pressure, value.temperature);
  const thrustReference = staticThrust(value.power, diameter, density, value.merit);
  const thrust = thrustAt(planned, reference, thrustReference);
  const held = lines(value.straps.map(toStrap));
  const wheelForce = value.wheels === "credited" ? wheelHolding(value.wheelFriction, value.wheelMass) : 0;
  const holding = held.reduce((sum, line) => sum + line.axial, wheelForce);
  const steady = slopePull(mass, slope);
  const lineCap = capRotation(reference, thrustReference, factor, holding, steady);
  const demand = factor * thrust + steady;
  let nose: RestraintNumbers["nose"] = null;
  if (value.gear === "tail") {
    // The slope's pull is taken at the height of the thrust line, near which the centre of gravity lies.
    const height = value.thrustHeight;
    const righting = rightingMoment(mass, slope, value.centreArm, value.holdDown, value.tailArm);
    nose = { cap: capRotation(reference, thrustReference * height, factor, righting, steady * height), tipping: demand * height, righting };
  }
  const cap = Math.min(lineCap, nose?.cap ?? Number.POSITIVE_INFINITY);
  return { density, thrustReference, thrust, lines: held, wheelForce, holding, steady, demand, lineCap, nose, cap };
}

function compute(inputs: unknown): Outcome<SheetResult> {
  const checked = check(restraintSchema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const { planned, power, reference, diameter } = value;
  const n = restraintNumbers(value);
  const { holding, demand, nose, cap } = n;
  const noseFigures: SheetFigure[] = nose
    ? [
        figure("Moment that tips it on its nose, at the planned rpm", "torque", nose.tipping),
        figure("Moment that keeps the tail down", "torque", nose.righting),
        figure("Cap by nosing over", "rotation", wholeRpm(nose.cap)),
      ]
    : [];
  return {
    ok: true,
    result: {
      passes: cap >= planned,
      sentence: sentenceFor(cap, planned, nose !== null && nose.cap < n.lineCap),
      cap,
      margin: figure("Engine speed left to the cap", "rotation", wholeRpm(cap) - planned),
      figures: [
        figure("Air density", "density", n.density, AIR_DENSITY),
        figure("Thrust at the reference speed", "force", n.thrustReference),
        figure("Thrust at the planned rpm", "force", n.thrust),
        figure("Pull of the slope", "force", n.steady),
        figure("Demand at the planned rpm", "force", demand),
        ...n.lines.map((line) => figure(`${line.name}: may take (limit: ${ENDED_BY[line.by]})`, "force", line.force)),
        ...n.lines.map((line) => figure(`${line.name}: holds along the aircraft`, "force", line.axial)),
        ...(value.wheels === "credited" ? [figure("Brakes and chocks", "force", n.wheelForce)] : []),
        figure("Holding", "force", holding),
        // A shortfall is a figure of its own, so that no force is shown below zero.
        holding >= demand
          ? figure("Margin of the lines", "force", holding - demand)
          : figure("The lines are short by", "force", demand - holding),
        figure("Cap by the lines", "rotation", wholeRpm(n.lineCap)),
        ...noseFigures,
        figure("Propeller speed at the planned rpm", "rotation", planned / value.reduction),
        figure("Power the propeller takes at the planned rpm", "power", powerAt(planned, reference, power)),
        figure("Wind behind the propeller at the planned rpm", "speed", 2 * inducedVelocity(n.thrust, diameter, n.density)),
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
  const { min, max } = PRESSURE_ALTITUDE;
  // At an end of the range the last binary digit may fall outside.
  const inside = (h: number) => Math.min(max, Math.max(min, h));
  const inputs = typeof pressure === "number" ? { ...rest, pressureAltitude: inside(pressureAltitude(pressure)) } : rest;
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
