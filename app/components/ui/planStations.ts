/** Where each position stands on the floor plan: pure geometry in the plan's units, 572 wide, aircraft at 286, 196. */

export type PlanPosition = "operator" | "runlead" | "fireguard" | "areaguard" | "observer" | "recorder" | "swinger";

/**
 * Guards stand outboard, clear of the propeller's plane, with a way in that does not pass it; the area guard at the line,
 * looking out; the recorder behind it (the readiness template's positions). Several of one position take the places in turn.
 */
const PLACES: Record<PlanPosition, [number, number][]> = {
  operator: [[286, 196]],
  runlead: [
    [46, 152],
    [46, 204],
  ],
  fireguard: [
    [526, 142],
    [526, 242],
    [46, 256],
    [526, 292],
  ],
  areaguard: [
    [130, 384],
    [440, 384],
    [40, 384],
  ],
  observer: [
    [104, 266],
    [470, 266],
  ],
  recorder: [
    [216, 412],
    [160, 412],
  ],
  swinger: [[218, 44]],
};

/** Behind a pusher's wing the propeller turns: these stand ahead of it. */
const PUSHER_PLACES: Partial<typeof PLACES> = {
  fireguard: [
    [526, 142],
    [526, 204],
    [46, 256],
  ],
  observer: [
    [128, 182],
    [444, 182],
  ],
};

/** Each station with its place; past the known places of a position the next ones stand beside the last. */
export function placeStations<T extends { position: PlanPosition; letter: string }>(stations: T[], pusher: boolean) {
  const taken: Partial<Record<PlanPosition, number>> = {};
  return stations.map((station) => {
    const n = taken[station.position] ?? 0;
    taken[station.position] = n + 1;
    const places = (pusher && PUSHER_PLACES[station.position]) || PLACES[station.position];
    const [x, y] = places[Math.min(n, places.length - 1)] ?? [286, 414];
    return { station, x: x + Math.max(0, n - places.length + 1) * 44, y, key: `${station.position}-${n}` };
  });
}
