/**
 * The lying Line, 1000 px and wider: gates from left to right, the collector gathers them, the runs stand at the right.
 * Pure: from gates to coordinates.
 */
import { findFlow } from "#app/components/line/flow";
import { at } from "#app/components/line/graph";
import { type LadderSizes, ladderPipe, type PlacedItem, placeLadder } from "#app/components/line/ladderPipe";
import { lineLayout } from "#app/components/line/layout";
import { clip, NAME_PX, NOTE_PX, textWidth, wrap } from "#app/components/line/measure";
import { collectorPipes, type Frame, gatePipes } from "#app/components/line/pipes";
import { drawPipework, type Pipework } from "#app/components/line/pipework";
import { runLadder } from "#app/components/line/runLadder";
import type { LineGate, LineProps } from "#app/components/line/types";

export interface DrawnGate {
  gate: LineGate;
  x: number;
  y: number;
  name: string[];
  note: string;
  fed: boolean;
  /** Pipe before it ends in a blank: it needs nothing. */
  blank: boolean;
}

export interface LyingDrawing {
  width: number;
  height: number;
  pipework: Pipework;
  gates: DrawnGate[];
  /** Of the run pipe. */
  x: number;
  ladder: PlacedItem[];
}

const HALF = 20;
/** From a valve's centre to its label. */
export const LABEL_AT = 31;
/** Room kept for any note, so that a change of state never moves the drawing. */
const NOTE_ROOM = 115;
export const BALLOON_ROOM = 24;
const FIRST = 28;
const PER_HEADER = 22;
const SECOND_LINE = 18;
/** Heading and link to the list stand at the top left; a first column that would begin there moves down. */
const BELOW_HEAD = 120;
/** The note's text may run on to just before the next header's wall. */
const NOTE_OVERHANG = 8;

const SIZES: LadderSizes = { walkRound: 74, run: 42, service: 44, release: 42, half: HALF, smallHalf: 9 };

export function drawLying({ gates, walkRound, runs, release, wall = false }: LineProps): LyingDrawing {
  const layout = lineLayout(gates);
  const flow = findFlow(layout, gates);
  const lanePitch = wall ? 55 : 53;
  const ladderWidth = wall ? 176 : 134;
  const columns = fitColumns(gates, layout.column, layout.columns, layout.tracks, (wall ? 1300 : 1180) - ladderWidth - 58);
  const width = columns.end + 29 + ladderWidth;

  const laneY: number[] = [];
  let y = 46;
  for (let lane = 0; lane < layout.lanes; lane++) {
    const lines = Math.max(1, ...gates.map((_, i) => (layout.lane[i] === lane ? at(columns.names, i).length : 1)));
    y += (lines - 1) * SECOND_LINE;
    laneY.push(y);
    y += lanePitch;
  }
  const highest = Math.min(...gates.map((_, i) => (layout.column[i] === 0 ? at(laneY, at(layout.lane, i)) : BELOW_HEAD)));
  const down = Math.max(0, BELOW_HEAD - highest);

  const collectorX = at(columns.headerAt, layout.columns);
  const x = collectorX + 40;
  const top = 22;
  const frame: Frame = {
    standing: false,
    main: (gate) => at(columns.x, at(layout.column, gate)),
    track: (gap, track) => at(columns.headerAt, gap) + track * PER_HEADER,
    across: (lane) => at(laneY, lane) + down,
    half: HALF,
    collector: collectorX,
    inlet: 10,
  };
  const items = runLadder(walkRound, runs, release, flow.collected);
  const ladder = placeLadder(items, top + 16, wall ? { ...SIZES, run: 46 } : SIZES);
  const rootY = frame.across(at(layout.lane, layout.root));
  const pipework = drawPipework([
    ...gatePipes(layout, flow, frame),
    ...collectorPipes(layout, flow, frame, top),
    { from: [-8, rootY], to: [frame.main(layout.root) - HALF - frame.inlet, rootY], full: true },
    { from: [collectorX, top], to: [x, top], full: flow.collected },
    ...ladderPipe(ladder, x, top, flow.collected, SIZES),
  ]);
  return {
    width,
    height: Math.max(at(laneY, laneY.length - 1) + down, at(ladder, ladder.length - 1).y) + 34,
    pipework,
    x,
    ladder,
    gates: gates.map((gate, i) => ({
      gate,
      x: frame.main(i),
      y: frame.across(at(layout.lane, i)),
      name: at(columns.names, i),
      note: clip(gate.note, NOTE_PX, at(columns.room, at(layout.column, i)) + NOTE_OVERHANG - (gate.balloon ? BALLOON_ROOM : 0)),
      fed: at(flow.fed, i),
      blank: at(layout.feeds, i).length === 0 && i !== layout.root,
    })),
  };
}

interface FittedColumns {
  names: string[][];
  x: number[];
  /** First header of the gap before each column; the last one is the collector. */
  headerAt: number[];
  room: number[];
  end: number;
}

/** Four forms of names are tried, the first that fits the room is used; what is left over is spread evenly. */
function fitColumns(gates: LineGate[], column: number[], count: number, tracks: number[], room: number): FittedColumns {
  const forms: ((gate: LineGate) => string[])[] = [
    (gate) => [gate.name],
    (gate) => wrap(gate.name, NAME_PX, 150),
    (gate) => [gate.short],
    (gate) => wrap(gate.short, NAME_PX, 112),
  ];
  const gapAfter = (c: number) => Math.max(0, at(tracks, c + 1) - 1) * PER_HEADER;
  let names: string[][] = [];
  let widths: number[] = [];
  let total = 0;
  for (const form of forms) {
    names = gates.map(form);
    widths = Array.from({ length: count }, (_, c) =>
      Math.max(
        NOTE_ROOM,
        ...gates.map((_, i) => (column[i] === c ? Math.max(...at(names, i).map((line) => textWidth(line, NAME_PX))) : 0)),
      ),
    );
    total = FIRST + widths.reduce((sum, w, c) => sum + LABEL_AT + w + 12 + gapAfter(c) + (c < count - 1 ? 29 : 0), 0);
    if (total <= room) break;
  }
  const spare = Math.max(0, room - total) / count;
  const x = [FIRST];
  const headerAt = [0];
  for (let c = 0; c < count; c++) {
    const header = at(x, c) + LABEL_AT + at(widths, c) + 12 + spare;
    headerAt.push(header);
    x.push(header + gapAfter(c) + 29);
  }
  return { names, x, headerAt, room: widths.map((w) => w + spare), end: at(x, count) };
}
