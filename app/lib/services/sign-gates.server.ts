// Signs or countersigns the gates of one sheet with one PIN entry: a signature of its own for each, all or none.
import { signatures } from "#app/db/schema/signatures";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { maySign } from "#app/lib/gates/signing-verdicts";
import { hashOf } from "#app/lib/record/chain";
import { meaningOf, shownGate } from "#app/lib/record/shown";
import type { SignGates } from "#app/lib/schemas/signing";
import { pinRefusal } from "#app/lib/services/check-pin.server";
import { done, invalid, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { type Act, perform } from "#app/lib/services/perform.server";

export async function signGates(act: Act, { pin, ...input }: SignGates): Promise<Outcome<{ signatures: string[] }>> {
  const wrongPin = await pinRefusal(act, pin);
  if (wrongPin) return wrongPin;
  return perform({ ...act, kind: "sign-gates", input }, async (d) => {
    const { as, gates } = input;
    if (new Set(gates.map((g) => g.gate)).size !== gates.length) return invalid("A gate is on the sheet twice. Load the page again.");
    for (const { gate, covers } of gates) {
      const refusal = refusalOf(maySign(d.e, { gate, member: d.member.id, as, covers }));
      if (refusal) return refusal;
    }
    const ids: string[] = [];
    const meaning = meaningOf(as);
    for (const { gate, covers } of gates) {
      const signed = d.e.facts.gates.get(gate);
      if (!signed) throw new Error("A gate that may be signed is not on the board");
      const shownText = shownGate(d.e, gate, as);
      const row = { gateRevision: signed.revision, covers, meaning, rulesVersion: RULES_VERSION, shownHash: hashOf(shownText) };
      const base = await d.record(as, { type: "signed", data: { gate, key: signed.key, ...row } });
      await d.tx.insert(signatures).values({ ...base, gateId: gate, ...row, shownText });
      ids.push(base.id);
    }
    return done({ signatures: ids });
  });
}
