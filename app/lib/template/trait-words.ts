/**
 * The words of the condition language: every answer of the two question pages, and a few derived from them.
 * Each comes with what to say where it is true of an install and where it is not.
 */
import type { Traits } from "#app/lib/template/types";

const say = (absent: string, present: string) => ({ absent, present });

export const TRAIT_WORDS = {
  gravity: say("fuel is not fed by gravity", "fuel is fed by gravity"),
  enginepump: say("no engine pump feeding alone", "the engine's own pump feeds alone"),
  boost: say("no boost pump", "there is an electric boost pump"),
  electric: say("fuel is not fed by electric pumps alone", "electric pumps feed the engine"),
  carb: say("no carburettor", "there is a carburettor"),
  mechinj: say("no mechanical fuel injection", "the injection is mechanical"),
  efi: say("no electronic fuel injection", "the injection is electronic"),
  mag: say("no magneto", "the ignition is by magneto"),
  selfpow: say("no self-powered electronic ignition", "the ignition makes its own power"),
  batt: say("no ignition fed by the bus alone", "the ignition is fed by the bus"),
  mixed: say("no mixed ignition", "one ignition is grounded to stop, one fed by the bus"),
  none: say("there is an ignition", "there is no ignition"),
  air: say("not cooled by air alone", "cooled by air alone"),
  liquid: say("not cooled by liquid alone", "cooled by liquid alone"),
  airliquid: say("not cooled by air and liquid", "cooled by air and liquid"),
  wet: say("no wet sump", "the sump is wet"),
  dry: say("no dry sump", "the sump is dry"),
  nosump: say("there is an oil sump", "there is no oil sump"),
  direct: say("the propeller is geared", "the propeller is driven direct"),
  geared: say("no gearbox or belt drive", "the propeller is geared"),
  fixed: say("the pitch can be set", "the pitch is fixed"),
  groundadj: say("no blades set on the ground", "the blades are set on the ground"),
  cshyd: say("no hydraulic governor", "the propeller has a hydraulic governor"),
  cselec: say("no electric pitch drive", "the pitch drive is electric"),
  nose: say("no nosewheel", "there is a nosewheel"),
  tail: say("no tailwheel", "there is a tailwheel"),
  estart: say("no electric starter", "there is an electric starter"),
  hand: say("not started by hand", "started by hand"),
  new: say("the engine has run before", "the engine is new or overhauled"),
  runbefore: say("the engine is new or overhauled", "the engine has run before"),
  "4s": say("not a four-stroke", "a four-stroke"),
  "2s": say("not a two-stroke", "a two-stroke"),
  rotary: say("not a rotary engine", "a rotary engine"),
  diesel: say("not a diesel", "a diesel"),
  premix: say("no oil mixed into the fuel", "oil is mixed into the fuel"),
  oilinj: say("no two-stroke oil pump", "a pump feeds two-stroke oil"),
  return: say("no fuel return line", "there is a fuel return line"),
  pump2: say("no second electric pump", "there is a second electric pump"),
  mixctl: say("no mixture or stop lever", "there is a mixture or stop lever"),
  altair: say("no alternate air", "there is alternate air"),
  low: say("no cylinder below the crankcase", "there are cylinders below the crankcase"),
  turbo: say("no turbocharger", "there is a turbocharger"),
  elsys: say("no battery fitted", "a battery is fitted"),
  lithium: say("no lithium battery", "the battery is lithium"),
  metal: say("no metal blades", "the blades are metal"),
  wood: say("no wooden blades", "the blades are wood"),
  composite: say("no composite blades", "the blades are composite"),
  pusher: say("not a pusher", "a pusher"),
  cabinheat: say("no cabin heat from the exhaust", "cabin heat comes from the exhaust"),
  ecu: say("no engine computer", "there is an engine computer"),
  ecu2: say("no second engine computer", "there are two engine computers"),
  ground: say("no ignition that stops when grounded", "an ignition stops when grounded"),
  powered: say("nothing in ignition or injection needs the bus", "ignition or injection needs the bus"),
  epump: say("no electric pump", "there is an electric pump"),
  inj: say("no fuel injection", "there is fuel injection"),
  wetcool: say("no coolant", "there is coolant"),
  oilsys: say("a two-stroke has no oil system of its own", "the engine has an oil system"),
} as const;

export type TraitWord = keyof typeof TRAIT_WORDS;

/** The words that are true of an install with these traits. */
export function traitWords(traits: Traits): ReadonlySet<TraitWord> {
  const words = new Set<TraitWord>([
    traits.delivery,
    traits.metering,
    traits.ignition,
    traits.cooling,
    traits.lubrication,
    traits.drive,
    traits.propeller,
    traits.gear,
    traits.starter,
    traits.history,
    traits.cycle,
    traits.blades,
  ]);
  const flags = ["return", "pump2", "mixctl", "altair", "low", "turbo", "elsys", "lithium", "pusher", "cabinheat"] as const;
  for (const flag of flags) if (traits[flag]) words.add(flag);
  if (traits.twoStrokeOil) words.add(traits.twoStrokeOil);
  if (traits.computers >= 1) words.add("ecu");
  if (traits.computers === 2) words.add("ecu2");
  if (["mag", "selfpow", "mixed"].includes(traits.ignition)) words.add("ground");
  if (["batt", "mixed"].includes(traits.ignition) || traits.computers >= 1) words.add("powered");
  if (traits.delivery === "electric" || traits.delivery === "boost") words.add("epump");
  if (traits.metering !== "carb") words.add("inj");
  if (traits.cooling !== "air") words.add("wetcool");
  if (traits.cycle !== "2s") words.add("oilsys");
  return words;
}
