/**
 * What the drawings of the bench show: shares and texts, worked out from the inputs that made the result.
 * Pure; lengths and places on the paper are the drawings' own business.
 */
import type { BenchKey } from "#app/lib/bench/bench-def";
import { check } from "#app/lib/bench/check";
import { restraintSchema } from "#app/lib/bench/restraint-input";
import { burstsIn } from "#app/lib/bench/sheet-crank";
import { flowsIn } from "#app/lib/bench/sheet-fuel-flow";
import { restraintNumbers } from "#app/lib/bench/sheet-restraint";
import { fromSI } from "#app/lib/units/convert";
import { format, type UnitSystem } from "#app/lib/units/display";

export interface StrapDrawn {
  name: string;
  /** rad */
  elevation: number;
  azimuth: number;
  force: string;
}

/** Demand over engine speed; speeds in rpm, forces as shares of the chart's height. */
export interface ThrustChart {
  mostRpm: number;
  demand: { rpm: number; share: number }[];
  holding: { share: number; text: string };
  planned: number;
  cap: number;
  capBy: "the lines" | "nosing over";
  forces: { share: number; text: string }[];
}

export type Drawing =
  | { kind: "restraint"; straps: StrapDrawn[]; chart: ThrustChart }
  | { kind: "fuel"; required: { share: number; text: string }; bars: { label: string; share: number; text: string; counts: boolean }[] }
  | { kind: "torque"; wrench: string; adapter: string; angle: number; reach: number }
  | { kind: "crank"; end: number; bursts: { from: number; to: number; pressure: number | null }[]; endText: string };

export function drawingOf(key: BenchKey, inputs: Record<string, unknown>, units: UnitSystem): Drawing | null {
  if (key === "restraint") return restraintDrawing(inputs, units);
  if (key === "fuel-flow") return fuelDrawing(inputs, units);
  if (key === "torque") return torqueDrawing(inputs, units);
  return key === "crank" ? crankDrawing(inputs) : null;
}

const POINTS = 40;

function restraintDrawing(inputs: unknown, units: UnitSystem): Drawing | null {
  const checked = check(restraintSchema, inputs);
  if (!checked.ok) return null;
  const { value } = checked;
  const n = restraintNumbers(value);
  const most = 1.15 * Math.max(value.planned, Math.min(n.cap, 1.6 * value.planned), value.reference);
  const demandAt = (rotation: number) => value.factor * n.thrustReference * (rotation / value.reference) ** 2 + n.steady;
  const top = 1.08 * Math.max(demandAt(most), n.holding);
  const step = roundStep(fromSI(top, units === "si" ? "N" : "lbf") / 4);
  const perUnit = top / fromSI(top, units === "si" ? "N" : "lbf");
  const marks = Array.from({ length: 5 }, (_, i) => i * step * perUnit).filter((force) => force <= top);
  return {
    kind: "restraint",
    straps: value.straps.map(({ name, elevation, azimuth }, i) => ({
      name,
      elevation,
      azimuth,
      force: format("force", n.lines[i]?.force ?? 0, units).text,
    })),
    chart: {
      mostRpm: fromSI(most, "rpm"),
      demand: Array.from({ length: POINTS + 1 }, (_, i) => {
        const rotation = (most * i) / POINTS;
        return { rpm: fromSI(rotation, "rpm"), share: demandAt(rotation) / top };
      }),
      holding: { share: n.holding / top, text: `holding ${format("force", n.holding, units).text}` },
      planned: fromSI(value.planned, "rpm"),
      cap: fromSI(n.cap, "rpm"),
      capBy: n.nose !== null && n.nose.cap < n.lineCap ? "nosing over" : "the lines",
      forces: marks.map((force) => ({ share: force / top, text: format("force", force, units).text })),
    },
  };
}

/** 1, 2 or 5 times a power of ten, the next one up. */
function roundStep(rough: number): number {
  const power = 10 ** Math.floor(Math.log10(rough));
  return ([1, 2, 5, 10].find((n) => n * power >= rough) ?? 10) * power;
}

function fuelDrawing(inputs: unknown, units: UnitSystem): Drawing | null {
  const read = flowsIn(inputs);
  if (!read) return null;
  const most = 1.1 * Math.max(read.required, ...read.pumps.flatMap((pump) => pump.flows));
  return {
    kind: "fuel",
    required: { share: read.required / most, text: `asked ${format("volumeFlow", read.required, units).text}` },
    bars: read.pumps.flatMap(({ name, flows, counted }) =>
      flows.map((flow, i) => ({
        label: `${name} ${i + 1}`,
        share: flow / most,
        text: format("volumeFlow", flow, units).text,
        counts: i >= flows.length - counted,
      })),
    ),
  };
}

function torqueDrawing(inputs: Record<string, unknown>, units: UnitSystem): Drawing | null {
  const { wrench, extension, angle } = inputs;
  if (typeof wrench !== "number" || typeof extension !== "number" || typeof angle !== "number" || extension === 0) return null;
  return {
    kind: "torque",
    wrench: `L ${format("length", wrench, units).text}`,
    adapter: `E ${format("length", extension, units).text}`,
    angle,
    reach: Math.max(-0.8, Math.min(0.8, extension / wrench)),
  };
}

function crankDrawing(inputs: unknown): Drawing | null {
  const read = burstsIn(inputs);
  if (!read?.bursts.length || read.now === 0) return null;
  return {
    kind: "crank",
    end: read.now / 1000,
    endText: format("time", read.now / 1000, "si").text,
    bursts: read.bursts.map(({ at, seconds, pressureAfter }) => ({
      from: at / 1000,
      to: at / 1000 + seconds,
      pressure: pressureAfter === null ? null : at / 1000 + pressureAfter,
    })),
  };
}
