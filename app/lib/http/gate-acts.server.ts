// The acts of a gate's page: one form, one service each. What cannot be taken goes back with the text as it was typed.

import type { z } from "zod";
import { itemOf } from "#app/lib/gates/facts";
import { instantOfLocal } from "#app/lib/gates/local-time";
import type { InstallContext } from "#app/lib/http/install.server";
import type { Refused } from "#app/lib/http/respond.server";
import { commandIdSchema } from "#app/lib/schemas/act";
import {
  acceptNotApplicableSchema,
  confirmProofSchema,
  keepProofSchema,
  recordProofSchema,
  withdrawProofSchema,
} from "#app/lib/schemas/proof";
import { enterNumberSchema } from "#app/lib/schemas/set-up";
import { withdrawSignatureSchema } from "#app/lib/schemas/signing";
import { acceptNotApplicable } from "#app/lib/services/accept-not-applicable.server";
import { confirmProof } from "#app/lib/services/confirm-proof.server";
import { enterNumber } from "#app/lib/services/enter-number.server";
import { keepProof } from "#app/lib/services/keep-proof.server";
import { invalid, notFound, type Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { withdrawProof } from "#app/lib/services/withdraw-proof.server";
import { withdrawSignature } from "#app/lib/services/withdraw-signature.server";
import { format, parseEntry, type UnitSystem } from "#app/lib/units/display";
import { type EntryError, type ReadEntry, readEntry } from "#app/lib/views/evidence-form";

export interface GateReply {
  item: string | null;
  typed: Record<string, string[]>;
  errors: EntryError[];
  refusal: Refused | null;
  result: { passes: boolean; sentence: string; caution: string; figures: { label: string; value: string; unit: string }[] } | null;
}

export type GateActed = { done: true; item: string | null } | { done: false; status: number; reply: GateReply };

type Acting = { install: InstallContext; form: FormData; act: Act; item: string | null };

const text = (form: FormData, name: string): string => {
  const value = form.get(name);
  return typeof value === "string" ? value.trim() : "";
};

export async function actOnGate(install: InstallContext, form: FormData, photosRefused: EntryError[]): Promise<GateActed> {
  const item = text(form, "item") || null;
  const command = commandIdSchema.safeParse(text(form, "commandId"));
  const acting: Acting = {
    install,
    form,
    item,
    act: { installId: install.installId, actor: { userId: install.me.id }, commandId: command.data ?? "" },
  };
  if (!command.success) return back(acting, 422, [], invalid(command.error.issues[0]?.message ?? ""));
  const intent = text(form, "intent");
  switch (intent) {
    case "prove":
    case "preview":
    case "failed":
    case "na":
      return prove(acting, intent, photosRefused);
    case "number":
      return number(acting);
    case "confirm":
      return simple(acting, confirmProofSchema, { proof: text(form, "proof"), as: text(form, "as") }, confirmProof);
    case "accept":
      return simple(acting, acceptNotApplicableSchema, reasoned(form), acceptNotApplicable);
    case "keep":
      return simple(acting, keepProofSchema, reasoned(form), keepProof);
    case "withdraw":
      return simple(acting, withdrawProofSchema, reasoned(form), withdrawProof);
    case "unsign":
      return simple(
        acting,
        withdrawSignatureSchema,
        { signature: text(form, "signature"), reason: text(form, "reason") },
        withdrawSignature,
      );
    default:
      return back(acting, 422, [], invalid("This page does not know what was asked. Load it again."));
  }
}

const reasoned = (form: FormData) => ({ proof: text(form, "proof"), reason: text(form, "reason") });

async function simple<S extends z.ZodType, T>(
  acting: Acting,
  schema: S,
  input: unknown,
  service: (act: Act, input: z.output<S>) => Promise<Outcome<T>>,
) {
  const parsed = schema.safeParse(input);
  if (!parsed.success)
    return back(
      acting,
      400,
      parsed.error.issues.map((i) => ({ field: i.path.join("."), message: i.message })),
    );
  return finish(acting, await service(acting.act, parsed.data));
}

async function prove(acting: Acting, intent: "prove" | "preview" | "failed" | "na", photosRefused: EntryError[]): Promise<GateActed> {
  const { install, form, item: id } = acting;
  const item = id ? itemOf(install.e.facts, id) : undefined;
  if (!item) return back(acting, 404, [], notFound("That item"));
  const read = readEntry(item, form, { snapshot: install.snapshot, units: install.me.units, now: install.now });
  if (intent === "preview") return preview(acting, read);
  const when = lateOf(acting);
  const errors = [...photosRefused, ...when.errors];
  const note = text(form, "note");
  if (intent === "prove") errors.push(...read.errors, ...read.outOfBand);
  else if (note.length < 3)
    errors.push({ field: "note", message: intent === "na" ? "Say why the item does not apply." : "Say what is not right." });
  if (errors.length) return back(acting, 400, errors);
  const state = intent === "prove" ? "done" : intent;
  // A failing proof keeps what was entered well; what was left out does not stop bad news.
  const evidence = state === "na" ? [] : read.evidence;
  const parsed = recordProofSchema.safeParse({
    item: item.id,
    revision: Number(text(form, "revision")),
    seen: form.has("seen") ? text(form, "seen") || null : undefined,
    as: text(form, "as") || install.me.roles[0],
    state,
    evidence,
    tools: state === "na" ? [] : read.tools,
    note,
    did: text(form, "did") || null,
    at: when.at,
    told: form.get("told") === "yes",
  });
  if (!parsed.success)
    return back(
      acting,
      400,
      parsed.error.issues.map((i) => ({ field: i.path.join("."), message: i.message })),
    );
  return finish(acting, await recordProof(acting.act, parsed.data));
}

function lateOf({ form, install }: Acting): { at: number | null; errors: EntryError[] } {
  const typed = text(form, "at");
  const did = text(form, "did");
  if (!typed)
    return { at: null, errors: did && did !== install.me.id ? [{ field: "at", message: "Somebody else did it: enter when." }] : [] };
  const [date = "", time = ""] = typed.split("T");
  const read = instantOfLocal(date, time, install.snapshot.install.timeZone);
  if (!read.ok) return { at: null, errors: [{ field: "at", message: read.sentence }] };
  const early = read.at > install.now;
  return { at: read.at, errors: early ? [{ field: "at", message: "That time has not come yet. Enter when it was done." }] : [] };
}

function preview(acting: Acting, read: ReadEntry): GateActed {
  const [sheet] = Object.values(read.sheets);
  const errors = [...read.errors.filter((e) => !/\.photo$/.test(e.field)), ...read.outOfBand];
  if (!sheet || errors.length) return back(acting, 400, errors);
  const units = acting.install.me.units;
  const figures = sheet.figures.map((f) => {
    const { value, unit } = format(f.quantity, f.value, units, f.as?.[units]);
    return { label: f.label, value, unit };
  });
  const { passes, sentence, caution } = sheet;
  return { done: false, status: 200, reply: { ...replyOf(acting), result: { passes, sentence, caution, figures } } };
}

async function number(acting: Acting): Promise<GateActed> {
  const { form, install, item: id } = acting;
  const n = Number(text(form, "part"));
  const part = id ? itemOf(install.e.facts, id)?.parts[n] : undefined;
  const errors: EntryError[] = [];
  const field = (name: string) => `n${n}.${name}`;
  const end = (name: "min" | "max", units: UnitSystem): number | null => {
    const typed = text(form, field(name));
    if (!typed || (part?.kind !== "measure" && part?.kind !== "torque")) return null;
    const entry = parseEntry(typed, part.criterion.quantity, units);
    if (!entry.ok) errors.push({ field: field(name), message: entry.sentence });
    return entry.ok ? same(entry.si, part.criterion.band?.[name] ?? null, part.criterion.quantity, units) : null;
  };
  const band = part?.kind === "tick" ? null : { min: end("min", install.me.units), max: end("max", install.me.units) };
  if (band && band.min === null && band.max === null && !errors.length)
    errors.push({ field: field("min"), message: "Enter the least, the most, or both." });
  if (errors.length) return back(acting, 400, errors);
  const parsed = enterNumberSchema.safeParse({
    item: id,
    part: n,
    band,
    text: text(form, field("text")) || null,
    source: text(form, field("source")),
  });
  if (parsed.success) return finish(acting, await enterNumber(acting.act, parsed.data));
  return back(
    acting,
    400,
    parsed.error.issues.map((i) => ({ field: field(i.path[0] === "band" ? "min" : String(i.path[0])), message: i.message })),
  );
}

/** A number that was only read back keeps every digit of the one that is there, instead of the rounded text's. */
function same(typed: number, there: number | null, quantity: Parameters<typeof format>[0], units: UnitSystem): number {
  return there !== null && format(quantity, there, units).value === format(quantity, typed, units).value ? there : typed;
}

function replyOf({ form, item }: Acting): GateReply {
  const typed: Record<string, string[]> = {};
  for (const name of new Set(form.keys())) typed[name] = form.getAll(name).filter((value) => typeof value === "string");
  return { item, typed, errors: [], refusal: null, result: null };
}

function back(acting: Acting, status: number, errors: EntryError[], refusal: Refused | null = null): GateActed {
  const shown = refusal && { code: refusal.code, message: refusal.message, blockers: refusal.blockers };
  return { done: false, status, reply: { ...replyOf(acting), errors, refusal: shown } };
}

const finish = (acting: Acting, outcome: Outcome<unknown>): GateActed =>
  outcome.ok ? { done: true, item: acting.item } : back(acting, outcome.status, [], outcome);
