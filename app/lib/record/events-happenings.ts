/** Events of what happens to an install: openings, loose ends, findings, and the crib. */
import { z } from "zod";
import { event, id, instant, severity, system, words } from "#app/lib/record/event-parts";

const cap = z.number().nullable();
const due = z.discriminatedUnion("kind", [
  z.strictObject({ kind: z.literal("gate"), gate: id }),
  z.strictObject({ kind: z.literal("rung"), rung: z.string() }),
]);

export const happeningEvents = [
  event("opened", { systems: z.array(system), reason: words, opened: instant, happened: instant.optional(), looseEnd: id.optional(), undisturbed: z.literal(true).optional() }),
  event("opening-closed", { opening: id, closed: instant, note: words }),
  event("opening-undisturbed", { opening: id }),
  event("opening-mistaken", { opening: id, reason: words }),
  event("loose-end-made", { what: words, count: z.number().int(), system, why: words, askedBy: id.nullable(), due, photos: z.array(id).optional() }),
  event("loose-end-restored", { looseEnd: id }),
  event("loose-end-confirmed", { looseEnd: id }),
  event("loose-end-accepted", { looseEnd: id, rung: z.string(), reason: words }),
  event("finding-raised", { system, words, photo: id.nullable(), morePhotos: z.array(id).optional(), severity, cap }),
  event("finding-severity", { finding: id, severity, cap, words }),
  event("finding-fixed", { finding: id, words }),
  event("finding-not-fixed", { finding: id, words }),
  event("finding-closed", { finding: id, words }),
  event("tool-added", { name: words, serial: words }),
  event("tool-checked", { tool: id, at: instant, good: z.boolean(), due: instant.nullable(), note: words, since: instant.optional(), certificate: words.optional(), photo: id.optional() }),
  event("extinguisher-added", { name: words, agent: z.string(), classB: z.boolean(), charge: z.number(), rating: words.optional(), position: words.optional() }),
  event("extinguisher-checked", { extinguisher: id, kind: z.enum(["look", "service", "withdrawn"]), at: instant, due: instant.nullable(), note: words }),
] as const; // biome-ignore format: a list of shapes
