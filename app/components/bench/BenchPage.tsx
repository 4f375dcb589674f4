import { Form } from "react-router";
import { BenchForm } from "#app/components/bench/BenchForm";
import { BenchResult } from "#app/components/bench/BenchResult";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { Anchor } from "#app/components/ui/Anchor";
import { type CautionSign, CautionSlab } from "#app/components/ui/CautionSlab";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { Notice } from "#app/components/ui/Notice";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import type { BenchView } from "#app/lib/views/bench";

const FORM = "bench-form";

/** One calculator: caution, result, what went in. The address holds the inputs; on paper it is one sheet with all of it. */
export function BenchPage({ view, sign, refusal }: { view: BenchView; sign: CautionSign; refusal: string | null }) {
  const { result, errors } = view;
  return (
    <>
      <main id="main" className="bench">
        <TitlePipe
          title={view.title}
          state={result ? result.word : errors.length ? "To be put right" : "Not worked out yet"}
          fill={result ? (result.passes === false ? 0.5 : 1) : 0}
          then={view.answers}
        />
        <p className="bench-paper-head">
          {view.install}. Worked out {view.workedOut}.
        </p>
        <CautionSlab title="an aid to thinking, not a release." sign={sign}>
          {view.caution}
        </CautionSlab>
        {refusal && (
          <Notice kind="refused" title="Not kept" role="alert" band>
            {refusal}
          </Notice>
        )}
        <div className="bench-halves">
          {result && <BenchResult view={view} result={result} keep={view.sent && <KeepForm view={view} />} />}
          <div className="bench-asks">
            <ErrorSummary errors={errors} title={errors.length === 1 ? "One thing to put right" : undefined} />
            <BenchForm view={view} id={FORM} />
            {view.kept && !view.sent && (
              <p className="bench-note">
                These inputs were kept by {view.kept.by}, {view.kept.at}. What the install fills in follows the install.{" "}
                <Anchor href={`${view.home}/bench/${view.key}?fresh`}>Begin with the install’s values only</Anchor>
              </p>
            )}
            <details className="bench-how">
              <summary>Formula and sources</summary>
              <p>{view.formula}</p>
              <p>
                <b>Criterion:</b> {view.criterion}
              </p>
              <p>
                <b>Sources:</b> {view.source}
              </p>
            </details>
          </div>
        </div>
        <PaperInputs view={view} />
      </main>
      <Foot
        says={result ? "Change an input and work it out again" : "Fill in what is asked"}
        note="The address of the result holds the inputs: members of this install may open it."
      >
        <Fitting size="act" form={FORM}>
          Work it out
        </Fitting>
      </Foot>
    </>
  );
}

/** The inputs as they were sent, so that what is kept is what was worked out. */
function KeepForm({ view }: { view: BenchView }) {
  const { sent } = view;
  if (!sent) return null;
  return (
    <Form method="post" className="bench-keep">
      <input type="hidden" name="units" value={sent.units} />
      {Object.entries(sent.fields).flatMap(([name, texts]) =>
        // biome-ignore lint/suspicious/noArrayIndexKey: rows are numbered
        texts.map((text, row) => <input key={`${name}.${row}`} type="hidden" name={name} value={text} />),
      )}
      <Fitting variant="outline" note="for everybody on this install">
        Keep these inputs
      </Fitting>
    </Form>
  );
}

function PaperInputs({ view }: { view: BenchView }) {
  return (
    <section className="bench-paper" aria-hidden="true">
      <h2>Inputs</h2>
      <table>
        <tbody>
          {view.inputs.map((line) => (
            <tr key={line.label}>
              <th scope="row">{line.label}</th>
              <td className="fig">{line.value}</td>
              <td>{line.origin}</td>
            </tr>
          ))}
        </tbody>
      </table>
      <p>{view.formula}</p>
      <p>
        Criterion: {view.criterion} Sources: {view.source}
      </p>
    </section>
  );
}
