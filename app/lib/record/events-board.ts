/** Events of the board itself: how it came to be, its people, its numbers, proofs and signatures. */
import { z } from "zod";
import { cover, event, id, instant, json, role, sha256, words } from "#app/lib/record/event-parts";
import { evidenceListSchema } from "#app/lib/record/evidence-shape";

const signed = { meaning: words, rulesVersion: z.string(), shownHash: sha256 };
const revised = z.array(z.strictObject({ item: id, revision: z.number().int() }));

export const boardEvents = [
  event("install-created", { registration: words, name: words, timeZone: z.string(), traits: json, templateVersion: z.string(), values: json, gates: json, items: json, rungs: json, leftOut: json, rulesVersion: z.string().optional() }),
  event("rules-changed", { from: z.string(), to: z.string(), stands: z.array(z.string()) }),
  event("member-added", { member: id, name: words, role }),
  event("role-ended", { member: id, name: words, role }),
  event("number-entered", { item: id, key: z.string(), part: z.number().int(), entered: json, source: words, revision: z.number().int() }),
  event("value-confirmed", { key: z.string(), value: z.number().nullable(), source: words, revised }),
  event("proof", {
    item: id, key: z.string(), revision: z.number().int(), did: id, counts: instant, late: z.boolean(),
    state: z.enum(["done", "failed", "na"]), evidence: evidenceListSchema, tools: z.array(id), note: words,
  }),
  event("proof-withdrawn", { proof: id, reason: words }),
  event("proof-confirmed", { proof: id }),
  event("not-applicable-accepted", { proof: id, reason: words }),
  event("proof-kept", { proof: id, reason: words }),
  event("signed", { gate: id, key: z.string(), gateRevision: z.number().int(), covers: z.array(cover), ...signed }),
  event("signature-withdrawn", { signature: id, reason: words }),
  event("release-signed", { covers: z.strictObject({ items: z.array(cover), signatures: z.array(id) }), ...signed }),
  event("release-signature-withdrawn", { signature: id, reason: words }),
  event("board-edited", { edit: json, says: z.array(words), reason: words, proposal: id.nullable(), wordsOnly: z.boolean(), now: json }),
  event("edit-proposed", { edit: json, subject: words, says: z.array(words), reason: words }),
  event("edit-answered", { edit: id, answer: z.enum(["accepted", "accepted as words only", "rejected", "taken back"]), reason: words }),
  event("file-stored", { hash: sha256, mime: z.string(), size: z.number().int(), name: words }),
] as const; // biome-ignore format: a list of shapes
