import { round } from "#app/components/line/BalloonMark";
import { LyingGate } from "#app/components/line/GateMark";
import { drawLying } from "#app/components/line/lying";
import { Pipework } from "#app/components/line/Pipework";
import { RunPipe } from "#app/components/line/RunPipe";
import type { LineProps } from "#app/components/line/types";

/** Gates from left to right, runs at the right. */
export function LyingLine(props: LineProps & { label: string }) {
  const { width, height, pipework, gates, x, ladder } = drawLying(props);
  const firstRun = ladder.find(({ item }) => item.kind === "run");
  const tooWide = width > 1320;
  return (
    // biome-ignore lint/a11y/useSemanticElements: an svg has no element for a group with a name
    <svg
      viewBox={`0 0 ${round(width)} ${round(height)}`}
      role="group"
      aria-label={props.label}
      style={tooWide ? { minWidth: width } : undefined}
    >
      <g>
        <Pipework drawn={pipework} />
        <path className="pipe-blank" d={gates.map((g) => (g.blank ? `M${round(g.x - 30)} ${round(g.y - 10)}v20` : "")).join("")} />
        {firstRun && (
          <text className="g-note" x={round(width - 12)} y={round(firstRun.y - 22)} textAnchor="end">
            % rpm
          </text>
        )}
      </g>
      {gates.map((drawn) => (
        <LyingGate key={drawn.gate.id} drawn={drawn} />
      ))}
      <RunPipe ladder={ladder} x={x} width={width} blade={Math.min(104, width - x - 86)} />
    </svg>
  );
}
