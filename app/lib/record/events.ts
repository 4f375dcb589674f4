/**
 * Every event that a record can hold, as one discriminated union. An event says who did what, in which role and when;
 * its `id` is the id of what it made, and `seq` its number in the install's chain.
 */
import { z } from "zod";
import { id, instant, role } from "#app/lib/record/event-parts";
import { boardEvents } from "#app/lib/record/events-board";
import { happeningEvents } from "#app/lib/record/events-happenings";
import { runEvents } from "#app/lib/record/events-runs";

export const eventBodySchema = z.discriminatedUnion("type", [...boardEvents, ...happeningEvents, ...runEvents]);

/** What a service says; the rest of the event is filled in where it is written. */
export type EventBody = z.infer<typeof eventBodySchema>;
export type EventType = EventBody["type"];

const envelopeSchema = z.object({ v: z.literal(1), install: id, seq: z.number().int().min(1), recorded: instant, by: id, as: role, id });

export type RecordEvent = z.infer<typeof envelopeSchema> & EventBody;

/** @returns the event of one line of a record. Throws a ZodError that names what does not fit. */
export function parseEvent(input: unknown): RecordEvent {
  const envelope = envelopeSchema.parse(input);
  const { type, data } = input as { type: unknown; data: unknown };
  return { ...envelope, ...eventBodySchema.parse({ type, data }) };
}
