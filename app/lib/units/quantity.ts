/**
 * The kinds of quantity the product knows, and the SI unit in which each is stored and computed.
 * Values cross the edge of the program (form, screen, mail, print) through `convert.ts` and `display.ts` only.
 */
export const SI = {
  torque: "N·m",
  pressure: "Pa",
  temperature: "K",
  temperatureDifference: "K",
  volume: "m³",
  volumeFlow: "m³/s",
  massFlow: "kg/s",
  voltage: "V",
  current: "A",
  resistance: "Ω",
  angle: "rad",
  length: "m",
  area: "m²",
  mass: "kg",
  force: "N",
  speed: "m/s",
  power: "W",
  time: "s",
  /** Crankshaft speed in revolutions per second; shown as rpm. Propeller figures are converted by the reduction ratio first. */
  rotation: "1/s",
  pressureRate: "Pa/s",
  density: "kg/m³",
  specificFuel: "kg/J",
  count: "1",
  ratio: "1",
  /** Parts per million (cockpit CO) and percentages are ratios with their own display units. */
  fraction: "1",
} as const;

export type Quantity = keyof typeof SI;

/** An inclusive band in SI. A missing end is open. */
export interface Band {
  min: number | null;
  max: number | null;
}
