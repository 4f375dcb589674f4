import { Fitting } from "#app/components/ui/Fitting";
import type { Place } from "#app/lib/views/places";

/** The way back for whoever was led here from a gate, an item or a run, and what was taken along. */
export function CameFromLine({ back, says }: { back: Place | null; says: string }) {
  if (!back) return null;
  return (
    <div className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-line px-4 py-3 tablet:px-6">
      <p>
        From <b>{back.label}</b>. {says}
      </p>
      <Fitting href={back.href}>Back to it</Fitting>
    </div>
  );
}
