import type { LiveState } from "#app/components/live/useLiveState";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { holdFace } from "#app/lib/bench/live-clock";
import type { LiveStep } from "#app/lib/views/live";

interface LiveStepsProps {
  steps: LiveStep[];
  state: LiveState;
  now: number;
  /** Instant of the start: the first step counts from it. */
  started: number;
  onChange: (to: Partial<LiveState>) => void;
}

const clock = (seconds: number): string => `${Math.floor(seconds / 60)}:${String(seconds % 60).padStart(2, "0")}`;

/** The step that is on, as large as the screen allows; what comes next under it; marks by one press. */
export function LiveSteps({ steps, state, now, started, onChange }: LiveStepsProps) {
  const on = steps[Math.min(state.step, steps.length - 1)];
  if (!on) return null;
  const next = steps[state.step + 1];
  const hold = holdFace(on.hold, state.since ?? started, now);
  const mark = (words: string) => onChange({ marks: [...state.marks, { at: Date.now(), words }] });
  const go = (step: number) =>
    onChange({ step, since: Date.now(), marks: [...state.marks, { at: Date.now(), words: `step ${steps[step]?.no ?? ""}` }] });
  return (
    <section className="border-b-2 border-ink px-4 py-4 tablet:px-6" aria-labelledby="step">
      <p className="text-ink-2">
        Step {on.no} of {steps.at(-1)?.no}, run clock <Figure value={clock(Math.max(0, Math.floor((now - started) / 1000)))} />
      </p>
      <h2 id="step" className="text-h2">
        {on.title}
      </h2>
      <p className="flex flex-wrap items-baseline gap-x-8 gap-y-1">
        {on.rpm && <Figure value={on.rpm.replace(" rpm", "")} unit="rpm" className="text-[44px] font-bold" />}
        {on.hold !== null && (
          <span>
            hold {on.holdText}: <Figure value={hold.over ? "held" : clock(hold.left)} className="text-[44px] font-bold" />
          </span>
        )}
      </p>
      <p className="mt-1 max-w-[60ch] text-lead">{on.see}</p>
      <p className="mt-3 flex flex-wrap gap-3">
        {on.marks.map((words) => (
          <Fitting key={words} type="button" onClick={() => mark(words)}>
            {words}
          </Fitting>
        ))}
        {next && (
          <Fitting size="act" type="button" onClick={() => go(state.step + 1)} note={[next.title, next.rpm].filter(Boolean).join(", ")}>
            {on.hold === null || hold.over ? "Next step" : "Next step, hold is not over"}
          </Fitting>
        )}
        {state.step > 0 && (
          <Fitting variant="quiet" type="button" onClick={() => go(state.step - 1)}>
            Step back
          </Fitting>
        )}
      </p>
      {state.marks.length > 0 && (
        <details className="mt-3">
          <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
            {state.marks.length === 1 ? "1 mark" : `${state.marks.length} marks`} on this device
          </summary>
          <ol>
            {state.marks.map((m) => (
              <li key={m.at}>
                <Figure value={clock(Math.max(0, Math.floor((m.at - started) / 1000)))} /> {m.words}
              </li>
            ))}
          </ol>
        </details>
      )}
    </section>
  );
}
