/**
 * The fuel flow sheet: each pump alone, or gravity, caught and timed, against what the engine takes at take-off.
 * Source: 14 CFR 23.955 before amendment 23-64; attitude and low tank as in AC 90-89A. The maker's figures come first.
 */
import { z } from "zod";
import { amount, check, MOST_ROWS, missing, notChosen, type Outcome, tooMany, words } from "#app/lib/bench/check";
import { atLeast } from "#app/lib/bench/compare";
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
import { FUEL_FLOW_FIELD as FIELD, FUEL_FLOW_FORM } from "#app/lib/bench/fuel-flow-form";
import { ceilText, figure, floorText, type SheetDef, type SheetFigure, type SheetResult, use } from "#app/lib/bench/sheet-result";

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
          catches: z
            .array(caught, { error: () => "Enter the catches of this pump." })
            .min(1, "Enter at least one catch of this pump.")
            .max(MOST_ROWS, tooMany("catches")),
        }),
        { error: () => noPumps },
      )
      .min(1, noPumps)
      .max(MOST_ROWS, tooMany("pumps")),
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
  /** Flow over take-off consumption, of the catches that count. */
  ratio: number;
  says: string;
  figures: SheetFigure[];
}

const volumeOf = (row: Inputs["pumps"][number]["catches"][number], density: number) => row.volume ?? weighedVolume(row.mass ?? 0, density);
const flowsOf = (pump: Inputs["pumps"][number], density: number) =>
  pump.catches.map((row) => catchFlow({ volume: volumeOf(row, density), seconds: row.seconds }));
const takeoffOf = (inputs: Inputs) => inputs.takeoffFlow ?? consumption(inputs.power ?? 0, inputs.specific ?? 0, inputs.density);

/** Flow asked for and flow of each catch (m³/s), `counted` = the newest that agree; null where the inputs do not compute. */
export function flowsIn(inputs: unknown) {
  const checked = check(schema, inputs);
  if (!checked.ok) return null;
  const { value } = checked;
  return {
    required: requiredFlow(value.supply, takeoffOf(value)),
    pumps: value.pumps.map((pump) => {
      const flows = flowsOf(pump, value.density);
      return { name: pump.name, flows, counted: agreeing(flows).length };
    }),
  };
}

function judgePump(pump: Inputs["pumps"][number], inputs: Inputs, takeoff: number): PumpResult {
  const { name: typed, catches } = pump;
  // It begins sentences and lines.
  const name = `${typed.charAt(0).toUpperCase()}${typed.slice(1)}`;
  const flows = flowsOf(pump, inputs.density);
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
      ? [
          figure(
            `${name}: longest time for a catch as large as the last`,
            "time",
            longestCatch(volumeOf(last, inputs.density), factor * takeoff),
          ),
        ]
      : []),
  ];
  if (counted.length < 2) {
    const says =
      flows.length < 2
        ? `${name} has one catch only: make another.`
        : `${name}: the last two catches differ by ${ceilText(100 * spread(flows.slice(-2)), 1)} %, more than ${100 * CATCH_SPREAD} %: make another.`;
    return { passes: false, ratio, says, figures };
  }
  const left = flows.length - counted.length;
  const aside =
    left === 0
      ? ""
      : ` ${left === 1 ? "An earlier catch that did not agree does" : `${left} earlier catches that did not agree do`} not count.`;
  if (atLeast(ratio, factor))
    return {
      passes: true,
      ratio,
      says: `${name} gives ${floorText(ratio, 2)} times take-off consumption, ${factor} is asked.${aside}`,
      figures,
    };
  const says = `${name} gives ${floorText(ratio, 2)} times take-off consumption, less than the ${factor} asked: look at vent, filter, line, valve and pump, then catch again.${aside}`;
  return { passes: false, ratio, says, figures };
}

function compute(inputs: unknown): Outcome<SheetResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { value } = checked;
  const takeoff = takeoffOf(value);
  const pumps = value.pumps.map((pump) => judgePump(pump, value, takeoff));
  const failing = pumps.filter((pump) => !pump.passes);
  const weakest = Math.min(...pumps.map((pump) => pump.ratio));
  const factor = FLOW_FACTOR[value.supply];
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
      caution: FUEL_FLOW_FORM.caution,
      margin: figure("Weakest supply above what is asked", "fraction", weakest / factor - 1),
      rule: { quantity: "ratio", label: "Weakest supply over take-off consumption", value: weakest, min: factor, max: null },
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
    if (pump === undefined) return "catches";
    const rows = pumps[Number(pump)]?.rows ?? [];
    return part === "catches" && row !== undefined
      ? `catches.${rows[Number(row)] ?? 0}.${field ?? "volume"}`
      : `catches.${rows[0] ?? 0}.pump`;
  };
  return { inputs: { ...rest, pumps: pumps.map(({ name, catches }) => ({ name, catches })) }, locate };
}

export const FUEL_FLOW: SheetDef = {
  version: "1",
  takes: ["takeoffFlow", "ratedPower"],
  uses: ({ takeoffFlow, power }) => [
    use("take-off fuel flow", takeoffFlow, "takeoffFlow"),
    ...(takeoffFlow === undefined ? [use("rated power", power, "ratedPower")] : []),
  ],
  form: FUEL_FLOW_FORM,
  compute,
  fromForm,
};
