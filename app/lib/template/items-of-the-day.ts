/**
 * Items of the gates DY to WR: short-lived proofs of the day, made anew for each day or each start.
 */
import {
  atLeast,
  atMost,
  COMMON,
  computed,
  type ItemRow,
  item,
  makers,
  only,
  pairs,
  photo,
  reading,
  sheet,
  text,
  tick,
  tickAgainst,
} from "#app/lib/template/rows";

/** Some level to read: all but a two-stroke on premix, cooled by air and driven direct. */
export const HAS_LEVELS = "oilsys|wetcool|geared|oilinj";

const DAY: ItemRow[] = [
  item("DY1", "K", [], "Draw a sample at every fuel drain: right fuel, no water, no dirt; motor fuel passes the alcohol test.", [tick]),
  item("DY2", "K", [], "Measure the oil mixed into today's fuel: the maker's ratio.", [makers("Parts of fuel to one of oil", "ratio")], {
    when: "premix",
  }),
  item("DY3", "", [], "Dip the tank that feeds: fuel for today's run cards twice over.", [
    atLeast("Fuel in the feeding tank", "volume", 20, "L", COMMON, { limits: [{ key: "tankFeedMin", end: "min" }] }),
  ]),
  item(
    "DY4",
    "",
    [],
    "Read each level that this engine has: oil, coolant, gearbox, two-stroke oil, each at its mark.",
    [tickAgainst("Where each level's mark is, and read how: cold, hot, level")],
    { when: HAS_LEVELS },
  ),
  item(
    "DY5",
    "",
    [],
    "Measure the battery at rest, charger off and taken away: charged for the day.",
    [
      only("!lithium", atLeast("Battery at rest", "voltage", 12.4, "V", COMMON, { doubledAt24V: true })),
      only("lithium", atLeast("Battery at rest", "voltage", 13.2, "V", COMMON, { doubledAt24V: true })),
    ],
    { when: "elsys" },
  ),
  item("DY6", "", [], "Read oil or block temperature: above the cold-start minimum, or preheat first.", [
    makers("Oil or block", "temperature", { limits: [{ key: "coldStartMin", end: "min" }] }),
  ]),
];

const TIE_DOWN: ItemRow[] = [
  item("TD1", "K", ["restr"], "Work the restraint sheet as rigged for the day's highest rpm: it passes.", [sheet("restraint")], {
    wordsWhen: [["tail", "Work the restraint sheet as rigged for the day's highest rpm, nose-over too: it passes."]],
  }),
  item(
    "TD2",
    "K2",
    ["restr"],
    "Go along each strap: to main gear or hard point, not engine, mount or weak strut; label readable, no cut or knot.",
    [photo("Straps and where they are made fast")],
  ),
  item("TD3", "K2", ["restr"], "Sweep the propeller's reach: no strap, loose end, hook, chock rope or cover can get into it.", [tick]),
  item("TD4", "", ["restr"], "Tie the tail down and the stick back: read the load on the tail.", [reading("Load on the tail", "mass")], {
    when: "tail",
  }),
  item(
    "TD5",
    "",
    ["restr", "site"],
    "Chock each wheel both sides, ropes outboard, on firm, clean, dry, level, unpainted ground; mark tyre and ground.",
    [tick],
  ),
  item("TD6", "", ["restr"], "Push hard against the brakes: they hold, and the nosewheel is straight.", [tick], {
    wordsWhen: [["tail", "Push hard against the brakes: they hold, and the tailwheel is straight."]],
  }),
];

const FIRE_SITE: ItemRow[] = [
  item(
    "FI1",
    "K",
    ["site"],
    "Extinguishers: two or more of class B in date, one of them CO2 of 5 lb or clean agent; powder last, never water.",
    [computed("extinguishers")],
    { source: "FAA-H-8083-30 (fire guard with CO2 of at least 5 lb); the rest is common practice" },
  ),
  item("FI2", "K", ["site"], "Stand the guards outboard of the propeller's plane: seen by the operator, a way in that does not pass it.", [
    tick,
  ]),
  item("FI3", "", ["site"], "Outdoors, nose into wind: 30 m clear behind, 10 m round the aircraft swept.", [tick]),
  item("FI4", "", ["site"], "Mark the line 15 m off for onlookers, children and dogs; the propeller's plane is empty out to 50 m.", [tick]),
  item("FI5", "", ["site"], "Try the phone here, with spill kit and burn dressings laid out: help can be called and can find the gate.", [
    text("Number, address, gate, who calls"),
  ]),
];

