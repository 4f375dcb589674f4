/** The crank sheet: bursts as they were made, and whether and for how long the starter may turn again. The rule: crank.ts. */
import { z } from "zod";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, MOST_ROWS, missing, type Outcome, tooMany } from "#app/lib/bench/check";
import { type Burst, type CrankRule, crankSummary, DEFAULT_CRANK_RULE, mayCrank } from "#app/lib/bench/crank";
import { amountField, type SheetForm } from "#app/lib/bench/form";
import { figure } from "#app/lib/bench/sheet-result";

const MINUTES = { si: "min", us: "min" } as const;
const FIELD = {
  on: amountField("on", "Longest burst", "time", [1, 120], "The starter maker's figure.", {
    preset: DEFAULT_CRANK_RULE.on,
    prefill: [{ kind: "value", key: "starterOn" }],
  }),
  rest: amountField("rest", "Rest after each burst", "time", [0, 1800], "The starter maker's figure.", {
    preset: DEFAULT_CRANK_RULE.rest,
    prefill: [{ kind: "value", key: "starterRest" }],
  }),
  tries: amountField("tries", "Bursts in a set", "count", [1, 20], "Then the long rest.", {
    preset: DEFAULT_CRANK_RULE.tries,
    prefill: [{ kind: "value", key: "starterTries" }],
  }),
  longRest: amountField("longRest", "Rest after a set", "time", [60, 7200], "30 min unless the maker says otherwise.", {
    preset: DEFAULT_CRANK_RULE.longRest,
    as: MINUTES,
  }),
  giveUpAfter: amountField(
    "giveUpAfter",
    "Give up after",
    "time",
    [5, 600],
    "Cranking in all without oil pressure: then look for the cause. Common practice.",
    { preset: DEFAULT_CRANK_RULE.giveUpAfter },
  ),
  since: amountField("since", "Starter off since", "time", [0, 86_400], "From the end of the last burst until now.", { optional: true }),
  before: amountField("before", "Rest before it", "time", [0, 86_400], "From the end of the burst before; empty for the first.", {
    optional: true,
  }),
  seconds: amountField("seconds", "Starter on for", "time", [0.1, 600], "How long it turned."),
  pressureAfter: amountField("pressureAfter", "Pressure after", "time", [0, 600], "Seconds into the burst; empty where none was seen.", {
    optional: true,
  }),
};

const form: SheetForm = {
  title: "Crank clock",
  formula:
    "A burst lasts at most so long and is followed by a rest; after a set comes the long rest. An over-long burst counts as the number it would have filled. Time to pressure is counted from the first burst, and as cranking alone.",
  caution:
    "The propeller turns: ignition and fuel as the procedure says, area clear, one person calls. A hot starter burns its windings, and an engine cranked without oil pressure wears at every turn. The starter and engine makers' limits come first.",
  fields: [FIELD.on, FIELD.rest, FIELD.tries, FIELD.longRest, FIELD.giveUpAfter, FIELD.since],
  groups: [
    {
      name: "bursts",
      label: "Bursts, in order",
      row: "burst",
      rows: 2,
      rowsFrom: null,
      fields: [FIELD.before, FIELD.seconds, FIELD.pressureAfter],
    },
  ],
};

const schema = z
  .object({
    on: amount(FIELD.on),
    rest: amount(FIELD.rest),
    tries: amount(FIELD.tries),
    longRest: amount(FIELD.longRest),
    giveUpAfter: amount(FIELD.giveUpAfter),
    since: amount(FIELD.since).optional(),
    bursts: z
      .array(
        z.object({
          before: amount(FIELD.before).optional(),
          seconds: amount(FIELD.seconds),
          pressureAfter: amount(FIELD.pressureAfter).optional(),
        }),
        { error: () => "Bursts must be a list: enter them row by row." },
      )
      .max(MOST_ROWS, tooMany("bursts")),
  })
  .superRefine(({ rest, longRest, since, bursts }, at) => {
    const add = (path: (string | number)[], message: string) => at.addIssue({ code: "custom", path, message });
    if (longRest < rest) add(["longRest"], "The rest after a set cannot be shorter than the rest after a burst: check the two.");
    if (bursts.length > 0 && since === undefined) add(["since"], missing(FIELD.since.label));
    bursts.forEach(({ before, seconds, pressureAfter }, index) => {
      if (index > 0 && before === undefined) add(["bursts", index, "before"], `Burst ${index + 1} needs the rest before it: enter it.`);
      if (pressureAfter !== undefined && pressureAfter > seconds)
        add(["bursts", index, "pressureAfter"], `Pressure is seen inside the burst, so at most after ${seconds} s.`);
    });
  });

