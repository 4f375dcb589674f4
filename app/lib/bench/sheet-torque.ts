/** The torque sheet: what to set on the wrench for a fastener, with an adapter and the drag of a locking nut. Formulas: torque.ts. */
import { z } from "zod";
import type { BenchDef, BenchResult } from "#app/lib/bench/bench-def";
import { amount, check, type FieldError, notChosen, type Outcome, words } from "#app/lib/bench/check";
import { atLeast, atMost } from "#app/lib/bench/compare";
import { amountField, choiceField, type SheetForm, textField } from "#app/lib/bench/form";
import { figure } from "#app/lib/bench/sheet-result";
import { type Adapter, appliedTorque, withDrag, wrenchSetting } from "#app/lib/bench/torque";
import { standardTorque, TORQUE_TABLE, TORQUE_TABLE_SOURCE } from "#app/lib/bench/torque-table";
import { toSI } from "#app/lib/units/convert";

const maker = { field: "from", is: "maker" };
const standard = { field: "from", is: "table" };
const TORQUE = [0.1, 3000] as const;
/** Field values are plain words: "3/8-24" is "3_8-24". */
const keyOf = (thread: string): string => thread.replace("/", "_");

const FIELD = {
  from: choiceField(
    "from",
    "Torque from",
    { maker: "the maker's manual", table: "the standard table" },
    "The table is for general hardware where the maker gives none; never for a propeller.",
    { preset: "maker" },
  ),
  least: amountField("least", "Torque, least", "torque", TORQUE, "The same in both where the maker gives one figure.", { when: maker }),
  most: amountField("most", "Torque, most", "torque", TORQUE, "Upper end of the maker's band.", { when: maker }),
  manual: textField("manual", "Read in", "Manual and page.", { when: maker, optional: true }),
  thread: choiceField(
    "thread",
    "Thread",
    Object.fromEntries(TORQUE_TABLE.map(({ thread, series }) => [keyOf(thread), `${thread} ${series}`])),
    "Dry cadmium-plated threads.",
    { when: standard },
  ),
  nut: choiceField("nut", "Nut", { tension: "tension", shear: "shear (thin)" }, "Thin nuts take less.", { when: standard }),
  drag: amountField(
    "drag",
    "Drag of a self-locking nut",
    "torque",
    [0, 200],
    "Read on the wrench while it runs down free; 0 for a plain nut.",
    {
      preset: 0,
    },
  ),
  wrench: amountField("wrench", "Wrench length", "length", [0.05, 2], "From the middle of the handle to the middle of the drive."),
  extension: amountField(
    "extension",
    "Adapter",
    "length",
    [-1, 1],
    "From the drive to the fastener; minus where it folds back over the wrench, 0 without one.",
    { preset: 0 },
  ),
  angle: amountField("angle", "Angle of the adapter", "angle", [0, Math.PI], "0 in line with the wrench, 90 at a right angle.", {
    preset: 0,
  }),
  setting: amountField("setting", "Wrench was set to", "torque", TORQUE, "To see what the fastener got.", { optional: true }),
};

const form: SheetForm = {
  title: "Torque",
  formula:
    "Setting = torque × wrench length / (wrench length + adapter × cos(angle)). The drag of a self-locking nut is added to the torque first. At a right angle nothing is corrected.",
  caution:
    "The engine, propeller or kit maker's torque, sequence and lubrication come first. Oil on a thread meant to be dry stretches the bolt at the same reading. A fastener found over its torque is replaced, not backed off, unless the maker says otherwise.",
  fields: Object.values(FIELD),
  groups: [],
};

const source = z.discriminatedUnion(
  "from",
  [
    z.object({ from: z.literal("maker"), least: amount(FIELD.least), most: amount(FIELD.most), manual: words(FIELD.manual).optional() }),
    z.object({
      from: z.literal("table"),
      thread: z
        .string({ error: () => notChosen(FIELD.thread) })
        .refine((key) => TORQUE_TABLE.some(({ thread }) => keyOf(thread) === key), "Thread: choose one of the table."),
      nut: z.enum(["tension", "shear"], { error: () => notChosen(FIELD.nut) }),
    }),
  ],
  { error: () => notChosen(FIELD.from) },
);
const schema = z.intersection(
  z.object({
    drag: amount(FIELD.drag),
    wrench: amount(FIELD.wrench),
    extension: amount(FIELD.extension),
    angle: amount(FIELD.angle),
    setting: amount(FIELD.setting).optional(),
  }),
  source,
);
type Inputs = z.infer<typeof schema>;

