/**
 * From stretches to path data: corners become bends, flow ends in a front line where full meets empty.
 */
import type { Point, Stretch } from "#app/components/line/pipes";

export interface Pipework {
  /** All pipes, for wall and bore. */
  pipes: string;
  /** Full stretches, each a path of its own so that new ones can be told from old ones. */
  flow: string[];
  /** Lines across the pipe where the flow stops. */
  fronts: string;
}

const BEND = 13;
/** Flow stops short of an empty pipe, and runs a little into a tee so that no gap shows. */
const SHORT = 6;
const INTO_TEE = 4;

type End = "from" | "to";
interface Joint {
  stretch: Stretch;
  end: End;
}

const r = (n: number) => Math.round(n * 10) / 10;
const text = (p: Point) => `${r(p[0])} ${r(p[1])}`;
const other = (end: End): End => (end === "from" ? "to" : "from");
const lies = (s: Stretch) => s.from[1] === s.to[1];

/** Corners of exactly two stretches become bends; more than two stay tees. */
export function drawPipework(input: Stretch[]): Pipework {
  const joints = findJoints(input);
  const drawn = new Map<Stretch, { from: Point; to: Point }>(input.map((s) => [s, { from: s.from, to: s.to }]));
  const bends: { d: string; full: boolean }[] = [];

  for (const [first, second, third] of joints.values()) {
    if (!first || !second || third || lies(first.stretch) === lies(second.stretch)) continue;
    const corner = first.stretch[first.end];
    const start = towards(corner, first.stretch[other(first.end)], BEND);
    const stop = towards(corner, second.stretch[other(second.end)], BEND);
    for (const [joint, p] of [
      [first, start],
      [second, stop],
    ] as const) {
      const shape = drawn.get(joint.stretch);
      if (shape) shape[joint.end] = p;
    }
    bends.push({ d: `M${text(start)}Q${text(corner)} ${text(stop)}`, full: first.stretch.full && second.stretch.full });
  }

  const fronts: string[] = [];
  const flowEnd = (stretch: Stretch, end: End): Point => {
    const shape = drawn.get(stretch) ?? stretch;
    const p = shape[end];
    const q = shape[other(end)];
    const long = Math.hypot(p[0] - q[0], p[1] - q[1]) || 1;
    const u: Point = [(p[0] - q[0]) / long, (p[1] - q[1]) / long];
    const meeting = joints.get(text(stretch[end])) ?? [];
    const meetsEmpty = meeting.length > 1 && meeting.some((joint) => !joint.stretch.full);
    if (meetsEmpty) {
      const stop: Point = [p[0] - u[0] * SHORT, p[1] - u[1] * SHORT];
      fronts.push(`M${r(stop[0] - u[1] * 5)} ${r(stop[1] - u[0] * 5)}L${r(stop[0] + u[1] * 5)} ${r(stop[1] + u[0] * 5)}`);
      return stop;
    }
    return meeting.length > 2 ? [p[0] + u[0] * INTO_TEE, p[1] + u[1] * INTO_TEE] : p;
  };

  const line = (from: Point, to: Point) => `M${text(from)}L${text(to)}`;
  return {
    pipes: [...[...drawn.values()].map((s) => line(s.from, s.to)), ...bends.map((b) => b.d)].join(""),
    flow: [
      ...input.filter((s) => s.full).map((s) => line(flowEnd(s, "from"), flowEnd(s, "to"))),
      ...bends.filter((b) => b.full).map((b) => b.d),
    ],
    fronts: fronts.join(""),
  };
}

function findJoints(stretches: Stretch[]): Map<string, Joint[]> {
  const joints = new Map<string, Joint[]>();
  for (const stretch of stretches)
    for (const end of ["from", "to"] as const) {
      const key = text(stretch[end]);
      const list = joints.get(key);
      if (list) list.push({ stretch, end });
      else joints.set(key, [{ stretch, end }]);
    }
  return joints;
}

function towards(p: Point, q: Point, by: number): Point {
  const long = Math.hypot(q[0] - p[0], q[1] - p[1]) || 1;
  return [p[0] + ((q[0] - p[0]) / long) * by, p[1] + ((q[1] - p[1]) / long) * by];
}
