/** May this member do this now? What an install is set up with: its board, numbers, ratings and limits, crib, people, and its mail. */
import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf } from "#app/lib/gates/facts";
import { needsRole, no, notFound, OK } from "#app/lib/gates/permit";
import type { Verdict } from "#app/lib/gates/result";

/** The lead shapes the board freely until the first proof. */
export function mayShape(e: Evaluation, a: { member: string }): Verdict {
  return (
    needsRole(e, a.member, ["lead"], "change the board") ??
    (e.snapshot.proofs.length
      ? no(e, {
          code: "order",
          title: "Work has begun",
          sentence: "After the first proof, what asks for less waits for an inspector's acceptance.",
          roles: ["inspector"],
        })
      : OK)
  );
}

/** @param a.asksLess the number lets something pass that the one which is there does not; left out: any number at all. */
export function mayEnterNumber(e: Evaluation, a: { item: string; member: string; asksLess?: boolean }): Verdict {
  if (!itemOf(e.facts, a.item)) return notFound(e, "item");
  const role = needsRole(e, a.member, ["builder", "lead", "inspector"], "enter a maker's number");
  if (role || !a.asksLess || !e.snapshot.proofs.length) return role ?? OK;
  return needsRole(e, a.member, ["inspector"], "enter it")
    ? no(e, {
        code: "not-your-role",
        subject: ["item", a.item],
        title: "An inspector's to enter",
        sentence: "This asks for less than the number that is there. Work has begun, so an inspector must enter it.",
        roles: ["inspector"],
      })
    : OK;
}

/** A rating or limit that was read somewhere is an inspector's to change once work has begun. */
export const isInspectorsToChange = (e: Evaluation, key: string): boolean =>
  e.snapshot.proofs.length > 0 && e.snapshot.values.some((v) => v.key === key && v.source !== null);

/**
 * May this person enter ratings and limits, and this one?
 * @param a.value left out: any at all. `changes` = another figure than the one that is there, not only where it was read.
 */
export function mayConfirmValue(e: Evaluation, a: { member: string; value?: { key: string; changes: boolean } }): Verdict {
  const role = needsRole(e, a.member, ["lead", "builder", "inspector"], "enter ratings and limits");
  if (role || !a.value) return role ?? OK;
  const { key, changes } = a.value;
  const known = e.snapshot.values.find((v) => v.key === key);
  if (!known) return notFound(e, "rating or limit");
  if (!changes || !isInspectorsToChange(e, key) || !needsRole(e, a.member, ["inspector"], "change it")) return OK;
  return no(e, {
    code: "not-your-role",
    subject: ["value", key],
    title: "An inspector's to change",
    sentence: `${known.label} was confirmed (${known.source}) and work has begun. An inspector must change it; you may correct where it was read.`,
    roles: ["inspector"],
    page: "set-up",
  });
}

export const mayEditCrib = (e: Evaluation, a: { member: string }): Verdict =>
  needsRole(e, a.member, ["builder", "lead", "inspector"], "keep the crib") ?? OK;
export const mayInvite = (e: Evaluation, a: { member: string }): Verdict => needsRole(e, a.member, ["lead"], "invite people") ?? OK;

/**
 * A mail that was given up is sent once more by a lead. A GO that is over stays unsent: who reads it late would take it for true.
 * @param a.act id of the record that the mail tells about.
 */
export function mayMailAgain(e: Evaluation, a: { member: string; kind: string; act: string }): Verdict {
  const role = needsRole(e, a.member, ["lead"], "send a mail again");
  if (role) return role;
  if (a.kind !== "go" || e.result.runs.some((r) => r.go?.id === a.act)) return OK;
  return no(e, {
    code: "go-over",
    title: "This GO is over",
    sentence: "This GO is over, so its mail is not sent any more. Call GO again when the run is clear.",
    roles: ["lead"],
  });
}
