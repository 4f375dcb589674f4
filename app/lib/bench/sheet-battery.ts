/** The battery sheet: how full it is at rest, and what it leaves the engine's computers while the starter turns. Figures: battery.ts. */
import { z } from "zod";
import { type Charge, LEAST_CHARGE, NOT_AT_REST, REST_TIME, stateOfCharge } from "#app/lib/bench/battery";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, notChosen, type Outcome } from "#app/lib/bench/check";
import { atLeast, atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm } from "#app/lib/bench/form";
import { figure } from "#app/lib/bench/sheet-result";

const HOURS = { si: "h", us: "h" } as const;
const FIELD = {
  chemistry: choiceField(
    "chemistry",
    "Chemistry",
    { lead: "lead-acid, six cells a battery", lifepo4: "lithium iron phosphate, four cells a battery" },
    "As its label says. Other chemistries have other voltages.",
    { prefill: [{ kind: "trait" }] },
  ),
  blocks: amountField("blocks", "12 V batteries in series", "count", [1, 2], "1 for a 14 V system, 2 for 28 V.", { preset: 1 }),
  rest: amountField("rest", "Rest voltage", "voltage", [6, 30], "At the posts, nothing switched on, charger off."),
  rested: amountField("rested", "At rest for", "time", [0, 30 * 24 * 3600], "At least 2 h without charge or load.", { as: HOURS }),
  leastCharge: amountField("leastCharge", "Charge asked for", "fraction", [0.2, 0.99], "75 % before a start. Common practice.", {
    preset: LEAST_CHARGE,
  }),
  lowest: amountField(
    "lowest",
    "Lowest voltage in a burst",
    "voltage",
    [1, 30],
    "At the computers' supply, ignition cut, starter turning; the least the meter holds.",
    { optional: true },
  ),
  minimum: amountField("minimum", "Computers' minimum supply", "voltage", [4, 26], "The maker's figure for ignition or injection.", {
    optional: true,
    prefill: [{ kind: "value", key: "ecuVoltsMin" }],
  }),
};

const form: SheetForm = {
  title: "Battery",
  formula:
    "State of charge between the usual rest voltages of the chemistry, on straight lines, per 12 V battery. Margin = lowest voltage while the starter turns − what the computers need.",
  caution:
    "With electronic ignition a weak battery is a no-start or a kick-back that breaks a starter or an arm: charge first, nobody near the propeller. Lead-acid gives off gas that burns, lithium must have its own charger. The battery and ignition makers' figures come first.",
  fields: Object.values(FIELD),
  groups: [],
};

const schema = z
  .object({
    chemistry: z.enum(["lead", "lifepo4"], { error: () => notChosen(FIELD.chemistry) }),
    blocks: amount(FIELD.blocks),
    rest: amount(FIELD.rest),
    rested: amount(FIELD.rested),
    leastCharge: amount(FIELD.leastCharge),
    lowest: amount(FIELD.lowest).optional(),
    minimum: amount(FIELD.minimum).optional(),
  })
  .superRefine(({ chemistry, blocks, rest, rested, lowest, minimum }, at) => {
    const add = (path: string, message: string) => at.addIssue({ code: "custom", path: [path], message });
    if (!atLeast(rested, REST_TIME)) add("rested", "The voltage says nothing of the charge before 2 h at rest: wait, then measure again.");
    const most = NOT_AT_REST[chemistry] * blocks;
    if (!atMost(rest, most))
      add(
        "rest",
        `More than ${most} V is not a battery at rest: take it off the charger, wait 2 h; or check chemistry and number of batteries.`,
      );
    if (!atLeast(rest, 8 * blocks))
      add(
        "rest",
        `Less than ${8 * blocks} V is a dead battery, or fewer batteries in series than entered: look before anything is charged.`,
      );
    if (lowest !== undefined && !atMost(lowest, rest))
      add("lowest", "The voltage while cranking cannot be above the rest voltage: check which is which.");
    if (lowest !== undefined && minimum === undefined)
      add("minimum", "To judge the lowest voltage the computers' minimum supply is needed: enter the maker's figure, or leave both empty.");
  });

const percent = (share: number): string => `${Math.round(100 * share)} %`;
const chargeWords = ({ charge, side }: Charge): string =>
  side === "under" ? `less than ${percent(charge)}` : side === "over" ? `${percent(charge)} or more` : `about ${percent(charge)}`;

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { chemistry, blocks, rest, leastCharge, lowest, minimum } = checked.value;
  const charge = stateOfCharge(chemistry, rest, blocks);
  const full = charge.side !== "under" && atLeast(charge.charge, leastCharge);
  const sags = lowest !== undefined && minimum !== undefined;
  const holds = !sags || atLeast(lowest, minimum);
  const gauge = chemistry === "lifepo4" ? " The voltage of this chemistry is a poor gauge: charge it fully instead of relying on it." : "";
  const sag = sags
    ? holds
      ? "The computers keep their supply while the starter turns."
      : "While the starter turns the computers get less than they need: charge, look at cables, posts and grounds, then measure again before any start."
    : "What the starter leaves for the computers is not measured.";
  const charged = full
    ? `Charged ${chargeWords(charge)}.`
    : `Charged ${chargeWords(charge)}, ${percent(leastCharge)} is asked: charge it before a start.`;
  return {
    ok: true,
    result: {
      passes: full && holds,
      sentence: `${charged}${gauge} ${sag}`,
      figures: [
        figure(
          charge.side === "under" ? "State of charge, less than" : charge.side === "over" ? "State of charge, at least" : "State of charge",
          "fraction",
          charge.charge,
        ),
        figure("Rest voltage of each 12 V battery", "voltage", rest / blocks),
        ...(lowest === undefined ? [] : [figure("Sag while cranking", "voltage", rest - lowest)]),
      ],
      caution: form.caution,
      ...(sags
        ? {
            margin: figure("Voltage left to the computers' minimum", "voltage", lowest - minimum),
            rule: { quantity: "voltage" as const, label: "Lowest voltage while cranking", value: lowest, min: minimum, max: null },
          }
        : {}),
    },
  };
}

export const BATTERY: BenchDef = {
  answers: "Is the battery full enough, and do the computers keep their supply while it cranks?",
  criterion: "State of charge at least as asked; lowest voltage in a burst at least the computers' minimum supply.",
  source: "Common practice, as battery makers print it for about 20 to 25 °C; no standard.",
  form,
  compute,
};
