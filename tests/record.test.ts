import { createHash } from "node:crypto";
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { canonical } from "#app/lib/record/canonical";
import { FIRST, type Line, link, verify } from "#app/lib/record/chain";
import { type EventBody, parseEvent, type RecordEvent } from "#app/lib/record/events";

const at = Date.UTC(2026, 11, 3, 9, 0);

function chain(bodies: EventBody[]): Line<RecordEvent>[] {
  const lines: Line<RecordEvent>[] = [];
  for (const [n, body] of bodies.entries()) {
    const prev = lines.at(-1)?.hash ?? FIRST;
    const event = parseEvent({ v: 1, install: "N0200W", seq: n + 1, recorded: at + n, by: "bea", as: "builder", id: `e${n + 1}`, ...body });
    lines.push({ event, prev, hash: link(prev, event) });
  }
  return lines;
}

const opened = (reason: string): EventBody => ({ type: "opened", data: { systems: ["fuelsup"], reason, opened: at } });
const six = () => chain(["strainer out", "hose off", "tank drained", "vent moved", "valve out", "line off"].map(opened));
const copy = (lines: Line<RecordEvent>[]): Line<RecordEvent>[] => JSON.parse(JSON.stringify(lines));
const third = (lines: Line<RecordEvent>[]) => {
  const line = lines[2];
  if (!line) throw new Error("The chain is too short");
  return line;
};

describe("the canonical form", () => {
  it("is the one of RFC 8785 section 3.2.2 to 3.2.3, its own example", () => {
    const example = JSON.parse(
      '{"numbers":[333333333.33333329,1E30,4.50,2e-3,0.000000000000000000000000001],"string":"\\u20ac$\\u000F\\u000aA\'\\u0042\\u0022\\u005c\\\\\\"\\/","literals":[null,true,false]}',
    );
    expect(canonical(example)).toBe(
      '{"literals":[null,true,false],"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  it("does not depend on the order of keys", () => {
    fc.assert(
      fc.property(fc.dictionary(fc.string(), fc.jsonValue()), (data) => {
        const turned = Object.fromEntries(Object.entries(data).reverse());
        expect(canonical(turned)).toBe(canonical(data));
      }),
    );
  });

  it.each([Number.NaN, Number.POSITIVE_INFINITY, undefined])("refuses %s, which JSON cannot say", (x) => {
    expect(() => canonical(x)).toThrow();
  });
});

describe("the chain", () => {
  it("verifies as it was written, and its hash is plain SHA-256 of event and prev", () => {
    const lines = six();
    const [first] = lines;
    if (!first) throw new Error("No line");
    const byHand = createHash("sha256")
      .update(canonical({ prev: "0".repeat(64), event: first.event }))
      .digest("hex");
    expect(first.hash).toBe(byHand);
    expect(verify(lines)).toEqual({ ok: true, lines: 6, head: lines.at(-1)?.hash });
    expect(verify([])).toEqual({ ok: true, lines: 0, head: FIRST });
  });

  it.each<[string, (lines: Line<RecordEvent>[]) => unknown, number, RegExp]>([
    ["a reason reworded", (l) => Object.assign(third(l).event.data, { reason: "nothing" }), 3, /changed after/],
    ["another person named", (l) => Object.assign(third(l).event, { by: "tom" }), 3, /changed after/],
    ["a role raised", (l) => Object.assign(third(l).event, { as: "inspector" }), 3, /changed after/],
    ["an instant moved", (l) => Object.assign(third(l).event, { recorded: at - 1 }), 3, /changed after/],
    ["a field added", (l) => Object.assign(third(l).event, { note: "x" }), 3, /changed after/],
    ["a line taken out", (l) => l.splice(2, 1), 3, /number 4/],
    ["the first line taken out", (l) => l.splice(0, 1), 1, /number 2/],
    ["two lines swapped", (l) => l.splice(2, 2, ...l.slice(2, 4).reverse()), 3, /number 4/],
    ["a line doubled", (l) => l.splice(2, 0, third(l)), 4, /number 3/],
    ["a hash changed", (l) => Object.assign(third(l), { hash: "0".repeat(64) }), 3, /changed after/],
    ["a link changed", (l) => Object.assign(third(l), { prev: FIRST }), 3, /does not follow/],
    ["a line changed and its hash made anew", (l) => rehash(l, (line) => Object.assign(line.event, { by: "tom" })), 4, /does not follow/],
    ["a line of another install", (l) => rehash(l, (line) => Object.assign(line.event, { install: "N0201X" })), 3, /another install/],
    ["a line dated back", (l) => rehash(l, (line) => Object.assign(line.event, { recorded: at })), 3, /dated before/],
  ])("shows %s", (_, tamper, line, why) => {
    const lines = copy(six());
    tamper(lines);
    const verdict = verify(lines);
    expect(verdict).toMatchObject({ ok: false, line });
    expect(verdict.ok ? "" : verdict.why).toMatch(why);
  });

  it("shows any change to any byte of any event", () => {
    const lines = six();
    fc.assert(
      fc.property(fc.nat(5), fc.nat(400), fc.integer({ min: 1, max: 94 }), (n, where, by) => {
        const changed = copy(lines);
        const line = changed[n];
        if (!line) throw new Error("No line");
        const text = canonical(line.event);
        const i = where % text.length;
        const other = text.slice(0, i) + String.fromCharCode(32 + ((text.charCodeAt(i) - 32 + by) % 95)) + text.slice(i + 1);
        let event: RecordEvent;
        try {
          event = JSON.parse(other) as RecordEvent;
        } catch {
          return; // No longer JSON: it cannot even be read.
        }
        line.event = event;
        expect(verify(changed).ok).toBe(false);
      }),
    );
  });

  it("cannot show that its end was cut off: its head has to be known from elsewhere", () => {
    const lines = six();
    const cut = verify(lines.slice(0, 4));
    expect(cut.ok).toBe(true);
    expect(cut).not.toEqual(verify(lines));
  });
});

/** Changes the third line and gives it a hash that fits. */
function rehash(lines: Line<RecordEvent>[], change: (line: Line<RecordEvent>) => unknown): void {
  const line = third(lines);
  change(line);
  line.hash = link(line.prev, line.event);
}

describe("events", () => {
  const envelope = { v: 1, install: "i", seq: 1, recorded: at, by: "bea", as: "builder", id: "e" };

  it.each<[string, unknown]>([
    ["an unknown type", { ...envelope, type: "erased", data: {} }],
    ["a field that the type does not know", { ...envelope, type: "proof-confirmed", data: { proof: "p", extra: 1 } }],
    ["a missing field", { ...envelope, type: "proof-kept", data: { proof: "p" } }],
    ["a role that is none", { ...envelope, as: "admin", type: "proof-confirmed", data: { proof: "p" } }],
    ["number 0", { ...envelope, seq: 0, type: "proof-confirmed", data: { proof: "p" } }],
  ])("refuse %s", (_, event) => {
    expect(() => parseEvent(event)).toThrow();
  });

  it("are read back as they were written", () => {
    const [line] = six();
    expect(parseEvent(JSON.parse(canonical(line?.event)))).toEqual(line?.event);
  });
});
