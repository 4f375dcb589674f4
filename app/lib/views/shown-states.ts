/** The evaluator's states as the drawings know them, and short notes beside a valve. */
import type { NutState, ValveState } from "#app/components/ui/states";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { GateResult, GateState, ItemState } from "#app/lib/gates/result";
import type { Instant } from "#app/lib/gates/snapshot";
import { lapsedAt } from "#app/lib/views/lapsed-at";

const VALVES: Record<GateState, ValveState> = {
  waiting: "waiting",
  "in work": "in-work",
  ready: "ready",
  "half signed": "half-signed",
  signed: "signed",
  lapsed: "lapsed",
};
const NUTS: Record<ItemState, NutState> = {
  "to do": "todo",
  done: "done",
  "not applicable": "na",
  "second eyes": "second-eyes",
  lapsed: "lapsed",
};

export const valveOf = (state: GateState): ValveState => VALVES[state];
export const nutOf = (state: ItemState): NutState => NUTS[state];

const dates = new Map<string, Intl.DateTimeFormat>();

function parts(instant: Instant, timeZone: string): Record<string, string> {
  let format = dates.get(timeZone);
  if (!format) {
    format = new Intl.DateTimeFormat("en-GB", {
      timeZone,
      year: "numeric",
      month: "short",
      day: "numeric",
      hour: "2-digit",
      minute: "2-digit",
      hourCycle: "h23",
    });
    dates.set(timeZone, format);
  }
  return Object.fromEntries(format.formatToParts(instant).map((p) => [p.type, p.value]));
}

/** "08:20" on the day of `now`, else "24 Nov": for the few signs beside a valve, whose full name says the zone. */
export function dayOrTime(instant: Instant, now: Instant, timeZone: string): string {
  const then = parts(instant, timeZone);
  const today = parts(now, timeZone);
  const same = then.day === today.day && then.month === today.month && then.year === today.year;
  return same ? `${then.hour}:${then.minute}` : `${then.day} ${then.month}`;
}

/** Prerequisites that do not stand. */
export const waitsFor = (gates: Record<string, GateResult>, gate: GateResult): string[] =>
  gate.prerequisites.filter((id) => !gates[id]?.stands);

/** Beside the valve, at most 13 signs. */
export function noteOf(e: Evaluation, gate: GateResult): string {
  const { snapshot, at } = e;
  const { gates } = e.result;
  const short = (instant: Instant) => dayOrTime(instant, at, snapshot.install.timeZone);
  switch (gate.state) {
    case "signed": {
      const last = snapshot.signatures.find((s) => s.id === gate.holding.at(-1));
      return last ? `signed ${short(last.recorded)}` : "signed";
    }
    case "waiting":
      return `waits for ${waitsFor(gates, gate).length}`;
    case "in work":
      return gate.done ? `${gate.done} of ${gate.of} done` : "not begun";
    case "ready":
      return "ready to sign";
    case "lapsed": {
      const own = e.facts.gates.get(gate.id);
      const since = own ? lapsedAt(e, own) : null;
      return since === null ? "lapsed" : `lapsed ${short(since)}`;
    }
    default:
      return gate.state;
  }
}
