import { useEffect, useRef } from "react";
import { Lapses } from "#app/components/happenings/Lapses";
import { Notice } from "#app/components/ui/Notice";
import { holdWords, type WhatLapses } from "#app/lib/views/what-lapses";

interface LapsePanelProps {
  /** Null: nothing is chosen yet, or the choice has changed since. */
  lapses: WhatLapses | null;
  /** Still open: nothing proved of it counts before it is closed. */
  staysOpen: boolean;
  changed: boolean;
  /** The form came back: it says beside a field what is to be put right. */
  refused: boolean;
  /** Take the focus: somebody has just asked for it. Changes with each answer. */
  focus: string | null;
}

/** What an opening makes lapse, the HOLD first. It stands beside the form before the opening counts. */
export function LapsePanel({ lapses, staysOpen, changed, refused, focus }: LapsePanelProps) {
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    if (focus) heading.current?.focus();
  }, [focus]);
  return (
    <section aria-labelledby="lapses" className="border-t-2 border-ink bg-plate px-4 py-5 tablet:px-6 wide:border-t-0 wide:border-l-2">
      <h2 id="lapses" ref={heading} tabIndex={-1} className="scroll-mt-4 text-h3">
        What will lapse
      </h2>
      {lapses ? (
        <Shown lapses={lapses} staysOpen={staysOpen} />
      ) : (
        <p className="mt-2 max-w-[60ch] text-ink-2">
          {refused
            ? "Nothing was looked up or recorded: put right what is marked in the form, then look again."
            : changed
              ? "You have changed the choice. Look again before you confirm."
              : "Choose what was opened, then look: the items that lapse, the gates that fall and whether a GO turns into HOLD stand here before anything is recorded."}
        </p>
      )}
    </section>
  );
}

function Shown({ lapses, staysOpen }: { lapses: WhatLapses; staysOpen: boolean }) {
  const hold = holdWords(lapses);
  return (
    <div className="mt-3 flex flex-col gap-3">
      {lapses.running && (
        <Notice kind="danger" title={`Run ${lapses.running} is on.`}>
          Shout STOP first, or cross your arms overhead. Record it when the engine stands still.
        </Notice>
      )}
      {hold && (
        <Notice kind="hold" title={hold.slice(0, hold.indexOf(":") + 1).replace(":", ".")}>
          {hold.slice(hold.indexOf(":") + 2)} Everybody answers again before the next GO.
        </Notice>
      )}
      {lapses.releaseLapses && (
        <Notice kind="lapsed" title="The release for taxi tests lapses.">
          The leak check run comes again.
        </Notice>
      )}
      {lapses.clearance && (
        <p>
          Clearance falls from <b>{lapses.clearance.from}</b> to <b>{lapses.clearance.to}</b>.
        </p>
      )}
      {lapses.gates.length > 0 ? (
        <Lapses gates={lapses.gates} />
      ) : (
        <p>Nothing that stands now lapses. Record it all the same: what is proved later counts only from the closing on.</p>
      )}
      <p className="border-t border-line pt-3 text-note text-ink-2">
        {lapses.gates.length > 0 && `${lapses.same === 1 ? "1 gate stays as it is." : `${lapses.same} gates stay as they are.`} `}
        {staysOpen && "While it is open, no proof of these systems counts: prove them again once it is closed."}
      </p>
    </div>
  );
}
