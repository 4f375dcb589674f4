/** The bench's pages as plain views: where inputs come from, addresses in other units, what is kept. */
import { describe, expect, it } from "vitest";
import { BENCH_KEYS } from "#app/lib/bench/bench";
import type { TypedForm } from "#app/lib/bench/bench-def";
import { evaluate } from "#app/lib/gates/evaluate";
import type { ValueKey } from "#app/lib/template/types";
import { valueDefs } from "#app/lib/template/values";
import { toSI } from "#app/lib/units/convert";
import { benchCards, benchView } from "#app/lib/views/bench";
import { typedForm, workOut, worthKeeping } from "#app/lib/views/bench-work";
import { SAMPLES } from "./support/sample-traits";
import { makeBoard } from "./support/snapshots";

const traits = SAMPLES.gearedElectronicInjection;
const POWER = toSI(100.3, "hp");
/** An install with some of its numbers entered; one of them confirmed. */
function evaluation() {
  const board = makeBoard({ FP: { name: "Fuel prime", items: { FP1: {} } } });
  const given: Partial<Record<ValueKey, [number, string | null]>> = {
    ratedPower: [POWER, "engine manual p. 4"],
    propDiameter: [1.7, null],
    reductionRatio: [2.43, "gearbox plate"],
    redline: [toSI(5800, "rpm"), "engine manual p. 5"],
    cylinders: [3, "engine manual p. 1"],
  };
  board.s.traits = traits;
  board.s.values = valueDefs(traits).map((def) => ({ ...def, value: given[def.key]?.[0] ?? null, source: given[def.key]?.[1] ?? null }));
  return evaluate(board.s, board.now);
}
const e = evaluation();
const now = Date.UTC(2026, 11, 3, 9);
const view = (
  key: Parameters<typeof benchView>[0]["key"],
  sent: TypedForm | null = null,
  kept: TypedForm | null = null,
  units: "si" | "us" = "si",
) => benchView({ e, key, units, now, sent, kept: kept && { inputs: kept, by: "Odalys", recorded: now } });
const form = (query: string, key: Parameters<typeof typedForm>[0] = "tip-speed") => typedForm(key, new URLSearchParams(query));
const TIP = "units=si&rotation=5800&reduction=2.43&diameter=1700&forward=0&temperature=15&blades=metal&ceiling=";

describe("a calculator before anything is typed", () => {
  it("is filled from the install, each field with where that came from, and gives no result yet", () => {
    const fields = new Map(view("tip-speed").fields.map((f) => [f.name, f]));
    expect(fields.get("rotation")).toMatchObject({ value: "5800", unit: "rpm", origin: "Set-up: engine manual p. 5" });
    expect(fields.get("diameter")).toMatchObject({ value: "1700", unit: "mm", origin: "Set-up, not confirmed yet" });
    expect(fields.get("forward")).toMatchObject({ value: "0", origin: "default" });
    expect(fields.get("blades")).toMatchObject({ value: traits.blades, origin: "answers at set-up" });
    expect(fields.get("temperature")).toMatchObject({ value: "", origin: "" });
    expect(view("tip-speed")).toMatchObject({ result: null, errors: [] });
  });

  it("shows the reader's units", () => {
    expect(view("tip-speed", null, null, "us").fields.find((f) => f.name === "diameter")).toMatchObject({ value: "66.929", unit: "in" });
  });

  it("draws a row for each cylinder of the install", () => {
    expect(view("compression").groups[0]?.rows).toHaveLength(3);
  });

  it.each(BENCH_KEYS)("%s has a caution, a criterion and sources in plain words", (key) => {
    const { caution, criterion, source, formula } = view(key);
    for (const words of [caution, criterion, source, formula]) expect(words.length).toBeGreaterThan(20);
  });
});

describe("an address", () => {
  it("holds nothing without its units, and no field that the calculator has not", () => {
    expect(form("rotation=5800")).toBeNull();
    expect(form("units=furlong&rotation=5800")).toBeNull();
    expect(form("units=si&rotation=5800&rotation=1&other=3&__proto__=1")?.fields).toEqual({ rotation: ["5800"] });
    expect(form(`units=si&rotation=${"9".repeat(500)}`)?.fields.rotation?.[0]).toHaveLength(80);
  });

  it("is computed with the install's exact value where that stands in the field, else with what was typed", () => {
    const query = "units=si&supply=pump&power=74.8&specific=334.6&density=719&takeoffFlow=&measuredAt=return&noseUp=10&fuelInTank=5";
    const fuel = form(`${query}&catches.pump=main&catches.volume=4&catches.mass=&catches.seconds=240`, "fuel-flow");
    const worked = fuel && workOut(e, "fuel-flow", fuel);
    expect(worked?.ok && worked.inputs.power).toBe(POWER);
    const other = fuel && workOut(e, "fuel-flow", { ...fuel, fields: { ...fuel.fields, power: ["74.9"] } });
    expect(other?.ok && other.inputs.power).toBe(toSI(74.9, "kW"));
  });

  it("in another person's units is the same result, its fields converted", () => {
    const mine = view("tip-speed", form(TIP));
    const yours = view("tip-speed", form(TIP), null, "us");
    expect(yours.result?.sentence).toBe(mine.result?.sentence);
    const temperature = yours.fields.find((f) => f.name === "temperature");
    expect(temperature).toMatchObject({ value: "59", unit: "°F", origin: "typed" });
    expect(yours.fields.find((f) => f.name === "diameter")).toMatchObject({ origin: "Set-up, not confirmed yet" });
  });

  it("says what is wrong at each field, and links the summary to it", () => {
    const bad = view("tip-speed", form(TIP.replace("temperature=15", "temperature=cold").replace("metal", "")));
    expect(bad.result).toBeNull();
    expect(bad.errors.map((error) => error.field)).toEqual(["bench-temperature", "bench-blades"]);
    expect(bad.fields.find((f) => f.name === "temperature")).toMatchObject({
      value: "cold",
      errors: [expect.stringContaining("not a number")],
    });
  });

  it("leads an error in a row to the row as it was sent", () => {
    const sent = form(
      "units=si&on=10&rest=20&tries=6&longRest=30&giveUpAfter=60&since=5&bursts.before=&bursts.seconds=10&bursts.pressureAfter=&bursts.before=&bursts.seconds=&bursts.pressureAfter=&bursts.before=&bursts.seconds=9&bursts.pressureAfter=",
      "crank",
    );
    const bad = view("crank", sent);
    expect(bad.errors).toEqual([{ field: "bench-bursts-2-before", message: expect.stringContaining("rest before it") }]);
    expect(bad.groups[0]?.rows[2]?.[0]?.errors).toHaveLength(1);
  });

  it("gives the margin first, figures with units, and a rule in the reader's units", () => {
    const { result } = view("tip-speed", form(TIP));
    expect(result).toMatchObject({ passes: true, word: "Within the criterion", rule: { min: null, max: 0.85 } });
    expect(result?.lead).toEqual([{ label: "Mach number left to the ceiling", value: "0.226", unit: "" }]);
    expect(result?.figures.find((f) => f.label === "Propeller speed")).toEqual({ label: "Propeller speed", value: "2387", unit: "rpm" });
  });
});

