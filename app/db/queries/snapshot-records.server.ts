// The snapshot's proofs and signatures, each with what was recorded about it afterwards. One query a table.
import { asc, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { files } from "#app/db/schema/files";
import { acceptances, confirmations, keeps, proofs, proofWithdrawals } from "#app/db/schema/proofs";
import { releaseSignatures, releaseSignatureWithdrawals, signatures, signatureWithdrawals } from "#app/db/schema/signatures";
import type { Evidence, Recorded, ReleaseSignature, Role, Signature, Snapshot } from "#app/lib/gates/snapshot";

/** Only what every record has, without the row's other columns. */
export const recorded = ({ id, seq, recorded, by, as }: Recorded): Recorded => ({ id, seq, recorded, by, as });

type Loaded = Pick<Snapshot, "proofs" | "confirmations" | "acceptances" | "keeps" | "signatures" | "releaseSignatures">;

export async function loadRecords(reader: Reader, installId: string): Promise<Loaded> {
  const [proofRows, takenBack, seen, accepted, kept, signed, unsigned, releases, unreleased, arrived] = await Promise.all([
    reader.select().from(proofs).where(eq(proofs.installId, installId)).orderBy(asc(proofs.seq)),
    reader.select().from(proofWithdrawals).where(eq(proofWithdrawals.installId, installId)),
    reader.select().from(confirmations).where(eq(confirmations.installId, installId)).orderBy(asc(confirmations.seq)),
    reader.select().from(acceptances).where(eq(acceptances.installId, installId)).orderBy(asc(acceptances.seq)),
    reader.select().from(keeps).where(eq(keeps.installId, installId)).orderBy(asc(keeps.seq)),
    reader.select().from(signatures).where(eq(signatures.installId, installId)).orderBy(asc(signatures.seq)),
    reader.select().from(signatureWithdrawals).where(eq(signatureWithdrawals.installId, installId)),
    reader.select().from(releaseSignatures).where(eq(releaseSignatures.installId, installId)).orderBy(asc(releaseSignatures.seq)),
    reader.select().from(releaseSignatureWithdrawals).where(eq(releaseSignatureWithdrawals.installId, installId)),
    reader.select({ id: files.id }).from(files).where(eq(files.installId, installId)),
  ]);
  const withdrawnProof = new Map(takenBack.map((w) => [w.proofId, recorded(w)]));
  const withdrawnSignature = new Map(unsigned.map((w) => [w.signatureId, recorded(w)]));
  const withdrawnRelease = new Map(unreleased.map((w) => [w.signatureId, recorded(w)]));
  const stored = new Set(arrived.map((f) => f.id));
  return {
    proofs: proofRows.map(({ itemId, installId: _, evidence, ...p }) => ({
      ...p,
      item: itemId,
      evidence: evidence.map((e) => withStored(e, stored)),
      withdrawn: withdrawnProof.get(p.id) ?? null,
    })),
    confirmations: seen.map((c) => ({ ...recorded(c), proof: c.proofId })),
    acceptances: accepted.map((a) => ({ ...recorded(a), proof: a.proofId, reason: a.reason })),
    keeps: kept.map((k) => ({ ...recorded(k), proof: k.proofId, reason: k.reason })),
    signatures: signed.map((s) => ({
      ...recorded(s),
      as: asSigner(s.as),
      gate: s.gateId,
      gateRevision: s.gateRevision,
      covers: s.covers,
      meaning: s.meaning,
      rulesVersion: s.rulesVersion,
      withdrawn: withdrawnSignature.get(s.id) ?? null,
    })),
    releaseSignatures: releases.map((s) => ({
      ...recorded(s),
      as: asReleaser(s.as),
      covers: s.covers,
      meaning: s.meaning,
      rulesVersion: s.rulesVersion,
      withdrawn: withdrawnRelease.get(s.id) ?? null,
    })),
  };
}

/** Whether a photo has arrived is asked each time: a tablet may send the proof first and the picture later. */
function withStored(evidence: Evidence | null, stored: Set<string>): Evidence | null {
  return evidence?.kind === "photo" ? { ...evidence, stored: evidence.files.every((f) => stored.has(f)) } : evidence;
}

function asSigner(role: Role): Signature["as"] {
  if (role === "crew") throw new Error("A signature was stored in a role that cannot sign");
  return role;
}

function asReleaser(role: Role): ReleaseSignature["as"] {
  if (role !== "lead" && role !== "inspector") throw new Error("A release was stored in a role that cannot release");
  return role;
}
