/** Invented installs, as unlike each other as the template allows, and an arbitrary that makes any valid one. */
import fc from "fast-check";
import { type PageOne, presetPageTwo, settleCycle } from "#app/lib/template/traits";
import type { Traits } from "#app/lib/template/types";

const base: PageOne = {
  delivery: "gravity",
  metering: "carb",
  ignition: "mag",
  computers: 0,
  cooling: "air",
  lubrication: "wet",
  drive: "direct",
  propeller: "fixed",
  gear: "nose",
  starter: "estart",
  history: "new",
};

const sample = (one: Partial<PageOne>, two: Partial<Traits> = {}): Traits => ({ ...presetPageTwo({ ...base, ...one }), ...two });

export const SAMPLES = {
  /** Air-cooled four-stroke, carburettor fed by gravity, magnetos, no electrics, swung by hand. */
  handStartedTaildragger: sample({ gear: "tail", starter: "hand" }),
  /** Air-cooled four-stroke with boost pump, magnetos, hydraulic constant speed. */
  boostedConstantSpeed: sample({ delivery: "boost", propeller: "cshyd" }, { blades: "metal" }),
  /** Geared, liquid-cooled, two computers, dry sump. */
  gearedElectronicInjection: sample({
    delivery: "electric",
    metering: "efi",
    ignition: "batt",
    computers: 2,
    cooling: "airliquid",
    lubrication: "dry",
    drive: "geared",
    propeller: "groundadj",
  }),
  /** Two-stroke on premix with a belt drive, a pusher. */
  premixTwoStroke: sample(
    { delivery: "enginepump", ignition: "selfpow", lubrication: "nosump", drive: "geared", propeller: "groundadj", history: "runbefore" },
    { pusher: true, cabinheat: false },
  ),
  /** Mechanical diesel with a turbocharger. */
  diesel: sample(
    { delivery: "boost", metering: "mechinj", ignition: "none", cooling: "liquid", propeller: "cshyd", drive: "geared" },
    { return: true, turbo: true, blades: "composite" },
  ),
  /** Rotary with turbocharger, electric pitch drive, lithium battery. */
  rotaryTurbo: sample(
    {
      delivery: "electric",
      metering: "efi",
      ignition: "batt",
      computers: 1,
      cooling: "liquid",
      drive: "geared",
      propeller: "cselec",
      gear: "tail",
    },
    { cycle: "rotary", turbo: true, lithium: true },
  ),
} satisfies Record<string, Traits>;

const anyTraits = fc.record<Traits>({
  delivery: fc.constantFrom("gravity", "enginepump", "boost", "electric"),
  metering: fc.constantFrom("carb", "mechinj", "efi"),
  ignition: fc.constantFrom("mag", "selfpow", "batt", "mixed"),
  computers: fc.constantFrom(0, 1, 2),
  cooling: fc.constantFrom("air", "liquid", "airliquid"),
  lubrication: fc.constantFrom("wet", "dry"),
  drive: fc.constantFrom("direct", "geared"),
  propeller: fc.constantFrom("fixed", "groundadj", "cshyd", "cselec"),
  gear: fc.constantFrom("nose", "tail"),
  starter: fc.constantFrom("estart", "hand"),
  history: fc.constantFrom("new", "runbefore"),
  cycle: fc.constantFrom("4s", "2s", "rotary", "diesel"),
  twoStrokeOil: fc.constantFrom("premix", "oilinj"),
  return: fc.boolean(),
  pump2: fc.boolean(),
  mixctl: fc.boolean(),
  altair: fc.boolean(),
  low: fc.boolean(),
  turbo: fc.boolean(),
  elsys: fc.boolean(),
  lithium: fc.boolean(),
  blades: fc.constantFrom("metal", "wood", "composite"),
  pusher: fc.boolean(),
  cabinheat: fc.boolean(),
});

/** Any install that makes sense: what contradicts itself is mended the way a builder would answer. */
export const validTraits: fc.Arbitrary<Traits> = anyTraits.map((drawn) => {
  const traits = settleCycle(drawn);
  if (traits.cycle === "diesel" && traits.metering === "carb") traits.metering = "mechinj";
  if (traits.metering === "efi" && traits.computers === 0) traits.computers = 1;
  if (traits.metering !== "carb" && traits.delivery === "gravity") traits.delivery = "enginepump";
  const electricPump = traits.delivery === "electric" || traits.delivery === "boost";
  const powered = traits.ignition === "batt" || traits.ignition === "mixed" || traits.computers > 0;
  if (traits.starter === "estart" || electricPump || powered || traits.propeller === "cselec") traits.elsys = true;
  traits.pump2 &&= electricPump;
  traits.return &&= traits.delivery !== "gravity";
  traits.lithium &&= traits.elsys;
  return traits;
});
