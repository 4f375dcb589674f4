/**
 * Stretches of pipe between valves, headers and collector, each full or empty. The same walk serves both Lines: `main`
 * is the coordinate along the flow, `across` the one over the lanes; a frame says what they are on the drawing.
 */
import type { Flow } from "#app/components/line/flow";
import { at } from "#app/components/line/graph";
import type { Header } from "#app/components/line/headers";
import type { LineLayout } from "#app/components/line/layout";

export type Point = [x: number, y: number];

export interface Stretch {
  from: Point;
  to: Point;
  full: boolean;
}

export interface Frame {
  standing: boolean;
  /** Along the flow: centre of a gate's valve. */
  main: (gate: number) => number;
  /** Along the flow: a header. */
  track: (gap: number, track: number) => number;
  /** Over the lanes. */
  across: (lane: number) => number;
  /** Half the length of a valve's body. */
  half: number;
  /** Along the flow: the collector. */
  collector: number;
  /** Length of the blanked pipe before a gate that needs nothing. */
  inlet: number;
}

/** Where a pipe dives under a header, it is broken this far either side. */
const BREAK = 11;

interface HeaderRun {
  header: Header;
  at: number;
  a: number;
  b: number;
  full: boolean;
}

interface LaneRun {
  lane: number;
  a: number;
  b: number;
  full: boolean;
  /** Headers that it meets: it is cut at them and never dives under them. */
  own: Header[];
  cuts: number[];
}

const point = (frame: Frame, main: number, across: number): Point => (frame.standing ? [across, main] : [main, across]);

/** All pipes of the gates, up to the collector. A stretch is full only if everything that flows through it passes. */
export function gatePipes(layout: LineLayout, flow: Flow, frame: Frame): Stretch[] {
  const headers = layout.headers.flatMap((header) => headerRuns(layout, flow, frame, header));
  const stretches = laneRuns(layout, flow, frame).flatMap((run) => splitLane(run, headers, frame));
  for (const run of headers)
    stretches.push({ from: point(frame, run.at, frame.across(run.a)), to: point(frame, run.at, frame.across(run.b)), full: run.full });
  return stretches;
}

/** A header from tap to tap. In a merge flow gathers towards the gate's lane from both sides. */
function headerRuns(layout: LineLayout, flow: Flow, frame: Frame, header: Header): HeaderRun[] {
  const lane = (i: number) => at(layout.lane, i);
  const passes = (i: number) => at(flow.passes, i);
  const taps = [...new Set([...header.from, ...header.to].map(lane))].sort((a, b) => a - b);
  const target = lane(at(header.to, 0));
  return taps.slice(1).map((b, i) => {
    const a = at(taps, i);
    const full = header.merge
      ? header.from.every((s) => (a >= target ? lane(s) < b || passes(s) : b <= target ? lane(s) > a || passes(s) : true))
      : passes(at(header.from, 0));
    return { header, at: frame.track(header.gap, header.track), a, b, full };
  });
}

function laneRuns(layout: LineLayout, flow: Flow, frame: Frame): LaneRun[] {
  const place = (header: Header) => frame.track(header.gap, header.track);
  const into = (gate: number) => layout.headers.find((h) => h.to.includes(gate));
  return layout.ids.flatMap((_, gate) => {
    const runs: LaneRun[] = [];
    const lane = at(layout.lane, gate);
    const outlet = frame.main(gate) + frame.half;
    const fed = layout.headers.filter((h) => h.from.includes(gate));
    const heir = layout.heir[gate];
    const heirHeader = heir === undefined ? undefined : into(heir);
    let end = layout.ends.includes(gate) ? frame.collector : Math.max(outlet, ...fed.map(place));
    if (heir !== undefined) end = Math.max(end, heirHeader ? place(heirHeader) : frame.main(heir) - frame.half);
    if (end > outlet) {
      const own = heirHeader ? [...fed, heirHeader] : fed;
      runs.push({ lane, a: outlet, b: end, full: at(flow.passes, gate), own, cuts: own.map(place) });
    }
    const header = into(gate);
    const inlet = frame.main(gate) - frame.half;
    if (header) runs.push({ lane, a: place(header), b: inlet, full: at(flow.fed, gate), own: [header], cuts: [] });
    else if (at(layout.feeds, gate).length === 0) runs.push({ lane, a: inlet - frame.inlet, b: inlet, full: true, own: [], cuts: [] });
    return runs;
  });
}

/** Cuts a lane's pipe at its own headers and breaks it under foreign ones. */
function splitLane(run: LaneRun, headers: HeaderRun[], frame: Frame): Stretch[] {
  const y = frame.across(run.lane);
  const dives = headers
    .filter((h) => h.at > run.a + 1 && h.at < run.b - 1 && h.a < run.lane && h.b > run.lane && !run.own.includes(h.header))
    .map((h) => h.at)
    .sort((p, q) => p - q);
  const ends = [...new Set([run.a, ...run.cuts.filter((x) => x > run.a && x < run.b), run.b])].sort((p, q) => p - q);
  return ends.slice(1).flatMap((b, i) => {
    const out: Stretch[] = [];
    let a = at(ends, i);
    for (const x of dives.filter((x) => x > a && x < b)) {
      out.push({ from: point(frame, a, y), to: point(frame, x - BREAK, y), full: run.full });
      a = x + BREAK;
    }
    out.push({ from: point(frame, a, y), to: point(frame, b, y), full: run.full });
    return out;
  });
}

/**
 * The collector: a header of its own before the run pipe. Flow gathers in it towards its outlet, which lies above the
 * first lane (lying) or among the lanes (standing).
 */
export function collectorPipes(layout: LineLayout, flow: Flow, frame: Frame, outlet: number): Stretch[] {
  const ends = layout.ends.map((gate) => ({ at: frame.across(at(layout.lane, gate)), passes: at(flow.passes, gate) }));
  const cuts = [...new Set([...ends.map((end) => end.at), outlet])].sort((p, q) => p - q);
  return cuts.slice(1).map((b, i) => {
    const a = at(cuts, i);
    const full = ends.every((end) => end.passes || (a >= outlet ? end.at < b : end.at > a));
    return { from: point(frame, frame.collector, a), to: point(frame, frame.collector, b), full };
  });
}
