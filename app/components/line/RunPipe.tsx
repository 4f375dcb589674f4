import { BalloonMark, round } from "#app/components/line/BalloonMark";
import type { PlacedItem } from "#app/components/line/ladderPipe";
import { clip, NAME_PX, NOTE_PX } from "#app/components/line/measure";
import { isHeld, type LadderItem } from "#app/components/line/runLadder";
import { runWord, spokenGate, spokenRun, stopName, stopWords } from "#app/components/line/spoken";
import type { LineGate, LineRun, LineStop } from "#app/components/line/types";
import { Anchor } from "#app/components/ui/Anchor";
import { Blade } from "#app/components/ui/Blade";
import { ReleaseCap } from "#app/components/ui/ReleaseCap";
import { Spade } from "#app/components/ui/Spade";
import { Valve } from "#app/components/ui/Valve";

interface RunPipeProps {
  ladder: PlacedItem[];
  /** Of the pipe. */
  x: number;
  /** Of the whole drawing. */
  width: number;
  /** Length of the blade of full rated speed. */
  blade: number;
  /** Where the gates' names begin. Set on the standing Line: names and speeds are written out beside the blades. */
  textX?: number;
}

/** What stands on the run pipe: the walk-round, a blade a run, post-run valves, service, the release cap. The pipe itself is part of the pipework. */
export function RunPipe({ ladder, x, width, blade, textX }: RunPipeProps) {
  const roomy = textX !== undefined;
  return ladder.map(({ item, y }) => {
    const place = { x, y, width };
    switch (item.kind) {
      case "walk-round":
        return <WalkRound key={item.key} {...place} gate={item.gate} fed={item.fed} column={textX} />;
      case "run":
        return roomy ? (
          <NamedRun key={item.key} {...place} run={item.run} blade={blade} />
        ) : (
          <ShortRun key={item.key} {...place} run={item.run} blade={blade} />
        );
      case "release":
        return <Release key={item.key} {...place} stop={item.stop} roomy={roomy} />;
      default:
        return <SmallValve key={item.key} {...place} item={item} roomy={roomy} />;
    }
  });
}

interface Place {
  x: number;
  y: number;
  width: number;
}

function WalkRound({ x, y, width, gate, fed, column }: Place & { gate: LineGate; fed: boolean; column?: number }) {
  const roomy = column !== undefined;
  const textX = column ?? x + 28;
  const name = roomy ? gate.name : gate.short;
  return (
    <Anchor className={`valve-link is-${gate.state}`} href={gate.href} aria-label={spokenGate(gate, name)}>
      <rect className="hit" x={round(x - 26)} y={round(y - 27)} width={round(width - x + 22)} height="54" rx="3" />
      {roomy && <path className="line-leader" d={`M${round(x + 20)} ${round(y)}H${round(textX - 6)}`} />}
      <g transform={`translate(${round(x)} ${round(y)})`}>
        <Valve state={gate.state} part={gate.part} fed={fed} standing scale={roomy ? 0.72 : 1} lever={36} />
      </g>
      <text className="g-name" x={round(textX)} y={round(y - 3)}>
        {clip(name, NAME_PX, width - textX)}
      </text>
      <text className="g-note" x={round(textX + (gate.balloon ? 27 : 0))} y={round(y + 18)}>
        {clip(gate.note, NOTE_PX, width - textX - (gate.balloon ? 27 : 0))}
      </text>
      <BalloonMark x={textX + 11} y={y + 13} n={gate.balloon} />
    </Anchor>
  );
}

function RunDrawing({ x, y, run, blade }: { x: number; y: number; run: LineRun; blade: number }) {
  const length = blade * Math.min(1, Math.max(0.2, run.share));
  return (
    <>
      <g transform={`translate(${round(x + 6)} ${round(y)}) rotate(90)`}>
        <Blade length={length} state={run.state} />
      </g>
      {isHeld(run) && (
        <g transform={`translate(${round(x)} ${round(y)}) rotate(90)`}>
          <Spade />
        </g>
      )}
      <BalloonMark x={x + 6 + length * 0.72} y={y} n={run.balloon} />
    </>
  );
}

