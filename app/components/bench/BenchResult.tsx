import type { ReactNode } from "react";
import { CrankBursts } from "#app/components/bench/CrankBursts";
import { FuelBars } from "#app/components/bench/FuelBars";
import { StrapDrawing } from "#app/components/bench/StrapDrawing";
import { ThrustCurve } from "#app/components/bench/ThrustCurve";
import { TorqueDrawing } from "#app/components/bench/TorqueDrawing";
import { BandRule } from "#app/components/ui/BandRule";
import { cx } from "#app/components/ui/cx";
import { Figure } from "#app/components/ui/Figure";
import type { BenchView, FigureView, ResultView } from "#app/lib/views/bench";
import type { Drawing } from "#app/lib/views/bench-drawing";

/** What came out: the word and sentence first, then margin, drawing and every figure. */
export function BenchResult({ view, result, keep }: { view: BenchView; result: ResultView; keep: ReactNode }) {
  const { passes, rule, lead, drawing } = result;
  const look = passes === null ? "bench-result-plain" : passes ? "bench-result-within" : "bench-result-outside";
  return (
    <section className={cx("bench-result", look)} aria-labelledby="bench-result">
      <h2 id="bench-result">{result.word}</h2>
      <p className="bench-says" role="status">
        {result.sentence}
      </p>
      <p className="bench-criterion">
        <b>Criterion:</b> {view.criterion}
      </p>
      {lead.map(({ label, value, unit }) => (
        <p key={label} className="bench-lead">
          {label} <Figure value={value} unit={unit} />
        </p>
      ))}
      {rule && <BandRule min={rule.min} max={rule.max} value={rule.value} label={rule.label} />}
      {drawing && <Drawn drawing={drawing} />}
      <dl className="bench-figures">
        {result.figures.map((figure) => (
          <FigureLine key={figure.label} figure={figure} />
        ))}
      </dl>
      {keep}
    </section>
  );
}

function FigureLine({ figure: { label, value, unit } }: { figure: FigureView }) {
  return (
    <div>
      <dt>{label}</dt>
      <dd>
        <Figure value={value} unit={unit} />
      </dd>
    </div>
  );
}

function Drawn({ drawing }: { drawing: Drawing }) {
  switch (drawing.kind) {
    case "restraint":
      return (
        <>
          <ThrustCurve chart={drawing.chart} />
          <StrapDrawing straps={drawing.straps} />
        </>
      );
    case "fuel":
      return <FuelBars drawing={drawing} />;
    case "torque":
      return <TorqueDrawing drawing={drawing} />;
    case "crank":
      return <CrankBursts drawing={drawing} />;
  }
}
