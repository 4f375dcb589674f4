/**
 * How each quantity is shown and typed, for the system of units that a person chose.
 * Every number leaves with its unit; trailing zeros are dropped down to the decimals that the trade reads.
 * What is typed so that it could be read two ways, or cannot be true of an engine, is refused with a sentence.
 */
import { fromSI, measures, symbolOf, toSI, UNITS, type Unit } from "#app/lib/units/convert";
import type { Band, Quantity } from "#app/lib/units/quantity";

export type UnitSystem = "si" | "us";

export interface Shown {
  /** "22.5 N·m" */
  text: string;
  /** The rounded number alone, "22.5". */
  value: string;
  /** The symbol alone, "N·m"; empty for a bare number. */
  unit: string;
}

/** Unit with the fewest and the most decimals shown. */
type Style = readonly [unit: Unit, least: number, most: number];

const both = (...style: Style): Record<UnitSystem, Style> => ({ si: style, us: style });

const STYLES: Record<Quantity, Record<UnitSystem, Style>> = {
  torque: { si: ["N·m", 0, 2], us: ["in-lb", 0, 1] },
  pressure: { si: ["kPa", 0, 1], us: ["psi", 0, 1] },
  temperature: { si: ["°C", 0, 1], us: ["°F", 0, 1] },
  temperatureDifference: { si: ["Δ°C", 0, 1], us: ["Δ°F", 0, 1] },
  volume: { si: ["L", 0, 2], us: ["US gal", 0, 2] },
  volumeFlow: { si: ["L/min", 0, 3], us: ["US gal/h", 0, 2] },
  massFlow: { si: ["kg/h", 0, 1], us: ["lb/h", 0, 1] },
  voltage: both("V", 1, 2),
  current: both("A", 0, 1),
  resistance: both("Ω", 0, 3),
  angle: both("deg", 0, 2),
  length: { si: ["mm", 0, 1], us: ["in", 0, 3] },
  area: { si: ["m²", 0, 2], us: ["ft²", 0, 2] },
  mass: { si: ["kg", 0, 1], us: ["lb", 0, 1] },
  force: { si: ["N", 0, 0], us: ["lbf", 0, 0] },
  speed: both("kt", 0, 1),
  power: { si: ["kW", 0, 1], us: ["hp", 0, 1] },
  time: both("s", 0, 1),
  rotation: both("rpm", 0, 0),
  pressureRate: { si: ["kPa/min", 0, 2], us: ["psi/min", 0, 2] },
  density: { si: ["kg/m³", 0, 3], us: ["lb/US gal", 0, 3] },
  specificFuel: { si: ["g/(kW·h)", 0, 1], us: ["lb/(hp·h)", 0, 3] },
  count: both("1", 0, 0),
  ratio: both("1", 0, 4),
  fraction: both("%", 0, 4),
};

/** Decimals of units that are read only where a field or figure asks for them; any other shows up to three. */
const OTHER: Partial<Record<Unit, readonly [least: number, most: number]>> = {
  m: [0, 1],
  ft: [0, 1],
  hPa: [0, 1],
  inHg: [2, 2],
  "m/s": [0, 1],
  "ft/s": [0, 0],
  mΩ: [0, 2],
  W: [0, 1],
};

function styleFor(quantity: Quantity, system: UnitSystem, as?: Unit): Style {
  const own = STYLES[quantity][system];
  if (!as || as === own[0]) return own;
  if (!measures(as, quantity)) throw new Error(`${as} does not measure ${quantity}`);
  const [least, most] = OTHER[as] ?? [0, 3];
  return [as, least, most];
}

/** The unit in which a person of this system reads and types `quantity`. */
export function displayUnit(quantity: Quantity, system: UnitSystem): Unit {
  return STYLES[quantity][system][0];
}

function decimal(value: number, least: number, most: number): string {
  const fixed = value.toFixed(most);
  const dot = fixed.indexOf(".");
  let end = fixed.length;
  if (dot >= 0) {
    const keep = least === 0 ? dot : dot + 1 + least;
    while (end > keep && (fixed[end - 1] === "0" || fixed[end - 1] === ".")) end -= 1;
  }
  const text = fixed.slice(0, end);
  return Number(text) === 0 ? text.replace("-", "") : text.replace("-", "−");
}

const withUnit = (value: string, symbol: string): string => (symbol === "" ? value : `${value} ${symbol}`);

/**
 * An SI value as text for a person: format("torque", 22.5, "si").text = "22.5 N·m".
 * `as` shows another unit of the same quantity (minutes instead of seconds, ppm instead of percent).
 */
export function format(quantity: Quantity, siValue: number, system: UnitSystem, as?: Unit): Shown {
  const [key, least, most] = styleFor(quantity, system, as);
  const unit = symbolOf(key);
  if (!Number.isFinite(siValue)) return { text: "no value", value: "", unit };
  const value = decimal(fromSI(siValue, key), least, most);
  return { text: withUnit(value, unit), value, unit };
}

