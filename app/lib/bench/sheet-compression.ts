/**
 * The compression sheet: each cylinder's loss against the limit, and where it leaks.
 * Source: AC 43.13-1B, paragraph 8-14 (80 psi, loss in excess of 25 % is suspect). The engine maker's method and limits come first.
 */
import { z } from "zod";
import { amount, check, MOST_ROWS, notChosen, type Outcome, tooMany, words } from "#app/lib/bench/check";
import { atMost } from "#app/lib/bench/compare";
import { LOSS_LIMIT, loss, TEST_PRESSURE } from "#app/lib/bench/compression";
import { amountField, choiceField, type SheetForm, textField } from "#app/lib/bench/form";
import { ceilText, figure, type SheetDef, type SheetResult, use } from "#app/lib/bench/sheet-result";
import { toSI } from "#app/lib/units/convert";

const LEAKS = {
  none: "nowhere heard",
  exhaust: "exhaust valve or port",
  intake: "intake valve or port",
  rings: "rings (breather)",
  head: "head, plug or coolant",
};
const FIELD = {
  count: amountField("count", "Cylinders or rotor chambers", "count", [1, 36], "Every one is tested.", {
    prefill: [{ kind: "value", key: "cylinders" }],
  }),
  supply: amountField(
    "supply",
    "Supply pressure",
    "pressure",
    [toSI(20, "psi"), toSI(120, "psi")],
    "80 psi (552 kPa) unless the maker says otherwise.",
    { preset: TEST_PRESSURE },
  ),
  orifice: amountField(
    "orifice",
    "Orifice of the tester",
    "length",
    [toSI(0.02, "in"), toSI(0.2, "in")],
    "0.040 in (1.0 mm) under 5 in bore, 0.060 in (1.5 mm) from there on; makers differ.",
    {
      preset: toSI(0.04, "in"),
    },
  ),
  maxLoss: amountField("maxLoss", "Loss allowed", "fraction", [0.01, 0.6], "25 % unless the maker gives another limit.", {
    preset: LOSS_LIMIT,
  }),
  limitFrom: textField("limitFrom", "Where another limit was read", "Manual and page. Needed only when the loss allowed is above 25 %.", {
    optional: true,
  }),
  name: textField("name", "Cylinder", "Its number on the engine."),
  reading: amountField(
    "reading",
    "Reading",
    "pressure",
    [0, toSI(120, "psi")],
    "Warm, piston held at top dead centre, after the needle settles.",
  ),
  leak: choiceField("leak", "Leaks at", LEAKS, "Listen at exhaust, intake and breather.", { preset: "none" }),
};

const form: SheetForm = {
  title: "Compression",
  formula: "Loss = (supply − reading) / supply. Every cylinder's loss must be within the limit; exactly at the limit passes.",
  caution:
    "Air in a cylinder swings the propeller hard: ignition dead, one plug out of each other cylinder, a second person holds the propeller, nobody in its arc, let air in slowly. The engine maker's method and limits and licensed practice come first.",
  fields: [FIELD.count, FIELD.supply, FIELD.orifice, FIELD.maxLoss, FIELD.limitFrom],
  groups: [
    {
      name: "cylinders",
      label: "Cylinders",
      row: "cylinder",
      rows: 4,
      rowsFrom: "cylinders",
      fields: [FIELD.name, FIELD.reading, FIELD.leak],
    },
  ],
};

const leaks = ["none", "exhaust", "intake", "rings", "head"] as const satisfies readonly (keyof typeof LEAKS)[];
const noCylinders = "Enter the reading of every cylinder.";
const schema = z
  .object({
    count: amount(FIELD.count),
    supply: amount(FIELD.supply),
    orifice: amount(FIELD.orifice),
    maxLoss: amount(FIELD.maxLoss),
    limitFrom: words(FIELD.limitFrom).optional(),
    cylinders: z
      .array(
        z.object({ name: words(FIELD.name), reading: amount(FIELD.reading), leak: z.enum(leaks, { error: () => notChosen(FIELD.leak) }) }),
        { error: () => noCylinders },
      )
      .min(1, noCylinders)
      .max(MOST_ROWS, tooMany("cylinders")),
  })
  .superRefine(({ cylinders, count, supply, maxLoss, limitFrom }, at) => {
    if (!atMost(maxLoss, LOSS_LIMIT) && limitFrom === undefined) {
      at.addIssue({ code: "custom", path: ["limitFrom"], message: "A loss above 25 % needs the maker's word: enter the manual and page." });
    }
    if (cylinders.length !== count) {
      at.addIssue({
        code: "custom",
        path: ["cylinders"],
        message: `There are ${cylinders.length} readings for ${count} cylinders: enter one for each.`,
      });
    }
    const names = cylinders.map((cylinder) => cylinder.name.toLowerCase());
    cylinders.forEach((cylinder, index) => {
      if (names.indexOf(cylinder.name.toLowerCase()) !== index)
        at.addIssue({
          code: "custom",
          path: ["cylinders", index, "name"],
          message: `Cylinder ${cylinder.name} is entered twice: check the numbers.`,
        });
      if (!atMost(cylinder.reading, supply)) {
        at.addIssue({
          code: "custom",
          path: ["cylinders", index, "reading"],
          message: "A cylinder cannot hold more than the supply: read both gauges again.",
        });
      }
    });
  });

function compute(inputs: unknown): Outcome<SheetResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { supply, orifice, maxLoss, cylinders } = checked.value;
  const losses = cylinders.map((cylinder) => ({ ...cylinder, lost: loss(supply, Math.min(cylinder.reading, supply)) }));
  const bad = losses.filter(({ lost }) => !atMost(lost, maxLoss));
  const worst = losses.reduce((most, cylinder) => (cylinder.lost > most.lost ? cylinder : most));
  const limit = `${Number((100 * maxLoss).toFixed(2))} %`;
  const leaking = bad.map(({ name, lost, leak }) => `cylinder ${name} loses ${ceilText(100 * lost, 1)} % (${LEAKS[leak]})`).join(", ");
  const sentence =
    bad.length === 0
      ? `Every cylinder is within ${limit}; the worst is cylinder ${worst.name} with a loss of ${ceilText(100 * worst.lost, 1)} %.`
      : `More than ${limit} is lost: ${leaking}. Run the engine at least 3 min more and test again; if it stays, find the leak by the maker's manual.`;
  const readings = losses.map(({ reading }) => reading);
  return {
    ok: true,
    result: {
      passes: bad.length === 0,
      sentence,
      cap: null,
      figures: [
        figure("Supply pressure", "pressure", supply),
        figure("Orifice of the tester", "length", orifice),
        figure("Loss allowed", "fraction", maxLoss),
        ...losses.flatMap(({ name, reading, lost }) => [
          figure(`Cylinder ${name}: reading`, "pressure", reading),
          figure(`Cylinder ${name}: loss`, "fraction", lost),
        ]),
        figure("Spread between best and worst", "pressure", Math.max(...readings) - Math.min(...readings)),
      ],
      caution: form.caution,
      margin: figure("Loss left to the limit, worst cylinder", "fraction", maxLoss - worst.lost),
      rule: { quantity: "fraction", label: "Largest loss", value: worst.lost, min: null, max: maxLoss },
    },
  };
}

export const COMPRESSION: SheetDef = {
  version: "1",
  takes: ["cylinders"],
  uses: ({ count }) => [use("number of cylinders", count, "cylinders")],
  form,
  compute,
};
