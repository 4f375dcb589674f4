/**
 * The board editor's forms as a page sends them: text in the person's own units in, what a gate or an item would say out, or what is
 * wrong beside each field. Pure.
 */
import { z } from "zod";
import type { GateFields, ItemFields } from "#app/lib/gates/edits";
import type { Gate, Item } from "#app/lib/gates/snapshot";
import { commandIdSchema, idSchema, reasonSchema } from "#app/lib/schemas/act";
import { gateFieldsSchema, itemFieldsSchema } from "#app/lib/schemas/edit";
import { readNewPart, readPart } from "#app/lib/schemas/part-forms";
import { type SignPolicy, SYSTEMS, type Validity } from "#app/lib/template/types";
import type { UnitSystem } from "#app/lib/units/display";

export type Errors = Record<string, string[]>;
export type Read<T> = { ok: true; value: T } | { ok: false; errors: Errors };
export type Sent = (name: string) => string;

export const sentBy =
  (form: FormData): Sent =>
  (name) => {
    const value = form.get(name);
    return typeof value === "string" ? value.trim() : "";
  };

export const answerForm = z.object({ commandId: commandIdSchema, edit: idSchema, reason: reasonSchema });

function hours(sent: Sent, name: string, errors: Errors): number | null {
  const text = sent(name).replace(",", ".");
  if (text === "") return null;
  const value = Number(text);
  if (Number.isFinite(value) && value >= 0.1 && value <= 9000) return value;
  errors[name] = ["Enter hours between 0.1 and 9,000, or leave it empty."];
  return null;
}

function validity(sent: Sent, errors: Errors): Validity | null {
  const [first, second] = [hours(sent, "hours", errors), hours(sent, "afterRun", errors)];
  return first === null && second === null ? null : { hours: first, afterRunHours: second };
}

/** Errors of a schema under the fields of the form. @param prefixes of the parts' fields, in the order of the parts. */
function fieldErrors(issues: z.core.$ZodIssue[], prefixes: string[] = []): Errors {
  const errors: Errors = {};
  for (const { path, message } of issues) {
    const part = path[0] === "parts" && typeof path[1] === "number" ? prefixes[path[1]] : undefined;
    const name = part === undefined ? String(path[0] ?? "") : `${part}.${path.includes("band") ? "min" : "label"}`;
    errors[name] = [...(errors[name] ?? []), message];
  }
  return errors;
}

/** @param item as it is now; null for a new one. @param peers ids of the items that the form offers to follow. */
export function readItemForm(sent: Sent, item: Item | null, peers: string[], units: UnitSystem): Read<ItemFields> {
  const errors: Errors = {};
  const kept = (item?.follows ?? []).filter((id) => !peers.includes(id));
  const parts = (item?.parts ?? []).flatMap((part, n) => {
    const read = readPart(sent, part, n, units, errors);
    return read ? [{ read, prefix: `p${n}` }] : [];
  });
  const added = readNewPart(sent, units, errors);
  if (added) parts.push({ read: added, prefix: "new" });
  const draft = {
    words: sent("words"),
    killer: sent("killer") !== "",
    secondEyes: sent("secondEyes") !== "",
    guarded: sent("guarded") !== "",
    systems: SYSTEMS.filter((key) => sent(`sys.${key}`) !== ""),
    parts: parts.map((p) => p.read),
    follows: [...kept, ...peers.filter((id) => sent(`follow.${id}`) !== "")],
    validity: validity(sent, errors),
    caution: sent("caution") || null,
  };
  const read = itemFieldsSchema.safeParse(draft);
  const prefixes = parts.map((p) => p.prefix);
  const all = { ...(read.success ? {} : fieldErrors(read.error.issues, prefixes)), ...errors };
  return Object.keys(all).length || !read.success ? { ok: false, errors: all } : { ok: true, value: read.data };
}

/** "builder", then "lead+inspector": one place of a policy as it stands in its field. */
export const placeCode = (roles: SignPolicy[number]): string => roles.join("+");
export const SIGN_PLACES = ["builder", "inspector", "lead", "lead+inspector", "builder+lead", "builder+inspector"];
const PLACES = ["sign1", "sign2", "sign3"];

function readPolicy(sent: Sent): SignPolicy {
  return PLACES.map(sent).flatMap((code) => (SIGN_PLACES.includes(code) ? [code.split("+") as SignPolicy[number]] : []));
}

/** @param gate as it is now; null for a new one. @param others ids of the gates that the form offers an edge to. */
export function readGateForm(sent: Sent, gate: Gate | null, others: string[]): Read<GateFields> {
  const errors: Errors = {};
  const edges = (kind: "needs" | "after", with_: string[]) => [
    ...(gate?.[kind] ?? []).filter((id) => !others.includes(id)),
    ...others.filter((id) => with_.includes(sent(`edge.${id}`))),
  ];
  const by = sent("requiredBy");
  const draft = {
    name: sent("name"),
    short: sent("short"),
    needs: edges("needs", ["needs", "after"]),
    after: edges("after", ["after"]),
    requiredBy: by.startsWith("rung:") ? { kind: "rung-and-release", rung: by.slice(5) } : { kind: by },
    validity: validity(sent, errors),
    policy: gate && gate.policy.length === 0 ? [] : readPolicy(sent),
    caution: sent("caution") || null,
  };
  const read = gateFieldsSchema.safeParse(draft);
  const all = { ...(read.success ? {} : fieldErrors(read.error.issues)), ...errors };
  return Object.keys(all).length || !read.success ? { ok: false, errors: all } : { ok: true, value: read.data };
}
