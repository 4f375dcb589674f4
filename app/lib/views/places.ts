/**
 * Addresses of an install's pages, and the short names under which a link to them stands on a fitting.
 * Pure: ids in, paths and words out.
 */
import type { Blocker } from "#app/lib/gates/result";
import type { Snapshot } from "#app/lib/gates/snapshot";

export const boardOf = (installId: string): string => `/installs/${installId}`;
export const gateOf = (installId: string, gateId: string, itemId: string | null = null): string =>
  `/installs/${installId}/gates/${gateId}${itemId ? `#${anchorOf(itemId)}` : ""}`;
export const runOf = (installId: string, runId: string): string => `/installs/${installId}/runs/${runId}`;

/** Fragment of an item's row on its gate page. */
export const anchorOf = (itemId: string): string => `item-${itemId}`;

export interface Place {
  href: string;
  label: string;
}

const PAGES: Record<Exclude<Blocker["link"]["page"], "gate" | "run">, [path: string, label: string]> = {
  findings: ["/findings", "Findings"],
  "loose-ends": ["/loose-ends", "Loose ends"],
  crib: ["/crib", "Crib"],
  crew: ["/crew", "Crew"],
  "set-up": ["/set-up", "Set-up"],
  "build-up": ["/build-up", "Build-up"],
  board: ["", "Board"],
  openings: ["/openings", "Openings"],
};

/** Their rows have a fragment each. */
const ROWS = { openings: "opening", "loose-ends": "loose-end", findings: "finding" } as const;
export const rowAnchor = (page: keyof typeof ROWS, id: string): string => `${ROWS[page]}-${id}`;

/** Where bad news is written down: taken from any member at any time. What is still open is counted there. */
export function recordPlaces(snapshot: Snapshot): Place[] {
  const open = snapshot.openings.filter((o) => o.closed === null).length;
  return (["openings", "loose-ends", "findings"] as const).map((page) => ({
    href: `${boardOf(snapshot.install.id)}${PAGES[page][0]}`,
    label: page === "openings" && open ? `${PAGES[page][1]}, ${open} open` : PAGES[page][1],
  }));
}

/** Where a blocker is cleared. */
export function placeOf(snapshot: Snapshot, link: Blocker["link"]): Place {
  const { id: install } = snapshot.install;
  if (link.page === "gate" && link.id) {
    const gate = snapshot.gates.find((g) => g.id === link.id);
    return { href: gateOf(install, link.id, link.item), label: gate?.short ?? "Gate" };
  }
  if (link.page === "run" && link.id) {
    const run = snapshot.runs.find((r) => r.id === link.id);
    return { href: runOf(install, link.id), label: run ? `Run ${run.label}` : "Run" };
  }
  const page = link.page === "gate" ? "board" : link.page === "run" ? "build-up" : link.page;
  const [path, label] = PAGES[page];
  const row = link.id && (page === "openings" || page === "loose-ends" || page === "findings") ? `#${rowAnchor(page, link.id)}` : "";
  return { href: `${boardOf(install)}${path}${row}`, label };
}

/** "Mirela Tansen", "Mirela Tansen or Osei Brandt", "Mirela Tansen, Osei Brandt or 2 more". */
export function anyOf(names: string[], most = 3): string {
  if (names.length > most) return `${names.slice(0, most - 1).join(", ")} or ${names.length - most + 1} more`;
  return names.length < 2 ? (names[0] ?? "") : `${names.slice(0, -1).join(", ")} or ${names.at(-1)}`;
}

export const nameIn = (snapshot: Snapshot, member: string): string =>
  snapshot.members.find((m) => m.id === member)?.name ?? "a former member";

/** "WR1", "WR1 and WR2", "WR1, WR2 and WR3". */
export const listOf = (words: string[]): string =>
  words.length < 2 ? (words[0] ?? "") : `${words.slice(0, -1).join(", ")} and ${words.at(-1)}`;

/** Who can clear it, by name, the reader as "you" and first; or what comes first: a sentence. */
export function whoClears(snapshot: Snapshot, owner: Blocker["owner"], me: string): string {
  if (!owner.members.length) return owner.next ?? "";
  const others = owner.members.filter((m) => m !== me).map((m) => nameIn(snapshot, m));
  return `For ${anyOf(others.length < owner.members.length ? ["you", ...others] : others)}.`;
}
