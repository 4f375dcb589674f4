/**
 * From a gate, an item's row or a run to where bad news is written down: the addresses carry what is known already, so that they
 * work without a script, and the pages read it back. Pure.
 */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { allItems, itemOf, itemsIn } from "#app/lib/gates/facts";
import type { Item } from "#app/lib/gates/snapshot";
import { isComputed } from "#app/lib/gates/work-facts";
import { SYSTEMS, type SystemKey } from "#app/lib/template/types";
import { boardOf, gateOf, type Place, runOf } from "#app/lib/views/places";
import { lowerFirst } from "#app/lib/views/run-words";
import { systemsOn } from "#app/lib/views/systems";

export type From = { kind: "gate" | "item" | "run"; id: string } | { kind: "board"; id: null };

export interface RecordLinks {
  opening: Place;
  looseEnd: Place;
  finding: Place;
}

/** What a page that was reached from elsewhere is told by its address. */
export interface CameFrom {
  /** As in the address; "" = from nowhere in particular. */
  value: string;
  systems: SystemKey[];
  /** The way back; null = from nowhere in particular. */
  back: Place | null;
  /** "at item FP3 of Fuel prime": joins a finding's words. */
  where: string | null;
  /** The item that asks for a loose end, and what it asks for. */
  asks: { item: string; what: string; due: string } | null;
}

/** Where an opening, a loose end and a finding are written down, with what is known here chosen already. */
export function recordLinks(e: Evaluation, from: From): RecordLinks {
  const base = boardOf(e.snapshot.install.id);
  const item = from.kind === "item" ? itemOf(e.facts, from.id) : undefined;
  const systems = systemsFrom(e, from);
  const single = systems.filter((s) => s !== "bay" || systems.length === 1);
  const asked = item?.offersLooseEnd ?? null;
  const value = addressed(from);
  const one = from.kind === "item" || single.length === 1 ? single.slice(0, 1) : [];
  return {
    opening: { href: `${base}/openings${query(systems, value)}`, label: "Opened a system" },
    looseEnd: {
      href: `${base}/loose-ends${query(asked ? [asked.system] : one, value, asked ? item?.id : undefined)}#new`,
      label: asked ? `Loose end: ${lowerFirst(asked.what)}` : "Loose end",
    },
    finding: { href: `${base}/findings${query(one, value)}#new`, label: "Finding" },
  };
}

const addressed = (from: From): string => (from.id === null ? from.kind : `${from.kind}:${from.id}`);

function query(systems: SystemKey[], from: string, asks?: string): string {
  const parts = [systems.length ? `systems=${systems.join(",")}` : "", `from=${from}`, asks ? `asks=${asks}` : ""];
  return `?${parts.filter(Boolean).join("&")}`;
}

/** In the template's order, each once. */
function systemsFrom(e: Evaluation, from: From): SystemKey[] {
  const items: Item[] =
    from.kind === "gate" ? itemsIn(e.facts, from.id).filter((i) => !isComputed(i)) : from.kind === "item" ? itemsOf(e, from.id) : [];
  const all = new Set(items.flatMap((i) => i.systems));
  return SYSTEMS.filter((s) => all.has(s));
}
const itemsOf = (e: Evaluation, id: string): Item[] => [itemOf(e.facts, id)].flatMap((i) => i ?? []);

/** @param search of the address. What it names and this install does not have is left out. */
export function cameFrom(e: Evaluation, search: URLSearchParams): CameFrom {
  const known = new Set<string>(systemsOn(e).map((s) => s.value));
  const wanted = (search.get("systems") ?? "").split(",");
  const systems = SYSTEMS.filter((s) => wanted.includes(s) && known.has(s));
  const [kind = "", id = ""] = (search.get("from") ?? "").split(":");
  return { systems, asks: asksOf(e, search.get("asks")), ...placeOf(e, kind, id) };
}

/** The query with which a page that has done its act still knows the way back; empty where there is none. */
export const backTo = (came: CameFrom): string => (came.back ? `?from=${came.value}` : "");

function placeOf(e: Evaluation, kind: string, id: string): Pick<CameFrom, "value" | "back" | "where"> {
  const install = e.snapshot.install.id;
  if (kind === "board") return { value: "board", back: { href: boardOf(install), label: "Board" }, where: null };
  const value = `${kind}:${id}`;
  const gate = e.facts.gates.get(id);
  if (kind === "gate" && gate) return { value, back: { href: gateOf(install, id), label: gate.name }, where: `at gate ${gate.name}` };
  const item = kind === "item" ? itemOf(e.facts, id) : undefined;
  if (item) {
    const place = { href: gateOf(install, item.gate, id), label: `${e.facts.gates.get(item.gate)?.name ?? "Gate"}, ${item.key}` };
    return { value, back: place, where: `at item ${item.key} of ${e.facts.gates.get(item.gate)?.name ?? "a gate"}` };
  }
  const run = kind === "run" ? e.facts.runs.get(id)?.run : undefined;
  if (run) return { value, back: { href: runOf(install, id), label: `Run ${run.label}` }, where: `at run ${run.label}` };
  return { value: "", back: null, where: null };
}

/** What an item's offer fills in; due as the form's own choice, empty where its gate or rung is not on this board. */
function asksOf(e: Evaluation, id: string | null): CameFrom["asks"] {
  const item = allItems(e.facts).find((i) => i.id === id);
  const offer = item?.offersLooseEnd;
  if (!item || !offer) return null;
  const gate = offer.dueGate === undefined ? undefined : [...e.facts.gates.values()].find((g) => g.key === offer.dueGate);
  const rung = e.facts.rungs.find((r) => r.key === offer.dueRung);
  return { item: item.id, what: offer.what, due: gate ? `gate:${gate.id}` : rung ? `rung:${rung.key}` : "" };
}
