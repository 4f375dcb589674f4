/**
 * Items of the gates FS, OC and PR: fuel supply, oil and coolant, propeller.
 */
import {
  atLeast,
  atMost,
  COMMON,
  type ItemRow,
  item,
  makers,
  only,
  photo,
  standard,
  tick,
  tickAgainst,
  torque,
} from "#app/lib/template/rows";

const CLEARANCE = standard("14 CFR 23.925, before amendment 23-64");

const FUEL_SUPPLY: ItemRow[] = [
  item("FS1", "K2", ["fuelsup"], "Pass air through every tank vent: open, pointing the right way, no low spot that traps fuel.", [tick]),
  item("FS2", "K", ["fuelsup"], "Turn the fuel valve through every position: OFF stops the flow, each position feeds the tank it names.", [
    tick,
  ]),
  item(
    "FS3",
    "K2",
    ["fuelsup"],
    "Follow the fuel return in every valve position: it reaches the tank that feeds, or a placard gives the rule.",
    [tick],
    {
      when: "return",
    },
  ),
  item("FS4", "", ["fuelsup"], "Flush the fuel lines through a paper filter: paper and strainers come out clean.", [
    atLeast("Fuel passed through the paper", "volume", 1, "L", COMMON),
    photo("Paper and strainers after the flush"),
  ]),
  item(
    "FS5",
    "",
    ["fuelsup"],
    "Go along the fuel lines: hose right for the fuel and in date, unions tight and painted, strainers in, drains shut.",
    [tick],
  ),
  item("FS6", "", ["fuelsup"], "With full tanks, leave paper at each union for 30 min: every paper is dry.", [tick]),
];

const OIL_COOLANT: ItemRow[] = [
  item(
    "OC1",
    "",
    ["oilfill"],
    "Fill with oil of the maker's grade: the quantity is inside the maker's band.",
    [makers("Oil in the engine", "volume")],
    { when: "oilsys" },
  ),
  item(
    "OC2",
    "K2",
    ["oil"],
    "Trace each oil line end to end: in, out, cooler and thermostat as drawn, suction and return not swapped.",
    [tick],
    {
      when: "oilsys",
    },
  ),
  item(
    "OC3",
    "",
    ["oilfill"],
    "Look at oil filter and drain plug: right filter and by-pass, one gasket, turned home, both locked.",
    [photo("Filter and drain plug, locked")],
    { when: "oilsys" },
  ),
  item("OC4", "", ["oil"], "Follow the breather and the oil tank's vent to the end: open, no low spot.", [tick], { when: "oilsys" }),
  item(
    "OC5",
    "K",
    ["oil"],
    "Fill the suction line by the maker's method: full of oil right to the pump.",
    [tickAgainst("How the maker has the suction line filled")],
    { when: "dry" },
  ),
  item(
    "OC6",
    "",
    ["coolant"],
    "Mix and cap right, bled at the highest point, thermostat vented: hold cap pressure for 15 min and read the drop.",
    [atMost("Pressure lost in 15 min", "pressure", 5, "kPa", COMMON)],
    { when: "wetcool", caution: "Never open a hot cap." },
  ),
  item(
    "OC7",
    "",
    ["drive"],
    "Fill the gearbox to its mark; measure friction torque, with play or belt tension, by the maker's method: in band.",
    [makers("Friction torque", "torque")],
    { when: "geared" },
  ),
  item("OC8", "K", ["oil", "oilfill"], "Fill the two-stroke oil tank and bleed the line to its pump: vent open, no bubble left.", [tick], {
    when: "oilinj",
  }),
];

const PROPELLER: ItemRow[] = [
  item("PR1", "K2", ["prop"], "Torque the propeller bolts in the maker's sequence: every one in the maker's band.", [
    torque("Propeller bolts"),
  ]),
  item(
    "PR2",
    "K2",
    ["prop", "elec"],
    "Run the pitch drive: dies with switch and with breaker, stops at both ends, stays where it was cut.",
    [tick],
    {
      when: "cselec",
    },
  ),
  item(
    "PR3",
    "2",
    ["prop"],
    "Set the propeller to the pitch for runs 1 to 3 and hold it there: the drive cannot move it.",
    [makers("Blade angle as held", "angle")],
    {
      when: "cselec",
      step: { endedBy: null },
      offersLooseEnd: { what: "Propeller pitch held for runs 1 to 3", system: "prop", dueRung: "4" },
    },
  ),
  item(
    "PR4",
    "",
    ["prop"],
    "Look over the propeller: locked, painted, blades unhurt and right for this rotation, spinner true and clear.",
    [photo("Propeller, locked and painted")],
  ),
  item(
    "PR5",
    "",
    ["prop"],
    "Turn the propeller past a fixed pointer: the tips follow one track.",
    [
      only("metal", atMost("Spread of the tips", "length", 1.6, "mm", standard("AC 20-37, as taught: 1/16 in for metal blades"))),
      only("wood", atMost("Spread of the tips", "length", 3.2, "mm", standard("1/8 in for wooden blades, as taught; weakly sourced"))),
      only("composite", makers("Spread of the tips", "length")),
    ],
    { caution: "One plug out of each cylinder and chocks in before the propeller is touched." },
  ),
  item("PR6", "", ["prop"], "Set the aircraft level and measure from the lowest tip to the ground: clear enough.", [
    only("nose", atLeast("Tip to ground, level", "length", 178, "mm", CLEARANCE)),
    only("tail", atLeast("Tip to ground, level", "length", 229, "mm", CLEARANCE)),
  ]),
  item(
    "PR7",
    "",
    ["prop"],
    "Measure every blade's angle at the same station: they agree.",
    [atMost("Spread of blade angles", "angle", 0.3, "deg", COMMON)],
    { when: "groundadj" },
  ),
];

export const SUPPLY_ITEMS: ItemRow[] = [...FUEL_SUPPLY, ...OIL_COOLANT, ...PROPELLER];
