/**
 * A new install as it arrives from its pages: what it is called and where it stands, then its ratings and limits as typed.
 * Text in, SI out; every message says what to type instead. Pure.
 */
import { z } from "zod";
import { commandIdSchema, sourceSchema } from "#app/lib/schemas/act";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import type { ValueDef, ValueKey } from "#app/lib/template/types";
import { valueFault } from "#app/lib/template/values";
import { format, parseEntry, type UnitSystem } from "#app/lib/units/display";

export const identitySchema = createInstallSchema.pick({ registration: true, name: true, timeZone: true });

/** What a value starts from, as its field shows it; empty where only the maker can say. */
export const presetText = (def: ValueDef, units: UnitSystem): string =>
  def.preset === null ? "" : format(def.quantity, def.preset, units, def.shownIn).value;

/** Pairs of which the first is not above the second. */
const ORDER: [ValueKey, ValueKey][] = [
  ["idleRpm", "redline"],
  ["staticRpmMin", "staticRpmMax"],
  ["avoidRpmMin", "avoidRpmMax"],
  ["oilPressureMin", "oilPressureMax"],
  ["oilTempForPower", "oilTempMax"],
  ["fuelPressureMin", "fuelPressureMax"],
  ["busVoltsMin", "busVoltsMax"],
  ["windLimit", "gustLimit"],
];

const typed = z.object({ value: z.string().default(""), source: z.string().default("") }).default({ value: "", source: "" });

/**
 * Ratings and limits as typed, by value key. Each may stay empty; then its preset stands, not confirmed. A source without a
 * value is refused, and so is a least above its most.
 */
export function ratingsForm(defs: ValueDef[], units: UnitSystem) {
  return z
    .object({ commandId: commandIdSchema, values: z.record(z.string(), typed).default({}) })
    .transform(({ commandId, values }, context) => {
      const issue = (key: string, field: "value" | "source", message: string) =>
        context.addIssue({ code: "custom", path: ["values", key, field], message });
      const out: Record<string, { value: number | null; source: string | null }> = {};
      for (const def of defs) {
        const { value: text, source } = values[def.key] ?? { value: "", source: "" };
        const read = source.trim() === "" ? null : sourceSchema.safeParse(source);
        if (read && !read.success) issue(def.key, "source", read.error.issues[0]?.message ?? "Say where it was read.");
        const value = siOf(def, text.trim(), units);
        if (!value.ok) issue(def.key, "value", value.sentence);
        else if (value.si === null && read) issue(def.key, "value", "Enter the value that you read there, or clear where it was read.");
        out[def.key] = { value: value.ok ? value.si : null, source: read?.success ? read.data : null };
      }
      const standing = (key: ValueKey) => out[key]?.value ?? defs.find((def) => def.key === key)?.preset ?? null;
      for (const [low, high] of ORDER) {
        const [least, most] = [standing(low), standing(high)];
        const top = defs.find((def) => def.key === high);
        if (least === null || most === null || !top || least <= most) continue;
        const text = format(top.quantity, most, units, top.shownIn).text;
        issue(low, "value", `This is above “${top.label}”, which stands at ${text}: change one of the two.`);
      }
      return { commandId, values: out };
    });
}

/** Null = empty. A preset left as it was shown keeps its exact value, not the rounded one. */
function siOf(def: ValueDef, text: string, units: UnitSystem): { ok: true; si: number | null } | { ok: false; sentence: string } {
  if (text === "") return { ok: true, si: null };
  if (text === presetText(def, units)) return { ok: true, si: def.preset };
  const read = parseEntry(text, def.quantity, units, def.shownIn);
  const fault = read.ok ? valueFault(def, read.si) : null;
  return fault ? { ok: false, sentence: fault } : read;
}
