/**
 * Items of the gates MF to IX: mount and firewall, controls, electrical, ignition and computers, instruments, induction and exhaust.
 */
import {
  atLeast,
  atMost,
  COMMON,
  type ItemRow,
  item,
  makers,
  only,
  pairs,
  photo,
  text,
  tick,
  torque,
  within,
} from "#app/lib/template/rows";

const MOUNT: ItemRow[] = [
  item("MF1", "K2", ["mount"], "Torque the engine mount bolts at the engine and at the firewall: every one inside the maker's band.", [
    torque("Engine end"),
    torque("Firewall end"),
  ]),
  item("MF2", "K", [], "Count by place every blank, cap, bag, tape and drying plug that was put in: the same number has come out.", [
    pairs("put in", "taken out"),
  ]),
  item(
    "MF3",
    "",
    ["exh"],
    "Follow each line and wire ahead of the firewall: clamped, sleeve ends banded, clear of heat, edges, moving parts.",
    [photo("Lines and wires ahead of the firewall")],
  ),
  item("MF4", "", ["mount"], "Look at every mount nut: locked, with an unbroken stripe of witness paint.", [
    photo("Mount nuts with paint"),
  ]),
  item("MF5", "2", ["mount"], "Compare mount rubbers, washers and spacers with the drawing: none missing, each the right way round.", [
    tick,
  ]),
  item("MF6", "", ["mount", "elec"], "Look over the firewall: every hole closed fireproof, the engine's earth strap on clean bare metal.", [
    tick,
  ]),
];

const CONTROLS: ItemRow[] = [
  item(
    "EC1",
    "K2",
    ["ctl"],
    "Move the throttle end to end, watching the engine: both stops reached, stays put, free as the engine is rocked.",
    [tick],
  ),
  item("EC2", "", ["ctl"], "Find out which way the throttle goes when its cable parts: this is the runaway case on the card.", [
    text("Opens or closes when the cable parts"),
  ]),
  item("EC3", "K", ["ctl"], "Pull the mixture or stop lever right back: the arm on the engine reaches its cut-off stop.", [tick], {
    when: "mixctl",
  }),
  item("EC4", "K2", ["ctl"], "Look at each control end: locked, ball ends held by a large washer, nothing rubs over the full travel.", [
    photo("Control ends at the engine"),
  ]),
  item("EC5", "", ["ctl", "induct"], "Work the carburettor heat or alternate air: its door opens right up and shuts tight.", [tick], {
    when: "carb|altair",
  }),
  item(
    "EC6",
    "",
    ["ctl", "prop"],
    "Work the propeller lever: the governor arm reaches both stops, and lever forward is fine pitch.",
    [tick],
    { when: "cshyd" },
  ),
  item(
    "EC7",
    "K",
    ["ctl", "oil"],
    "Set the throttle where the oil pump's maker says: the pump's mark lines up, and the two move together.",
    [tick],
    {
      when: "oilinj",
    },
  ),
];

const ELECTRICAL: ItemRow[] = [
  item(
    "EL1",
    "K2",
    ["elec"],
    "With every switch off, measure at starter and bus: dead, the contactors have dropped out.",
    [atMost("Highest voltage left at starter or bus", "voltage", 0.1, "V", COMMON)],
    { when: "estart", caution: "Arc clear: a contactor that hangs turns the propeller." },
  ),
  item(
    "EL2",
    "",
    ["elec", "ign"],
    "With the master off, find what stays live and how each is killed; label it there.",
    [text("What stays live, and how it is killed")],
    {
      when: "powered|electric",
    },
  ),
  item(
    "EL3",
    "2",
    ["elec"],
    "Compare the battery with the drawing: strapped, covered, vented; polarity, main fuse and cable ends right.",
    [tick],
    {
      when: "elsys",
    },
  ),
  item(
    "EL4",
    "",
    ["elec"],
    "Run ignition, computer and pump for 5 min on the second supply alone: its volts hold to the end.",
    [
      only("ecu", makers("Volts after 5 min", "voltage", { limits: [{ key: "ecuVoltsMin", end: "min" }] })),
      only("!ecu", makers("Volts after 5 min", "voltage")),
    ],
    { when: "powered", caution: "Coils are live: hands off, no fuel vapour about, propeller clear." },
  ),
  item(
    "EL5",
    "",
    ["elec"],
    "Check the alternator: its output is fused, the field switch works, an over-voltage cut-out is fitted.",
    [tick],
    { when: "elsys" },
  ),
];

