import fc from "fast-check";
import { DirectedGraph } from "graphology";
import { hasCycle } from "graphology-dag";
import { describe, expect, it } from "vitest";
import { applies, parseCondition, whyNot } from "#app/lib/template/condition";
import { generate } from "#app/lib/template/generate";
import { crewRule } from "#app/lib/template/positions";
import { leakCheckRung } from "#app/lib/template/runs";
import { NOT_OPENINGS, OPENING_PRESETS, SYSTEM_NAMES } from "#app/lib/template/systems";
import { TEMPLATE } from "#app/lib/template/template";
import { traitWords } from "#app/lib/template/trait-words";
import { PAGE_ONE, PAGE_TWO, presetPageTwo, settleCycle, traitsSchema } from "#app/lib/template/traits";
import { type GeneratedBoard, SYSTEMS, type Traits } from "#app/lib/template/types";
import { assertTemplate, validateTemplate } from "#app/lib/template/validate";
import { valueDefs } from "#app/lib/template/values";
import { toSI } from "#app/lib/units/convert";
import { SAMPLES, validTraits } from "./support/sample-traits";

const FIRST_START_GATES = ["MF", "EC", "EL", "IG", "IN", "IX", "FS", "OC", "PR", "FP", "OP", "DY", "TD", "FI", "CR", "WR"];
const itemOf = (board: GeneratedBoard, key: string) => [...board.items, ...board.postRun.items].find((item) => item.key === key);
const keysOf = (board: GeneratedBoard) => board.items.map(({ key }) => key);
const gateOn = (board: GeneratedBoard, key: string) => board.gates.find((gate) => gate.key === key);
const criterionOf = (board: GeneratedBoard, key: string) => {
  const part = itemOf(board, key)?.parts.find((one) => one.kind === "measure");
  return part?.kind === "measure" ? part.criterion : undefined;
};

describe("conditions", () => {
  const words = traitWords(SAMPLES.gearedElectronicInjection);

  it.each<[string, boolean]>([
    ["ecu2", true],
    ["!gravity", true],
    ["carb|altair", false],
    ["powered&!diesel", true],
    ["carb|efi&!ecu", false],
    ["!carb&efi|mag", true],
  ])("%s is %s", (text, expected) => {
    expect(applies(text, words)).toBe(expected);
  });

  it("binds ! before & before |", () => {
    expect(parseCondition("!carb&efi|mag")).toEqual({
      op: "or",
      of: [
        {
          op: "and",
          of: [
            { op: "not", of: { op: "word", word: "carb" } },
            { op: "word", word: "efi" },
          ],
        },
        { op: "word", word: "mag" },
      ],
    });
  });

  it("refuses unknown and empty words", () => {
    expect(() => parseCondition("carb|steam")).toThrow('"steam" is not a word');
    expect(() => parseCondition("")).toThrow("is not a word");
    expect(() => parseCondition("constructor")).toThrow("is not a word");
  });

  it("says why it does not hold", () => {
    expect(whyNot("carb|altair", words)).toBe("no carburettor and no alternate air");
    expect(whyNot("epump", traitWords(SAMPLES.handStartedTaildragger))).toBe("no electric pump");
    expect(whyNot("!efi", words)).toBe("the injection is electronic");
    expect(whyNot("powered&mag", words)).toBe("no magneto");
    expect(whyNot("efi", words)).toBe("");
  });
});

