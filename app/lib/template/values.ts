/**
 * Ratings and limits asked of an install, each with a starting point where there is an honest one.
 * A preset is never a confirmation: it stays marked as a default until somebody says where they read it.
 */
import { applies } from "#app/lib/template/condition";
import { traitWords } from "#app/lib/template/trait-words";
import type { Basis, Traits, ValueDef, ValueKey } from "#app/lib/template/types";
import { toSI } from "#app/lib/units/convert";
import type { Quantity } from "#app/lib/units/quantity";

type ValueRow = Omit<ValueDef, "preset" | "basis"> & {
  when?: string;
  /** The first whose condition holds; none = only the maker can say. */
  presets: { when?: string; value: number; basis: Basis }[];
};

const COMMON: Basis = { kind: "common" };
const STARTER: Basis = { kind: "standard", source: "starter makers' duty cycle as printed in their instructions; yours comes first" };
const WARM: Basis = { kind: "standard", source: "engine makers' warm-up figures (60 °C oil; 50 °C for small geared engines)" };

const always = (value: number, basis: Basis = COMMON) => [{ value, basis }];

function rating(key: ValueKey, label: string, quantity: Quantity, help: string, extras: Partial<ValueRow> = {}): ValueRow {
  return { key, label, quantity, help, card: false, limit: false, presets: [], ...extras };
}

/** A limit; on the run cards, so that it stops every run until confirmed, unless said otherwise. */
function limit(key: ValueKey, label: string, quantity: Quantity, help: string, extras: Partial<ValueRow> = {}): ValueRow {
  return rating(key, label, quantity, help, { card: true, limit: true, ...extras });
}

const RATINGS: ValueRow[] = [
  rating("ratedPower", "Rated power", "power", "At the crankshaft, at sea level."),
  rating("ratedRpm", "Rated speed", "rotation", "Crankshaft speed at rated power; the build-up's steps are shares of it."),
  rating(
    "takeoffFlow",
    "Take-off fuel flow",
    "volumeFlow",
    "At full power, as the maker gives it; the fuel-flow sheet asks for more than this.",
  ),
  rating("cylinders", "Cylinders (rotors of a rotary)", "count", "Plugs and compression are counted by it.", {
    presets: [{ when: "2s|rotary", value: 2, basis: COMMON }, ...always(4)],
  }),
  rating("plugs", "Plugs in each cylinder", "count", "Glow plugs of a diesel.", {
    presets: [{ when: "diesel", value: 1, basis: COMMON }, ...always(2)],
  }),
  rating("propDiameter", "Propeller diameter", "length", "Tip to tip."),
  rating("reductionRatio", "Reduction ratio", "ratio", "Crankshaft turns to one of the propeller.", { when: "geared" }),
  rating("mass", "Mass as tied down", "mass", "The aircraft with fuel and operator, as it stands for the run."),
  rating("wheelBase", "Wheel base", "length", "Main wheels to nosewheel or tailwheel, along the ground."),
];

const SPEEDS: ValueRow[] = [
  limit("redline", "Redline", "rotation", "Highest crankshaft speed ever allowed."),
  rating("idleRpm", "Idle speed", "rotation", "Crankshaft speed at idle, engine warm."),
  limit("staticRpmMin", "Static speed, least", "rotation", "Expected at full throttle tied down; less means missing power.", {
    card: false,
  }),
  limit("staticRpmMax", "Static speed, most", "rotation", "Expected at full throttle tied down; the plan of run 5 comes from it.", {
    card: false,
  }),
  rating("avoidRpmMin", "Band to avoid, from", "rotation", "Speed at which the maker forbids staying; leave empty where there is none."),
  rating("avoidRpmMax", "Band to avoid, to", "rotation", "Upper end of that band."),
];

