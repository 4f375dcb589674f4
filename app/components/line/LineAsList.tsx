import type { ReactNode } from "react";
import { isHeld, runLadder } from "#app/components/line/runLadder";
import { runWord, stopName, stopWords } from "#app/components/line/spoken";
import type { LineGate, LineProps, LineRun } from "#app/components/line/types";
import { Anchor } from "#app/components/ui/Anchor";
import { Balloon } from "#app/components/ui/Balloon";
import { Blade } from "#app/components/ui/Blade";
import { ReleaseCap } from "#app/components/ui/ReleaseCap";
import { VALVE_WORD, type ValveState } from "#app/components/ui/states";
import { ValveSign } from "#app/components/ui/ValveSign";

/** The same as the Line in words, in order of flow: lever beside each name, state and reason in full. */
export function LineAsList({ gates, walkRound, runs, release }: LineProps) {
  return (
    <ol className="line-list">
      {gates.map((gate) => (
        <GateRow key={gate.id} gate={gate} />
      ))}
      {runLadder(walkRound, runs, release, false).map((item) => {
        if (item.kind === "walk-round") return <GateRow key={item.key} gate={item.gate} />;
        if (item.kind === "run") return <RunRow key={item.key} run={item.run} />;
        const sign = item.kind === "release" ? <CapSign state={item.stop.state} /> : <ValveSign state={item.stop.state} />;
        return (
          <Row key={item.key} state={item.stop.state} sign={sign} href={item.stop.href} name={stopName(item)} says={stopWords(item.stop)} />
        );
      })}
    </ol>
  );
}

function GateRow({ gate }: { gate: LineGate }) {
  const full = gate.full || gate.note;
  const says = full.toLowerCase().includes(VALVE_WORD[gate.state]) ? full : [VALVE_WORD[gate.state], full].filter(Boolean).join(": ");
  return (
    <Row
      state={gate.state}
      sign={<ValveSign state={gate.state} part={gate.part} />}
      href={gate.href}
      name={gate.name}
      says={says}
      balloon={gate.balloon}
    />
  );
}

function RunRow({ run }: { run: LineRun }) {
  const sign = (
    <svg width="52" height="41" viewBox="-52 -41 104 82" aria-hidden="true">
      <g transform="translate(-46 0) rotate(90)">
        <Blade length={92 * Math.max(0.2, run.share)} width={32} state={run.state} />
      </g>
    </svg>
  );
  return (
    <Row
      state={isHeld(run) ? "held" : undefined}
      sign={sign}
      href={run.href}
      name={`Run ${run.key}, ${run.name}`}
      says={`${runWord(run)}, to ${run.rpmText}`}
      balloon={run.balloon}
    />
  );
}

function CapSign({ state }: { state: ValveState }) {
  return (
    <svg width="52" height="41" viewBox="-26 -10 52 41" aria-hidden="true">
      <ReleaseCap state={state} />
    </svg>
  );
}

interface RowProps {
  state?: ValveState | "held";
  sign: ReactNode;
  href: string;
  name: string;
  says: string;
  balloon?: number | null;
}

function Row({ state, sign, href, name, says, balloon }: RowProps) {
  return (
    <li className={state && `is-${state}`}>
      {sign}
      <Anchor href={href}>{name}</Anchor>
      <span>
        {balloon ? <Balloon n={balloon} label={`${balloon} in what stops us:`} small /> : null}
        {says}
      </span>
    </li>
  );
}
