/**
 * The crew's positions at a run, and which of them one person may hold together.
 */
import type { CrewRule, PositionDef, PositionKey, Traits } from "#app/lib/template/types";

export const POSITIONS: PositionDef[] = [
  {
    key: "operator",
    name: "Operator",
    letter: "O",
    place: "In the seat",
    duty: "Hands on throttle and ignition; does what the run lead calls, stops at any STOP.",
  },
  {
    key: "runlead",
    name: "Run lead",
    letter: "L",
    place: "To the side, seen by the operator",
    duty: "Calls the card step by step; the only one who says when anybody moves.",
  },
  {
    key: "fireguard",
    name: "Fire guard",
    letter: "F",
    place: "Outboard of the propeller's plane, extinguisher in hand",
    duty: "Watches for fire; goes in only when the propeller has stopped.",
  },
  {
    key: "areaguard",
    name: "Area guard",
    letter: "A",
    place: "At the line, looking out",
    duty: "Keeps people and dogs outside; calls STOP when anybody comes in.",
  },
  {
    key: "observer",
    name: "Observer",
    letter: "B",
    place: "To the side, sees belly and bay",
    duty: "Looks for leaks, smoke, slack straps and moving wheels.",
  },
  { key: "recorder", name: "Recorder", letter: "R", place: "Behind the line", duty: "Keeps clock, marks and readings on the card." },
  {
    key: "swinger",
    name: "Swinger",
    letter: "S",
    place: "At the propeller for the start, then clear to the side",
    duty: "Swings by the agreed words only; out of the arc before power.",
  },
];

const FULL_CREW_RUNGS = ["1", "5"];

/** Who is wanted for a run of this rung. On the first start and at full power the run lead does nothing else. */
export function crewRule(rung: string, traits: Traits): CrewRule {
  const full = FULL_CREW_RUNGS.includes(rung);
  const swinger = traits.starter === "hand";
  const wanted: PositionKey[] = ["operator", "runlead", "fireguard", "areaguard", "observer", "recorder"];
  if (swinger) wanted.push("swinger");
  const mayAlso: CrewRule["mayAlso"] = [["observer", "recorder"]];
  if (!full) mayAlso.push(["runlead", "observer"], ["runlead", "recorder"]);
  return { people: (full ? 5 : 4) + (swinger ? 1 : 0), wanted: wanted.map((position) => ({ position, count: 1 })), mayAlso };
}