const LIMITS: ValueRow[] = [
  limit("oilPressureMin", "Oil pressure, least", "pressure", "Below this the engine is stopped at once.", { when: "oilsys" }),
  limit("oilPressureMax", "Oil pressure, most", "pressure", "Cold start excepted where the maker says so.", { when: "oilsys" }),
  limit("oilTempMax", "Oil temperature, most", "temperature", "At any power.", { when: "oilsys" }),
  limit("oilTempForPower", "Oil temperature before power", "temperature", "Below this the engine stays at warm-up speed.", {
    when: "oilsys",
    presets: [
      { when: "geared", value: toSI(50, "°C"), basis: WARM },
      { when: "direct", value: toSI(60, "°C"), basis: WARM },
    ],
  }),
  limit("chtMax", "Cylinder head temperature, most", "temperature", "The hottest cylinder counts.", { when: "air|airliquid" }),
  limit("egtMax", "Exhaust gas temperature, most", "temperature", "The hottest cylinder counts.", { when: "2s|rotary|turbo|diesel" }),
  limit("coolantMax", "Coolant temperature, most", "temperature", "With the cap and mix in use.", { when: "wetcool" }),
  limit("fuelPressureMin", "Fuel pressure, least", "pressure", "At the engine.", { when: "!gravity" }),
  limit("fuelPressureMax", "Fuel pressure, most", "pressure", "At the engine.", { when: "!gravity" }),
  limit("busVoltsMin", "Bus volts running, least", "voltage", "Charging, at 65 % speed. Twice the default on 24 V.", {
    when: "elsys",
    presets: always(13.5),
  }),
  limit("busVoltsMax", "Bus volts running, most", "voltage", "Charging, at 65 % speed. Twice the default on 24 V.", {
    when: "elsys",
    presets: always(14.5),
  }),
  limit("ecuVoltsMin", "Computers' lowest volts", "voltage", "Below this an engine computer may restart.", { when: "ecu" }),
  limit("coldStartMin", "Cold-start minimum", "temperature", "Oil or block; colder means preheat."),
  limit("tankFeedMin", "Fuel in the feeding tank, least", "volume", "Twice what the day's cards burn.", {
    card: false,
    presets: always(toSI(20, "L")),
  }),
];

const STARTING_AND_SITE: ValueRow[] = [
  limit("starterOn", "Starter on, most", "time", "One burst.", { when: "estart", card: false, presets: always(10, STARTER) }),
  limit("starterRest", "Starter rest, least", "time", "Between bursts.", { when: "estart", card: false, presets: always(20, STARTER) }),
  limit("starterTries", "Starter bursts, most", "count", "Then 30 min of rest.", {
    when: "estart",
    card: false,
    presets: always(6, STARTER),
  }),
  limit("windLimit", "Wind, most", "speed", "Steady wind; a tail wind is never allowed.", { presets: always(toSI(15, "kt")) }),
  limit("gustLimit", "Gusts, most", "speed", "Highest gust: 8 kt above the wind's limit.", { presets: always(toSI(23, "kt")) }),
  limit("groundMinutes", "Ground running before flight, most", "time", "The product warns when the runs add up to more.", {
    card: false,
    shownIn: "min",
    presets: [{ when: "runbefore", value: toSI(60, "min"), basis: COMMON }],
  }),
];

const ROWS = [...RATINGS, ...SPEEDS, ...LIMITS, ...STARTING_AND_SITE];

const MORE_THAN_NONE: ReadonlySet<Quantity> = new Set(["rotation", "power", "volumeFlow", "voltage", "length", "mass", "count", "ratio"]);

/** Why this figure (SI) can be no rating or limit, such as a redline of 0 rpm, or null. It is for what parses and is plausible otherwise. */
export const valueFault = ({ label, quantity }: Pick<ValueDef, "label" | "quantity">, si: number): string | null =>
  MORE_THAN_NONE.has(quantity) && si <= 0 ? `${label} is more than zero: type the maker’s figure.` : null;

/** Every value by its key, for words about one that an install may not ask for any more. */
export const VALUES_BY_KEY: ReadonlyMap<string, Pick<ValueDef, "label" | "quantity" | "shownIn">> = new Map(
  ROWS.map((row) => [row.key, row]),
);

/** The values that an install with these traits is asked for, with presets (SI) and where those come from. */
export function valueDefs(traits: Traits): ValueDef[] {
  const words = traitWords(traits);
  return ROWS.filter((row) => applies(row.when, words)).map(({ when: _, presets, ...row }) => {
    const found = presets.find((preset) => applies(preset.when, words));
    return { ...row, preset: found?.value ?? null, basis: found?.basis ?? { kind: "maker" } };
  });
}
