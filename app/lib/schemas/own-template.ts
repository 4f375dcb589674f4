/**
 * A template of one's own as a file: JSON with its schema and version. What does not fit is refused with sentences that say where and
 * what to put right; nothing of a bad file is taken.
 */
import { z } from "zod";
import { circle } from "#app/lib/gates/edit-faults";
import { count } from "#app/lib/gates/who";
import { textSchema } from "#app/lib/schemas/act";
import { partSchema, policySchema, requiredBySchema, validitySchema } from "#app/lib/schemas/board-parts";
import { isPlain, NOT_PLAIN } from "#app/lib/schemas/plain-text";
import { OWN_TEMPLATE_SCHEMA, OWN_TEMPLATE_VERSION, type OwnTemplate } from "#app/lib/template/own-template";
import { traitsSchema } from "#app/lib/template/traits";
import { SYSTEMS } from "#app/lib/template/types";
import { VALUES_BY_KEY } from "#app/lib/template/values";

export const templateNameSchema = textSchema("Give the template a name.", 60, 2);

const key = z.string().regex(/^[A-Z]{2,4}\d{0,3}$/, "A key is two to four capital letters, for an item with a number behind them.");
const words = z.string().trim().min(2).max(400);
const caution = words.nullable();

const gate = z.strictObject({
  key,
  name: words.max(60),
  short: words.max(16),
  needs: z.array(key).max(60),
  after: z.array(key).max(60),
  requiredBy: requiredBySchema,
  eachRun: z.boolean(),
  lookBack: z
    .union([z.strictObject({ kind: z.literal("run") }), z.strictObject({ kind: z.literal("rung"), rung: z.string().max(8) })])
    .nullable(),
  validity: validitySchema.nullable(),
  policy: policySchema,
  caution,
});
const item = z.strictObject({
  key,
  gate: key,
  words: words.max(200),
  killer: z.boolean(),
  secondEyes: z.boolean(),
  guarded: z.boolean(),
  onCard: z.boolean(),
  systems: z.array(z.enum(SYSTEMS)),
  parts: z.array(partSchema).min(1).max(12),
  follows: z.array(key).max(60),
  step: z.strictObject({ endedBy: key.nullable() }).nullable(),
  validity: validitySchema.nullable(),
  caution,
  offersLooseEnd: z
    .strictObject({ what: words, system: z.enum(SYSTEMS), dueGate: key.optional(), dueRung: z.string().max(8).optional() })
    .nullable(),
  runs: z.array(z.string().max(8)).nullable(),
  source: z.string().max(400).optional(),
});
const hidden = { hidden: z.boolean() };

const bodySchema = z.strictObject({
  schema: z.literal(OWN_TEMPLATE_SCHEMA),
  version: z.literal(OWN_TEMPLATE_VERSION),
  name: templateNameSchema,
  templateVersion: z.string().regex(/^\d+\.\d+\.\d+$/),
  traits: traitsSchema,
  values: z.record(
    z.string().refine((k) => VALUES_BY_KEY.has(k), "This is no rating or limit that is known here."),
    z.number(),
  ),
  gates: z.array(gate.extend(hidden)).min(1).max(80),
  items: z.array(item.extend(hidden)).min(1).max(600),
  postRun: z.strictObject({ gate, items: z.array(item).min(1).max(80), policyByRung: z.record(z.string().max(8), policySchema) }),
});

export type ReadTemplate = { ok: true; template: OwnTemplate } | { ok: false; sentences: string[] };
const no = (...sentences: string[]): ReadTemplate => ({ ok: false, sentences });
const MOST = 6;

