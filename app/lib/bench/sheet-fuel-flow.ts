/**
 * The fuel flow sheet: each pump alone, or gravity, caught and timed, against what the engine takes at take-off.
 * Source: 14 CFR 23.955 before amendment 23-64; attitude and low tank as in AC 90-89A. The maker's figures come first.
 */
import { z } from "zod";
import { amount, check, missing, notChosen, type Outcome, words } from "#app/lib/bench/check";
import { atLeast, atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm, textField } from "#app/lib/bench/form";
import {
  agreeing,
  CATCH_SPREAD,
  catchFlow,
  consumption,
  FLOW_FACTOR,
  longestCatch,
  mean,
  requiredFlow,
  spread,
  weighedVolume,
} from "#app/lib/bench/fuel-flow";
import { ceilText, figure, floorText, type SheetDef, type SheetFigure, type SheetResult } from "#app/lib/bench/sheet-result";
import { toSI } from "#app/lib/units/convert";

const litres = (n: number) => toSI(n, "L");
const FIELD = {
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

const form: SheetForm = {
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

const caught = z
  .object({ volume: amount(FIELD.volume).optional(), mass: amount(FIELD.mass).optional(), seconds: amount(FIELD.seconds) })
  .superRefine((row, at) => {
    if (row.volume === undefined && row.mass === undefined)
      at.addIssue({ code: "custom", path: ["volume"], message: "Enter what was caught, as a volume or as a weight." });
    if (row.volume !== undefined && row.mass !== undefined)
      at.addIssue({
        code: "custom",
        path: ["mass"],
        message: "Enter either volume or weight, not both: the sheet cannot tell which one counts.",
      });
  });

const noPumps = "Enter the catches of at least one pump, or of the tank by gravity.";
const schema = z
  .object({
    supply: z.enum(["gravity", "pump"], { error: () => notChosen(FIELD.supply) }),
    takeoffFlow: amount(FIELD.takeoffFlow).optional(),
    power: amount(FIELD.power).optional(),
    specific: amount(FIELD.specific).optional(),
    density: amount(FIELD.density),
    measuredAt: z.enum(["engine", "return", "inlet"], { error: () => notChosen(FIELD.measuredAt) }),
    noseUp: amount(FIELD.noseUp),
    fuelInTank: amount(FIELD.fuelInTank),
    pumps: z
      .array(
        z.object({
          name: words(FIELD.pump),
          catches: z.array(caught, { error: () => "Enter the catches of this pump." }).min(1, "Enter at least one catch of this pump."),
        }),
        { error: () => noPumps },
      )
      .min(1, noPumps),
  })
  .superRefine((inputs, at) => {
    if (inputs.takeoffFlow === undefined && inputs.power === undefined) {
      at.addIssue({
        code: "custom",
        path: ["takeoffFlow"],
        message: "Enter the maker's take-off consumption, or rated power to compute it from.",
      });
    }
    if (inputs.takeoffFlow === undefined && inputs.power !== undefined && inputs.specific === undefined) {
      at.addIssue({ code: "custom", path: ["specific"], message: missing(FIELD.specific.label) });
    }
    const names = inputs.pumps.map((pump) => pump.name.toLowerCase());
    names.forEach((name, index) => {
      if (names.indexOf(name) !== index)
        at.addIssue({
          code: "custom",
          path: ["pumps", index, "name"],
          message: "This name is used twice: put the catches of one pump together.",
        });
    });
  });

type Inputs = z.infer<typeof schema>;

interface PumpResult {
  passes: boolean;
  says: string;
  figures: SheetFigure[];
}

function judgePump({ name, catches }: Inputs["pumps"][number], inputs: Inputs, takeoff: number): PumpResult {
  const volumeOf = (row: Inputs["pumps"][number]["catches"][number]) => row.volume ?? weighedVolume(row.mass ?? 0, inputs.density);
  const flows = catches.map((row) => catchFlow({ volume: volumeOf(row), seconds: row.seconds }));
  const counted = agreeing(flows);
  const flow = mean(counted);
  const ratio = flow / takeoff;
  const factor = FLOW_FACTOR[inputs.supply];
  const last = catches.at(-1);
  const figures = [
    figure(`${name}: flow, mean of the ${counted.length} catches that count`, "volumeFlow", flow),
    figure(`${name}: catches made`, "count", flows.length),
    figure(`${name}: spread of all catches`, "fraction", spread(flows)),
    figure(`${name}: flow over take-off consumption`, "ratio", ratio),
    ...(last
      ? [figure(`${name}: longest time for a catch as large as the last`, "time", longestCatch(volumeOf(last), factor * takeoff))]
      : []),
  ];
  if (counted.length < 2) {
    const says =
      flows.length < 2
        ? `${name} has one catch only: make another.`
        : `${name}: the last two catches differ by ${ceilText(100 * spread(flows.slice(-2)), 1)} %, more than ${100 * CATCH_SPREAD} %: make another.`;
    return { passes: false, says, figures };
  }
  const left = flows.length - counted.length;
  const aside =
    left === 0
      ? ""
      : ` ${left === 1 ? "An earlier catch that did not agree does" : `${left} earlier catches that did not agree do`} not count.`;
  if (atLeast(ratio, factor))
    return { passes: true, says: `${name} gives ${floorText(ratio, 2)} times take-off consumption, ${factor} is asked.${aside}`, figures };
  const says = `${name} gives ${floorText(ratio, 2)} times take-off consumption, less than the ${factor} asked: look at vent, filter, line, valve and pump, then catch again.${aside}`;
  return { passes: false, says, figures };
}

function compute(inputs: unknown): Outcome<SheetResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const takeoff = value.takeoffFlow ?? consumption(value.power ?? 0, value.specific ?? 0, value.density);
  const pumps = value.pumps.map((pump) => judgePump(pump, value, takeoff));
  const failing = pumps.filter((pump) => !pump.passes);
  return {
    ok: true,
    result: {
      passes: failing.length === 0,
      sentence: (failing.length === 0 ? pumps : failing).map((pump) => pump.says).join(" "),
      cap: null,
      figures: [
        figure(
          value.takeoffFlow === undefined ? "Take-off consumption, from rated power" : "Take-off consumption, maker's figure",
          "volumeFlow",
          takeoff,
        ),
        figure("Flow asked for", "volumeFlow", requiredFlow(value.supply, takeoff)),
        ...pumps.flatMap((pump) => pump.figures),
        figure("Nose up during the test", "angle", value.noseUp),
        figure("Fuel in the feeding tank", "volume", value.fuelInTank),
      ],
      caution: form.caution,
    },
  };
}

/** Rows under one name are the catches of one pump. */
function fromForm(flat: Record<string, unknown>) {
  const { catches, ...rest } = flat;
  const pumps: { name: string; catches: unknown[]; rows: number[] }[] = [];
  (Array.isArray(catches) ? (catches as Record<string, unknown>[]) : []).forEach(({ pump, ...row }, index) => {
    const name = String(pump ?? "");
    const known = pumps.find((other) => other.name.toLowerCase() === name.toLowerCase());
    const home = known ?? { name, catches: [], rows: [] };
    if (!known) pumps.push(home);
    home.catches.push(row);
    home.rows.push(index);
  });
  const locate = (path: string) => {
    const [, pump, part, row, field] = path.split(".");
    if (!path.startsWith("pumps")) return path;
    const rows = pumps[Number(pump)]?.rows ?? [];
    return part === "catches" && row !== undefined
      ? `catches.${rows[Number(row)] ?? 0}.${field ?? "volume"}`
      : `catches.${rows[0] ?? 0}.pump`;
  };
  return { inputs: { ...rest, pumps: pumps.map(({ name, catches }) => ({ name, catches })) }, locate };
}

export const FUEL_FLOW: SheetDef = { version: "1", takes: ["takeoffFlow", "ratedPower"], form, compute, fromForm };
