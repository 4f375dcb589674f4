import { cx } from "#app/components/ui/cx";
import { Spade } from "#app/components/ui/Spade";
import type { ShownValve } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";

export interface AnswerProps {
  title: string;
  state: string;
  note: string | null;
  tone: "clear" | "shut" | "held" | "go" | "running";
}

const VALVE: Record<Exclude<AnswerProps["tone"], "held">, ShownValve> = { clear: "signed", go: "signed", running: "signed", shut: "shut" };

/** The board's first words, as a label on the pipe: green up to the shut valve, green all along when nothing stops it. */
export function Answer({ title, state, note, tone }: AnswerProps) {
  const passes = tone !== "shut" && tone !== "held";
  return (
    <div className={cx("answer", `answer-${tone}`)}>
      <h1>
        <span className="answer-title">{title}</span> <span className="answer-state">{state}</span>
      </h1>
      <div className="answer-pipe" aria-hidden="true">
        <i className={passes ? "answer-full" : undefined} />
        <svg viewBox="-48 -62 96 124" aria-hidden="true">
          {tone === "held" ? <Spade length={88} width={15} /> : <Valve state={VALVE[tone]} scale={1.9} lever={31} fed />}
        </svg>
      </div>
      {note && <p>{note}</p>}
    </div>
  );
}
