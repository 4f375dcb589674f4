/**
 * What a signer is shown and signs: the words of the signature's meaning, and the sheet as plain text.
 * The page shows this very text; it is stored with the signature and its hash goes into the chain. Times with zone, numbers in SI.
 */

import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf } from "#app/lib/gates/facts";
import type { Cover, SigningRole } from "#app/lib/gates/snapshot";
import { when } from "#app/lib/gates/when";
import { evidenceWords } from "#app/lib/record/evidence-words";

/** What a signature of a gate says, by the role in which it is given. */
export function meaningOf(as: SigningRole): string {
  return as === "builder"
    ? "I answer for the work of this gate: it was done as recorded here, and what is recorded is true."
    : "I did none of this gate's work. I have looked at what is recorded here and I find it sound.";
}

export function meaningOfRelease(as: "lead" | "inspector"): string {
  return as === "lead"
    ? "I answer for this install: every run is reviewed and nothing that I know of is left open. I release it for taxi tests."
    : "I have looked at the record of this install and find no reason against taxi tests.";
}

/** The sheet of one gate. Throws when the gate is not on the board. */
export function shownGate(e: Evaluation, gateId: string, as: SigningRole): string {
  const gate = e.facts.gates.get(gateId);
  const covers = e.result.gates[gateId]?.covers;
  if (!gate || !covers) throw new Error("No such gate on the board");
  const { install } = e.snapshot;
  return [
    `${install.registration}, ${install.name}`,
    `Gate ${gate.key} ${gate.name}, revision ${gate.revision}`,
    ...(gate.caution ? [`Caution: ${gate.caution}`] : []),
    ...covers.map((c) => coverLine(e, c)),
    `Signed as ${as}: ${meaningOf(as)}`,
  ].join("\n");
}

/** The sheet of the release. */
export function shownRelease(e: Evaluation, as: "lead" | "inspector"): string {
  const { install } = e.snapshot;
  const { covers } = e.result.release;
  return [
    `${install.registration}, ${install.name}`,
    "Release for taxi tests",
    ...covers.items.map((c) => coverLine(e, c)),
    `Signatures of the other gates: ${covers.signatures.join(", ") || "none"}`,
    `Signed as ${as}: ${meaningOfRelease(as)}`,
  ].join("\n");
}

function coverLine(e: Evaluation, cover: Cover): string {
  const item = itemOf(e.facts, cover.item);
  if (!item) throw new Error("A cover of an item that is not on the board");
  const head = `${item.key} (revision ${cover.revision}) ${item.words}`;
  const proof = e.snapshot.proofs.find((p) => p.id === cover.proof);
  if (!proof) return `${head}: no proof`;
  const zone = e.snapshot.install.timeZone;
  const name = (id: string) => e.facts.members.get(id)?.name ?? "a former member";
  const said =
    proof.state === "na"
      ? `not applicable, ${proof.note}`
      : item.parts.map((part, n) => evidenceWords(part, proof.evidence[n] ?? null, "si", zone)).join("; ");
  const who = proof.did === proof.by ? name(proof.did) : `${name(proof.did)}, written down by ${name(proof.by)}`;
  return `${head}: ${said}. ${who}, ${when(proof.counts, zone, true)}. Proof ${proof.id}`;
}
