import fc from "fast-check";
import { describe, expect, it } from "vitest";
import { presetText, ratingsForm } from "#app/lib/schemas/new-install";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import { generate } from "#app/lib/template/generate";
import { PAGE_ONE, PAGE_TWO, type PageOne, presetPageTwo, traitsSchema } from "#app/lib/template/traits";
import type { Traits } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { toSI } from "#app/lib/units/convert";
import {
  changedOf,
  type Draft,
  firstQuestions,
  judgeFirst,
  judgeSecond,
  placeOfPage,
  readDraft,
  secondQuestions,
  traitsOf,
  writeDraft,
} from "#app/lib/views/new-install";
import { rangesOf, whatItMakes } from "#app/lib/views/new-install-makes";
import { SAMPLES, validTraits } from "./support/sample-traits";

const NAMED = { registration: "N0834S", name: "Sundew", timeZone: "Europe/Berlin" };
const draftOf = (answers: Partial<Traits>): Draft => ({ ...NAMED, answers });
const carried = (draft: Draft): Draft => readDraft(new URL(placeOfPage(1, draft), "http://board.example").searchParams);
const pageOne = (traits: Traits): PageOne => Object.fromEntries(PAGE_ONE.map(({ key }) => [key, traits[key]])) as unknown as PageOne;

/** Any page one as radios can send it, sensible or not, with any of its questions open. */
const anyPageOne: fc.Arbitrary<Partial<Traits>> = fc.record(
  Object.fromEntries(PAGE_ONE.map(({ key, options }) => [key, fc.constantFrom(...options.map((o) => o.value))])),
  { requiredKeys: [] },
);
/** Any whole set of answers, sensible or not. */
const anyAnswers = fc.record(
  Object.fromEntries([...PAGE_ONE, ...PAGE_TWO].map(({ key, options }) => [key, fc.constantFrom(...options.map((o) => o.value))])),
) as unknown as fc.Arbitrary<Traits>;
const anyText = fc.string({ unit: "grapheme", maxLength: 30 });

describe("answers in the address", () => {
  it("bring every sensible install back as it was answered", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        expect(traitsOf(carried(draftOf(traits)))).toEqual(traits);
      }),
    );
  });

  it("bring back every answer of page one, sensible or not, and leave open what is open", () => {
    fc.assert(
      fc.property(anyPageOne, (answers) => {
        expect(carried(draftOf(answers)).answers).toEqual(answers);
      }),
    );
  });

  it("carry of page two only what differs from its preset, so that a changed page one presets anew", () => {
    const asPreset = presetPageTwo(pageOne(SAMPLES.gearedElectronicInjection));
    expect(asPreset.return).toBe(true);
    expect([...writeDraft(draftOf(asPreset)).keys()]).toEqual(["registration", "name", "zone", ...PAGE_ONE.map((q) => q.key)]);
    const changed = writeDraft(draftOf({ ...asPreset, return: false, turbo: true }));
    expect([changed.get("return"), changed.get("turbo"), changed.get("pusher")]).toEqual(["no", "yes", null]);
  });

  it("keep any registration and name, whatever signs are in them", () => {
    fc.assert(
      fc.property(anyText, anyText, (registration, name) => {
        const back = carried({ registration, name, timeZone: "Pacific/Auckland", answers: {} });
        expect(back).toEqual({
          registration: registration.trim().toUpperCase(),
          name: name.trim(),
          timeZone: "Pacific/Auckland",
          answers: {},
        });
      }),
    );
  });

  it("take what the questions do not know for unanswered", () => {
    const { answers } = readDraft(new URLSearchParams("delivery=steam&computers=3&gear=tail&turbo=perhaps&__proto__=x&history="));
    expect(answers).toEqual({ gear: "tail" });
  });
});

