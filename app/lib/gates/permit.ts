/** Small parts of verdicts: the refusals that every act shares, each with why and what to do. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { heldAnyRole, heldRole } from "#app/lib/gates/facts";
import type { Blocker, BlockerCode, Verdict } from "#app/lib/gates/result";
import type { Role } from "#app/lib/gates/snapshot";
import { blocker, ownerOf } from "#app/lib/gates/who";

export const OK: Verdict = { ok: true };
export const refuse = (...blockers: Blocker[]): Verdict => ({ ok: false, blockers });

type Page = Blocker["link"]["page"];

interface Refusal {
  code: BlockerCode;
  title: string;
  sentence: string;
  roles: [Role, ...Role[]];
  barred?: string[];
  subject?: [Blocker["subject"]["kind"], string];
  page?: Page;
  id?: string | null;
}

export const no = (e: Evaluation, r: Refusal): Verdict =>
  refuse(
    blocker({
      code: r.code,
      subject: r.subject ?? ["install", e.snapshot.install.id],
      title: r.title,
      sentence: r.sentence,
      owner: ownerOf(e.facts, r.roles, r.barred),
      page: r.page ?? "board",
      id: r.id ?? null,
    }),
  );

export const notFound = (e: Evaluation, what: string): Verdict =>
  no(e, { code: "not-found", title: "Not found", sentence: `This ${what} is not on this install. Go back to the board.`, roles: ["lead"] });

/** A run that was started, ended or scrubbed takes no more of it. */
export const runOver = (e: Evaluation, id: string, state: string): Verdict =>
  no(e, {
    subject: ["run", id],
    page: "run",
    id,
    code: "run-over",
    title: `The run is ${state}`,
    sentence: `It is ${state}; plan another run of this rung instead.`,
    roles: ["lead"],
  });

const words: Record<Role, string> = { lead: "a lead", builder: "a builder", inspector: "an inspector", crew: "a crew member" };
const either = (roles: Role[]): string => roles.map((r) => words[r]).join(" or ");

/** Null when the member holds one of the roles now; else the refusal. */
export function needsRole(e: Evaluation, member: string, roles: [Role, ...Role[]], act: string): Verdict | null {
  if (roles.some((r) => heldRole(e.facts, member, r, e.at))) return null;
  const mine = (["lead", "builder", "inspector", "crew"] as Role[]).filter((r) => heldRole(e.facts, member, r, e.at));
  return no(e, {
    code: "not-your-role",
    title: "Not your role",
    sentence: `Only ${either(roles)} can ${act}. ${mine.length ? `You are here as ${mine.join(" and ")}.` : "You hold no role here."}`,
    roles,
  });
}

export const needsMember = (e: Evaluation, member: string): Verdict | null =>
  heldAnyRole(e.facts, member, e.at)
    ? null
    : no(e, {
        code: "not-your-role",
        title: "Not a member",
        sentence: "Only members of this install can record here. Ask the lead to invite you.",
        roles: ["lead"],
      });
