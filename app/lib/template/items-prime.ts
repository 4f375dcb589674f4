/**
 * Items of the gates FP and OP: fuel flow and prime, oil prime. The steps among them are true only while the work goes on.
 */
import { atLeast, atMost, COMMON, type ItemRow, item, makers, only, reading, sheet, tick, torque } from "#app/lib/template/rows";

const ANGLE = "nose 5 deg above the steepest climb.";

const FUEL_PRIME: ItemRow[] = [
  item("FP1", "K", [], "Outdoors, kill ignition and coils; man an extinguisher and put a tray under, before any fuel moves.", [tick], {
    step: { endedBy: "FP7" },
  }),
  item("FP2", "", ["fuelsup"], `Measure the flow of each pump alone from a low tank, ${ANGLE}`, [sheet("fuel-flow")], {
    follows: ["FP1"],
    guarded: true,
    wordsWhen: [
      ["gravity", `Measure the gravity flow at the carburettor's inlet from a low tank, ${ANGLE}`],
      ["enginepump", `Measure the flow at the engine pump's inlet from a low tank, ${ANGLE}`],
    ],
    source: "AC 90-89A",
    caution: "Fuel runs free: no switch, no spark, catch every drop.",
  }),
  item(
    "FP3",
    "",
    ["fuelsup", "fueleng"],
    "Run each electric pump alone and read fuel pressure at the engine: inside the band.",
    [
      makers("Fuel pressure", "pressure", {
        places: "each-electric-pump",
        limits: [
          { key: "fuelPressureMin", end: "min" },
          { key: "fuelPressureMax", end: "max" },
        ],
      }),
    ],
    { when: "epump", follows: ["FP1"], guarded: true, caution: "Eyes covered: a loose union sprays." },
  ),
  item(
    "FP4",
    "K2",
    ["fuelsup", "fueleng"],
    "Run each pump and watch the return at the tank that feeds: fuel comes back.",
    [
      tick,
      only("epump", reading("Return flow", "volumeFlow", "each-electric-pump", true)),
      only("enginepump", reading("Return flow", "volumeFlow", "one", true)),
    ],
    { when: "return", follows: ["FP1"], guarded: true },
  ),
  item("FP5", "", ["fueleng"], "Let fuel to the carburettor for 5 min: bowls fill, floats shut, nothing overflows.", [tick], {
    when: "carb",
    follows: ["FP1"],
    guarded: true,
  }),
  item("FP6", "", ["fueleng"], "Lever at cut-off, pump on: no fuel reaches the nozzles.", [tick], {
    when: "mechinj",
    follows: ["FP1"],
    guarded: true,
  }),
  item(
    "FP7",
    "2",
    ["fueleng"],
    "After 5 min at pressure, look ahead of the firewall: unions painted and dry, strainer in; note the fall, pump off.",
    [tick, only("!gravity", reading("Fall of pressure, pump off", "pressureRate", "one", true))],
    {
      follows: ["FP1", "FP2", "FP3", "FP4", "FP5", "FP6"],
      guarded: true,
      wordsWhen: [["gravity", "After 5 min with the valve open, look ahead of the firewall: unions painted and dry, strainer in."]],
    },
  ),
  item("FP8", "K2", ["fueleng"], "Look at the intake drain and the lowest plugs: no fuel in intake or cylinders.", [tick], {
    when: "inj|low|2s",
    follows: ["FP7"],
    caution: "Fuel in a cylinder stops the piston and bends the rod. Never turn it to find out.",
  }),
];