const IGNITION: ItemRow[] = [
  item(
    "IG1",
    "K2",
    ["ign"],
    "Take each grounding lead off at its source and measure it: OFF is earthed, ON is open; put the lead back.",
    [atMost("Lead to earth, switch OFF", "resistance", 1, "Ω", COMMON, { places: "each-grounded-source" })],
    { when: "ground", caution: "A source with its lead off is hot: one plug out of each cylinder first." },
  ),
  item(
    "IG2",
    "K2",
    ["ign"],
    "With the ignition off, measure at every coil: no volts at any of them.",
    [atMost("Highest voltage at a coil", "voltage", 0.1, "V", COMMON)],
    { when: "powered&!diesel" },
  ),
  item(
    "IG3",
    "2",
    ["ign", "ecu"],
    "Trace each lead, coil and injector plug to its cylinder, reading the order aloud: it matches the drawing.",
    [tick],
    {
      wordsWhen: [["diesel", "Trace each injector line and plug to its cylinder, reading the order aloud: it matches the drawing."]],
    },
  ),
  item(
    "IG4",
    "",
    ["ign"],
    "Turn the engine to its timing mark: each source fires at the maker's angle.",
    [makers("Timing before top dead centre", "angle", { places: "each-grounded-source" })],
    { when: "ground", caution: "Timing an ignition arms it: plugs out, arc clear." },
  ),
  item(
    "IG5",
    "",
    ["ecu", "map"],
    "Write down what the computer holds, and keep its file: another box can then be made the same.",
    [text("Firmware, map, injector size, trigger offset, rev limit, sensor scaling, where the file is kept")],
    { when: "ecu" },
  ),
  item(
    "IG6",
    "",
    ["ecu"],
    "Engine still: the computer's manifold pressure agrees with field pressure; throttle reads 0 and 100 %.",
    [within("Manifold pressure less field pressure", "pressure", 2, "kPa", COMMON)],
    { when: "ecu" },
  ),
  item("IG7", "", ["ecu", "elec"], "Wake the computer by itself: it comes up without a fault.", [tick], {
    when: "ecu",
    wordsWhen: [["ecu2", "Wake each computer alone, then take one away: no fault shown, and the other carries on."]],
  }),
  item("IG8", "", ["plugs"], "Torque the spark plugs: every one inside the maker's band.", [torque("Spark plugs", "plugs")], {
    when: "2s",
  }),
];

const INSTRUMENTS: ItemRow[] = [
  item("IN1", "2", ["instr"], "Read the display's limits, units and alarms aloud against the limits sheet: every one agrees.", [tick]),
  item(
    "IN2",
    "K",
    ["instr"],
    "Hand-pump the oil pressure sender to the minimum limit: the display agrees with the test gauge.",
    [within("Display less test gauge", "pressure", 20, "kPa", COMMON)],
    { when: "oilsys" },
  ),
  item("IN3", "", ["instr"], "Engine cold: compare each temperature with the air; pressures, flow and rpm read zero.", [
    atMost("Largest difference from the air, either way", "temperatureDifference", 3, "Δ°C", COMMON),
  ]),
  item("IN4", "", ["instr"], "Warm each temperature probe in turn: the right cylinder moves on the display.", [tick]),
  item("IN5", "", ["instr"], "Record a test log: its clock is right, the file opens here, pulses and gear ratio give engine rpm.", [tick]),
];

const INDUCTION_EXHAUST: ItemRow[] = [
  item("IX1", "K2", ["induct"], "Look through the intake from filter to engine: empty, every clamp held, the lowest drain open.", [tick]),
  item("IX2", "", ["exh"], "Torque the exhaust nuts: in band, gaskets in, slip and ball joints free, springs and hangers safe.", [
    torque("Exhaust nuts"),
  ]),
  item(
    "IX3",
    "",
    ["exh", "air"],
    "Measure the least gap from exhaust, or its shield, to cowl, hose and wire; put heat strips where it is tight.",
    [atLeast("Least gap", "length", 25, "mm", COMMON)],
  ),
  item("IX4", "", ["air"], "Look over baffles, seals and the ducts to cooler and radiator: closed, and pointing the right way.", [
    photo("Baffles, seals and ducts"),
  ]),
  item("IX5", "", ["exh"], "Open the cabin heat muff: the pipe inside is sound, and the cabin valve shuts fully.", [tick], {
    when: "cabinheat",
  }),
  item("IX6", "", ["exh", "oil"], "Spin the turbocharger by hand: free, wastegate moves, oil feed and drain are on.", [tick], {
    when: "turbo",
  }),
];

export const INSTALLATION_ITEMS: ItemRow[] = [...MOUNT, ...CONTROLS, ...ELECTRICAL, ...IGNITION, ...INSTRUMENTS, ...INDUCTION_EXHAUST];