describe("traits", () => {
  it.each(Object.entries(SAMPLES))("%s is valid", (_, traits) => {
    expect(traitsSchema.safeParse(traits).error?.issues ?? []).toEqual([]);
  });

  const { boostedConstantSpeed: four, premixTwoStroke: two, diesel, handStartedTaildragger: hand } = SAMPLES;
  it.each<[string, Traits, keyof Traits]>([
    ["diesel with magnetos", { ...diesel, ignition: "mag" }, "ignition"],
    ["no ignition, no diesel", { ...four, ignition: "none" }, "cycle"],
    ["two-stroke with a sump", { ...two, lubrication: "wet" }, "lubrication"],
    ["no sump, no two-stroke", { ...four, lubrication: "nosump" }, "cycle"],
    ["two-stroke without oil", { ...two, twoStrokeOil: null }, "twoStrokeOil"],
    ["premix in a four-stroke", { ...four, twoStrokeOil: "premix" }, "twoStrokeOil"],
    ["electronic injection without computer", { ...four, metering: "efi" }, "computers"],
    ["diesel with a carburettor", { ...diesel, metering: "carb" }, "metering"],
    ["injection fed by gravity", { ...four, metering: "mechinj", delivery: "gravity" }, "delivery"],
    ["return line fed by gravity", { ...hand, return: true }, "return"],
    ["second pump without a first", { ...hand, pump2: true }, "pump2"],
    ["starter without battery", { ...four, elsys: false }, "elsys"],
    ["lithium without battery", { ...hand, lithium: true }, "lithium"],
  ])("%s is refused at the answer to change", (_, traits, path) => {
    const issues = traitsSchema.safeParse(traits).error?.issues ?? [];
    expect(issues.map((issue) => issue.path[0])).toContain(path);
  });

  it("asks every trait once, and offers every answer once", () => {
    const asked = [...PAGE_ONE, ...PAGE_TWO].map(({ key }) => key);
    expect(asked.sort()).toEqual(Object.keys(SAMPLES.diesel).sort());
    for (const question of [...PAGE_ONE, ...PAGE_TWO]) {
      const values = question.options.map(({ value }) => value);
      expect(new Set(values).size).toBe(values.length);
      expect(question.label.endsWith("?")).toBe(true);
    }
  });

  it("presets page two so that a sensible page one is valid at once", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        fc.pre(traits.cycle !== "rotary");
        const preset = presetPageTwo(traits);
        expect(traitsSchema.safeParse(preset).success).toBe(true);
      }),
    );
  });

  it("lets the cycle settle ignition and sump", () => {
    expect(settleCycle({ ...four, cycle: "diesel" }).ignition).toBe("none");
    expect(settleCycle({ ...four, cycle: "2s" })).toMatchObject({ lubrication: "nosump", twoStrokeOil: "premix" });
    expect(settleCycle({ ...two, cycle: "4s" }).twoStrokeOil).toBeNull();
  });
});

describe("the template itself", () => {
  it("has no fault", () => {
    expect(validateTemplate()).toEqual([]);
    expect(() => assertTemplate()).not.toThrow();
  });

  const [first, second] = TEMPLATE.items;
  if (!first || !second) throw new Error("the template is empty");
  const broken = (change: Partial<typeof TEMPLATE>) => validateTemplate({ ...TEMPLATE, ...change }).join("\n");
  const withItem = (key: string, change: Partial<typeof first>) =>
    broken({ items: TEMPLATE.items.map((item) => (item.key === key ? { ...item, ...change } : item)) });
  const withGate = (key: string, change: Partial<(typeof TEMPLATE.gates)[number]>) =>
    broken({ gates: TEMPLATE.gates.map((gate) => (gate.key === key ? { ...gate, ...change } : gate)) });

  it.each<[string, string, RegExp]>([
    ["an item twice", broken({ items: [...TEMPLATE.items, first] }), /Item MF1 stands twice/],
    ["a lost item", withItem("FP2", { follows: ["FP99"] }), /follows FP99/],
    ["a circle of items", withItem("OP4", { follows: ["OP10"] }), /circle: .*OP4/],
    ["long words", withItem("MF1", { words: `${"x".repeat(120)}.` }), /longer than 120/],
    ["no evidence", withItem("MF1", { parts: [] }), /asks for no evidence/],
    ["a bad condition", withItem("MF1", { when: "steam" }), /"steam" is not a word/],
    ["an ending too early", withItem("FP7", { follows: ["FP1"] }), /FP7 ends step FP1 but does not follow FP2/],
    ["an ending elsewhere", withItem("FP1", { step: { endedBy: "OP10" } }), /not in its gate/],
    ["an ending that may be missing", withItem("FP7", { when: "carb" }), /without FP7/],
    [
      "a tally of nothing",
      withItem("OP10", { parts: [{ kind: "tally", mode: "in", of: "MF1", words: { out: "a", in: "b" } }] }),
      /counts back/,
    ],
    ["an item without gate", withItem("MF1", { key: "ZZ1" }), /ZZ1 belongs to no gate/],
    ["a gate to nowhere", withGate("FP", { needs: [{ gate: "ZZ" }] }), /points to ZZ/],
    ["a circle of gates", withGate("MF", { needs: [{ gate: "WR" }] }), /circle: .*MF/],
    ["a long short name", withGate("MF", { short: "Mount and firewall" }), /longer than 16/],
    ["after without needs", withGate("FP", { needs: [] }), /does not need it/],
  ])("%s is found", (_, faults, sentence) => {
    expect(faults).toMatch(sentence);
  });
});

