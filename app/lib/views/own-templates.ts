/** A person's own templates as their page lists them, each beside the built-in one. Pure. */
import { count } from "#app/lib/gates/who";
import { type Compared, compareWithBuiltIn, type OwnTemplate } from "#app/lib/template/own-template";

export const TEMPLATES = "/templates";

export interface TemplateRow {
  id: string;
  anchor: string;
  name: string;
  /** "17 gates, 92 items; kept 3 Dec 2031" */
  says: string;
  file: string;
  compared: Compared;
  /** How many of the dropped guard a life. */
  lives: number;
}

export const anchorOfTemplate = (id: string): string => `template-${id}`;

export function templateRow({
  id,
  name,
  body,
  createdAt,
}: {
  id: string;
  name: string;
  body: OwnTemplate;
  createdAt: number;
}): TemplateRow {
  const compared = compareWithBuiltIn(body);
  const gates = body.gates.filter((g) => !g.hidden);
  const items = body.items.filter((i) => !i.hidden && gates.some((g) => g.key === i.gate));
  const day = new Intl.DateTimeFormat("en-GB", { day: "numeric", month: "short", year: "numeric", timeZone: "UTC" }).format(createdAt);
  return {
    id,
    anchor: anchorOfTemplate(id),
    name,
    says: `${count(gates.length, "gate")}, ${count(items.length, "item")}; kept on ${day} UTC`,
    file: `${TEMPLATES}/${id}/board.json`,
    compared,
    lives: compared.dropped.filter((d) => d.killer).length,
  };
}
