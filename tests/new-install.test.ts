// A new install: its answers in the address and back, what is said about answers that cannot be true together, and the counts.
import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { newId } from "#app/lib/ids";
import { identitySchema, ratingsForm } from "#app/lib/schemas/new-install";
import { holds, parseCondition } from "#app/lib/template/condition";
import { gateOf, TEMPLATE } from "#app/lib/template/template";
import { traitWords } from "#app/lib/template/trait-words";
import { PAGE_ONE, PAGE_TWO, traitsSchema } from "#app/lib/template/traits";
import type { Traits } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { toSI } from "#app/lib/units/convert";
import {
  changedOf,
  type Draft,
  judgeFirst,
  judgeSecond,
  plainest,
  readDraft,
  secondQuestions,
  traitsOf,
  writeDraft,
} from "#app/lib/views/new-install";
import { rangesOf, whatItMakes } from "#app/lib/views/new-install-makes";
import { SAMPLES, validTraits } from "./support/sample-traits";

const draftOf = (answers: Partial<Traits>): Draft => ({ registration: "N0551K", name: "Plank", timeZone: "Europe/Berlin", answers });
const there = (draft: Draft) => readDraft(new URLSearchParams(writeDraft(draft).toString()));
const pageOne = (traits: Traits): Partial<Traits> => Object.fromEntries(PAGE_ONE.map((q) => [q.key, traits[q.key]]));

describe("the address of a new install", () => {
  it("gives back every install that can be, whole", () => {
    fc.assert(
      fc.property(validTraits, fc.string(), fc.string(), (traits, registration, name) => {
        const draft = { ...draftOf(traits), registration: registration.trim().toUpperCase(), name: name.trim() };
        const back = there(draft);
        expect(traitsOf(back)).toEqual(traits);
        expect(back).toMatchObject({ registration: draft.registration, name: draft.name, timeZone: "Europe/Berlin" });
      }),
    );
  });

  it("gives back what is answered so far and nothing else", () => {
    fc.assert(
      fc.property(validTraits, fc.subarray(PAGE_ONE, { maxLength: PAGE_ONE.length - 1 }), (traits, asked) => {
        const answers = Object.fromEntries(asked.map((q) => [q.key, traits[q.key]]));
        expect(there(draftOf(answers)).answers).toEqual(answers);
      }),
    );
  });

  it("carries of page two only what differs from the preset, so that page one presets it anew", () => {
    const two = { ...SAMPLES.boostedConstantSpeed, turbo: true };
    expect([...writeDraft(draftOf(two)).keys()].filter((key) => key === "turbo" || key === "elsys" || key === "cabinheat")).toEqual([
      "turbo",
    ]);
    const cooled = there({ ...there(draftOf(two)), answers: { ...there(draftOf(two)).answers, cooling: "liquid" } });
    expect(traitsOf(cooled)).toMatchObject({ turbo: true, cabinheat: false });
  });

  it("takes no answer that the questions do not know", () => {
    expect(readDraft(new URLSearchParams("delivery=steam&metering=carb&computers=3&return=true")).answers).toEqual({ metering: "carb" });
  });
});