describe("generation", () => {
  it.each(Object.entries(SAMPLES))("%s asks 60 to 95 things before the first start", (_, traits) => {
    const before = generate(traits).items.filter(({ gate }) => FIRST_START_GATES.includes(gate));
    expect(before.length).toBeGreaterThanOrEqual(60);
    expect(before.length).toBeLessThanOrEqual(95);
  });

  it("holds its promises for any valid install", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        expect(traitsSchema.safeParse(traits).success).toBe(true);
        const board = generate(traits);
        expect(generate(traits)).toEqual(board);

        const gates = new Set(board.gates.map(({ key }) => key));
        const items = new Map([...board.items, ...board.postRun.items].map((item) => [item.key, item]));
        const gateGraph = new DirectedGraph();
        for (const key of gates) gateGraph.addNode(key);
        for (const gate of board.gates) {
          expect(board.items.some((item) => item.gate === gate.key)).toBe(true);
          for (const need of gate.needs) gateGraph.addEdge(need, gate.key);
          for (const earlier of gate.after) expect(gate.needs).toContain(earlier);
        }
        expect(hasCycle(gateGraph)).toBe(false);

        const itemGraph = new DirectedGraph();
        for (const key of items.keys()) itemGraph.addNode(key);
        for (const item of items.values()) {
          expect(item.parts.length).toBeGreaterThan(0);
          expect(item.words.length).toBeLessThanOrEqual(120);
          for (const earlier of item.follows) itemGraph.addEdge(earlier, item.key);
          if (item.step?.endedBy) expect(items.get(item.step.endedBy)?.gate).toBe(item.gate);
          for (const part of item.parts) {
            if (part.kind === "measure" || part.kind === "reading") expect(part.places.length).toBeGreaterThan(0);
            if (part.kind === "measure" || part.kind === "torque")
              expect(part.criterion.band === null).toBe(part.criterion.basis.kind === "maker");
          }
        }
        expect(hasCycle(itemGraph)).toBe(false);

        const known = [...TEMPLATE.items, ...TEMPLATE.postRunItems];
        expect([...items.keys(), ...board.leftOut.map(({ key }) => key)].sort()).toEqual(known.map(({ key }) => key).sort());
        for (const row of known) if (row.killer && items.has(row.key)) expect(items.get(row.key)?.killer).toBe(true);
        for (const { because } of board.leftOut) expect(because).not.toBe("");
      }),
      { numRuns: 100 },
    );
  });

  it("passes the edges of a vanished gate to what it needs", () => {
    const board = generate(SAMPLES.premixTwoStroke);
    expect(gateOn(board, "OP")).toBeUndefined();
    expect(gateOn(board, "DY")?.needs).toEqual(["FP", "OC", "PR", "IG", "EL"]);
    expect(board.leftOut.find(({ key }) => key === "OP4")?.because).toBe("a two-stroke has no oil system of its own");
  });

  it("drops a gate whose items all fell away", () => {
    const traits: Traits = { ...SAMPLES.premixTwoStroke, drive: "direct" };
    const board = generate(traits);
    expect(gateOn(board, "OC")).toBeUndefined();
    expect(gateOn(board, "DY")?.needs).toEqual(["FP", "MF", "PR", "IG", "EL"]);
    expect(itemOf(board, "DY4")).toBeUndefined();
  });

  it("needs the electrics for the fuel prime only where a pump is driven", () => {
    expect(gateOn(generate(SAMPLES.handStartedTaildragger), "FP")?.needs).toEqual(["FS"]);
    expect(gateOn(generate(SAMPLES.boostedConstantSpeed), "FP")).toMatchObject({ needs: ["FS", "EL"], after: ["FS"] });
  });

  it("gives gates their validity, signatures and requirement", () => {
    const board = generate(SAMPLES.boostedConstantSpeed);
    const table = board.gates.map(({ key, validity, policy, requiredBy }) => [
      key,
      validity?.hours ?? null,
      policy.length && policy[1]?.[0],
      requiredBy.kind,
    ]);
    expect(table).toEqual([
      ...["MF", "EC", "EL", "IG", "IN", "IX", "FS", "OC", "PR"].map((key) => [key, null, "inspector", "runs-and-release"]),
      ["FP", 336, "inspector", "runs-and-release"],
      ["OP", 72, "inspector", "runs-and-release"],
      ...["DY", "TD", "FI", "CR"].map((key) => [key, 12, "lead", "runs"]),
      ["WR", 4, "lead", "runs"],
      ["SV", null, "inspector", "rung-and-release"],
      ["RL", null, 0, "release"],
    ]);
    expect(gateOn(board, "FP")?.validity?.afterRunHours).toBe(720);
    expect(gateOn(board, "WR")).toMatchObject({ eachRun: true, needs: FIRST_START_GATES.slice(0, -1) });
    expect(gateOn(board, "SV")?.lookBack).toEqual({ kind: "rung", rung: "5" });
    expect(board.postRun.gate.lookBack).toEqual({ kind: "run" });
    expect(board.postRun.policyByRung).toMatchObject({
      "1": [["builder"], ["inspector"]],
      "3": [["builder"], ["lead", "inspector"]],
      L: [["builder"], ["inspector"]],
    });
  });

  it("marks steps, guarded items, loose ends and card items", () => {
    const board = generate(SAMPLES.rotaryTurbo);
    expect(board.items.filter(({ step }) => step).map(({ key, step }) => [key, step?.endedBy])).toEqual([
      ["PR3", null],
      ["FP1", "FP7"],
      ["OP1", "OP10"],
      ["OP2", "OP11"],
      ["OP3", "OP10"],
    ]);
    expect(board.items.filter(({ guarded }) => guarded).map(({ key }) => key)).toEqual([
      "FP2",
      "FP3",
      "FP4",
      "FP7",
      "OP4",
      "OP7",
      "OP8",
      "OP9",
    ]);
    expect(itemOf(board, "OP2")?.offersLooseEnd?.dueGate).toBe("OP");
    expect(itemOf(board, "PR3")?.offersLooseEnd?.dueRung).toBe("4");
    expect(itemOf(board, "FP7")?.follows).toEqual(["FP1", "FP2", "FP3", "FP4"]);
    expect(board.items.filter(({ onCard }) => onCard).map(({ key }) => key)).toEqual([
      "TD1",
      "TD2",
      "TD3",
      "FI1",
      "FI2",
      "CR1",
      "CR2",
      "WR1",
      "WR2",
      "WR3",
    ]);
    const computed = [...board.items, ...board.postRun.items].flatMap(({ key, parts }) =>
      parts.flatMap((part) => (part.kind === "computed" ? [[key, part.rule]] : [])),
    );
    expect(computed).toEqual([
      ["FI1", "extinguishers"],
      ["WR4", "loose-ends"],
      ["RL1", "release-record"],
      ["RL2", "release-openings"],
      ["PO5", "log"],
    ]);
  });

  it("chooses words, places and parts by trait", () => {
    const hand = generate(SAMPLES.handStartedTaildragger);
    expect(itemOf(hand, "OP4")?.parts).toEqual([{ kind: "tick" }]);
    expect(itemOf(hand, "FP2")?.words).toMatch(/gravity/);
    const rotary = generate(SAMPLES.rotaryTurbo, { cylinders: 3 });
    expect(itemOf(rotary, "SV2")?.parts).toMatchObject([{ kind: "measure", places: ["rotor 1", "rotor 2", "rotor 3"] }]);
    expect(itemOf(rotary, "OP1")?.parts).toMatchObject([{ kind: "tally", mode: "out", expected: 3 }]);
    const injected = generate(SAMPLES.gearedElectronicInjection);
    expect(itemOf(injected, "FP3")?.parts).toMatchObject([{ places: ["pump 1", "pump 2"] }]);
    expect(itemOf(generate(SAMPLES.premixTwoStroke), "IG1")?.parts).toMatchObject([{ places: ["source 1", "source 2"] }]);
    expect(itemOf(generate(SAMPLES.premixTwoStroke, { cylinders: 3, plugs: 1 }), "IG8")?.parts).toMatchObject([
      { kind: "torque", count: 3 },
    ]);
  });

  it("takes bands from the install's limits once they are entered", () => {
    const traits = SAMPLES.gearedElectronicInjection;
    expect(criterionOf(generate(traits), "OP7")).toMatchObject({ band: null, limit: { key: "ecuVoltsMin", end: "min" } });
    expect(criterionOf(generate(traits, { ecuVoltsMin: 9 }), "OP7")?.band).toEqual({ min: 9, max: null });
    expect(criterionOf(generate(traits, { fuelPressureMin: 280e3 }), "FP3")?.band).toBeNull();
    expect(criterionOf(generate(traits, { fuelPressureMin: 280e3, fuelPressureMax: 320e3 }), "FP3")).toMatchObject({
      band: { min: 280e3, max: 320e3 },
      otherLimit: { key: "fuelPressureMax", end: "max" },
    });
    expect(criterionOf(generate(traits), "DY3")?.band).toEqual({ min: 0.02, max: null });
    expect(criterionOf(generate(traits, { tankFeedMin: 0.03 }), "DY3")?.band?.min).toBe(0.03);
    expect(criterionOf(generate(traits), "DY5")?.band?.min).toBe(12.4);
    expect(criterionOf(generate(traits, { busVoltsMax: 29 }), "DY5")?.band?.min).toBe(24.8);
  });

  it("makes post-run items for the rungs they are meant for", () => {
    const board = generate(SAMPLES.boostedConstantSpeed);
    expect(itemOf(board, "PO8")?.runs).toEqual(["1", "5"]);
    expect(itemOf(generate(SAMPLES.handStartedTaildragger), "PO8")?.runs).toBeNull();
    expect(board.items.some(({ key }) => key.startsWith("PO"))).toBe(false);
    expect(keysOf(board)).toContain("RL1");
  });
});