const OIL_PRIME: ItemRow[] = [
  item(
    "OP1",
    "",
    [],
    "Take one plug out of each cylinder and count them by cylinder: as many out as there are cylinders.",
    [{ kind: "tally", mode: "out", expected: "cylinders", words: { out: "plugs out", in: "plugs in" } }],
    {
      step: { endedBy: "OP10" },
      wordsWhen: [
        ["diesel", "Take the glow plug out of each cylinder and count them: as many out as there are cylinders."],
        ["rotary", "Take one plug out of each rotor's housing and count them: as many out as there are rotors."],
      ],
    },
  ),
  item("OP2", "K2", [], "Make it dead: ignition off, supply pulled or leads grounded, injectors unplugged, pumps and fuel off.", [tick], {
    step: { endedBy: "OP11" },
    offersLooseEnd: { what: "Ignition supply, leads and injectors made dead for cranking", system: "ign", dueGate: "OP" },
  }),
  item("OP3", "K2", [], "Look into each cylinder and drain it, then two turns by hand the way it runs: no stop.", [tick], {
    step: { endedBy: "OP10" },
  }),
  item(
    "OP4",
    "K",
    ["oil"],
    "Crank in short bursts until oil pressure shows; none by the time to give up: stop and find the cause.",
    [only("estart", { kind: "crank", giveUpAfter: 60, basis: COMMON }), only("hand", tick)],
    {
      follows: ["OP1", "OP2", "OP3"],
      guarded: true,
      wordsWhen: [["hand", "Raise oil pressure with a pressure pot or by pulling through, plugs out: the gauge shows it."]],
      caution: "The propeller turns: arc clear, chocks in, nobody in line with a plug hole.",
    },
  ),
  item("OP5", "", ["oil"], "Look into the oil tank: oil is seen coming back.", [tick], { when: "dry", follows: ["OP4"], guarded: true }),
  item(
    "OP6",
    "",
    ["oil"],
    "Read the oil level after cranking and top up: inside the band, no leak anywhere.",
    [makers("Oil level", "volume")],
    {
      follows: ["OP4"],
    },
  ),
  item(
    "OP7",
    "",
    ["elec"],
    "In a burst, read the lowest bus volts: ignition and computers would stay awake.",
    [
      only("ecu", makers("Lowest bus volts", "voltage", { limits: [{ key: "ecuVoltsMin", end: "min" }] })),
      only("!ecu", atLeast("Lowest bus volts", "voltage", 10, "V", COMMON)),
    ],
    {
      when: "estart&powered",
      follows: ["OP1", "OP2", "OP3"],
      guarded: true,
      caution: "The propeller turns: meter clipped on before, hands out of the arc.",
    },
  ),
  item(
    "OP8",
    "",
    ["elec"],
    "In a burst, read volts from crankcase to battery minus: the earth path carries the starter.",
    [atMost("Crankcase to battery minus", "voltage", 0.2, "V", COMMON)],
    {
      when: "estart",
      follows: ["OP1", "OP2", "OP3"],
      guarded: true,
      caution: "The propeller turns: meter clipped on before, hands out of the arc.",
    },
  ),
  item(
    "OP9",
    "2",
    ["ign", "ecu"],
    "Plugs out, ignition live for this only: read the timing by strobe from outside the arc, against the computer.",
    [makers("Strobe less computer (2 deg either way is usual)", "angle")],
    {
      when: "powered&!diesel",
      follows: ["OP1", "OP3", "OP4"],
      guarded: true,
      caution: "Ignition live and propeller turning: fuel off, air clear of vapour, plugs grounded away from the holes.",
    },
  ),
  item(
    "OP10",
    "K2",
    ["plugs"],
    "Put the plugs back and torque them: as many in as came out.",
    [{ kind: "tally", mode: "in", of: "OP1", words: { out: "plugs out", in: "plugs in" } }, torque("Plugs", "cylinders")],
    { follows: ["OP4", "OP7", "OP8", "OP9"] },
  ),
  item("OP11", "2", ["plugs"], "Put leads and injectors back as marked and restore what was made dead: each on its own cylinder.", [tick], {
    follows: ["OP10"],
  }),
];

export const PRIME_ITEMS: ItemRow[] = [...FUEL_PRIME, ...OIL_PRIME];