describe("page one", () => {
  it("counts the open questions and lets nobody on until all is there", () => {
    const all = judgeFirst(draftOf(pageOne(SAMPLES.boostedConstantSpeed)));
    expect(all).toMatchObject({ open: [], errors: {}, identity: {}, ready: true });
    for (const { key } of PAGE_ONE) {
      const { [key]: _, ...rest } = pageOne(SAMPLES.boostedConstantSpeed) as Partial<Traits>;
      expect(judgeFirst(draftOf(rest))).toMatchObject({ open: [key], ready: false });
    }
    const nameless = judgeFirst({ ...draftOf(pageOne(SAMPLES.diesel)), registration: " ", timeZone: "Mars/Base" });
    expect(Object.keys(nameless.identity).sort()).toEqual(["registration", "timeZone"]);
    expect(nameless.ready).toBe(false);
  });

  it("takes any registration, not only invented ones", () => {
    for (const registration of ["N0834S", "XY-ABC", "build 7", "42"])
      expect(judgeFirst({ ...draftOf(pageOne(SAMPLES.diesel)), registration }).identity).toEqual({});
  });

  it("says of two answers that cannot both be true what to change, at a question of this page", () => {
    const clash = judgeFirst(draftOf({ ...pageOne(SAMPLES.handStartedTaildragger), metering: "efi" }));
    expect(clash.ready).toBe(false);
    expect(clash.errors.computers).toEqual(["Electronic injection needs an engine computer: choose one or two."]);
    const asked = new Set<string>(PAGE_ONE.map((q) => q.key));
    fc.assert(
      fc.property(anyPageOne, (answers) => {
        for (const key of Object.keys(judgeFirst(draftOf(answers)).errors)) expect(asked).toContain(key);
      }),
    );
  });

  it("is ready exactly when what page two presets from it makes sense", () => {
    fc.assert(
      fc.property(anyAnswers, (traits) => {
        const one = pageOne(traits);
        const sensible = traitsSchema.safeParse(traitsOf(draftOf(one))).success;
        expect(judgeFirst(draftOf(one)).ready).toBe(sensible);
      }),
    );
  });

  it("shows every question with its answer", () => {
    const shown = firstQuestions(draftOf({ computers: 0, starter: "hand" }));
    expect(shown.map((q) => q.no)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11]);
    expect(shown.filter((q) => q.answer !== null).map((q) => [q.key, q.answer])).toEqual([
      ["computers", "0"],
      ["starter", "hand"],
    ]);
  });
});

describe("page two", () => {
  it("is preset from page one, and what was changed is counted", () => {
    const preset = traitsOf(draftOf(pageOne(SAMPLES.gearedElectronicInjection)));
    expect(preset).toEqual(presetPageTwo(pageOne(SAMPLES.gearedElectronicInjection)));
    expect(changedOf(preset as Traits)).toBe(0);
    expect(changedOf({ ...(preset as Traits), turbo: true, low: true })).toBe(2);
  });

  it("asks only what applies, and shows each with an answer that it offers", () => {
    const keys = (traits: Traits) => secondQuestions(traits).map((q) => q.key);
    expect(keys(SAMPLES.handStartedTaildragger)).not.toEqual(expect.arrayContaining(["return"]));
    expect(keys(SAMPLES.handStartedTaildragger)).not.toContain("lithium");
    expect(keys(SAMPLES.premixTwoStroke)).toContain("twoStrokeOil");
    expect(keys(SAMPLES.diesel)).toEqual(expect.arrayContaining(["return", "lithium", "turbo"]));
    fc.assert(
      fc.property(validTraits, (traits) => {
        for (const q of secondQuestions(traits)) expect(q.options.map((o) => o.value)).toContain(q.answer);
      }),
    );
  });

  it("finds an answer wrong exactly where the traits' own schema does, at a question that it asks", () => {
    fc.assert(
      fc.property(anyAnswers, (answers) => {
        const traits = traitsOf(draftOf(answers)) as Traits;
        const judged = judgeSecond(traits);
        expect(judged.ready).toBe(traitsSchema.safeParse(traits).success);
        const asked: string[] = secondQuestions(traits).map((q) => q.key);
        for (const key of Object.keys(judged.errors)) expect(asked).toContain(key);
      }),
    );
  });

  it("sends back to page one what only that can mend", () => {
    const judged = judgeSecond({ ...SAMPLES.boostedConstantSpeed, cycle: "2s", twoStrokeOil: "premix" });
    expect(judged).toMatchObject({ onFirst: ["lubrication"], ready: false });
    expect(judged.errors.cycle?.[0]).toContain("A two-stroke has no sump");
  });
});

