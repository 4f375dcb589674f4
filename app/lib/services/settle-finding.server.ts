// What becomes of a finding: fixed by a builder, closed or sent back by an inspector, made sharper by anyone, lowered by an inspector.
import { findingEvents } from "#app/db/schema/findings";
import { mayClose, mayFix, mayGrade } from "#app/lib/gates/happening-verdicts";
import type { Verdict } from "#app/lib/gates/result";
import type { Role } from "#app/lib/gates/snapshot";
import type { FindingWords, GradeFinding } from "#app/lib/schemas/happenings";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

type Settled = Promise<Outcome<{ finding: string }>>;

export const fixFinding = (act: Act, input: FindingWords): Settled =>
  perform({ ...act, kind: "fix-finding", input }, (d) =>
    settle(d, "fixed", "builder", input, mayFix(d.e, { finding: input.finding, member: d.member.id })),
  );

export const closeFinding = (act: Act, input: FindingWords): Settled =>
  perform({ ...act, kind: "close-finding", input }, (d) =>
    settle(d, "closed", "inspector", input, mayClose(d.e, { finding: input.finding, member: d.member.id })),
  );

/** The fix did not hold: the finding is open again. */
export const rejectFix = (act: Act, input: FindingWords): Settled =>
  perform({ ...act, kind: "reject-fix", input }, (d) =>
    settle(d, "not-fixed", "inspector", input, mayClose(d.e, { finding: input.finding, member: d.member.id })),
  );

async function settle(
  d: Doing,
  kind: "fixed" | "closed" | "not-fixed",
  as: Role,
  { finding, words }: FindingWords,
  verdict: Verdict,
): Settled {
  const refusal = refusalOf(verdict);
  if (refusal) return refusal;
  const base = await d.record(as, { type: `finding-${kind}`, data: { finding, words } });
  await d.tx.insert(findingEvents).values({ ...base, findingId: finding, kind, words });
  return done({ finding });
}

export const gradeFinding = (act: Act, input: GradeFinding): Settled =>
  perform({ ...act, kind: "grade-finding", input }, async (d) => {
    const { finding, severity, cap, words } = input;
    const refusal = refusalOf(mayGrade(d.e, { finding, severity, cap, member: d.member.id }));
    if (refusal) return refusal;
    const base = await d.record(roleOf(d.member, "inspector", "builder"), {
      type: "finding-severity",
      data: { finding, severity, cap, words },
    });
    await d.tx.insert(findingEvents).values({ ...base, findingId: finding, kind: "severity", severity, cap, words });
    return done({ finding });
  });
