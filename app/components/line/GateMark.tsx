import { BalloonMark, round } from "#app/components/line/BalloonMark";
import { BALLOON_ROOM, type DrawnGate, LABEL_AT } from "#app/components/line/lying";
import { NAME_PX, NOTE_PX, textWidth } from "#app/components/line/measure";
import { spokenGate } from "#app/components/line/spoken";
import { Anchor } from "#app/components/ui/Anchor";
import { Valve } from "#app/components/ui/Valve";

/** A gate of the lying Line: valve, name above the pipe, note below it. */
export function LyingGate({ drawn }: { drawn: DrawnGate }) {
  const { gate, x, y, name, note, fed } = drawn;
  const wider = (name.length - 1) * 18;
  const textX = round(x + LABEL_AT);
  const noteX = round(x + LABEL_AT + (gate.balloon ? BALLOON_ROOM : 0));
  const width =
    LABEL_AT + 32 + Math.max(...name.map((line) => textWidth(line, NAME_PX)), textWidth(note, NOTE_PX) + (gate.balloon ? BALLOON_ROOM : 0));
  return (
    <Anchor className={`valve-link is-${gate.state}`} href={gate.href} aria-label={spokenGate(gate, name.join(" "))}>
      <rect className="hit" x={round(x - 25)} y={round(y - 26 - wider)} width={Math.round(width)} height={52 + wider} rx="3" />
      <g transform={`translate(${round(x)} ${round(y)})`}>
        <Valve state={gate.state} part={gate.part} fed={fed} />
      </g>
      {name.map((line, i) => (
        <text key={line} className="g-name" x={textX} y={round(y - 11 - (name.length - 1 - i) * 18)}>
          {line}
        </text>
      ))}
      <text className="g-note" x={noteX} y={round(y + 22)}>
        {note}
      </text>
      <BalloonMark x={x + LABEL_AT + 9} y={y + 17} n={gate.balloon} />
    </Anchor>
  );
}

/** A gate of the standing Line: valve on its lane, dotted leader, text at the right. */
export function StandingGate({ drawn, textX, width }: { drawn: DrawnGate; textX: number; width: number }) {
  const { gate, x, y, name, note, fed } = drawn;
  const up = (name.length - 1) * 9.5;
  return (
    <Anchor className={`valve-link is-${gate.state}`} href={gate.href} aria-label={spokenGate(gate, name.join(" "))}>
      <rect className="hit" x={round(textX - 10)} y={round(y - up - 27)} width={round(width - textX + 6)} height={54 + up * 2} rx="3" />
      <path className="line-leader" d={`M${round(x + 20)} ${round(y)}H${round(textX - 6)}`} />
      <g transform={`translate(${round(x)} ${round(y)})`}>
        <Valve state={gate.state} part={gate.part} fed={fed} scale={0.72} standing lever={36} />
      </g>
      {name.map((line, i) => (
        <text key={line} className="g-name" x={round(textX)} y={round(y - 3 - up + i * 19)}>
          {line}
        </text>
      ))}
      <text className="g-note" x={round(textX + (gate.balloon ? BALLOON_ROOM + 5 : 0))} y={round(y + up + 20)}>
        {note}
      </text>
      <BalloonMark x={textX + 11} y={y + up + 15} n={gate.balloon} />
    </Anchor>
  );
}
