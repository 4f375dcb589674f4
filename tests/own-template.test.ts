import { describe, expect, it } from "vitest";
import { templateOf } from "#app/lib/gates/board-template";
import { readTemplate } from "#app/lib/schemas/own-template";
import { generate } from "#app/lib/template/generate";
import { boardFrom, compareWithBuiltIn, type OwnTemplate } from "#app/lib/template/own-template";
import { emptySnapshot } from "./support/parts";

const TRAITS = emptySnapshot().traits;
const VALUES = { cylinders: 4, ratedRpm: 45 };

/** The built-in board for the plain install, as a template. */
function plain(): OwnTemplate {
  const board = generate(TRAITS, VALUES);
  const s = emptySnapshot();
  s.gates = board.gates.map((g) => ({
    ...g,
    id: `g-${g.key}`,
    revision: 1,
    hidden: false,
    needs: g.needs.map((k) => `g-${k}`),
    after: g.after.map((k) => `g-${k}`),
    lookBack: g.lookBack?.kind === "rung" ? g.lookBack : null,
  }));
  s.items = board.items.map((i) => ({
    ...i,
    id: `i-${i.key}`,
    gate: `g-${i.gate}`,
    revision: 1,
    hidden: false,
    follows: i.follows.map((k) => `i-${k}`),
    step: i.step && { endedBy: i.step.endedBy && `i-${i.step.endedBy}` },
    parts: i.parts.map((p) => (p.kind === "tally" && p.of ? { ...p, of: `i-${p.of}` } : p)),
  }));
  s.values = board.values.map((v) => ({ ...v, value: (VALUES as Record<string, number>)[v.key] ?? v.preset, source: "manual p. 1" }));
  return templateOf(s, "Plain", { postRun: board.postRun, templateVersion: "1.0.0" });
}
const read = (template: unknown) => readTemplate(JSON.stringify(template));
const known = (t: OwnTemplate) => t.values;

describe("a board as a template of one's own", () => {
  it("makes the same board again, and reads what it wrote", () => {
    const own = plain();
    expect(read(own)).toEqual({ ok: true, template: JSON.parse(JSON.stringify(own)) });
    const again = boardFrom(own, known(own));
    const builtIn = generate(TRAITS, known(own));
    expect(again.gates).toEqual(builtIn.gates);
    expect(again.items.map((i) => [i.key, i.words, i.follows, i.parts.length])).toEqual(
      builtIn.items.map((i) => [i.key, i.words, i.follows, i.parts.length]),
    );
    expect(compareWithBuiltIn(own)).toEqual({ dropped: [], own: [], changed: [] });
  });

  it("carries numbers as starting points, and nowhere where they were read", () => {
    const own = plain();
    const torque = own.items.find((i) => i.key === "MF1");
    const part = torque?.parts[0];
    if (part?.kind !== "torque") throw new Error("MF1 is a torque");
    part.criterion = { ...part.criterion, band: { min: 20, max: 24 }, source: "another engine's manual" };
    const made = boardFrom(own, known(own)).items.find((i) => i.key === "MF1")?.parts[0];
    expect(made).toMatchObject({ criterion: { band: { min: 20, max: 24 }, source: null } });
    expect(JSON.stringify(plain())).not.toContain("manual p. 1");
  });

  it("counts anew for other ratings", () => {
    const own = plain();
    const six = { ...known(own), cylinders: 6 };
    const counts = (b: ReturnType<typeof generate>) =>
      b.items.flatMap((i) =>
        i.parts.map((p) => ["places" in p && p.places.length, "expected" in p && p.expected, "count" in p && p.count]),
      );
    expect(counts(boardFrom(own, six))).toEqual(counts(generate(TRAITS, six)));
    expect(counts(boardFrom(own, six))).not.toEqual(counts(boardFrom(own, known(own))));
  });

  it("does not make what is hidden, lists it as left out, and passes edges on", () => {
    const own = plain();
    const gate = own.gates.find((g) => g.key === "EL");
    if (gate) gate.hidden = true;
    const board = boardFrom(own, known(own));
    expect(board.gates.some((g) => g.key === "EL")).toBe(false);
    expect(board.items.some((i) => i.gate === "EL")).toBe(false);
    expect(board.gates.find((g) => g.key === "IG")?.needs).toEqual(gate?.needs);
    expect(board.leftOut.filter((l) => l.because.includes("Plain")).map((l) => l.key)).toEqual(
      own.items.filter((i) => i.gate === "EL").map((i) => i.key),
    );
    expect(compareWithBuiltIn(own).dropped.some((d) => d.killer)).toBe(true);
  });

  it("tells what is its own and what says something else", () => {
    const own = plain();
    const [first] = own.items;
    if (!first) throw new Error("No item");
    own.items.push({ ...first, key: "MF51", words: "Our own look." });
    first.words = "In our words.";
    expect(compareWithBuiltIn(own)).toMatchObject({ own: [{ key: "MF51" }], changed: [{ key: first.key, words: "In our words." }] });
  });
});

describe("a file that is read in", () => {
  const bent = (change: (t: OwnTemplate) => void) => {
    const own = structuredClone(plain());
    change(own);
    return read(own);
  };
  it.each<[string, string, () => unknown]>([
    ["is no JSON", "no JSON", () => readTemplate("{")],
    ["is something else", "does not name the schema", () => read({ hello: 1 })],
    ["is of another version", "of version 2", () => read({ ...plain(), version: 2 })],
    ["has a field too many", "Item MF1", () => bent((t) => Object.assign(t.items[0] as object, { onclick: "x" }))],
    ["turns its letters round", "cannot be seen", () => bent((t) => Object.assign(t.items[0] as object, { words: "a\u202eb" }))],
    ["names a gate twice", "Gate MF stands twice", () => bent((t) => t.gates.push(t.gates[0] as (typeof t.gates)[number]))],
    ["waits for what is not there", "waits for QQ", () => bent((t) => t.gates[1]?.needs.push("QQ"))],
    ["waits in a circle", "in a circle", () => bent((t) => t.gates[0]?.needs.push(t.gates[1]?.key ?? ""))],
    ["asks for no evidence", "Item MF1, parts", () => bent((t) => Object.assign(t.items[0] as object, { parts: [] }))],
    ["has no release", "no gate for the release", () => bent((t) => { t.gates = t.gates.filter((g) => g.requiredBy.kind !== "release"); t.items = t.items.filter((i) => t.gates.some((g) => g.key === i.gate)); })],
    ["contradicts itself in its answers", "traits", () => bent((t) => Object.assign(t.traits, { cycle: "diesel" }))],
  ])("and %s is refused with what is wrong", (_, says, make) => {
    const read = make() as ReturnType<typeof readTemplate>;
    expect(read.ok ? "" : read.sentences.join(" ")).toContain(says);
  });
}); // biome-ignore format: rows of a table
