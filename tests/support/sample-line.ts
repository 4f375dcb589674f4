/** Gates of the template with the states of three moments of an invented install, for pictures and tests of the Line. */
import type { LineGate, LineProps, LineRun, LineStop } from "#app/components/line/types";
import type { RunState, ValveState } from "#app/components/ui/states";

type Told = [state: ValveState, note: string, part?: number, balloon?: number, full?: string];

const NETWORK: [id: string, name: string, short: string, needs: string[], after?: string[]][] = [
  ["MF", "Mount and firewall", "Mount", []],
  ["EC", "Engine controls", "Controls", ["MF"]],
  ["EL", "Electrical and starting", "Electrical", ["MF"]],
  ["IG", "Ignition, computers", "Ignition", ["EL"]],
  ["IN", "Instruments and log", "Instruments", ["EL"]],
  ["IX", "Induction, exhaust, cooling air", "Intake, exhaust", ["MF"]],
  ["FS", "Fuel supply sound", "Fuel supply", ["MF"]],
  ["OC", "Oil, coolant, gearbox", "Oil, coolant", ["MF"]],
  ["PR", "Propeller", "Propeller", ["MF"]],
  ["FP", "Fuel flow and prime", "Fuel prime", ["FS", "EL"], ["FS"]],
  ["OP", "Oil prime", "Oil prime", ["OC", "PR", "IG", "EL"]],
  ["DY", "Fuel, oil, battery of the day", "Day check", ["FP", "OP"]],
  ["TD", "Tie-down", "Tie-down", ["PR"]],
  ["FI", "Fire and site", "Fire and site", []],
  ["CR", "Crew and stop drill", "Crew drill", ["EC", "IG", "FI"]],
];

const RUNS: [key: string, name: string, rpmText: string, share: number][] = [
  ["1", "First start", "1,375 rpm", 0.5],
  ["2", "Change-over", "1,925 rpm", 0.7],
  ["3", "Middle power", "2,340 rpm", 0.85],
  ["4", "Propeller", "2,060 rpm", 0.75],
  ["5", "Full static", "2,750 rpm", 1],
  ["6", "Hot restart", "1,925 rpm", 0.7],
];

const signed = (day: string): Told => ["signed", `signed ${day}`];

function gate(id: string, name: string, short: string, needs: string[], after: string[], told: Told): LineGate {
  const [state, note, part = 0, balloon = null, full = note] = told;
  return { id, key: id, name, short, href: `/gates/${id}`, needs, after, state, note, part, balloon, full };
}

function gates(told: Record<string, Told>): LineGate[] {
  return NETWORK.map(([id, name, short, needs, after = []]) => gate(id, name, short, needs, after, told[id] ?? signed("24 Nov")));
}

const walkRound = (run: number, told: Told) => gate("WR", `Walk-round, run ${run}`, `Walk-round ${run}`, [], [], told);

const waits = (n: string): LineStop => ({ state: "waiting", note: `waits for run ${n}`, href: `/after/${n}` });

function runs(states: Record<string, RunState>, after: Record<string, LineStop> = {}): LineRun[] {
  return RUNS.map(([key, name, rpmText, share]) => ({
    id: `run-${key}`,
    key,
    name,
    href: `/runs/${key}`,
    rpmText,
    share,
    state: states[key] ?? "planned",
    spade: states[key] === "held",
    postRun: after[key] ?? waits(key),
    serviceBefore: key === "6" ? { state: "waiting", note: "waits for run 5", href: "/gates/SV" } : null,
    balloon: states[key] === "held" ? 1 : null,
  }));
}

const release: LineStop = { state: "waiting", note: "not yet", href: "/release" };

export const twoThings: LineProps = {
  gates: gates({
    FP: ["lapsed", "lapsed 3 Dec", 0, 1, "lapsed: fuel system opened 3 Dec 14:10 CET"],
    OP: ["in-work", "7 of 10 done", 0.7, 2, "in work: 7 of 10 done"],
    DY: ["waiting", "waits for 2"],
    FS: signed("3 Dec"),
    TD: signed("08:20"),
  }),
  walkRound: walkRound(1, ["waiting", "waits for 3"]),
  runs: runs({ "1": "next" }),
  release,
};

export const firstWeek: LineProps = {
  gates: gates({
    EC: ["in-work", "2 of 5 done", 0.4, 4],
    EL: ["half-signed", "half signed", 0, 2],
    IG: ["waiting", "waits for 1"],
    IN: ["waiting", "waits for 1"],
    IX: ["in-work", "1 of 6 done", 1 / 6, 5],
    FS: ["lapsed", "lapsed today", 0, 1, "lapsed: line 3 opened today 09:05 CET"],
    OC: ["in-work", "not begun", 0, 6],
    PR: ["ready", "ready to sign", 0, 3],
    FP: ["waiting", "waits for 2"],
    OP: ["waiting", "waits for 3"],
    DY: ["waiting", "waits for 2"],
    TD: ["waiting", "waits for 1"],
    FI: ["in-work", "not begun", 0, 7],
    CR: ["waiting", "waits for 3"],
  }),
  walkRound: walkRound(1, ["waiting", "waits for 15"]),
  runs: runs({ "1": "next" }),
  release,
};

export const heldBeforeRun3: LineProps = {
  gates: gates({}),
  walkRound: walkRound(3, ["signed", "signed 09:12"]),
  runs: runs(
    { "1": "reviewed", "2": "reviewed", "3": "held" },
    { "1": { state: "signed", note: "signed 6 Dec", href: "/after/1" }, "2": { state: "signed", note: "signed 12 Dec", href: "/after/2" } },
  ),
  release,
};

export const released: LineProps = {
  gates: gates({}),
  walkRound: null,
  runs: runs(
    Object.fromEntries(RUNS.map(([key]) => [key, "reviewed"])),
    Object.fromEntries(RUNS.map(([key]) => [key, { state: "signed", note: "signed 20 Dec", href: `/after/${key}` }])),
  ).map((run) => ({ ...run, serviceBefore: run.serviceBefore ? { state: "signed", note: "signed 19 Dec", href: "/gates/SV" } : null })),
  release: { state: "signed", note: "released 21 Dec", href: "/release" },
};

/** A two-stroke on a gravity tank: no oil gates, so their edges are gone; a new gate of the builder's own. */
export const fewGates: LineProps = {
  ...twoThings,
  gates: twoThings.gates.filter((g) => !["OP", "OC", "IN", "FI", "FS"].includes(g.id)),
};

export const oneGate: LineProps = { ...twoThings, gates: twoThings.gates.slice(0, 1), runs: twoThings.runs.slice(0, 1) };

/** Gates in layers, each fed by two of the layer before: the largest board that the product has to draw. */
export function manyGates(count: number, perLayer = 6): LineProps {
  const made = Array.from({ length: count }, (_, i) => {
    const layer = Math.floor(i / perLayer);
    const before = (j: number) => `G${(layer - 1) * perLayer + (j % perLayer)}`;
    const needs = layer === 0 ? [] : [before(i), before(i * 3 + layer)];
    return gate(`G${i}`, `Gate number ${i}`, `Gate ${i}`, needs, [], i % 7 === 3 ? ["in-work", "2 of 5 done", 0.4] : signed("24 Nov"));
  });
  return { ...twoThings, gates: made };
}
