/** The words in the strip above every page of an install, with the figures of what is open. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Instant } from "#app/lib/gates/snapshot";
import { boardOf } from "#app/lib/views/places";

export interface StripView {
  links: { label: string; href: string; count?: number; countLabel?: string }[];
  asOf: string;
}

/** Above the pages that belong to no install. */
export function everywhereLinks(current: string, isAdmin: boolean): (StripView["links"][number] & { current: boolean })[] {
  const links = [
    { label: "Hangar", href: "/hangar" },
    { label: "New install", href: "/installs/new" },
    { label: "Account", href: "/account" },
    ...(isAdmin ? [{ label: "Instance", href: "/admin" }] : []),
  ];
  return links.map((link) => ({ ...link, current: link.href === current }));
}

export function stripOf(e: Evaluation, now: Instant): StripView {
  const home = boardOf(e.snapshot.install.id);
  const loose = e.snapshot.looseEnds.filter((l) => !l.confirmed).length;
  return {
    links: [
      { label: "Board", href: home },
      { label: "Build-up", href: `${home}/build-up` },
      { label: "Findings", href: `${home}/findings` },
      { label: "Loose ends", href: `${home}/loose-ends`, count: loose, countLabel: " not restored" },
      { label: "Crew", href: `${home}/crew` },
      { label: "Crib", href: `${home}/crib` },
      { label: "Set-up", href: `${home}/set-up` },
      { label: "Bench", href: `${home}/bench` },
      { label: "Mail", href: `${home}/mail` },
      { label: "Record", href: `${home}/record` },
    ],
    asOf: `as of ${e.facts.when(now).replace(/^\d+ \w+ /, "")}`,
  };
}