/** A band (SI) in words: "22 to 26 N·m", "at least 10.0 V", "at most 0.1 V", "within 2 kPa either way of zero". */
export function formatBand(quantity: Quantity, band: Band | null, system: UnitSystem, as?: Unit): string {
  if (band === null) return "maker's number, not entered yet";
  const { min, max } = band;
  if (min === null && max === null) return "no limit";
  if (min === null) return `at most ${format(quantity, max ?? 0, system, as).text}`;
  if (max === null) return `at least ${format(quantity, min, system, as).text}`;
  const low = format(quantity, min, system, as);
  const high = format(quantity, max, system, as);
  if (min === max) return `exactly ${high.text}`;
  if (min === -max && max > 0) return `within ${high.text} either way of zero`;
  return `${low.value} to ${high.text}`;
}

export type Entry = { ok: true; si: number } | { ok: false; sentence: string };

/** Least and most that can be meant, SI. They catch slips of the finger, not bad engines. */
const PLAUSIBLE: Record<Quantity, readonly [number, number]> = {
  torque: [0, 5000],
  pressure: [-1.1e5, 1e8],
  temperature: [183.15, 1573.15],
  temperatureDifference: [-1500, 1500],
  volume: [0, 10],
  volumeFlow: [0, 0.05],
  massFlow: [0, 10],
  voltage: [-1000, 1000],
  current: [-5000, 5000],
  resistance: [0, 1e9],
  angle: [-2 * Math.PI, 2 * Math.PI],
  length: [-100, 100],
  area: [0, 1000],
  mass: [0, 50_000],
  force: [0, 1e6],
  speed: [0, 400],
  power: [0, 5e6],
  time: [0, 3.2e7],
  rotation: [0, 500],
  pressureRate: [-1e6, 1e6],
  density: [0, 25_000],
  specificFuel: [0, 1e-6],
  count: [0, 100_000],
  ratio: [-100_000, 100_000],
  fraction: [-1, 100],
};

/** The same for units in which whole fields and airfields are measured, not parts. */
const PLAUSIBLE_IN: Partial<Record<Unit, readonly [number, number]>> = { m: [-1000, 20_000], ft: [-1000, 20_000] };

const refuse = (sentence: string): Entry => ({ ok: false, sentence });
const SPACES = /[\s\u00a0\u2007\u2009\u202f]/g;
const GROUPED = /^[+-]?\d{1,3}( \d{3})+(?=$|[.,])/;

/** The number alone where `text` ends in a symbol of this quantity, and the unit that the symbol names. */
function splitUnit(text: string, quantity: Quantity): { number: string; unit: Unit | null; stray: boolean } {
  const tail = /[^\d\s.,]+.*$/.exec(text.replace(/^[+-]/, ""))?.[0].trim() ?? "";
  if (tail === "") return { number: text, unit: null, stray: false };
  const number = text.slice(0, text.length - tail.length).trim();
  const unit = (Object.keys(UNITS) as Unit[]).find((key) => symbolOf(key) === tail && measures(key, quantity)) ?? null;
  return { number, unit, stray: unit === null };
}

/**
 * What somebody typed for `quantity`, as SI. Accepts a decimal point or comma, spaces between groups of three
 * digits and the unit's own symbol behind the number. Refuses with a sentence: nothing typed, no number,
 * another unit, a comma that could be read two ways, a value that cannot be meant.
 */
export function parseEntry(text: string, quantity: Quantity, system: UnitSystem, as?: Unit): Entry {
  const key = as ?? displayUnit(quantity, system);
  const symbol = symbolOf(key);
  const inUnit = symbol === "" ? "" : ` in ${symbol}`;
  const clean = text.replace(SPACES, " ").replace("−", "-").trim();
  if (clean === "") return refuse(`Nothing is entered: type a number${inUnit}.`);
  const { number, unit, stray } = splitUnit(clean, quantity);
  if (stray || number === "")
    return refuse(`"${text.trim().slice(0, 40)}" is not a number: type digits only, the value${inUnit || " alone"}.`);
  if (unit !== null && symbolOf(unit) !== symbol)
    return refuse(`This field takes ${symbol}: convert ${number} ${symbolOf(unit)} and type the number${inUnit}.`);

  const joined = GROUPED.test(number) ? number.replace(/ /g, "") : number;
  if (/[.,].*[.,]/.test(joined))
    return refuse(`"${number}" has more than one point or comma: type it with one decimal mark and no thousands mark.`);
  if (/^[+-]?[1-9]\d{0,2},\d{3}$/.test(joined)) {
    const [whole, rest] = joined.split(",");
    return refuse(`"${number}" can be read two ways: type ${whole}${rest} or ${whole}.${rest}.`);
  }
  if (!/^[+-]?(\d+([.,]\d*)?|[.,]\d+)$/.test(joined))
    return refuse(`"${number.slice(0, 40)}" is not a number: type digits only, the value${inUnit || " alone"}.`);

  const value = Number(joined.replace(",", "."));
  const si = toSI(value, key);
  const [least, most] = PLAUSIBLE_IN[key] ?? PLAUSIBLE[quantity];
  if (!Number.isFinite(si) || si < least || si > most) {
    const low = format(quantity, least, system, key).value;
    return refuse(
      `${number} ${symbol}`
        .trim()
        .concat(` cannot be right here: type a value between ${low} and ${format(quantity, most, system, key).text}.`),
    );
  }
  if (quantity === "count" && !Number.isInteger(fromSI(si, key)))
    return refuse(`${number} is not a whole number: count them and type how many.`);
  return { ok: true, si };
}
