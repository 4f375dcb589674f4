/**
 * Which answers about an install cannot be true together, written in the condition language.
 */
import type { Traits } from "#app/lib/template/types";

/** Where the first condition holds the second must too; `path` is the answer to change. */
export const TRAIT_RULES: { given: string; needs: string; path: keyof Traits; sentence: string }[] = [
  {
    given: "diesel",
    needs: "none",
    path: "ignition",
    sentence: "A diesel has no ignition: choose nothing as the ignition, or another cycle.",
  },
  {
    given: "none",
    needs: "diesel",
    path: "cycle",
    sentence: "Only a diesel runs without an ignition: choose diesel, or name the ignition.",
  },
  { given: "2s", needs: "nosump", path: "lubrication", sentence: "A two-stroke has no sump: choose no sump, or another cycle." },
  { given: "nosump", needs: "2s", path: "cycle", sentence: "Only a two-stroke has no sump: choose two-stroke, or say where the oil is." },
  {
    given: "2s",
    needs: "premix|oilinj",
    path: "twoStrokeOil",
    sentence: "Say how the two-stroke gets its oil: mixed into the fuel or by a pump.",
  },
  {
    given: "premix|oilinj",
    needs: "2s",
    path: "twoStrokeOil",
    sentence: "Only a two-stroke burns its oil: choose that it is none, or change the cycle.",
  },
  { given: "efi", needs: "ecu", path: "computers", sentence: "Electronic injection needs an engine computer: choose one or two." },
  { given: "diesel", needs: "inj", path: "metering", sentence: "A diesel is injected: choose mechanical or electronic injection." },
  { given: "inj", needs: "!gravity", path: "delivery", sentence: "Injection needs fuel under pressure: choose the pump that feeds it." },
  {
    given: "return",
    needs: "!gravity",
    path: "return",
    sentence: "Fuel fed by gravity does not come back: choose no return line, or name the pump.",
  },
  {
    given: "pump2",
    needs: "epump",
    path: "pump2",
    sentence: "A second electric pump needs a first: choose no, or change how fuel reaches the engine.",
  },
  {
    given: "estart|powered|epump|cselec",
    needs: "elsys",
    path: "elsys",
    sentence: "Starter, powered ignition or injection, electric pump and pitch drive need a battery: choose yes.",
  },
  {
    given: "lithium",
    needs: "elsys",
    path: "lithium",
    sentence: "A lithium battery is a battery: say that one is fitted, or that it is not lithium.",
  },
];
