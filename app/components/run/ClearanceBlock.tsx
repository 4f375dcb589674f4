import { ClearanceBars, type ClearanceLimitRow } from "#app/components/ui/ClearanceBars";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";

export interface ClearanceBlockProps {
  figure: string;
  binds: string;
  next: string;
  limits: ClearanceLimitRow[];
  raise: { words: string; place: { href: string; label: string } } | null;
  /** Plan a lower run instead; set only for whoever may plan. */
  lower?: { text: string; href: string } | null;
}

/** "Cleared to N rpm", as large as the page allows; what binds, the bars, and how to raise it. */
export function ClearanceBlock({ figure, binds, next, limits, raise, lower }: ClearanceBlockProps) {
  return (
    <section aria-labelledby="cleared">
      <h2 id="cleared" className="text-lead text-ink-2">
        cleared to
      </h2>
      <p className="leading-none">
        <Figure value={figure} className="text-fig-l font-bold tracking-[-0.05em]" /> <Figure value="rpm" className="ml-3 text-h2" />
      </p>
      <p className="mt-3 text-lead">
        <b>{binds}</b> {next}
      </p>
      <div className="mt-3">
        <ClearanceBars limits={limits} />
      </div>
      {raise && (
        <div className="mt-4 flex flex-col items-start gap-2 border-t border-line pt-3">
          <h3 className="text-lead">To raise it</h3>
          <p>{raise.words}</p>
          <p className="flex flex-wrap gap-2">
            <Fitting href={raise.place.href}>{raise.place.label}</Fitting>
            {lower && <Fitting href={lower.href}>Plan it to {lower.text} rpm</Fitting>}
          </p>
        </div>
      )}
    </section>
  );
}
