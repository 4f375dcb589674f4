import { round } from "#app/components/line/BalloonMark";
import { StandingGate } from "#app/components/line/GateMark";
import { Pipework } from "#app/components/line/Pipework";
import { RunPipe } from "#app/components/line/RunPipe";
import { drawStanding } from "#app/components/line/standing";
import type { LineProps } from "#app/components/line/types";

/** Gates from top to bottom, text at the right. */
export function StandingLine(props: LineProps & { label: string }) {
  const { width, height, pipework, gates, textX, x, ladder, blade } = drawStanding(props);
  const tooWide = width > 400;
  return (
    // biome-ignore lint/a11y/useSemanticElements: an svg has no element for a group with a name
    <svg
      viewBox={`0 0 ${round(width)} ${round(height)}`}
      role="group"
      aria-label={props.label}
      style={{ maxWidth: round((width / 390) * 520), minWidth: tooWide ? round(width * 0.85) : undefined }}
    >
      <g>
        <Pipework drawn={pipework} />
        <path className="pipe-blank" d={gates.map((g) => (g.blank ? `M${round(g.x - 9)} ${round(g.y - 31)}h18` : "")).join("")} />
      </g>
      {gates.map((drawn) => (
        <StandingGate key={drawn.gate.id} drawn={drawn} textX={textX} width={width} />
      ))}
      <RunPipe ladder={ladder} x={x} width={width} blade={blade} textX={textX} />
    </svg>
  );
}
