/** The history page: the record's lines in plain words, newest first, filtered by gate, person and kind. Pure. */

import { when } from "#app/lib/gates/when";
import { count } from "#app/lib/gates/who";
import type { Line } from "#app/lib/record/chain";
import type { RecordEvent } from "#app/lib/record/events";
import { namesIn } from "#app/lib/record/names";
import { KINDS, type Kind, type Told, tell } from "#app/lib/record/tell";
import type { UnitSystem } from "#app/lib/units/display";
import { boardOf, gateOf } from "#app/lib/views/places";

export const PAGE_SIZE = 60;

export interface RecordFilter {
  gate: string | null;
  person: string | null;
  kind: Kind | null;
  /** Only lines up to this number: older pages. Null = from the newest. */
  upTo: number | null;
}

export interface RecordRow {
  seq: number;
  anchor: string;
  who: string;
  as: string;
  /** "3 Dec 2026 14:10 CET". */
  when: string;
  kind: Kind;
  did: string;
  details: string[];
  gate: { href: string; label: string } | null;
  /** The earlier line that this one corrects, closes or answers. */
  about: { seq: number; href: string } | null;
  /** Later lines that speak of this one: it reads as it was, and these say what became of it. */
  later: { seq: number; href: string; did: string; who: string }[];
  hash: string;
}

export interface RecordView {
  state: string;
  head: { seq: number; hash: string };
  rows: RecordRow[];
  shown: string;
  /** Address of the next older page; null = this is the last. */
  older: string | null;
  newest: string | null;
  filter: RecordFilter;
  gates: { value: string; label: string }[];
  people: { value: string; label: string }[];
  kinds: { value: Kind; label: string }[];
  exportHref: string;
  checkHref: string;
}

/** What the address asks for; what it cannot mean is left out. */
export function recordFilter(query: URLSearchParams): RecordFilter {
  const kind = KINDS.find((k) => k === query.get("kind")) ?? null;
  const upTo = Number(query.get("upTo"));
  return {
    gate: query.get("gate") || null,
    person: query.get("person") || null,
    kind,
    upTo: Number.isInteger(upTo) && upTo > 0 ? upTo : null,
  };
}

/** @param lines the whole record, oldest first. */
export function recordView(lines: Line<RecordEvent>[], filter: RecordFilter, install: string, units: UnitSystem): RecordView {
  const events = lines.map((l) => l.event);
  const names = namesIn(events);
  const told = events.map((event) => ({ event, told: tell(event, names, units) }));
  const who = (id: string) => names.of.get(id)?.words ?? "a former member";
  const later = new Map<number, RecordRow["later"]>();
  for (const { event, told: t } of told) {
    if (t.about === null) continue;
    const list = later.get(t.about) ?? [];
    list.push({ seq: event.seq, href: "", did: t.did, who: who(event.by) });
    later.set(t.about, list);
  }
  const fits = ({ event, told: t }: { event: RecordEvent; told: Told }) =>
    (!filter.gate || t.gate === filter.gate) && (!filter.person || event.by === filter.person) && (!filter.kind || t.kind === filter.kind);
  const found = told.filter(fits).reverse();
  const from = filter.upTo === null ? found : found.filter(({ event }) => event.seq <= (filter.upTo as number));
  const page = from.slice(0, PAGE_SIZE);
  const next = from[PAGE_SIZE];
  const here = `${boardOf(install)}/record`;
  const address = (upTo: number | null) => `${here}${query({ ...filter, upTo })}`;
  const onPage = new Set(page.map(({ event }) => event.seq));
  const hrefOf = (seq: number) =>
    onPage.has(seq) ? `#${anchorOfLine(seq)}` : `${here}${query({ ...NO_FILTER, upTo: seq })}#${anchorOfLine(seq)}`;

  const rows = page.map(
    ({ event, told: t }): RecordRow => ({
      seq: event.seq,
      anchor: anchorOfLine(event.seq),
      who: who(event.by),
      as: event.as,
      when: when(event.recorded, names.timeZone, true),
      kind: t.kind,
      did: t.did,
      details: t.details,
      gate: t.gate ? { href: gateOf(install, t.gate), label: names.of.get(t.gate)?.words ?? "Gate" } : null,
      about: t.about === null ? null : { seq: t.about, href: hrefOf(t.about) },
      later: (later.get(event.seq) ?? []).map((l) => ({ ...l, href: hrefOf(l.seq) })),
      hash: lines[event.seq - 1]?.hash ?? "",
    }),
  );
  const last = lines.at(-1);
  const filtered = Boolean(filter.gate || filter.person || filter.kind);
  return {
    state: `${count(lines.length, "line")}, nothing is ever taken out`,
    head: { seq: last?.event.seq ?? 0, hash: last?.hash ?? "" },
    rows,
    shown: filtered ? `${count(found.length, "line")} of ${lines.length}` : count(lines.length, "line"),
    older: next ? address(next.event.seq) : null,
    newest: filter.upTo === null ? null : address(null),
    filter,
    gates: [...new Set(told.flatMap(({ told: t }) => (t.gate ? [t.gate] : [])))].map((id) => ({
      value: id,
      label: names.of.get(id)?.words ?? "a gate",
    })),
    people: [...new Set(events.map((e) => e.by))].map((id) => ({ value: id, label: who(id) })),
    kinds: KINDS.filter((kind) => told.some(({ told: t }) => t.kind === kind)).map((kind) => ({ value: kind, label: kind })),
    exportHref: `${here}.jsonl`,
    checkHref: `${here}?check=1`,
  };
}

const NO_FILTER: RecordFilter = { gate: null, person: null, kind: null, upTo: null };

export const anchorOfLine = (seq: number): string => `line-${seq}`;

function query(filter: RecordFilter): string {
  const given = new URLSearchParams();
  for (const [key, value] of Object.entries(filter)) if (value !== null) given.set(key, String(value));
  const text = given.toString();
  return text ? `?${text}` : "";
}