describe("what the answers make", () => {
  it("counts the board that they make, gate by gate and item by item", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        const board = generate(traits);
        const makes = whatItMakes(traits);
        const before = new Set(board.gates.filter((g) => !["release", "rung-and-release"].includes(g.requiredBy.kind)).map((g) => g.key));
        expect(makes.gates).toBe(before.size);
        expect(makes.items).toBe(board.items.filter((i) => before.has(i.gate)).length);
        expect(makes.items + makes.laterItems).toBe(board.items.length + board.postRun.items.length);
        const listed = makes.leftOut.flatMap((m) => m.items.map((i) => i.key));
        expect(listed.sort()).toEqual(board.leftOut.map((i) => i.key).sort());
        for (const { because } of [...makes.added, ...makes.leftOut]) expect(because).not.toBe("");
      }),
      { numRuns: 40 },
    );
  });

  it("names what an answer adds with its reason, and what another leaves out", () => {
    const keysBecause = (list: { because: string; keys: string }[], because: string) => list.find((m) => m.because === because)?.keys;
    const makes = whatItMakes(SAMPLES.gearedElectronicInjection);
    expect(keysBecause(makes.added, "there is a fuel return line")).toBe("FS3, FP4");
    expect(keysBecause(makes.leftOut, "no carburettor")).toContain("FP5");
    const other = whatItMakes(SAMPLES.handStartedTaildragger);
    expect(other.leftOut.flatMap((m) => m.items.map((i) => i.key))).toContain("FP4");
    expect(other.added.flatMap((m) => m.items.map((i) => i.key))).toEqual(expect.arrayContaining(["CR7", "FP5"]));
  });

  it("writes three or more keys in a row as a range", () => {
    expect(rangesOf(["IG5", "IG6", "IG7", "FP3", "FP4"])).toBe("IG5 to IG7, FP3, FP4");
    expect(rangesOf(["OP9", "OP10", "OP11", "OP13"])).toBe("OP9 to OP11, OP13");
    expect(rangesOf([])).toBe("");
  });
});

describe("page three", () => {
  const defs = valueDefs(SAMPLES.gearedElectronicInjection);
  const commandId = "abcdefghijklmnopqrstuv";
  const parse = (values: Record<string, { value?: string; source?: string }>, units: "si" | "us" = "si") =>
    ratingsForm(defs, units).safeParse({ commandId, values });
  const issues = (result: ReturnType<typeof parse>) =>
    result.success ? [] : result.error.issues.map((i) => [i.path.join("."), i.message] as const);

  it("may stay empty, and what is left at its preset is exact and not confirmed", () => {
    const empty = parse({});
    expect(empty.success && Object.values(empty.data.values).every((v) => v.value === null && v.source === null)).toBe(true);
    for (const units of ["si", "us"] as const) {
      const shown = parse(Object.fromEntries(defs.map((def) => [def.key, { value: presetText(def, units) }])), units);
      expect(shown.success).toBe(true);
      if (shown.success) for (const def of defs) expect(shown.data.values[def.key]).toEqual({ value: def.preset, source: null });
    }
  });

  it("reads numbers in the person's units", () => {
    const us = parse({ oilPressureMin: { value: "12 psi", source: "engine manual p. 14" }, redline: { value: "5800" } }, "us");
    expect(us.success && us.data.values.oilPressureMin).toEqual({
      value: expect.closeTo(toSI(12, "psi"), 6),
      source: "engine manual p. 14",
    });
    expect(us.success && us.data.values.redline).toEqual({ value: expect.closeTo(toSI(5800, "rpm"), 9), source: null });
  });

  it.each([
    [{ redline: { value: "2,850" } }, "values.redline.value", "can be read two ways"],
    [{ redline: { value: "fast" } }, "values.redline.value", "is not a number"],
    [{ redline: { source: "engine manual p. 14" } }, "values.redline.value", "Enter the value that you read there"],
    [{ redline: { value: "5800", source: "p" } }, "values.redline.source", "Say where it was read"],
    [
      { fuelPressureMin: { value: "400" }, fuelPressureMax: { value: "300" } },
      "values.fuelPressureMin.value",
      "fuel pressure, most of 300 kPa",
    ],
    [{ windLimit: { value: "30" } }, "values.windLimit.value", "gusts, most of 23 kt"],
  ])("refuses %j at its field", (values, path, words) => {
    const [first] = issues(parse(values));
    expect(first?.[0]).toBe(path);
    expect(first?.[1]).toContain(words);
  });

  it("keeps out values that this install is not asked for", () => {
    const read = parse({ chtMax: { value: "240" }, notAValue: { value: "1" } });
    expect(read.success && Object.keys(read.data.values).sort()).toEqual(defs.map((d) => d.key).sort());
  });

  it("gives with the answers what a new install is made from", () => {
    fc.assert(
      fc.property(validTraits, (traits) => {
        const draft = carried(draftOf(traits));
        const { answers: _, ...named } = draft;
        const read = ratingsForm(valueDefs(traits), "si").parse({ commandId });
        expect(createInstallSchema.parse({ ...named, traits: traitsOf(draft), values: read.values }).traits).toEqual(traits);
      }),
      { numRuns: 40 },
    );
  });
});
