// Records one proof of one item. Its evidence is checked for shape here; whether it meets the criterion is derived, not stored.

import { and, eq, inArray } from "drizzle-orm";
import { files } from "#app/db/schema/files";
import { proofs } from "#app/db/schema/proofs";
import { itemOf } from "#app/lib/gates/facts";
import type { Evidence } from "#app/lib/gates/snapshot";
import { mayProve } from "#app/lib/gates/verdicts";
import { checkEvidence } from "#app/lib/schemas/evidence";
import type { RecordProof } from "#app/lib/schemas/proof";
import { done, invalid, notFound, type Outcome, type Refusal, refusalOf } from "#app/lib/services/outcome";
import { roleOf, stale } from "#app/lib/services/parts.server";
import { type Act, type Doing, perform } from "#app/lib/services/perform.server";

export function recordProof(act: Act, input: RecordProof): Promise<Outcome<{ proof: string }>> {
  return perform({ ...act, kind: "record-proof", input }, async (d) => {
    const { item: itemId, state, did, at } = input;
    const item = itemOf(d.e.facts, itemId);
    if (!item) return notFound("That item");
    const late = at !== null;
    // A failing proof is bad news: it names whatever role the person holds.
    const as = state === "failed" ? roleOf(d.member, input.as, "builder", "inspector") : input.as;
    const refusal = refusalOf(mayProve(d.e, { item: itemId, member: d.member.id, as, state, late, told: input.told, seen: input.seen }));
    if (refusal) return refusal;
    if (item.revision !== input.revision) return stale(`${item.key} was changed since you opened the page. Read it again, then record it.`);
    if (state === "na" && input.note.length < 3) return invalid("Say why the item does not apply.");
    const checked = checkEvidence(item.parts, state, input.evidence);
    if (!checked.ok) return invalid(checked.message);
    const wrong = whoAndWhen(d, did, at) ?? toolsKnown(d, input.tools) ?? (await photosKnown(d, checked.evidence));
    if (wrong) return wrong;

    const row = {
      revision: item.revision,
      did: did ?? d.member.id,
      counts: at ?? d.now,
      late,
      state,
      evidence: checked.evidence,
      tools: input.tools,
      note: input.note,
    };
    const base = await d.record(as, { type: "proof", data: { item: itemId, key: item.key, ...row } });
    await d.tx.insert(proofs).values({ ...base, itemId, ...row });
    return done({ proof: base.id });
  });
}

function whoAndWhen(d: Doing, did: string | null, at: number | null): Refusal | null {
  if (did !== null && !d.e.facts.members.has(did)) return invalid("Whoever did it is not a member here. Ask the lead to invite them.");
  if (at === null) return did !== null && did !== d.member.id ? invalid("Somebody else did it: enter when it was done.") : null;
  return at > d.now ? invalid("That time has not come yet. Enter when it was done.") : null;
}

function toolsKnown(d: Doing, tools: string[]): Refusal | null {
  return tools.every((t) => d.e.facts.tools.has(t)) ? null : invalid("A tool that you named is not in this crib. Add it there first.");
}

/** Photos must be files of this very install. */
async function photosKnown(d: Doing, evidence: (Evidence | null)[]): Promise<Refusal | null> {
  const named = evidence.flatMap((e) => (e?.kind === "photo" ? e.files : []));
  if (named.length === 0) return null;
  const rows = await d.tx
    .select({ id: files.id })
    .from(files)
    .where(and(eq(files.installId, d.installId), inArray(files.id, named)));
  for (const e of evidence) if (e?.kind === "photo") e.stored = e.files.every((f) => rows.some((r) => r.id === f));
  return rows.length === new Set(named).size ? null : invalid("A photo has not arrived. Send it again, then record the item.");
}
