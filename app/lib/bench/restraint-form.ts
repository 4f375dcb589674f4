/**
 * The form of the restraint sheet: labels, ranges, presets and where each value is filled from.
 * Friction values in the help texts are common practice, no source, taken at the low end.
 */
import { pressureField, RUN_UP_ALTITUDE, temperatureField } from "#app/lib/bench/air-fields";
import { amountField, choiceField, type SheetForm, textField } from "#app/lib/bench/form";
import { DEMAND_FACTOR } from "#app/lib/bench/restraint";
import { FIGURE_OF_MERIT } from "#app/lib/bench/thrust";
import { toSI } from "#app/lib/units/convert";

const deg = (n: number) => toSI(n, "deg");
const rpm = (n: number) => toSI(n, "rpm");
const FRICTION = [0.05, 1.2] as const;
const tail = { field: "gear", is: "tail" };
const credited = { field: "wheels", is: "credited" };
const rated = { field: "anchor", is: "rated" };
const dead = { field: "anchor", is: "mass" };

export const RESTRAINT_FIELD = {
  planned: amountField(
    "planned",
    "Planned highest engine speed",
    "rotation",
    [rpm(200), rpm(12_000)],
    "Crankshaft speed of the day's hardest run.",
    { prefill: [{ kind: "planned-rpm" }] },
  ),
  power: amountField("power", "Power at the reference speed", "power", [1000, 2e6], "Rated power is the safe choice.", {
    prefill: [{ kind: "value", key: "ratedPower" }],
  }),
  reference: amountField(
    "reference",
    "Reference engine speed",
    "rotation",
    [rpm(200), rpm(12_000)],
    "Lowest expected static speed at full throttle; with a constant-speed propeller the rated speed.",
    {
      prefill: [
        { kind: "value", key: "staticRpmMin" },
        { kind: "value", key: "ratedRpm" },
      ],
    },
  ),
  reduction: amountField("reduction", "Reduction ratio", "ratio", [0.5, 6], "Engine speed over propeller speed; 1 for direct drive.", {
    preset: 1,
    prefill: [{ kind: "value", key: "reductionRatio" }],
  }),
  diameter: amountField("diameter", "Propeller diameter", "length", [0.5, 5], "Tip to tip.", {
    prefill: [{ kind: "value", key: "propDiameter" }],
  }),
  merit: amountField(
    "merit",
    "Figure of merit",
    "ratio",
    [0.5, 1],
    "0.75 is a good propeller standing still; higher asks for more holding. Common practice.",
    { preset: FIGURE_OF_MERIT },
  ),
  pressure: pressureField(
    "pressure",
    "Air pressure at the field",
    "As it is here: the manifold gauge with the engine off. A report's sea-level pressure is higher, so on the safe side.",
  ),
  temperature: temperatureField("temperature", "Air temperature", "The coldest expected for the run: cold air gives more thrust."),
  factor: amountField("factor", "Gust and surge factor", "ratio", [1, 5], "Demand over steady thrust: 1.5. Common practice.", {
    preset: DEMAND_FACTOR,
  }),
  mass: amountField("mass", "Mass of the aircraft as it runs", "mass", [20, 20_000], "With the fuel and people aboard.", {
    prefill: [{ kind: "value", key: "mass" }],
  }),
  slope: amountField("slope", "Ground falls toward the nose by", "angle", [0, deg(15)], "0 when level or rising.", { preset: 0 }),
  wheels: choiceField(
    "wheels",
    "Brakes and chocks",
    { none: "not credited", credited: "credited" },
    "Leave them out unless friction and load are known.",
    { preset: "none" },
  ),
  wheelFriction: amountField(
    "wheelFriction",
    "Friction of tyre on ground",
    "ratio",
    FRICTION,
    "Use the low one: wet concrete 0.25, wet grass 0.20, dry grass 0.3.",
    { when: credited },
  ),
  wheelMass: amountField(
    "wheelMass",
    "Load on the braked or chocked wheels",
    "mass",
    [1, 20_000],
    "What these wheels carry, not the whole aircraft.",
    { when: credited },
  ),
  gear: choiceField(
    "gear",
    "Landing gear",
    { nose: "nosewheel", tail: "tailwheel" },
    "A tailwheel aircraft is checked for nosing over too.",
    { prefill: [{ kind: "trait" }] },
  ),
  thrustHeight: amountField("thrustHeight", "Thrust line above the ground", "length", [0.1, 5], "As the aircraft stands.", { when: tail }),
  centreArm: amountField(
    "centreArm",
    "Main wheel contact to centre of gravity",
    "length",
    [0, 5],
    "Along the ground, toward the tail, as loaded and as it stands.",
    { when: tail },
  ),
  holdDown: amountField(
    "holdDown",
    "Hold-down at the tail",
    "force",
    [0, 1e5],
    "Straight down: least of strap, fitting, anchor and ballast weight. 0 when the tail is free.",
    { when: tail, preset: 0 },
  ),
  tailArm: amountField("tailArm", "Main wheel contact to tail tie-down", "length", [0, 20], "Along the ground.", { when: tail }),
  name: textField("name", "Strap", "Where it runs: left main to ring 2."),
  pair: textField("pair", "Pair", "The same letter on left and right strap: they share evenly. Empty for one along the centreline.", {
    optional: true,
  }),
  elevation: amountField("elevation", "Rises from the ground by", "angle", [0, deg(75)], "Angle at the anchor."),
  azimuth: amountField("azimuth", "Off the centreline by", "angle", [deg(-75), deg(75)], "Right positive, left negative."),
  wll: amountField(
    "wll",
    "Working load limit",
    "force",
    [50, 5e5],
    "From the label: the weakest of strap, ratchet and hooks. Without a label it does not count.",
  ),
  anchor: choiceField("anchor", "Anchor", { rated: "rated point", mass: "dead mass" }, "A dead mass slides before it lifts."),
  rating: amountField(
    "rating",
    "Rating of the anchor point",
    "force",
    [50, 5e5],
    "In the direction of the strap, from whoever installed it.",
    { when: rated },
  ),
  anchorMass: amountField("anchorMass", "Dead mass", "mass", [1, 50_000], "What the strap would drag.", { when: dead }),
  friction: amountField(
    "friction",
    "Friction under the dead mass",
    "ratio",
    FRICTION,
    "Use the low one: filled sandbags on concrete 0.4, on grass less. Common practice: try it with a scale.",
    { when: dead },
  ),
};