describe("answers that cannot be true together", () => {
  const errorsFor = (answers: Partial<Traits>) => judgeFirst(draftOf(answers)).errors;

  it("says so at the question, before all are answered", () => {
    expect(errorsFor({ ignition: "none", metering: "carb" }).metering?.[0]).toMatch(/diesel is injected/);
    expect(errorsFor({ metering: "efi", delivery: "gravity" }).delivery?.[0]).toMatch(/fuel under pressure/);
    expect(errorsFor({ metering: "efi", computers: 0 }).computers?.[0]).toMatch(/engine computer/);
    expect(errorsFor({ ignition: "none", lubrication: "nosump" }).lubrication?.[0]).toMatch(/say where the oil is/);
    expect(errorsFor({ ignition: "mag", delivery: "gravity" })).toEqual({});
  });

  it("says at the cycle that a diesel has no magneto, and names the question on page one", () => {
    const draft = draftOf({ ...pageOne(SAMPLES.boostedConstantSpeed), cycle: "diesel", metering: "mechinj" });
    const judged = judgeSecond(traitsOf(draft) as Traits);
    expect(judged).toMatchObject({ ready: false, onFirst: ["ignition"] });
    expect(judged.errors.cycle?.[0]).toMatch(/diesel has no ignition/);
    expect(judgeFirst(draft)).toMatchObject({ ready: true, errors: { ignition: [expect.stringMatching(/diesel has no ignition/)] } });
  });

  it("finds nothing wrong with an install that can be, however little of page one is answered", () => {
    fc.assert(
      fc.property(validTraits, fc.subarray(PAGE_ONE), (traits, asked) => {
        const whole = draftOf(traits);
        expect(judgeSecond(traitsOf(whole) as Traits)).toEqual({ errors: {}, onFirst: [], ready: true });
        // The rotary and the chosen diesel are page two's; page one alone must stand too.
        const part = draftOf(Object.fromEntries(asked.map((q) => [q.key, traits[q.key]])));
        expect(judgeFirst(part).errors).toEqual({});
        expect(judgeFirst(part).open).toHaveLength(PAGE_ONE.length - asked.length);
      }),
    );
  });

  it("asks only what applies, and answers the rest by what does", () => {
    const keys = (traits: Traits) => secondQuestions(traits).map((q) => q.key);
    expect(keys(SAMPLES.handStartedTaildragger)).not.toContain("return");
    expect(keys(SAMPLES.handStartedTaildragger)).not.toContain("twoStrokeOil");
    expect(keys(SAMPLES.premixTwoStroke)).toContain("twoStrokeOil");
    const draft = draftOf({ ...pageOne(SAMPLES.handStartedTaildragger), lithium: true, pump2: true, return: true });
    expect(traitsOf(draft)).toMatchObject({ elsys: false, lithium: false, pump2: false, return: false });
    expect(changedOf({ ...SAMPLES.boostedConstantSpeed, turbo: true, low: true })).toBe(2);
  });
});

describe("any answers that radios can send, sensible or not", () => {
  const anyAnswers = fc.record(
    Object.fromEntries([...PAGE_ONE, ...PAGE_TWO].map(({ key, options }) => [key, fc.constantFrom(...options.map((o) => o.value))])),
  ) as unknown as fc.Arbitrary<Traits>;

  it("go on from page one exactly where its own answers make sense, and else are faulted at a question of it", () => {
    fc.assert(
      fc.property(anyAnswers, (answers) => {
        const draft = draftOf(pageOne(answers));
        const judged = judgeFirst(draft);
        expect(judged.ready).toBe(traitsSchema.safeParse(traitsOf(draft)).success);
        expect(Object.keys(judged.errors).length > 0).toBe(!judged.ready);
        const asked: string[] = PAGE_ONE.map((q) => q.key);
        for (const key of Object.keys(judged.errors)) expect(asked).toContain(key);
      }),
    );
  });

  it("go on from page two exactly where the traits make sense, and else are faulted at a question that it asks", () => {
    fc.assert(
      fc.property(anyAnswers, (answers) => {
        const traits = traitsOf(draftOf(answers));
        if (!traits) throw new Error("every question was answered");
        const judged = judgeSecond(traits);
        expect(judged.ready).toBe(traitsSchema.safeParse(traits).success);
        const asked = secondQuestions(traits);
        for (const key of Object.keys(judged.errors)) expect(asked.map((q) => q.key)).toContain(key);
        for (const q of asked) expect([...q.options.map((o) => o.value), "not-one"]).toContain(q.answer);
      }),
    );
  });
});

