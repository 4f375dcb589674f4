// Somebody found something wrong. Taken from any member; a grounding one stops every run at once.
import { and, eq } from "drizzle-orm";
import { files } from "#app/db/schema/files";
import { findings } from "#app/db/schema/findings";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import type { RaiseFinding } from "#app/lib/schemas/happenings";
import { done, invalid, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function raiseFinding(act: Act, input: RaiseFinding): Promise<Outcome<{ finding: string }>> {
  return perform({ ...act, kind: "raise-finding", input }, async (d) => {
    const refusal = refusalOf(mayRaise(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { system, words, severity, cap, photo } = input;
    if (photo !== null) {
      const [file] = await d.tx
        .select({ id: files.id })
        .from(files)
        .where(and(eq(files.id, photo), eq(files.installId, d.installId)));
      if (!file) return invalid("The photo has not arrived. Send it again, or raise the finding without it.");
    }
    const row = { system, words, photo, severity, cap };
    const base = await d.record(roleOf(d.member, "inspector", "builder"), { type: "finding-raised", data: row });
    await d.tx.insert(findings).values({ ...base, ...row });
    return done({ finding: base.id });
  });
}