/** A saved sheet keeps the pressure as the altitude that it stands for in the standard atmosphere, m. */
export const PRESSURE_ALTITUDE = amountField(
  "pressureAltitude",
  "Pressure altitude",
  "length",
  [RUN_UP_ALTITUDE.min, RUN_UP_ALTITUDE.max],
  "",
  {
    as: { si: "m", us: "ft" },
  },
);

const F = RESTRAINT_FIELD;
export const RESTRAINT_FORM: SheetForm = {
  title: "Restraint",
  formula:
    "Thrust = figure of merit^(2/3) × (2 × air density × disc area × power²)^(1/3), and goes with the square of rpm. Demand = thrust × factor + slope. Each line holds the least of strap and anchor, times the cosines of its angles; a pair holds twice its weaker side. Cap = reference rpm × √((holding − slope) / (factor × thrust)); nosing over has a cap of its own and the lower one counts.",
  caution:
    "An estimate, not a proof load: a strap that parts or an aircraft that breaks loose kills. Walk every line, pull up slowly, stop at the first movement, nobody in line with a tight strap or the propeller. The airframe, strap and anchor makers' limits and the local rules come first.",
  fields: [
    F.planned,
    F.power,
    F.reference,
    F.reduction,
    F.diameter,
    F.merit,
    F.pressure,
    F.temperature,
    F.factor,
    F.mass,
    F.slope,
    F.wheels,
    F.wheelFriction,
    F.wheelMass,
    F.gear,
    F.thrustHeight,
    F.centreArm,
    F.holdDown,
    F.tailArm,
  ],
  groups: [
    {
      name: "straps",
      label: "Straps",
      row: "strap",
      rows: 2,
      rowsFrom: null,
      fields: [F.name, F.pair, F.elevation, F.azimuth, F.wll, F.anchor, F.rating, F.anchorMass, F.friction],
    },
  ],
};
