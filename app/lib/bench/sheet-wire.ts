/** The wire drop sheet: voltage lost between bus and equipment for a gauge, length and current. Formulas and table: wire.ts. */
import { z } from "zod";
import { ALTITUDE } from "#app/lib/bench/air-fields";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, notChosen, type Outcome } from "#app/lib/bench/check";
import { atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm } from "#app/lib/bench/form";
import { ceilText, figure } from "#app/lib/bench/sheet-result";
import { AIRCRAFT_WIRE, ALLOWED_DROP, type Conductor, voltageDrop, warmed, wireResistance } from "#app/lib/bench/wire";
import { toSI } from "#app/lib/units/convert";

const MILLIOHM = { si: "mΩ", us: "mΩ" } as const;
const FIELD = {
  system: choiceField("system", "System", { "14": "14 V", "28": "28 V" }, "Voltage while charging.", { preset: "14" }),
  use: choiceField(
    "use",
    "Current flows",
    { continuous: "continuously", intermittent: "for a short time only" },
    "A starter, a flap or gear motor works for a short time.",
    { preset: "continuous" },
  ),
  gauge: choiceField(
    "gauge",
    "Wire gauge (AWG)",
    Object.fromEntries(AIRCRAFT_WIRE.map(([gauge]) => [`awg${gauge}`, gauge === 0 ? "0 (1/0)" : String(gauge)])),
    "A larger number is a thinner wire.",
  ),
  conductor: choiceField(
    "conductor",
    "Conductor",
    { aircraft: "stranded aircraft wire", solid: "solid copper" },
    "Stranded aircraft wire loses more than solid copper of the same gauge.",
    { preset: "aircraft" },
  ),
  length: amountField("length", "Length, one way", "length", [0.1, 50], "From the bus to the equipment, as the wire runs.", {
    as: ALTITUDE,
  }),
  back: choiceField(
    "back",
    "Current comes back by",
    { wire: "an equal wire", airframe: "the metal airframe" },
    "Wood and composite have no airframe to come back by.",
    { preset: "wire" },
  ),
  current: amountField("current", "Current", "current", [0.01, 1000], "What the equipment takes; of a starter, when it begins to turn."),
  temperature: amountField(
    "temperature",
    "Conductor temperature",
    "temperature",
    [toSI(-40, "°C"), toSI(150, "°C")],
    "20 °C is that of the tables; in a cowling it is more.",
    { preset: toSI(20, "°C") },
  ),
};

const form: SheetForm = {
  title: "Wire drop",
  formula:
    "Drop = current × resistance per length × length × 2 (back by an equal wire) or × 1 (back by the airframe, whose own loss is not in it). Solid copper: diameter = 0.127 mm × 92^((36 − gauge) / 39), 1/58 Ω·mm²/m at 20 °C. Resistance grows by 0.393 % per °C.",
  caution:
    "Drop says nothing of heat: what a wire may carry in a bundle or a cowling, and the breaker that protects it, is another table. The equipment makers' installation manuals come first.",
  fields: Object.values(FIELD),
  groups: [],
};

const gauges = new Map(AIRCRAFT_WIRE.map(([gauge]) => [`awg${gauge}`, gauge]));
const schema = z.object({
  system: z.enum(["14", "28"], { error: () => notChosen(FIELD.system) }),
  use: z.enum(["continuous", "intermittent"], { error: () => notChosen(FIELD.use) }),
  gauge: z.string({ error: () => notChosen(FIELD.gauge) }).refine((name) => gauges.has(name), notChosen(FIELD.gauge)),
  conductor: z.enum(["aircraft", "solid"], { error: () => notChosen(FIELD.conductor) }),
  length: amount(FIELD.length),
  back: z.enum(["wire", "airframe"], { error: () => notChosen(FIELD.back) }),
  current: amount(FIELD.current),
  temperature: amount(FIELD.temperature),
});

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { system, use, gauge: name, conductor, length, back, current, temperature } = checked.value;
  const gauge = gauges.get(name) ?? 22;
  const ways = back === "wire" ? 2 : 1;
  const perMetre = (awg: number, as: Conductor) => warmed(wireResistance(awg, as), temperature);
  const dropOf = (awg: number, as = conductor) => voltageDrop(perMetre(awg, as), length, ways, current);
  const drop = dropOf(gauge);
  const allowed = ALLOWED_DROP[system][use];
  const passes = atMost(drop, allowed);
  const thinnest = AIRCRAFT_WIRE.map(([awg]) => awg).find((awg) => atMost(dropOf(awg), allowed));
  const enough =
    thinnest === undefined
      ? "no gauge of the table is enough: shorten the way or move the battery"
      : `gauge ${thinnest} is the thinnest within it`;
  const lost = `${ceilText(drop, 2)} V is lost, ${allowed} V is allowed in a ${system} V system (${use === "continuous" ? "continuous" : "short time"})`;
  return {
    ok: true,
    result: {
      passes,
      sentence: passes ? `${lost}; ${enough}, for the drop alone.` : `${lost}: ${enough}, for the drop alone.`,
      figures: [
        figure("Voltage lost", "voltage", drop),
        figure("Share of the system's voltage", "fraction", drop / Number(system)),
        figure(
          back === "wire" ? "Resistance, there and back" : "Resistance, one way",
          "resistance",
          perMetre(gauge, conductor) * length * ways,
          MILLIOHM,
        ),
        figure("The same as solid copper would lose", "voltage", dropOf(gauge, "solid")),
        figure("Heat in the wire", "power", drop * current, { si: "W", us: "W" }),
      ],
      caution: form.caution,
      margin: figure("Voltage left to the limit", "voltage", allowed - drop),
      rule: { quantity: "voltage", label: "Voltage lost", value: drop, min: null, max: allowed },
    },
  };
}

export const WIRE_DROP: BenchDef = {
  answers: "How much voltage is lost in a wire, and which gauge is enough for that?",
  criterion: "Drop at most 0.5 V (14 V) or 1 V (28 V) continuous; 1 V or 2 V for a short time.",
  source: "AC 43.13-1B, tables 11-6 and 11-9 (short-time limits from memory); AWG diameters ASTM B258, copper IEC 60028.",
  form,
  compute,
};