describe("runs", () => {
  const rpm = (value: number) => toSI(value, "rpm");

  it("has no speeds before the ratings", () => {
    const board = generate(SAMPLES.boostedConstantSpeed);
    expect(board.rungs.map(({ key, rpm: speed }) => [key, speed])).toEqual(["1", "2", "3", "4", "5", "6"].map((key) => [key, null]));
    expect(board.rungs.flatMap(({ card }) => card.steps).every((step) => step.rpm === null)).toBe(true);
  });

  it("plans shares of rated speed, and full power under redline and static speed", () => {
    const values = { ratedRpm: rpm(2700), redline: rpm(2700), staticRpmMin: rpm(2200), staticRpmMax: rpm(2300), idleRpm: rpm(700) };
    const { rungs } = generate(SAMPLES.handStartedTaildragger, values);
    expect(rungs.map(({ key }) => key)).toEqual(["1", "2", "3", "5", "6"]);
    expect(rungs.map(({ rpm: speed }) => Math.round((speed ?? 0) * 60))).toEqual([1350, 1890, 2295, 2369, 1890]);
    const capped = generate(SAMPLES.handStartedTaildragger, { ...values, redline: rpm(2350) }).rungs[3];
    expect(Math.round((capped?.rpm ?? 0) * 60)).toBe(2350);
    for (const rung of rungs) {
      for (const step of rung.card.steps) if (step.rpm) expect(step.rpm.max).toBeLessThanOrEqual((rung.rpm ?? 0) + 1e-9);
    }
  });

  it("fills the cards with what the install has", () => {
    const titles = (traits: Traits, key: string) =>
      generate(traits)
        .rungs.find((rung) => rung.key === key)
        ?.card.steps.map(({ title }) => title) ?? [];
    expect(titles(SAMPLES.handStartedTaildragger, "1")).toEqual([
      "Contact calls",
      "Oil pressure",
      "Look and listen",
      "Idle",
      "Ignition dies",
    ]);
    expect(titles(SAMPLES.gearedElectronicInjection, "2")).toContain("Each computer alone");
    expect(titles(SAMPLES.diesel, "2")).not.toContain("Each ignition alone");
    expect(titles(SAMPLES.premixTwoStroke, "1")).toContain("Temperatures");
    for (const traits of Object.values(SAMPLES)) {
      for (const { card } of [...generate(traits).rungs, leakCheckRung(traits)]) {
        for (const { see } of card.steps) expect(see).not.toMatch(/[{}]/);
        expect(card.abort.kill.length).toBeGreaterThan(4);
      }
    }
  });

  it("stops the second run by the second means", () => {
    const second = generate(SAMPLES.diesel).rungs[1];
    expect(second?.card.end[1]).toMatch(/second means/);
  });

  it("keeps the leak check ready for a lead", () => {
    expect(leakCheckRung(SAMPLES.diesel, { ratedRpm: rpm(4000) })).toMatchObject({ key: "L", rpm: rpm(2000), share: 0.5 });
  });

  it("wants a fuller crew on first start and full power", () => {
    const { boostedConstantSpeed: electric, handStartedTaildragger: hand } = SAMPLES;
    expect(["1", "2", "5", "6"].map((key) => crewRule(key, electric).people)).toEqual([5, 4, 5, 4]);
    expect(crewRule("1", hand).people).toBe(6);
    expect(crewRule("1", electric).mayAlso).toEqual([["observer", "recorder"]]);
    expect(crewRule("3", electric).mayAlso).toContainEqual(["runlead", "recorder"]);
    expect(generate(electric).positions.some(({ key }) => key === "swinger")).toBe(false);
    expect(crewRule("2", hand).wanted).toContainEqual({ position: "swinger", count: 1 });
  });
});