describe("what the answers make", () => {
  const FIRST = ["MF", "EC", "EL", "IG", "IN", "IX", "FS", "OC", "PR", "FP", "OP", "DY", "TD", "FI", "CR", "WR"];
  const gateRows = new Map(TEMPLATE.gates.map((g) => [g.key, g]));

  /** Items of the template before the first start, counted by reading its conditions once more. */
  function counted(traits: Traits): { gates: number; items: number } {
    const words = traitWords(traits);
    const yes = (when: string | undefined) => when === undefined || holds(parseCondition(when), words);
    const rows = TEMPLATE.items.filter((i) => FIRST.includes(gateOf(i.key)) && yes(i.when) && yes(gateRows.get(gateOf(i.key))?.when));
    return { gates: new Set(rows.map((i) => gateOf(i.key))).size, items: rows.length };
  }

  it.each(Object.entries(SAMPLES))("counts %s right", (_, traits) => {
    const { gates, items, laterItems, leftOut } = whatItMakes(traits);
    expect({ gates, items }).toEqual(counted(traits));
    const out = leftOut.reduce((sum, made) => sum + made.items.length, 0);
    expect(items + laterItems + out).toBe(TEMPLATE.items.length + TEMPLATE.postRunItems.length);
  });

  it("leaves out two whole gates only where nothing of them is there", () => {
    expect(whatItMakes(SAMPLES.boostedConstantSpeed).gates).toBe(16);
    expect(whatItMakes(SAMPLES.handStartedTaildragger).gates).toBe(15); // nothing electrical
    expect(whatItMakes(SAMPLES.premixTwoStroke).gates).toBe(15); // no oil to prime
  });

  it("says why an item is there or not", () => {
    const { added, leftOut } = whatItMakes(SAMPLES.handStartedTaildragger);
    const reason = (list: typeof added, key: string) => list.find((made) => made.items.some((i) => i.key === key))?.because;
    expect(reason(added, "TD4")).toBe("there is a tailwheel");
    expect(reason(added, "MF1")).toBeUndefined();
    expect(reason(leftOut, "OC6")).toBe("no coolant");
  });

  it("never counts an item both as added and as left out, for any install", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        const { added, leftOut } = whatItMakes(traits);
        const keys = [...added, ...leftOut].flatMap((made) => made.items.map((i) => i.key));
        expect(new Set(keys).size).toBe(keys.length);
      }),
    );
  });

  it("counts open questions with the plainest answer", () => {
    expect(plainest(draftOf({}))).toMatchObject({ delivery: "gravity", metering: "carb", ignition: "mag", computers: 0 });
    expect(plainest(draftOf({ metering: "efi" }))).toMatchObject({ delivery: "enginepump", computers: 1 });
  });

  it("writes three keys that follow each other as a range", () => {
    expect(rangesOf(["IG5", "IG6", "IG7", "FP3", "FP4", "OP9", "OP11"])).toBe("IG5 to IG7, FP3, FP4, OP9, OP11");
  });
});

describe("ratings and limits as typed", () => {
  const defs = valueDefs(SAMPLES.boostedConstantSpeed);
  const sent = (values: Record<string, { value?: string; source?: string }>, units: "si" | "us" = "si") =>
    ratingsForm(defs, units).safeParse({ commandId: newId(), values });
  const faults = (result: ReturnType<typeof sent>) => result.error?.issues.map((i) => i.path.slice(1).join(".")) ?? [];

  it("may all stay empty", () => {
    const result = sent({});
    expect(result.success && Object.values(result.data.values).every((v) => v.value === null && v.source === null)).toBe(true);
  });

  it("come out as SI, confirmed only with where they were read", () => {
    const result = sent({ redline: { value: "2750", source: "engine manual p. 12" }, oilPressureMin: { value: "25" } }, "us");
    expect(result.data?.values.redline).toEqual({ value: toSI(2750, "rpm"), source: "engine manual p. 12" });
    expect(result.data?.values.oilPressureMin?.value).toBeCloseTo(toSI(25, "psi"), 6);
    expect(result.data?.values.oilPressureMin?.source).toBeNull();
  });

  it("keep a preset exact where it is left as shown in rounded units", () => {
    const preset = defs.find((def) => def.key === "tankFeedMin")?.preset;
    expect(sent({ tankFeedMin: { value: "5.28" } }, "us").data?.values.tankFeedMin?.value).toBe(preset);
  });

  it("refuse a source without a value, what is no number, and a least above its most", () => {
    expect(faults(sent({ redline: { source: "engine manual p. 12" } }))).toEqual(["redline.value"]);
    expect(faults(sent({ redline: { value: "fast" }, ratedRpm: { value: "2700", source: "x" } })).sort()).toEqual([
      "ratedRpm.source",
      "redline.value",
    ]);
    expect(faults(sent({ oilPressureMin: { value: "400" }, oilPressureMax: { value: "300" } }))).toEqual(["oilPressureMin.value"]);
    expect(faults(sent({ windLimit: { value: "25" } }))).toEqual(["windLimit.value"]);
  });

  it("take a registration of up to 12 letters, digits and hyphens, in capitals", () => {
    const named = (registration: string) => identitySchema.safeParse({ registration, name: "Plank", timeZone: "UTC" });
    expect(named(" n0-551k ").data?.registration).toBe("N0-551K");
    expect(named("N0551KN0551KN").success).toBe(false);
    for (const not of ["!!", "N0 51K", "N0_51", "-N051", "N051-", "N0--51", "Ñ0551"])
      expect(named(not).error?.issues[0]?.message).toMatch(/^Letters and digits, with a hyphen between/);
    expect(named("").error?.issues[0]?.message).toMatch(/registration/);
  });
});