/** Bursts on a clock that begins at 0 ms with the first one; `now` is ms too. */
function burstsOf(inputs: z.infer<typeof schema>) {
  let at = 0;
  const bursts = inputs.bursts.map(({ before = 0, seconds, pressureAfter }, index): Burst => {
    if (index > 0) at += before * 1000;
    const burst = { at, seconds, pressureAfter: pressureAfter ?? null };
    at += seconds * 1000;
    return burst;
  });
  return { bursts, now: at + (inputs.since ?? 0) * 1000 };
}

/** The bursts of a sheet's inputs, for drawing them; null where the inputs do not compute. */
export function burstsIn(inputs: unknown) {
  const checked = check(schema, inputs);
  return checked.ok ? burstsOf(checked.value) : null;
}

/** Each burst that began before its rest was over, or lasted longer than the rule. */
function breaches(rule: CrankRule, bursts: Burst[]): string[] {
  return bursts.flatMap((burst, index) => {
    const may = mayCrank(rule, bursts.slice(0, index), burst.at);
    if (!may.may)
      return [
        may.at === null
          ? `Burst ${index + 1} came after the give-up total`
          : `Burst ${index + 1} came ${restText((may.at - burst.at) / 1000)} too soon`,
      ];
    return burst.seconds > may.seconds + 1e-9 ? [`Burst ${index + 1} lasted ${secondsText(burst.seconds - may.seconds)} s too long`] : [];
  });
}

const restText = (seconds: number): string => (seconds >= 120 ? `${Math.ceil(seconds / 60)} min` : `${secondsText(seconds)} s`);
const secondsText = (seconds: number): string => String(Math.round(seconds * 10) / 10);

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { on, rest, tries, longRest, giveUpAfter } = checked.value;
  const rule: CrankRule = { on, rest, tries, longRest, giveUpAfter };
  const { bursts, now } = burstsOf(checked.value);
  const state = mayCrank(rule, bursts, now);
  const { total, pressure } = crankSummary(bursts, giveUpAfter);
  const broken = breaches(rule, bursts);
  const told = broken.length ? ` ${broken.join(". ")}: let the starter cool longer.` : "";
  const next = state.may
    ? `You may crank for at most ${secondsText(state.seconds)} s; ${state.left} left in this set, this burst included.`
    : state.at === null
      ? state.sentence
      : `Not yet: ${restText((state.at - now) / 1000)} of rest are left. ${state.sentence}`;
  return {
    ok: true,
    result: {
      passes: state.may,
      sentence: `${next}${told}`,
      figures: [
        figure("Bursts", "count", bursts.length),
        figure("Cranking in all", "time", total),
        ...(pressure
          ? [
              figure("Pressure after cranking for", "time", pressure.cranking),
              figure("Pressure since the first burst", "time", pressure.sinceFirst),
            ]
          : []),
        ...(state.may || state.at === null ? [] : [figure("Rest that is left", "time", (state.at - now) / 1000)]),
      ],
      caution: form.caution,
      ...(pressure ? {} : { margin: figure("Cranking left to the give-up total", "time", giveUpAfter - total) }),
    },
  };
}

export const CRANK_SHEET: BenchDef = {
  answers: "May the starter turn again, for how long, and when must I give up?",
  criterion: "No burst longer than allowed, none before its rest is over, none past the give-up total without oil pressure.",
  source:
    "Starter makers' duty cycles (10 s on, 20 s off, 6 times, then 30 min); yours comes first. The give-up total is common practice, no source.",
  form,
  compute,
};
