/**
 * The form of the fuel flow sheet: labels, ranges, presets and where each value is filled from.
 * Attitude and low tank as in AC 90-89A; 0.55 lb/(hp·h) and 6.0 lb/US gal are starting points, the maker's figures come first.
 */
import { amountField, choiceField, type SheetForm, textField } from "#app/lib/bench/form";
import { toSI } from "#app/lib/units/convert";

const litres = (n: number) => toSI(n, "L");
export const FUEL_FLOW_FIELD = {
  supply: choiceField(
    "supply",
    "Fuel reaches the engine by",
    { gravity: "gravity", pump: "pump" },
    "Gravity has to give 1.5 times take-off consumption, a pump 1.25 times.",
    {
      prefill: [{ kind: "trait" }],
    },
  ),
  takeoffFlow: amountField(
    "takeoffFlow",
    "Take-off consumption",
    "volumeFlow",
    [toSI(0.5, "L/h"), toSI(1500, "L/h")],
    "The maker's figure. Left empty, it is computed from rated power.",
    {
      optional: true,
      prefill: [{ kind: "value", key: "takeoffFlow" }],
    },
  ),
  power: amountField("power", "Rated power", "power", [1000, 2e6], "Used where the maker gives no consumption.", {
    optional: true,
    prefill: [{ kind: "value", key: "ratedPower" }],
  }),
  specific: amountField(
    "specific",
    "Fuel per power and time",
    "specificFuel",
    [toSI(0.2, "lb/(hp·h)"), toSI(1.2, "lb/(hp·h)")],
    "At full power: 0.55 lb/(hp·h) or 335 g/(kW·h) unless the maker says otherwise.",
    {
      optional: true,
      preset: toSI(0.55, "lb/(hp·h)"),
    },
  ),
  density: amountField(
    "density",
    "Fuel density",
    "density",
    [600, 900],
    "Avgas 6.0 lb/US gal or 0.72 kg/L. Used with rated power and for weighed catches.",
    { preset: toSI(6, "lb/US gal") },
  ),
  measuredAt: choiceField(
    "measuredAt",
    "Caught at",
    { engine: "the engine end of the line", return: "the return, at regulated pressure", inlet: "the engine pump's inlet" },
    "With the engine off, what comes back is what the pump can deliver.",
  ),
  noseUp: amountField(
    "noseUp",
    "Nose up during the test",
    "angle",
    [toSI(-10, "deg"), toSI(45, "deg")],
    "5° above the highest climb angle.",
  ),
  fuelInTank: amountField(
    "fuelInTank",
    "Fuel in the feeding tank",
    "volume",
    [0, litres(1000)],
    "Low tank: what cannot be used and a little more.",
  ),
  pump: textField("pump", "Pump or tank", "Each pump alone, under its own name; by gravity the tank.", { preset: "main" }),
  volume: amountField("volume", "Caught", "volume", [litres(0.05), litres(200)], "Leave empty if it was weighed.", { optional: true }),
  mass: amountField("mass", "or weighed", "mass", [0.03, 150], "Fuel only, without the can.", { optional: true }),
  seconds: amountField("seconds", "In", "time", [2, 7200], "From a steady stream; longer catches are better."),
};

const FIELD = FUEL_FLOW_FIELD;
export const FUEL_FLOW_FORM: SheetForm = {
  title: "Fuel flow",
  formula:
    "Flow = caught volume / time. It must reach 1.5 (gravity) or 1.25 (pump) times take-off consumption, which is the maker's figure, or rated power × fuel per power / density. The newest catches that agree within 5 % count, two at least.",
  caution:
    "Fuel in the open: ignition dead, aircraft and can bonded, extinguisher manned, nothing that sparks, wipe and air before any switch. The engine and kit makers' procedure and the local rules come first.",
  fields: [FIELD.supply, FIELD.takeoffFlow, FIELD.power, FIELD.specific, FIELD.density, FIELD.measuredAt, FIELD.noseUp, FIELD.fuelInTank],
  groups: [
    {
      name: "catches",
      label: "Catches, in the order made",
      row: "catch",
      rows: 2,
      rowsFrom: null,
      fields: [FIELD.pump, FIELD.volume, FIELD.mass, FIELD.seconds],
    },
  ],
};
