import { useEffect, useState } from "react";
import { keepClock, readClock } from "#app/components/crank/crankStore";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { useLive } from "#app/components/ui/useLive";
import { type CrankEvent, type CrankFace, crankFace, crankStep, NO_BURSTS } from "#app/lib/bench/crank-clock";
import type { CrankView } from "#app/lib/views/crank";

/** Held beside the starter: one huge figure, two huge fittings. It needs no network once it is open. */
export function CrankClockPage({ view }: { view: CrankView }) {
  const live = useLive();
  const [clock, setClock] = useState(NO_BURSTS);
  const [now, setNow] = useState(0);
  const [said, setSaid] = useState("");
  useEffect(() => {
    setClock(readClock(view.item) ?? NO_BURSTS);
    setNow(Date.now());
    const timer = setInterval(() => setNow(Date.now()), 100);
    return () => clearInterval(timer);
  }, [view.item]);
  useAwake(clock.running !== null);

  const face = crankFace(view.rule, clock, now);
  function press(kind: CrankEvent["kind"]) {
    const at = Date.now();
    setNow(at);
    const next = crankStep(view.rule, clock, { kind, at });
    setSaid(next.ok ? "" : next.sentence);
    if (!next.ok) return;
    setClock(next.clock);
    keepClock(view.item, next.clock);
  }
  const { rule } = view;
  const figure = figureOf(face, rule.on);
  return (
    <main id="main" className="crank">
      <TitlePipe
        title="Crank clock"
        state={`${view.key} ${view.words}`}
        fill={face.tone === "seen" ? 1 : Math.min(1, face.total / rule.giveUpAfter)}
        then={`${rule.on} s on at most, ${rule.rest} s of rest, ${rule.tries} bursts, then ${Math.round(rule.longRest / 60)} min; ${view.from}.`}
      />
      <CautionSlab title="Cranking.">{view.caution}</CautionSlab>
      {!live && (
        <p className="px-4 py-6 text-lead tablet:px-6">
          The clock needs scripts. Without them, time the bursts by a watch and enter them at the item.
        </p>
      )}
      {live && (
        <>
          <section className={`face face-${face.tone}`} aria-label="Clock">
            <p className="face-word" role="status">
              {face.word}
            </p>
            {figure && (
              <p className="face-figure" aria-hidden="true">
                <Figure {...figure} />
              </p>
            )}
            <p className="face-says">{face.sentence}</p>
          </section>
          <div className="face-acts">
            {clock.running ? (
              <Fitting size="act" variant="stop" type="button" onClick={() => press("off")} centred>
                Starter off
              </Fitting>
            ) : (
              <Fitting size="act" type="button" onClick={() => press("on")} reason={face.may.on ? undefined : face.sentence} centred>
                Starter on
              </Fitting>
            )}
            <Fitting
              size="act"
              variant="outline"
              type="button"
              onClick={() => press("pressure")}
              reason={face.may.pressure ? undefined : clock.running ? "marked" : "while the starter turns"}
              centred
            >
              Pressure seen
            </Fitting>
          </div>
          {said && (
            <p role="alert" className="px-4 text-lead tablet:px-6">
              {said}
            </p>
          )}
          <section className="px-4 py-5 tablet:px-6" aria-labelledby="bursts">
            <h2 id="bursts" className="text-h3">
              Bursts: {face.bursts}, {face.total.toFixed(1)} s of cranking
            </h2>
            <p className="text-ink-2">Stop and look for the cause when no pressure shows within {rule.giveUpAfter} s in all.</p>
            <ol className="mt-3 border-t border-line">
              {clock.bursts.map((b, n) => (
                <li key={b.at} className="flex flex-wrap gap-x-6 border-b border-line py-2">
                  <b className="fig">{n + 1}</b>
                  <span>{new Date(b.at).toLocaleTimeString("en-GB", { timeZone: view.timeZone, timeZoneName: "short" })}</span>
                  <Figure value={b.seconds.toFixed(1)} unit="s" />
                  <span>{b.pressureAfter === null ? "no pressure" : `pressure after ${b.pressureAfter.toFixed(1)} s`}</span>
                </li>
              ))}
            </ol>
            <p className="mt-4 flex flex-wrap gap-3">
              <Fitting
                href={view.back}
                size="act"
                reason={clock.running ? "switch the starter off first" : clock.bursts.length ? undefined : "no burst yet"}
              >
                Bring it to the item
              </Fitting>
              <Fitting
                type="button"
                variant="quiet"
                onClick={() => press("take-back")}
                reason={clock.bursts.length && !clock.running ? undefined : "no burst to take back"}
              >
                Take the last burst back
              </Fitting>
            </p>
            <p className="mt-3 text-ink-2">The bursts stay on this device until they are recorded, also without network.</p>
          </section>
        </>
      )}
    </main>
  );
}

/** Ready, it shows how long one may crank; while it rests, how long still; null where there is nothing to count. */
function figureOf({ figure, tone }: CrankFace, most: number): { value: string; unit: string } | null {
  if (figure === null) return tone === "ready" ? { value: String(most), unit: "s" } : null;
  if (tone !== "rest") return { value: figure.toFixed(1), unit: "s" };
  return figure >= 120 ? { value: String(Math.ceil(figure / 60)), unit: "min" } : { value: String(figure), unit: "s" };
}

/** Keeps the screen on while the starter turns, where the device can. */
function useAwake(wanted: boolean): void {
  useEffect(() => {
    if (!wanted || !("wakeLock" in navigator)) return;
    const lock = navigator.wakeLock.request("screen").catch(() => null);
    return () => void lock.then((l) => l?.release());
  }, [wanted]);
}
