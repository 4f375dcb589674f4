import { Lapses } from "#app/components/happenings/Lapses";
import { Notice } from "#app/components/ui/Notice";
import { holdWords, type WhatLapses } from "#app/lib/views/what-lapses";

/** What a tool's having been found out of tolerance makes lapse, the HOLD first; it stands above the second press. */
export function CheckLapses({ lapses }: { lapses: WhatLapses }) {
  const hold = holdWords(lapses);
  return (
    <section aria-label="What will lapse" className="w-full max-w-[640px] border-l-2 border-ink bg-plate px-4 py-3">
      {lapses.running && (
        <Notice kind="danger" title={`Run ${lapses.running} is on.`}>
          Shout STOP first. Record it when the engine stands still.
        </Notice>
      )}
      {hold && <Notice kind="hold" title={hold} role="status" />}
      <p className="py-2 text-lead font-semibold" role="status">
        Nothing is recorded yet. These lapse:
      </p>
      <Lapses gates={lapses.gates} />
    </section>
  );
}
