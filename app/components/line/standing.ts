/**
 * The standing Line, under 1000 px: one row a gate, its valve on its own lane, the text at the right of all lanes.
 * Pure: from gates to coordinates.
 */
import { findFlow } from "#app/components/line/flow";
import { at } from "#app/components/line/graph";
import { type LadderSizes, ladderPipe, type PlacedItem, placeLadder } from "#app/components/line/ladderPipe";
import { lineLayout } from "#app/components/line/layout";
import { BALLOON_ROOM, type DrawnGate } from "#app/components/line/lying";
import { clip, NAME_PX, NOTE_PX, textWidth, wrap } from "#app/components/line/measure";
import { collectorPipes, type Frame, gatePipes } from "#app/components/line/pipes";
import { drawPipework, type Pipework } from "#app/components/line/pipework";
import { runLadder } from "#app/components/line/runLadder";
import type { LineProps } from "#app/components/line/types";

export interface StandingDrawing {
  width: number;
  height: number;
  pipework: Pipework;
  gates: DrawnGate[];
  /** Where names and notes begin. */
  textX: number;
  /** Of the run pipe. */
  x: number;
  ladder: PlacedItem[];
  /** Longest blade, and where a run's text begins. */
  blade: number;
}

const WIDTH = 390;
const HALF = 15;
const FIRST_LANE = 27;
const WIDEST_PITCH = 26;
/** Closer than this the pipes would touch; the drawing grows instead and scrolls. */
const LEAST_PITCH = 15;
const NAME_LINE = 19;
const ROW = 42;
const PER_HEADER = 20;
const MOST_LINES = 3;

const SIZES: LadderSizes = { walkRound: 66, run: 50, service: 66, release: 52, half: HALF, smallHalf: 10 };

export function drawStanding({ gates, walkRound, runs, release }: LineProps): StandingDrawing {
  const layout = lineLayout(gates);
  const flow = findFlow(layout, gates);
  const gaps = Math.max(1, layout.lanes - 1);
  const pitch = Math.max(LEAST_PITCH, Math.min(WIDEST_PITCH, (WIDTH - 218) / gaps));
  const width = Math.max(WIDTH, 218 + pitch * (layout.lanes - 1));
  const laneX = (lane: number) => FIRST_LANE + lane * pitch;
  const textX = laneX(layout.lanes - 1) + 26;

  const rows = gates
    .map((_, i) => i)
    .sort((a, b) => at(layout.column, a) - at(layout.column, b) || at(layout.lane, a) - at(layout.lane, b));
  const names = gates.map((gate) => wrap(gate.name, NAME_PX, width - textX - 12, MOST_LINES));
  const rowY: number[] = [];
  const headerAt: number[] = [0];
  let y = 40;
  let column = 0;
  for (const i of rows) {
    for (; column < at(layout.column, i); column++) {
      headerAt.push(y - 26);
      y += Math.max(1, at(layout.tracks, column + 1)) * PER_HEADER;
    }
    const lines = at(names, i).length;
    rowY[i] = y + ((lines - 1) * NAME_LINE) / 2;
    y += lines * NAME_LINE + ROW;
  }

  const collectorY = y - 14;
  const x = laneX((layout.lanes - 1) / 2);
  const frame: Frame = {
    standing: true,
    main: (gate) => at(rowY, gate),
    track: (gap, track) => at(headerAt, gap) + track * PER_HEADER,
    across: laneX,
    half: HALF,
    collector: collectorY,
    inlet: 16,
  };
  const rootX = laneX(at(layout.lane, layout.root));
  const items = runLadder(walkRound, runs, release, flow.collected);
  const ladder = placeLadder(items, collectorY + 18, SIZES);
  const widestName = Math.max(0, ...runs.map((run) => textWidth(run.name, NAME_PX)));
  return {
    width,
    height: at(ladder, ladder.length - 1).y + 46,
    pipework: drawPipework([
      ...gatePipes(layout, flow, frame),
      ...collectorPipes(layout, flow, frame, x),
      { from: [rootX, -8], to: [rootX, frame.main(layout.root) - HALF - frame.inlet], full: true },
      ...ladderPipe(ladder, x, collectorY, flow.collected, SIZES),
    ]),
    textX,
    x,
    ladder,
    blade: Math.max(48, Math.min(118, width - x - 6 - 14 - 24 - 10 - widestName)),
    gates: rows.map((i) => {
      const gate = at(gates, i);
      return {
        gate,
        x: laneX(at(layout.lane, i)),
        y: at(rowY, i),
        name: at(names, i),
        note: clip(gate.note, NOTE_PX, width - textX - 10 - (gate.balloon ? BALLOON_ROOM + 5 : 0)),
        fed: at(flow.fed, i),
        blank: at(layout.feeds, i).length === 0 && i !== layout.root,
      };
    }),
  };
}