const refuse = (field: string, sentence: string): { ok: false; errors: FieldError[] } => ({ ok: false, errors: [{ field, sentence }] });

/** Band of the fastener without drag (N·m), and the most that the table allows with it. */
function bandOf(inputs: Inputs): Outcome<{ min: number; max: number; highest: number | null }> {
  if (inputs.from === "maker") {
    const { least, most } = inputs;
    if (!atMost(least, most)) return refuse("most", "The upper end is below the lower one: check which is which.");
    return { ok: true, result: { min: least, max: most, highest: null } };
  }
  const row = TORQUE_TABLE.find(({ thread }) => keyOf(thread) === inputs.thread);
  const band = row && standardTorque(row.thread, inputs.nut);
  if (!row || band?.min == null || band.max === null)
    return refuse("nut", "Public copies of the table differ for this nut: read the circular itself and enter its band as the maker's.");
  const highest = inputs.nut === "tension" && row.maxTension !== null ? toSI(row.maxTension, "in-lb") : null;
  return { ok: true, result: { min: band.min, max: band.max, highest } };
}

/** Where the kernels name another field than the form does. */
const at = (errors: FieldError[]) => ({
  ok: false as const,
  errors: errors.map(({ field, sentence }) => ({ field: field === "wrenchLength" ? "wrench" : field, sentence })),
});

function compute(inputs: unknown): Outcome<BenchResult> {
  const checked = check(schema, inputs);
  if (!checked.ok) return checked;
  const { drag, wrench, extension, angle, setting } = checked.value;
  const band = bandOf(checked.value);
  if (!band.ok) return band;
  const { min, max, highest } = band.result;
  const dragged = withDrag({ min, max }, drag);
  if (!dragged.ok) return at(dragged.errors);
  const adapter: Adapter = { wrenchLength: wrench, extension, angle };
  const [low, high] = [wrenchSetting(min + drag, adapter), wrenchSetting(max + drag, adapter)];
  if (!low.ok) return at(low.errors);
  if (!high.ok) return at(high.errors);
  const got = setting === undefined ? null : appliedTorque(setting, adapter);
  if (got && !got.ok) return at(got.errors);
  const applied = got?.ok ? got.result : null;
  const tooHigh = highest !== null && !atMost(max + drag, highest);
  const within = applied === null ? null : atLeast(applied, min + drag) && atMost(applied, max + drag);
  const sentence = tooHigh
    ? "With this drag the band passes the highest torque of the table for this thread: try another nut, or ask the maker."
    : applied === null
      ? `Set the wrench inside the band below${extension === 0 || low.result === min + drag ? "" : ": with the adapter it is not the torque of the fastener"}.`
      : within
        ? "With that setting the fastener got a torque inside its band."
        : "With that setting the fastener did not get a torque inside its band: ask the maker whether it is replaced, then do it again.";
  return {
    ok: true,
    result: {
      passes: tooHigh ? false : within,
      sentence,
      figures: [
        figure("Set the wrench to, least", "torque", low.result),
        figure("Set the wrench to, most", "torque", high.result),
        figure("Torque of the fastener, least", "torque", min + drag),
        figure("Torque of the fastener, most", "torque", max + drag),
        ...(highest === null ? [] : [figure("Highest torque of the table for this thread", "torque", highest)]),
        ...(applied === null ? [] : [figure("What the fastener got", "torque", applied)]),
      ],
      caution: form.caution,
      ...(applied === null
        ? {}
        : {
            margin: figure("Torque left to the nearer end of the band", "torque", Math.min(applied - min - drag, max + drag - applied)),
            rule: { quantity: "torque" as const, label: "What the fastener got", value: applied, min: min + drag, max: max + drag },
          }),
    },
  };
}

export const TORQUE_SHEET: BenchDef = {
  answers: "What do I set on the wrench, with this adapter and this nut?",
  criterion: "The fastener's torque, drag added, inside the maker's band, or the table's where the maker gives none.",
  source: `Adapter and drag: AC 43.13-1B, chapter 7. Table: ${TORQUE_TABLE_SOURCE}.`,
  form,
  compute,
};