describe("what is kept", () => {
  const sent = form(TIP.replace("forward=0", "forward=80"));
  if (!sent) throw new Error("no form");
  const kept = worthKeeping(e, "tip-speed", sent);

  it("leaves out what the install fills in, so that it follows the install", () => {
    expect(Object.keys(kept.fields).sort()).toEqual(
      ["blades", "ceiling", "forward", "temperature"].filter((n) => n !== "blades" || traits.blades !== "metal"),
    );
    const opened = view("tip-speed", null, kept);
    expect(opened.fields.find((f) => f.name === "forward")).toMatchObject({ value: "80", origin: "kept by Odalys" });
    expect(opened.fields.find((f) => f.name === "rotation")).toMatchObject({ value: "5800", origin: "Set-up: engine manual p. 5" });
    expect(opened.result?.sentence).toBe(view("tip-speed", sent).result?.sentence);
    expect(opened.sent).toBeNull();
  });

  it("is computed anew for the list, and what does not compute any more says why", () => {
    const broken: TypedForm = { units: "si", fields: { temperature: ["cold"] } };
    const cards = benchCards(
      e,
      new Map([
        ["tip-speed", { inputs: kept, by: "Odalys", recorded: now }],
        ["atmosphere", { inputs: broken, by: "Odalys", recorded: now }],
      ]),
    );
    const card = (key: string) => cards.find((c) => c.key === key);
    expect(cards.map((c) => c.key)).toEqual(BENCH_KEYS);
    expect(card("tip-speed")?.last).toMatchObject({ passes: true, kept: expect.stringMatching(/^kept by Odalys, 3 Dec 2026 \d\d:00 /) });
    expect(card("atmosphere")?.last).toMatchObject({ passes: null, word: "To be looked at" });
    expect(card("battery")?.last).toBeNull();
  });
});

describe("drawings", () => {
  const RIG =
    "units=si&planned=2400&power=88&reference=2400&reduction=1&diameter=1700&merit=0.75&pressure=1013&temperature=15&factor=1.5&mass=480&slope=0&wheels=none&gear=tail&thrustHeight=1600&centreArm=450&holdDown=600&tailArm=4200";
  const straps = [-20, 20].map(
    (a) =>
      `straps.name=s${a}&straps.pair=a&straps.elevation=10&straps.azimuth=${a}&straps.wll=8000&straps.anchor=rated&straps.rating=9000&straps.anchorMass=&straps.friction=`,
  );

  it("the rig's demand meets the holding at the cap of the lines; nosing over binds sooner", () => {
    const { result } = view("restraint", form([RIG, ...straps].join("&"), "restraint"));
    const drawing = result?.drawing;
    if (drawing?.kind !== "restraint") throw new Error("no drawing");
    const { chart } = drawing;
    expect(chart.capBy).toBe("nosing over");
    expect(chart.cap).toBeLessThan(chart.planned);
    for (const { share } of chart.demand) expect(share >= 0 && share <= 1).toBe(true);
    expect(chart.demand.at(-1)?.rpm).toBeCloseTo(chart.mostRpm, 9);
    expect(drawing.straps.map((s) => Math.round((s.azimuth * 180) / Math.PI))).toEqual([-20, 20]);
  });

  it("a catch that does not count is told from those that do", () => {
    const catches = [200, 240, 240].map((s) => `catches.pump=main&catches.volume=4&catches.mass=&catches.seconds=${s}`);
    const query = "units=si&supply=pump&takeoffFlow=0.5&power=&specific=&density=719&measuredAt=return&noseUp=10&fuelInTank=5";
    const drawing = view("fuel-flow", form([query, ...catches].join("&"), "fuel-flow")).result?.drawing;
    expect(drawing?.kind === "fuel" && drawing.bars.map((bar) => bar.counts)).toEqual([false, true, true]);
  });
});
