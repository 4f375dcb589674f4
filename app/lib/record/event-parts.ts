/** Shapes that several events share. Strict: what an event does not know is a bug, not data. */
import { z } from "zod";
import { SYSTEMS } from "#app/lib/template/types";

export const id = z.string().min(1).max(64);
export const instant = z.number().int();
export const words = z.string().max(4000);
export const system = z.enum(SYSTEMS);
export const role = z.enum(["lead", "builder", "inspector", "crew"]);
export const severity = z.enum(["grounding", "limiting", "watch"]);
export const sha256 = z.string().regex(/^[0-9a-f]{64}$/);
export const cover = z.strictObject({ item: id, revision: z.number().int(), proof: id.nullable() });
/** Definitions are stored as they were, whole: the record must be readable without this program. */
export const json = z.json();

/** One kind of event: `type` and its `data`. */
export const event = <T extends string, S extends z.ZodRawShape>(type: T, shape: S) =>
  z.strictObject({ type: z.literal(type), data: z.strictObject(shape) });
