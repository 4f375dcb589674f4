// What a service answers: done, or no with the reason. The page, its action and the API all say the same sentence.
import type { Blocker, Verdict } from "#app/lib/gates/result";

export type RefusalStatus = 403 | 404 | 409 | 422 | 429;

export interface Refusal {
  ok: false;
  status: RefusalStatus;
  /** The first blocker's code, or one of the service's own: "not-found", "invalid", "command-reused", "pin-wrong" ... */
  code: string;
  /** One sentence: why, and what to do next. */
  message: string;
  blockers: Blocker[];
}

export type Outcome<T> = { ok: true; value: T } | Refusal;

export const done = <T>(value: T): Outcome<T> => ({ ok: true, value });

export const refuse = (status: RefusalStatus, code: string, message: string, blockers: Blocker[] = []): Refusal => ({
  ok: false,
  status,
  code,
  message,
  blockers,
});

/** Not there, or not theirs to know of. */
export const notFound = (what = "That"): Refusal =>
  refuse(404, "not-found", `${what} is not here. It may have been put away, or you may not be a member of this install.`);

/** What was sent cannot be used; nothing was judged. */
export const invalid = (message: string): Refusal => refuse(422, "invalid", message);

/** A role that somebody lacks is 403; everything else that the rules forbid is 409, for it may pass later. */
export function refuseBy(blockers: Blocker[]): Refusal {
  const [first] = blockers;
  if (!first) throw new Error("A refusal without a blocker");
  const role = first.code === "not-your-role" || first.code === "lead-only" || first.code === "own-work";
  return refuse(first.code === "not-found" ? 404 : role ? 403 : 409, first.code, first.sentence, blockers);
}

/** Null when the rules allow it. */
export const refusalOf = (verdict: Verdict): Refusal | null => (verdict.ok ? null : refuseBy(verdict.blockers));
