import { RunCardView } from "#app/components/run/RunCardView";
import { RunTitle } from "#app/components/run/RunTitle";
import { Anchor } from "#app/components/ui/Anchor";
import { Blade } from "#app/components/ui/Blade";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { installContext } from "#app/lib/http/install.server";
import { buildUpView } from "#app/lib/views/build-up";
import type { Route } from "./+types/_app.installs.$installId.build-up";

export const meta: Route.MetaFunction = () => [{ title: "Build-up · Bladecount" }];

export function loader({ context }: Route.LoaderArgs) {
  const { e, me } = context.get(installContext);
  return buildUpView(e, me.id);
}

export default function BuildUp({ loaderData: view }: Route.ComponentProps) {
  return (
    <main id="main">
      <RunTitle title={view.title} state={view.state} rungs={view.ladder} gates={view.gates} />
      <CautionSlab title="up in steps." sign="propeller">
        Each run goes a little higher, after the one before was inspected and reviewed. The engine, propeller and kit maker’s manuals come
        before any speed or time on these cards.
      </CautionSlab>
      {view.leftOut.map((line) => (
        <p key={line} className="border-b-2 border-ink px-4 py-3 text-ink-2 tablet:px-6">
          {line}
        </p>
      ))}
      <ol className="px-4 tablet:px-6">
        {view.rungs.map((rung) => (
          <RungRow key={rung.key} rung={rung} />
        ))}
      </ol>
    </main>
  );
}

type Rung = Route.ComponentProps["loaderData"]["rungs"][number];

const LOOK = { settled: "reviewed", next: "next", later: "planned", "left-out": "scrubbed" } as const;

function RungRow({ rung }: { rung: Rung }) {
  const blade = Math.max(30, 96 * Math.min(1, rung.share));
  return (
    <li className="grid gap-x-6 gap-y-3 border-b-2 border-ink py-5 wide:grid-cols-[minmax(0,1fr)_minmax(0,1.2fr)]">
      <div className="grid grid-cols-[72px_minmax(0,1fr)] gap-x-4">
        <svg viewBox={`-24 ${-blade - 6} 48 ${blade + 24}`} width="60" height={(blade + 24) * 1.25} aria-hidden="true">
          <path className="pipe-wall" d="M-30 6H30" />
          <path className="pipe-bore" d="M-30 6H30" />
          {rung.state === "settled" && <path className="pipe-flow" d="M-30 6H30" />}
          <Blade length={blade} state={LOOK[rung.state]} />
        </svg>
        <div className="flex flex-col items-start gap-2">
          <h2 className={rung.state === "settled" ? "text-h3 font-medium" : "text-h3"} id={`rung-${rung.key}`}>
            <Figure value={rung.key} /> {rung.name}
          </h2>
          <p>
            {rung.rpm.endsWith(" rpm") ? <Figure value={rung.rpm.replace(" rpm", "")} unit="rpm" className="text-lead" /> : rung.rpm},{" "}
            <b>{rung.word}</b>
          </p>
          {rung.runs.length > 0 && (
            <ul className="w-full">
              {rung.runs.map((run) => (
                <li key={run.id} className="border-t border-line">
                  <Anchor href={run.href} className="inline-flex min-h-hit items-center font-semibold">
                    Run {run.label}
                  </Anchor>
                  <span className={run.state === "held" ? "font-semibold text-stop-ink" : undefined}> {run.words}</span>
                </li>
              ))}
            </ul>
          )}
          {rung.plan &&
            (rung.plan.ok ? (
              <Fitting href={rung.plan.href} size="act" note="time, place, who stands where">
                Plan run {rung.key}
              </Fitting>
            ) : (
              <p className="text-ink-2">Not planned yet. {rung.plan.why}</p>
            ))}
        </div>
      </div>
      <details open={rung.state === "next"}>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
          The card of run {rung.key}, {rung.card.steps.length} steps
        </summary>
        <p className="pb-2 text-ink-2">{rung.people}.</p>
        <RunCardView {...rung.card} level={3} short />
      </details>
    </li>
  );
}
