/** A restraint sheet for tests: its part, and evidence of a rig whose two straps take `pull` each. */
import { SHEET_VERSIONS } from "#app/lib/bench/sheet";
import type { Evidence } from "#app/lib/gates/snapshot";
import type { Part } from "#app/lib/template/types";

export const sheetPart: Part = { kind: "sheet", sheet: "restraint" };

const strap = (side: 1 | -1, pull: number) => ({
  ...{ name: side < 0 ? "Left strap" : "Right strap", pair: "A", elevation: 0.3, azimuth: side * 0.3 },
  ...{ wll: pull, anchor: "rated", rating: pull },
});

/**
 * With 3000 N a strap the rig holds to 57 rev/s, with 300 N to 18 rev/s, with 50 N to less than the planned 10 rev/s. `mass` is the
 * install's value that the sheet took.
 */
export function restraintEvidence(pull = 3000, mass = 500): Evidence {
  const air = { merit: 0.75, pressureAltitude: 0, temperature: 288.15 };
  const engine = { power: 60_000, reference: 45, reduction: 1, diameter: 1.7, ...air };
  const inputs = {
    planned: 10,
    factor: 1.5,
    mass,
    slope: 0,
    wheels: "none",
    gear: "nose",
    ...engine,
    straps: [strap(-1, pull), strap(1, pull)],
  };
  return { kind: "sheet", sheet: "restraint", version: SHEET_VERSIONS.restraint, inputs, took: { mass } };
}
