// Enters a maker's number or reference of an item, with where it was read. A missing number and a narrower band hold at once;
// the default confirmed as it is changes nothing but its source.
import { eq } from "drizzle-orm";
import { items } from "#app/db/schema/items";
import { itemOf } from "#app/lib/gates/facts";
import { mayEnterNumber } from "#app/lib/gates/set-up-verdicts";
import type { EnterNumber } from "#app/lib/schemas/set-up";
import { done, invalid, notFound, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";
import type { Part } from "#app/lib/template/types";
import type { Band } from "#app/lib/units/quantity";

type Entered = { part: Part; changed: boolean; asksLess: boolean } | string;

export function enterNumber(act: Act, input: EnterNumber): Promise<Outcome<{ item: string; revision: number }>> {
  return perform({ ...act, kind: "enter-number", input }, async (d) => {
    const refusal = refusalOf(mayEnterNumber(d.e, { item: input.item, member: d.member.id }));
    if (refusal) return refusal;
    const item = itemOf(d.e.facts, input.item);
    const part = item?.parts[input.part];
    if (!item || !part) return notFound("That part of the item");
    const entered = enter(part, input);
    if (typeof entered === "string") return invalid(entered);
    const { asksLess } = entered;
    const less = refusalOf(mayEnterNumber(d.e, { item: input.item, member: d.member.id, asksLess }));
    if (less) return less;
    const revision = item.revision + (entered.changed ? 1 : 0);
    const parts = item.parts.map((p, n) => (n === input.part ? entered.part : p));
    const as = asksLess ? roleOf(d.member, "inspector", "lead") : roleOf(d.member, "builder", "lead", "inspector");
    const said = input.text ?? input.band;
    await d.record(as, {
      type: "number-entered",
      data: { item: item.id, key: item.key, part: input.part, entered: said, source: input.source, revision },
    });
    await d.tx.update(items).set({ parts, revision }).where(eq(items.id, item.id));
    return done({ item: item.id, revision });
  });
}

/** The part with the number in it, or a sentence that says why it does not fit. */
function enter(part: Part, { band, text, source }: EnterNumber): Entered {
  if (part.kind === "tick" && part.reference) {
    if (text === null) return "Enter what the maker says.";
    const changed = part.reference.text !== text;
    return {
      part: { ...part, reference: { ...part.reference, text, source } },
      changed,
      asksLess: changed && part.reference.text !== null,
    };
  }
  if (part.kind !== "measure" && part.kind !== "torque") return "This part takes no number.";
  if (band === null) return "Enter the least, the most, or both.";
  const old = part.criterion.band;
  const changed = old?.min !== band.min || old?.max !== band.max;
  return { part: { ...part, criterion: { ...part.criterion, band, source } }, changed, asksLess: old !== null && wider(band, old) };
}

/** Whether `band` lets something pass that `old` does not. */
const wider = (band: Band, old: Band): boolean =>
  (band.min ?? -Infinity) < (old.min ?? -Infinity) || (band.max ?? Infinity) > (old.max ?? Infinity);
