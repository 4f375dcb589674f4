/**
 * What is asked about an install: page one (everybody answers), page two (preset from page one, changed where different),
 * and the schema that refuses answers which cannot all be true of one engine.
 */
import { z } from "zod";
import { applies } from "#app/lib/template/condition";
import { TRAIT_RULES } from "#app/lib/template/trait-rules";
import { traitWords } from "#app/lib/template/trait-words";
import type { Traits } from "#app/lib/template/types";

type QuestionOf<K extends keyof Traits> = {
  key: K;
  label: string;
  help: string;
  options: { value: Traits[K]; label: string }[];
  /** Condition on the answers so far; asked always where there is none. */
  when?: string;
};
export type Question = { [K in keyof Traits]: QuestionOf<K> }[keyof Traits];

export type PageOneKey =
  | "delivery"
  | "metering"
  | "ignition"
  | "computers"
  | "cooling"
  | "lubrication"
  | "drive"
  | "propeller"
  | "gear"
  | "starter"
  | "history";
export type PageOne = Pick<Traits, PageOneKey>;
export type PageTwo = Omit<Traits, PageOneKey>;

function ask<K extends keyof Traits>(key: K, label: string, help: string, options: [Traits[K], string][], when?: string): QuestionOf<K> {
  const shown = options.map(([value, text]) => ({ value, label: text }));
  return when === undefined ? { key, label, help, options: shown } : { key, label, help, options: shown, when };
}

const YES_NO: [boolean, string][] = [
  [true, "Yes"],
  [false, "No"],
];

export const PAGE_ONE: Question[] = [
  ask("delivery", "How does fuel reach the engine?", "What moves it when the engine runs as usual.", [
    ["gravity", "Gravity alone"],
    ["enginepump", "A pump on the engine"],
    ["boost", "A pump on the engine and an electric one"],
    ["electric", "Electric pumps alone"],
  ]),
  ask("metering", "What meters the fuel?", "The part that mixes it with the air.", [
    ["carb", "Carburettor"],
    ["mechinj", "Mechanical injection"],
    ["efi", "Electronic injection"],
  ]),
  ask("ignition", "What fires the plugs?", "Think of how it is stopped: by earthing a lead, or by taking its power away.", [
    ["mag", "Magnetos"],
    ["selfpow", "Electronic, makes its own power, stops when earthed"],
    ["batt", "Electronic or coil, fed by the bus"],
    ["mixed", "One of each"],
    ["none", "Nothing: it is a diesel"],
  ]),
  ask("computers", "How many engine computers?", "Boxes that run injection or ignition. Displays do not count.", [
    [0, "None"],
    [1, "One"],
    [2, "Two, either can run the engine"],
  ]),
  ask("cooling", "What cools it?", "Oil coolers do not count.", [
    ["air", "Air"],
    ["liquid", "Liquid"],
    ["airliquid", "Air round the cylinders, liquid in the heads"],
  ]),
  ask("lubrication", "Where is the oil?", "A two-stroke that burns its oil has no sump.", [
    ["wet", "In a sump under the engine"],
    ["dry", "In a tank of its own"],
    ["nosump", "No sump: a two-stroke"],
  ]),
  ask("drive", "How is the propeller driven?", "A belt counts as geared.", [
    ["direct", "Straight from the crankshaft"],
    ["geared", "Through a gearbox or belt"],
  ]),
  ask("propeller", "Which kind of propeller?", "How its pitch is set.", [
    ["fixed", "Fixed pitch"],
    ["groundadj", "Set on the ground"],
    ["cshyd", "Constant speed, hydraulic governor"],
    ["cselec", "Constant speed or in flight, electric drive"],
  ]),
  ask("gear", "Where is the third wheel?", "It decides clearance and how the tail is held.", [
    ["nose", "At the nose"],
    ["tail", "At the tail"],
  ]),
  ask("starter", "How is it started?", "By hand adds a position and its own rules.", [
    ["estart", "Electric starter"],
    ["hand", "By hand, swinging the propeller"],
  ]),
  ask("history", "Has this engine run before?", "Since it was built or overhauled, in any airframe or on a stand.", [
    ["new", "No: new or overhauled"],
    ["runbefore", "Yes"],
  ]),
];

