/** The words in the strip above every page of an install, with the figures of what is open. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Instant } from "#app/lib/gates/snapshot";
import { boardOf } from "#app/lib/views/places";

export interface StripView {
  links: { label: string; href: string; count?: number; countLabel?: string }[];
  asOf: string;
}

export function stripOf(e: Evaluation, now: Instant): StripView {
  const home = boardOf(e.snapshot.install.id);
  return {
    links: [
      { label: "Board", href: home },
      { label: "Build-up", href: `${home}/build-up` },
      { label: "Crew", href: `${home}/crew` },
      { label: "Crib", href: `${home}/crib` },
      { label: "Set-up", href: `${home}/set-up` },
      { label: "Mail", href: `${home}/mail` },
    ],
    asOf: `as of ${e.facts.when(now).replace(/^\d+ \w+ /, "")}`,
  };
}