/** @param text of the file. @returns the template, or what is wrong with it, at most a handful of sentences. */
export function readTemplate(text: string): ReadTemplate {
  let sent: unknown;
  try {
    sent = JSON.parse(text);
  } catch {
    return no("This file is no JSON. Choose a file that was saved from a template here.");
  }
  const { schema, version } = (typeof sent === "object" && sent !== null ? sent : {}) as { schema?: unknown; version?: unknown };
  if (schema !== OWN_TEMPLATE_SCHEMA) return no(`This file is no board template: it does not name the schema “${OWN_TEMPLATE_SCHEMA}”.`);
  if (version !== OWN_TEMPLATE_VERSION)
    return no(
      `This file is of version ${JSON.stringify(version)}; here version ${OWN_TEMPLATE_VERSION} is read. Save it anew with a program of the same version.`,
    );
  if (!isPlain(sent)) return no(NOT_PLAIN);
  const read = bodySchema.safeParse(sent);
  if (!read.success) {
    const all = read.error.issues.map(
      (issue) => `${placeOf(sent, issue.path)}: ${/^(Invalid|Unrecognized|Too)/.test(issue.message) ? plainly(issue) : issue.message}`,
    );
    return no(...all.slice(0, MOST), ...(all.length > MOST ? [`And ${count(all.length - MOST, "more fault")}.`] : []));
  }
  const template = read.data as OwnTemplate;
  const faults = crossFaults(template);
  return faults.length ? no(...faults.slice(0, MOST)) : { ok: true, template };
}

/** The schema's own messages are written for programmers. */
function plainly(issue: z.core.$ZodIssue): string {
  if (issue.code === "unrecognized_keys") return `has fields that no template has (${issue.keys.join(", ").slice(0, 80)}). Take them out.`;
  if (issue.code === "too_big" || issue.code === "too_small") return "is longer or shorter, or larger or smaller, than a template takes.";
  return "is missing, or of another kind than a template has there.";
}

/** "Item FP3, words" rather than a path of numbers. */
function placeOf(sent: unknown, path: PropertyKey[]): string {
  const [list, n, ...rest] = path;
  if ((list === "gates" || list === "items") && typeof n === "number") {
    const row = ((sent as Record<string, unknown[]>)[list] ?? [])[n] as { key?: unknown } | undefined;
    const name = `${list === "gates" ? "Gate" : "Item"} ${typeof row?.key === "string" ? row.key.slice(0, 12) : n + 1}`;
    return rest.length ? `${name}, ${rest.join(" ")}` : name;
  }
  return path.length ? path.join(" ") : "The file";
}

function crossFaults({ gates, items }: OwnTemplate): string[] {
  const [gateKeys, itemKeys] = [new Set(gates.map((g) => g.key)), new Set(items.map((i) => i.key))];
  const twice = (keys: string[]) => keys.filter((k, n) => keys.indexOf(k) !== n);
  const path =
    circle(gates.map((g) => ({ id: g.key, name: g.name, before: [...g.needs, ...g.after] }))) ??
    circle(items.map((i) => ({ id: i.key, name: i.key, before: i.follows })));
  const shown = new Map(items.filter((i) => !i.hidden).map((i) => [i.key, i]));
  return [
    ...twice(gates.map((g) => g.key)).map((k) => `Gate ${k} stands twice.`),
    ...twice(items.map((i) => i.key)).map((k) => `Item ${k} stands twice.`),
    ...gates.flatMap((g) =>
      [...g.needs, ...g.after].filter((k) => !gateKeys.has(k)).map((k) => `Gate ${g.key} waits for ${k}, which is not in the file.`),
    ),
    ...items.flatMap((i) => (gateKeys.has(i.gate) ? [] : [`Item ${i.key} belongs to gate ${i.gate}, which is not in the file.`])),
    ...items.flatMap((i) => i.follows.filter((k) => !itemKeys.has(k)).map((k) => `Item ${i.key} follows ${k}, which is not in the file.`)),
    ...[...shown.values()].flatMap((i) =>
      i.parts.flatMap((p) =>
        p.kind === "tally" && p.of !== undefined && !shown.has(p.of)
          ? [`Item ${i.key} counts back in what ${p.of} took out, which is not in the file.`]
          : [],
      ),
    ),
    ...gates.flatMap((g) => (g.policy.length || g.requiredBy.kind === "release" ? [] : [`Gate ${g.key} is signed by nobody.`])),
    ...(gates.some((g) => g.requiredBy.kind === "release" && !g.hidden) ? [] : ["There is no gate for the release."]),
    ...(gates.some((g) => g.eachRun && !g.hidden) ? [] : ["There is no walk-round: a gate that is done before each run."]),
    ...(path ? [`These wait for each other in a circle: ${path.join(", then ")}.`] : []),
  ];
}