const CREW: ItemRow[] = [
  item("CR1", "K2", ["crew"], "Operator, eyes shut, by touch: stop, runaway, fire at the start, fire running: every move right.", [tick]),
  item("CR2", "K2", ["crew", "ctl"], "Show two ways to stop that share no part: ignition or computer supply, and fuel.", [tick], {
    wordsWhen: [["diesel", "Show two ways to stop that share no part: fuel, and air."]],
  }),
  item(
    "CR3",
    "",
    ["crew"],
    "Time the operator from strapped in to outside, unaided, away from the propeller.",
    [atMost("Strapped in to outside", "time", 15, "s", COMMON)],
    { wordsWhen: [["pusher", "Time the operator from strapped in to outside, unaided, ahead of the aircraft."]] },
  ),
  item("CR4", "", ["crew"], "Lock the seat, fit the harness, work canopy or door: it cannot jam, slam or tear off.", [tick]),
  item("CR5", "", ["crew"], "Try radio and hand signals with every position: all know that 5 s without contact means stop.", [tick]),
  item(
    "CR6",
    "",
    ["crew"],
    "Eyes and ears covered, nothing loose or synthetic; each says place, way out, abort words; hands off while it runs.",
    [tick],
  ),
  item("CR7", "K2", ["crew"], "Swinger trained, footing dry, words agreed; a qualified hand on throttle and switch.", [tick], {
    when: "hand",
    caution: "Treat the propeller as live. Nobody swings who has not been taught it.",
  }),
];

const WALK_ROUND: ItemRow[] = [
  item("WR1", "K", ["bay"], "Set ignition, master and fuel off, throttle shut, lever at cut-off; from here the card says what comes on.", [
    tick,
  ]),
  item("WR2", "K", ["bay"], "Count tools, torch, mirror and rags: as many back as went out.", [pairs("out on the job", "back")]),
  item("WR9", "", ["bay"], "Look wherever hands have been since the last walk-round: locked, clamped, clear of exhaust and edges.", [tick]),
  item("WR3", "K2", ["bay"], "Covers, bungs, tow bar off; intake, exhaust, vents open; oil, coolant and fuel caps on, dipstick home.", [
    tick,
  ]),
  item("WR4", "", ["bay"], "Loose ends: each is restored, or accepted for this rung.", [computed("loose-ends")]),
  item(
    "WR5",
    "2",
    ["bay"],
    "Engine cold, pull through two turns the way it runs, after any fuel prime: no stop; if it stops, drain it.",
    [tick],
    {
      when: "low|inj|2s",
      wordsWhen: [["low", "After 30 min standing, engine cold, pull through two turns the way it runs: no stop; if it stops, drain it."]],
      source: "hydraulic lock after 30 min standing: FAA handbook practice (from memory)",
      caution: "Ignition off and it can still fire: stand to swing, arc clear, never force a stop.",
    },
  ),
  item("WR6", "", ["bay", "restr"], "Pull on each strap and push each chock: tight and home.", [tick], {
    wordsWhen: [["tail", "Pull on each strap and push each chock: tight and home, the tail held."]],
  }),
  item("WR7", "", ["bay"], "Fuel on for 5 min: no drip and no smell, in the bay or the cockpit.", [tick]),
  item("WR8", "", ["bay"], "Cowl as the card says; cockpit clear of loose things, pedals free, log running.", [tick]),
];

export const DAY_ITEMS: ItemRow[] = [...DAY, ...TIE_DOWN, ...FIRE_SITE, ...CREW, ...WALK_ROUND];
