/** Who can clear a blocker: every "no" names members, or says whom to invite or what comes first. */
import { type Facts, heldAnyRole, heldRole } from "#app/lib/gates/facts";
import type { Blocker, BlockerCode, SubjectKind } from "#app/lib/gates/result";
import type { Finding, LooseEnd, Role } from "#app/lib/gates/snapshot";

const articles: Record<Role, string> = { lead: "a lead", builder: "a builder", inspector: "an inspector", crew: "a crew member" };

/**
 * Members who hold one of `roles` now and are not barred (own work).
 * @param roles first = the role that owns the blocker; the others may clear it too.
 */
export function ownerOf(facts: Facts, roles: [Role, ...Role[]], barred: string[] = []): Blocker["owner"] {
  const members: string[] = [];
  for (const role of roles)
    for (const m of facts.snapshot.members)
      if (!barred.includes(m.id) && !members.includes(m.id) && heldRole(facts, m.id, role, facts.at)) members.push(m.id);
  const role = roles[0];
  const other = barred.length ? `${articles[role].replace(/^an? /, "another ")}` : articles[role];
  return { role, members, next: members.length ? null : `Nobody here can: invite ${other} on the Crew page.` };
}

/** A builder fixes a finding; an inspector, another person, closes it. */
export const findingOwner = (facts: Facts, f: Finding): Blocker["owner"] =>
  f.fixed ? ownerOf(facts, ["inspector"], [f.fixed.by]) : ownerOf(facts, ["builder"]);

/** Builder or inspector restores a loose end; then a second person looks. */
export const looseEndOwner = (facts: Facts, l: LooseEnd): Blocker["owner"] =>
  l.restored ? ownerOf(facts, ["builder", "inspector", "lead"], [l.restored.by]) : ownerOf(facts, ["builder", "inspector"]);

interface Draft {
  code: BlockerCode;
  subject: [SubjectKind, string];
  title: string;
  sentence: string;
  owner: Blocker["owner"];
  page: Blocker["link"]["page"];
  id?: string | null;
  item?: string | null;
}

export const blocker = (d: Draft): Blocker => ({
  code: d.code,
  subject: { kind: d.subject[0], id: d.subject[1] },
  title: d.title,
  sentence: d.sentence,
  owner: d.owner,
  link: { page: d.page, id: d.id ?? null, item: d.item ?? null },
});

/** "Mirela Tansen", "Mirela Tansen and Osei Brandt", "Mirela Tansen, Osei Brandt and 2 more". */
export function names(facts: Facts, ids: string[], most = 3): string {
  const all = ids.map((id) => facts.members.get(id)?.name ?? "a former member");
  if (all.length > most) return `${all.slice(0, most - 1).join(", ")} and ${all.length - most + 1} more`;
  return all.length < 2 ? (all[0] ?? "") : `${all.slice(0, -1).join(", ")} and ${all.at(-1)}`;
}

export const count = (n: number, one: string, many = `${one}s`): string => `${n} ${n === 1 ? one : many}`;

/** Those of the crew named who are still members; when nobody is, the lead comes first. */
export function ownersAmong(facts: Facts, members: string[]): Blocker["owner"] {
  const active = members.filter((m) => heldAnyRole(facts, m, facts.at));
  return { role: "crew", members: active, next: active.length ? null : "They are no longer members: the lead fills their places first." };
}

/** A label inside a sentence: "Oil pressure" becomes "oil pressure", "CHT" stays. */
export const inSentence = (label: string): string => (/^[A-Z][a-z]/.test(label) ? `${label[0]?.toLowerCase()}${label.slice(1)}` : label);