/** Number and share of rated speed; where more than "planned" is to be said, the word. */
function ShortRun({ x, y, width, run, blade }: Place & { run: LineRun; blade: number }) {
  const textX = x + blade + 18;
  const held = isHeld(run);
  const percent = Math.round(run.share * 100);
  return (
    <Anchor
      className="valve-link"
      href={run.href}
      aria-label={spokenRun(run, held ? `${run.key}, HOLD` : `${run.key}, ${percent} % of rated`)}
    >
      <rect className="hit" x={round(x + 13)} y={round(y - 20)} width={round(width - x - 19)} height="40" rx="3" />
      <RunDrawing x={x} y={y} run={run} blade={blade} />
      <text className="run-number" x={round(textX)} y={round(y + 6)}>
        {run.key}
      </text>
      <text className={held ? "run-hold" : "run-figure"} x={round(textX + 18)} y={round(y + 6)}>
        {held ? "HOLD" : percent}
      </text>
    </Anchor>
  );
}

const TOLD = new Set(["called", "running", "ended", "reviewed", "scrubbed"]);

function NamedRun({ x, y, width, run, blade }: Place & { run: LineRun; blade: number }) {
  const numberX = x + 6 + blade + 14;
  const textX = numberX + 24;
  const held = isHeld(run);
  const second = held || TOLD.has(run.state) ? runWord(run) : run.rpmText;
  return (
    <Anchor className="valve-link" href={run.href} aria-label={spokenRun(run, `${run.key} ${run.name} ${second}`)}>
      <rect className="hit" x={round(x + 14)} y={round(y - 24)} width={round(width - x - 20)} height="48" rx="3" />
      <RunDrawing x={x} y={y} run={run} blade={blade} />
      <text className="run-number" x={round(numberX)} y={round(y + 6)}>
        {run.key}
      </text>
      <text className="g-name" x={round(textX)} y={round(y - 2)}>
        {clip(run.name, NAME_PX, width - textX)}
      </text>
      <text className={held ? "run-hold" : second === run.rpmText ? "run-figure" : "g-note"} x={round(textX)} y={round(y + 17)}>
        {second === run.rpmText ? tightFigure(second) : second}
      </text>
    </Anchor>
  );
}

/** The figures' type gives a point a whole cell: draw it and what follows closer. */
function tightFigure(text: string) {
  return text.split(/(?<=[.,])/).map((part, i) => (
    <tspan key={part} dx={i ? "-0.27em" : undefined}>
      {part}
    </tspan>
  ));
}

function SmallValve({ x, y, width, item, roomy }: Place & { item: Extract<LadderItem, { kind: "post-run" | "service" }>; roomy: boolean }) {
  const service = item.kind === "service";
  const seen = service ? "service" : roomy ? "after" : "";
  const hit = roomy
    ? { x: x - 62, width: 74, height: 40 }
    : service
      ? { x: x - 30, width: width - x + 22, height: 26 }
      : { x: x - 30, width: 42, height: 30 };
  return (
    <Anchor
      className={`valve-link is-${item.stop.state}`}
      href={item.stop.href}
      aria-label={`${service || !roomy ? stopName(item) : `after run ${item.run.key}`}, ${stopWords(item.stop)}`}
    >
      <rect className="hit" x={round(hit.x)} y={round(y - hit.height / 2)} width={round(hit.width)} height={hit.height} rx="3" />
      <g transform={`translate(${round(x)} ${round(y)})`}>
        <Valve state={item.stop.state} fed={item.fed} standing scale={roomy ? 0.5 : 0.46} lever={roomy ? 44 : 46} />
      </g>
      {seen && (
        <text className="g-note" x={round(roomy ? x - 30 : x + 16)} y={round(y + 5)} textAnchor={roomy ? "end" : "start"}>
          {seen}
        </text>
      )}
    </Anchor>
  );
}

function Release({ x, y, width, stop, roomy }: Place & { stop: LineStop; roomy: boolean }) {
  const seen = roomy ? "release for taxi tests" : "release";
  return (
    <Anchor
      className={`valve-link is-${stop.state}`}
      href={stop.href}
      aria-label={`${seen}${roomy ? "" : " for taxi tests"}, ${stopWords(stop)}`}
    >
      <rect className="hit" x={round(x - 24)} y={round(y - 12)} width={round(width - x + 18)} height="40" rx="3" />
      <g transform={`translate(${round(x)} ${round(y)})`}>
        <ReleaseCap state={stop.state} />
      </g>
      <text className="g-name" x={round(x + 29)} y={round(y + 15)}>
        {seen}
      </text>
    </Anchor>
  );
}
