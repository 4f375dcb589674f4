/**
 * What the ids in a record stand for, learned from the record alone, so that its history can be read without the database.
 */
import type { RecordEvent } from "#app/lib/record/events";
import type { Part } from "#app/lib/template/types";

/** What is known of an id. */
export interface Known {
  /** "FP3 Purge the supply line", "Fuel prime", "run 2", a finding's words. */
  words: string;
  /** The line that made it. */
  seq: number;
  /** Gate that it belongs to. */
  gate: string | null;
  /** An item's parts since each of its revisions, oldest first, for its evidence in words. */
  parts: { since: number; parts: Part[] }[];
  /** Quantity and label of a value of the install, under "value:<key>". */
  proofOf: string | null;
}

export interface Names {
  of: ReadonlyMap<string, Known>;
  /** Install as the first line has it; "" in a record that does not begin with its first line. */
  timeZone: string;
  registration: string;
  name: string;
}

type Made = {
  id?: unknown;
  key?: unknown;
  words?: unknown;
  name?: unknown;
  gate?: unknown;
  gateId?: unknown;
  parts?: unknown;
  revision?: unknown;
};

/** What the item asked for at that revision. */
export const partsAt = (known: Known | undefined, revision: number): Part[] =>
  (known?.parts.findLast((p) => p.since <= revision) ?? known?.parts[0])?.parts ?? [];

const text = (x: unknown): string => (typeof x === "string" ? x : "");

/**
 * @param events from the first one on, in order. Linear in their number.
 * @returns names for every id that they made, and for the install.
 */
export function namesIn(events: Iterable<RecordEvent>): Names {
  const of = new Map<string, Known>();
  const names = { of, timeZone: "UTC", registration: "", name: "" };
  const put = (id: string, seq: number, words: string, more: Partial<Known> = {}) =>
    of.set(id, { words, seq, gate: null, parts: [], proofOf: null, ...more });
  const gate = (made: Made, seq: number) => put(text(made.id), of.get(text(made.id))?.seq ?? seq, text(made.name), { gate: text(made.id) });
  const item = (made: Made, seq: number) =>
    put(text(made.id), of.get(text(made.id))?.seq ?? seq, `${text(made.key)} ${text(made.words)}`.trim(), {
      gate: text(made.gateId) || text(made.gate) || null,
      parts: [
        ...(of.get(text(made.id))?.parts ?? []),
        { since: Number(made.revision ?? 1), parts: Array.isArray(made.parts) ? (made.parts as Part[]) : [] },
      ],
    });
  const list = (x: unknown): Made[] => (Array.isArray(x) ? (x as Made[]) : []);

  for (const event of events) {
    const { seq, id } = event;
    switch (event.type) {
      case "install-created":
        names.timeZone = event.data.timeZone;
        names.registration = event.data.registration;
        names.name = event.data.name;
        for (const made of list(event.data.gates)) gate(made, seq);
        for (const made of list(event.data.items)) item(made, seq);
        break;
      case "member-added":
        put(event.data.member, seq, event.data.name);
        break;
      case "proof":
        put(id, seq, of.get(event.data.item)?.words ?? event.data.key, {
          gate: of.get(event.data.item)?.gate ?? null,
          proofOf: event.data.item,
        });
        break;
      case "signed":
        put(id, seq, of.get(event.data.gate)?.words ?? event.data.key, { gate: event.data.gate });
        break;
      case "run-planned":
        if (!of.has(event.data.run)) put(event.data.run, seq, `run ${event.data.label}`);
        break;
      case "run-started": {
        const made = event.data.made as { gate?: Made; items?: Made[] } | null;
        if (event.data.unstarted && !of.has(event.data.run)) put(event.data.run, seq, "a run that nobody started here");
        if (made?.gate) gate(made.gate, seq);
        for (const one of list(made?.items)) item(one, seq);
        break;
      }
      case "board-edited": {
        const now = event.data.now as { gates?: Made[]; items?: Made[] } | null;
        for (const one of list(now?.gates)) gate(one, seq);
        for (const one of list(now?.items)) item(one, seq);
        const [about] = [...list(now?.items), ...list(now?.gates)];
        put(id, seq, event.data.says[0] ?? "", { gate: of.get(text(about?.id))?.gate ?? null });
        break;
      }
      case "edit-proposed":
        put(id, seq, event.data.says[0] ?? event.data.subject);
        break;
      case "opened":
        put(id, seq, event.data.reason);
        break;
      case "loose-end-made":
        put(id, seq, event.data.what);
        break;
      case "finding-raised":
        put(id, seq, event.data.words);
        break;
      case "tool-added":
      case "extinguisher-added":
        put(id, seq, event.data.name);
        break;
      case "exceedance":
        put(id, seq, event.data.sentence);
        break;
      case "release-signed":
        put(id, seq, "the release");
        break;
      default:
        put(id, seq, "");
    }
  }
  return names;
}