export const PAGE_TWO: Question[] = [
  ask("cycle", "Which cycle?", "A diesel has no ignition; a two-stroke has no sump.", [
    ["4s", "Four-stroke"],
    ["2s", "Two-stroke"],
    ["rotary", "Rotary"],
    ["diesel", "Diesel"],
  ]),
  ask("twoStrokeOil", "How does the two-stroke get its oil?", "Mixed into the fuel, or by a pump from a tank.", [
    ["premix", "Mixed into the fuel"],
    ["oilinj", "By an oil pump"],
    [null, "It is no two-stroke"],
  ]),
  ask("return", "Is there a fuel return line?", "Fuel that comes back from the engine to a tank.", YES_NO, "!gravity"),
  ask("pump2", "Is there a second electric pump?", "One that can take over from the other.", YES_NO, "epump"),
  ask("mixctl", "Is there a mixture or stop lever?", "A lever that cuts the fuel at the engine.", YES_NO),
  ask("altair", "Is there alternate air?", "A door that lets air past a blocked intake.", YES_NO),
  ask("low", "Are there cylinders below the crankcase?", "Inverted or radial engines: they can fill and lock.", YES_NO),
  ask("turbo", "Is there a turbocharger?", "Driven by the exhaust.", YES_NO),
  ask("elsys", "Is a battery fitted?", "In the aircraft, not on the bench.", YES_NO),
  ask("lithium", "Is the battery lithium?", "Its volts at rest are judged differently.", YES_NO, "elsys"),
  ask("blades", "What are the blades made of?", "The blades themselves, not the leading-edge guard.", [
    ["metal", "Metal"],
    ["wood", "Wood"],
    ["composite", "Composite"],
  ]),
  ask("pusher", "Is the propeller behind the cockpit?", "The way out then leads forward.", YES_NO),
  ask("cabinheat", "Does cabin heat come from the exhaust?", "A muff round an exhaust pipe.", YES_NO),
];

/** The traits of one install. Each breach of a rule is an issue at the answer to change, with its sentence. */
export const traitsSchema = z
  .object({
    delivery: z.enum(["gravity", "enginepump", "boost", "electric"]),
    metering: z.enum(["carb", "mechinj", "efi"]),
    ignition: z.enum(["mag", "selfpow", "batt", "mixed", "none"]),
    computers: z.literal([0, 1, 2]),
    cooling: z.enum(["air", "liquid", "airliquid"]),
    lubrication: z.enum(["wet", "dry", "nosump"]),
    drive: z.enum(["direct", "geared"]),
    propeller: z.enum(["fixed", "groundadj", "cshyd", "cselec"]),
    gear: z.enum(["nose", "tail"]),
    starter: z.enum(["estart", "hand"]),
    history: z.enum(["new", "runbefore"]),
    cycle: z.enum(["4s", "2s", "rotary", "diesel"]),
    twoStrokeOil: z.enum(["premix", "oilinj"]).nullable(),
    return: z.boolean(),
    pump2: z.boolean(),
    mixctl: z.boolean(),
    altair: z.boolean(),
    low: z.boolean(),
    turbo: z.boolean(),
    elsys: z.boolean(),
    lithium: z.boolean(),
    blades: z.enum(["metal", "wood", "composite"]),
    pusher: z.boolean(),
    cabinheat: z.boolean(),
  })
  .superRefine((traits, context) => {
    const words = traitWords(traits);
    for (const rule of TRAIT_RULES) {
      if (applies(rule.given, words) && !applies(rule.needs, words)) {
        context.addIssue({ code: "custom", path: [rule.path], message: rule.sentence });
      }
    }
  });

/**
 * Page one with the likeliest answers to page two. Of page one it changes nothing: where that contradicts itself the
 * schema says so. A rotary engine cannot be told from page one; page two asks.
 */
export function presetPageTwo(one: PageOne): Traits {
  const cycle = one.ignition === "none" ? "diesel" : one.lubrication === "nosump" ? "2s" : "4s";
  const electricPump = one.delivery === "electric" || one.delivery === "boost";
  const powered = one.ignition === "batt" || one.ignition === "mixed" || one.computers > 0;
  const blades = { fixed: "wood", groundadj: "composite", cshyd: "metal", cselec: "composite" } as const;
  return {
    ...one,
    cycle,
    twoStrokeOil: cycle !== "2s" ? null : one.metering === "carb" ? "premix" : "oilinj",
    return: one.metering === "efi" && one.delivery !== "gravity",
    pump2: one.metering === "efi" && one.delivery === "electric",
    mixctl: cycle === "diesel" || (cycle === "4s" && one.metering !== "efi"),
    altair: one.metering === "mechinj",
    low: false,
    turbo: false,
    elsys: one.starter === "estart" || electricPump || powered || one.propeller === "cselec",
    lithium: false,
    blades: blades[one.propeller],
    pusher: false,
    cabinheat: one.cooling === "air",
  };
}

/** The traits with what their cycle settles by itself: a diesel has no ignition, a two-stroke no sump, others no burnt oil. */
export function settleCycle(traits: Traits): Traits {
  if (traits.cycle === "diesel") return { ...traits, ignition: "none", twoStrokeOil: null };
  if (traits.cycle === "2s") return { ...traits, lubrication: "nosump", twoStrokeOil: traits.twoStrokeOil ?? "premix" };
  return { ...traits, twoStrokeOil: null };
}
