import { useRef } from "react";
import type { AbortPart } from "#app/components/run/AbortWords";
import { Fitting } from "#app/components/ui/Fitting";

/** The word first, over the whole screen, then when and how: to be shouted, and read by whoever has the device in hand. */
export function StopWords({ parts }: { parts: AbortPart[] }) {
  const dialog = useRef<HTMLDialogElement>(null);
  return (
    <>
      <Fitting size="act" variant="stop" type="button" onClick={() => dialog.current?.showModal()} note="shout it; the words">
        STOP
      </Fitting>
      <dialog ref={dialog} className="stop-words" aria-label="STOP">
        <p className="stop-words-word">STOP</p>
        <p className="text-h3">Shout it, or cross the arms overhead. Throttle shut, usual stop.</p>
        {/* Before the words: what takes the focus decides what is in sight. */}
        <p className="flex">
          <Fitting type="button" size="act" variant="outline" onClick={() => dialog.current?.close()}>
            Back to the card
          </Fitting>
        </p>
        {parts.map((part) => (
          <section key={part.word} aria-label={part.word}>
            <p className="text-lead">
              <b>{part.word}:</b> {part.first}
            </p>
            <ul className="list-disc pl-6">
              {part.lines.map((line) => (
                <li key={line}>{line}</li>
              ))}
            </ul>
          </section>
        ))}
      </dialog>
    </>
  );
}
