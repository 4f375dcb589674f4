// What happened at a gate, newest first: the events that tell of its items, their proofs and its signatures. Three queries.
import { and, asc, eq, inArray } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { events } from "#app/db/schema/events";
import { items } from "#app/db/schema/items";
import { users } from "#app/db/schema/users";
import { type EventType, parseEvent, type RecordEvent } from "#app/lib/record/events";

export interface GateHappening {
  event: RecordEvent;
  /** Who recorded it. */
  name: string;
  /** Item that it is about; null on signatures. */
  item: { id: string; key: string; words: string } | null;
}

const TYPES: EventType[] = [
  "number-entered",
  "proof",
  "proof-withdrawn",
  "proof-confirmed",
  "not-applicable-accepted",
  "proof-kept",
  "signed",
  "signature-withdrawn",
];

export async function gateHistory(reader: Reader, installId: string, gateId: string, most = 200): Promise<GateHappening[]> {
  const itemRows = await reader
    .select({ id: items.id, key: items.key, words: items.words })
    .from(items)
    .where(and(eq(items.gateId, gateId), eq(items.installId, installId)));
  const rows = await reader
    .select({ body: events.body, name: users.name })
    .from(events)
    .innerJoin(users, eq(users.id, events.by))
    .where(and(eq(events.installId, installId), inArray(events.type, TYPES)))
    .orderBy(asc(events.seq));
  const itemOf = new Map(itemRows.map((i) => [i.id, i]));
  // Proofs and signatures of this gate seen so far: what comes later points back at them by id.
  const made = new Map<string, GateHappening["item"]>();
  const happenings: GateHappening[] = [];
  for (const { body, name } of rows) {
    const event = parseEvent(JSON.parse(body));
    const item = itemIn(event, gateId, itemOf, made);
    if (item === undefined) continue;
    made.set(event.id, item);
    happenings.push({ event, name, item });
  }
  return happenings.reverse().slice(0, most);
}

/** The item that the event is about, null for one about the gate, undefined for one about another gate. */
function itemIn(
  event: RecordEvent,
  gateId: string,
  itemOf: Map<string, NonNullable<GateHappening["item"]>>,
  made: Map<string, GateHappening["item"]>,
) {
  if (event.type === "signed") return event.data.gate === gateId ? null : undefined;
  if (event.type === "signature-withdrawn") return made.get(event.data.signature);
  if (event.type === "proof" || event.type === "number-entered") return itemOf.get(event.data.item);
  return "proof" in event.data ? made.get(event.data.proof) : undefined;
}
