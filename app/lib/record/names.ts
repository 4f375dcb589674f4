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
  /** An item's parts, for its evidence in words. */
  parts: Part[];
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

type Made = { id?: unknown; key?: unknown; words?: unknown; name?: unknown; gate?: unknown; parts?: unknown };

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
  const gate = (made: Made, seq: number) => put(text(made.id), seq, text(made.name), { gate: text(made.id) });
  const item = (made: Made, seq: number) =>
    put(text(made.id), seq, `${text(made.key)} ${text(made.words)}`.trim(), {
      gate: text(made.gate) || null,
      parts: Array.isArray(made.parts) ? (made.parts as Part[]) : [],
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
