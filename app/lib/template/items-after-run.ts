/**
 * Items looked at after a run (PO), at the service after full power (SV), and for the release for taxi tests (RL).
 */
import { HAS_LEVELS } from "#app/lib/template/items-of-the-day";
import { computed, type ItemRow, item, makers, only, pairs, photo, reading, sheet, text, tick, torque } from "#app/lib/template/rows";

const POST_RUN: ItemRow[] = [
  item("PO1", "K2", [], "Ignition, fuel and master off, key out, before anybody touches the cowl.", [tick]),
  item("PO2", "K", [], "Look over the engine: dry and clean now; each leak of fuel, oil, coolant or soot is raised as a finding.", [tick]),
  item("PO3", "", [], "Go over hoses, wires, controls and clamps: no rub, scorch or slack, every stripe of witness paint whole.", [tick]),
  item(
    "PO4",
    "",
    [],
    "Engine cold, read the levels it has; where coolant fell, bleed it again.",
    [reading("Level", "volume", "each-level")],
    {
      when: HAS_LEVELS,
    },
  ),
  item("PO5", "K", [], "Engine log: read, and each exceedance answered.", [computed("log")]),
  item("PO6", "", [], 'Ask each position what was odd: write it down, or "none".', [text('What each position saw, or "none"')]),
  item("PO7", "", [], "Measure how far a tyre moved from its mark and look at the straps; over 25 mm (1 in) raise a limiting finding.", [
    reading("Tyre moved", "length"),
  ]),
  item(
    "PO8",
    "K2",
    [],
    "Check the torque of the propeller bolts without loosening: every one inside the maker's band.",
    [torque("Propeller bolts")],
    {
      runs: { rungs: ["1", "5"], unless: "wood" },
    },
  ),
  item(
    "PO9",
    "",
    [],
    "Engine cold, check the torque of mount bolts and exhaust nuts: every one inside the maker's band.",
    [torque("Mount bolts"), torque("Exhaust nuts")],
    { runs: { rungs: ["1", "5"] } },
  ),
  item("PO10", "2", [], "Take out the oil screen or magnetic plug: no metal on it.", [photo("Screen or plug, wiped out on white")], {
    when: "oilsys",
    runs: { rungs: ["1"] },
    source: "FAA-H-8083-32",
  }),
  item(
    "PO11",
    "",
    [],
    "Read the heat strips; cowl, firewall, coils and hoses carry no mark of heat.",
    [reading("Highest shown", "temperature", ["cowl", "firewall", "coils", "fuel parts"])],
    { runs: { rungs: ["3", "5"] } },
  ),
  item("PO12", "", [], "Measure the gearbox friction torque again: inside the maker's band.", [makers("Friction torque", "torque")], {
    when: "geared",
    runs: { rungs: ["5"] },
  }),
];

const SERVICE: ItemRow[] = [
  item("SV1", "K2", [], "Change oil and filter, cut the filter open and spread its paper: no metal.", [photo("Filter paper, spread out")], {
    when: "oilsys",
  }),
  item(
    "SV2",
    "",
    [],
    "Test each cylinder warm: compression holds.",
    [only("!2s&!rotary", sheet("compression")), only("2s|rotary", makers("Compression", "pressure", { places: "each-cylinder" }))],
    {
      when: "!diesel",
      wordsWhen: [["rotary", "Test each rotor warm: compression is inside the maker's band."]],
      caution: "Air in a cylinder swings the propeller: hold it, stand out of the arc.",
    },
  ),
  item("SV3", "", [], "Read the plugs: colour, oil and gap as they should be.", [photo("Plugs in order of cylinder")], { when: "!diesel" }),
  item("SV4", "", [], "Open fuel filter and strainers after running: clean.", [photo("Fuel filter and strainers")]),
  item("SV5", "", [], "Write down idle, mixture and map as trimmed; a new map's file is kept.", [
    text("Idle, mixture, map as trimmed; where the file is kept"),
  ]),
];

const RELEASE: ItemRow[] = [
  item("RL1", "K", [], "Record: no finding, no loose end, no limit or killer's band that is still an unconfirmed default.", [
    computed("release-record"),
  ]),
  item("RL2", "K", [], "Openings: fuel, oil, coolant, drive and propeller not opened since the end of the newest run.", [
    computed("release-openings"),
  ]),
  item("RL3", "K2", ["bay"], "Take off straps, gauges, heat strips, tags and temporary wires: as many off as were on.", [
    pairs("put on", "taken off"),
  ]),
  item(
    "RL4",
    "",
    [],
    "Write down what the engine gave: these are the figures to compare with later.",
    [text("Static and idle rpm, drops, hot oil pressure, temperatures, air")],
    { source: "14 CFR 43.15(c)(2)" },
  ),
  item("RL5", "2", ["bay"], "Fit the cowls: every fastener home, caps on, an extinguisher aboard.", [tick]),
  item("RL6", "", [], "Write the taxi card: limits, minutes on the ground, wind, and who watches.", [
    text("Limits, minutes on the ground, wind, who watches"),
  ]),
  item("RL7", "", [], "Have brakes, steering and flying controls cleared outside this board, and write up the logbook.", [
    text("Cleared by whom, and the logbook entry"),
  ]),
];

export const POST_RUN_ITEMS = POST_RUN;
export const AFTER_RUN_ITEMS: ItemRow[] = [...SERVICE, ...RELEASE];
