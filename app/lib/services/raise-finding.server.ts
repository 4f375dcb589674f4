// Somebody found something wrong. Taken from any member; a grounding one stops every run at once.
import { findings } from "#app/db/schema/findings";
import { mayRaise } from "#app/lib/gates/happening-verdicts";
import type { RaiseFinding } from "#app/lib/schemas/happenings";
import { done, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { photosMissing } from "#app/lib/services/own-photos.server";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function raiseFinding(act: Act, input: RaiseFinding): Promise<Outcome<{ finding: string }>> {
  return perform({ ...act, kind: "raise-finding", input }, async (d) => {
    const refusal = refusalOf(mayRaise(d.e, { member: d.member.id }));
    if (refusal) return refusal;
    const { system, words, severity, cap = null, photo = null, morePhotos = [] } = input;
    const missing = await photosMissing(d, photo === null ? morePhotos : [photo, ...morePhotos], "raise the finding");
    if (missing) return missing;
    const row = { system, words, photo, severity, cap };
    const data = { ...row, morePhotos: morePhotos.length ? morePhotos : undefined };
    const base = await d.record(roleOf(d.member, "inspector", "builder"), { type: "finding-raised", data });
    await d.tx.insert(findings).values({ ...base, ...row, morePhotos });
    return done({ finding: base.id });
  });
}