describe("values and systems", () => {
  it("asks only for what the install has", () => {
    const keys = (traits: Traits) => valueDefs(traits).map(({ key }) => key);
    expect(keys(SAMPLES.handStartedTaildragger)).not.toContain("ecuVoltsMin");
    expect(keys(SAMPLES.handStartedTaildragger)).not.toContain("fuelPressureMin");
    expect(keys(SAMPLES.premixTwoStroke)).not.toContain("oilPressureMin");
    expect(keys(SAMPLES.gearedElectronicInjection)).toEqual(
      expect.arrayContaining(["ecuVoltsMin", "coolantMax", "reductionRatio", "oilPressureMin"]),
    );
  });

  it("every limit an item refers to is asked for", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        const asked = new Set(valueDefs(traits).map(({ key }) => key));
        expect(new Set(asked).size).toBe(valueDefs(traits).length);
        for (const { parts } of generate(traits).items) {
          for (const part of parts) {
            if (part.kind !== "measure") continue;
            for (const limit of [part.criterion.limit, part.criterion.otherLimit]) if (limit) expect(asked).toContain(limit.key);
          }
        }
      }),
    );
  });

  it("a maker's value has no preset, and any other has one", () => {
    for (const traits of Object.values(SAMPLES)) {
      for (const { preset, basis } of valueDefs(traits)) expect(preset === null).toBe(basis.kind === "maker");
    }
  });

  it("names every system, and opens the bay with every opening", () => {
    expect(Object.keys(SYSTEM_NAMES).sort()).toEqual([...SYSTEMS].sort());
    for (const { systems } of OPENING_PRESETS) {
      expect(systems).toContain("bay");
      expect(new Set(systems).size).toBe(systems.length);
    }
    expect(NOT_OPENINGS.length).toBeGreaterThan(0);
  });
});
