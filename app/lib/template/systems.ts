/**
 * Names of the systems that can be opened, presets for common work, and what is not an opening at all.
 */
import type { SystemKey } from "#app/lib/template/types";

export const SYSTEM_NAMES: Record<SystemKey, string> = {
  mount: "Engine mount",
  fuelsup: "Fuel, tank to firewall",
  fueleng: "Fuel, forward of the firewall",
  oil: "Oil lines, pump, cooler, tank",
  oilfill: "Oil drain, filter, quantity",
  coolant: "Coolant",
  drive: "Gearbox or belt drive",
  ign: "Ignition source, switch, timing",
  plugs: "Plugs and leads",
  ecu: "Engine computer",
  map: "Computer's map tables",
  elec: "Electrical",
  induct: "Induction",
  exh: "Exhaust",
  ctl: "Engine controls",
  air: "Cooling air",
  prop: "Propeller",
  instr: "Instruments and log",
  restr: "Restraint",
  site: "Site",
  crew: "Crew",
  bay: "Engine bay",
};

export interface OpeningPreset {
  key: string;
  name: string;
  systems: SystemKey[];
}

const preset = (key: string, name: string, ...systems: SystemKey[]): OpeningPreset => ({ key, name, systems: withBay(systems) });

/** Every opening also opens the bay: hands were in it. */
export function withBay(systems: SystemKey[]): SystemKey[] {
  return systems.includes("bay") ? systems : [...systems, "bay"];
}

export const OPENING_PRESETS: OpeningPreset[] = [
  preset("oil-change", "Oil and filter change", "oilfill"),
  preset("plugs-out", "Plugs out, compression test", "plugs"),
  preset("fuel-filter", "Fuel filter or strainer", "fueleng"),
  preset("fuel-tank", "Fuel tank, valve or vent", "fuelsup"),
  preset("metering", "Carburettor or injector", "fueleng", "induct"),
  preset("oil-line", "Oil hose or cooler", "oil"),
  preset("ignition", "Magneto, ignition source or timing", "ign"),
  preset("map", "Map tables changed", "map"),
  preset("computer", "Computer: firmware, trigger, scaling, wiring", "ecu", "map"),
  preset("propeller", "Propeller, pitch gear or governor", "prop"),
  preset("gearbox", "Gearbox or belt drive", "drive", "prop"),
  preset("mount-bolt", "Mount bolt", "mount", "ctl"),
  preset("sender", "Sender or display setting", "instr"),
  preset("wiring", "Battery or wiring", "elec"),
  preset("aircraft-moved", "Aircraft moved", "restr", "site"),
  preset("new-operator", "Another operator", "crew"),
  preset("hand-in-bay", "Hand in the bay after the walk-round", "bay"),
];

/** Work that opens nothing; shown beside the presets so that nobody records it as one. */
export const NOT_OPENINGS: string[] = [
  "Cowl off or on, before the walk-round",
  "Refuelling, topping up, drawing a sample",
  "Charging the battery",
  "Checking a torque without loosening",
  "Restoring the loose ends that the oil prime or the held pitch offered",
];
