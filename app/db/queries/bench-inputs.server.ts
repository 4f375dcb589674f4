// What is kept of an install's bench, with who kept it and when.
import { and, eq } from "drizzle-orm";
import type { Reader } from "#app/db/client.server";
import { benchInputs } from "#app/db/schema/bench-inputs";
import { users } from "#app/db/schema/users";
import type { BenchKey, TypedForm } from "#app/lib/bench/bench-def";

export interface KeptInputs {
  inputs: TypedForm;
  by: string;
  recorded: number;
}

const columns = { sheet: benchInputs.sheet, inputs: benchInputs.inputs, by: users.name, recorded: benchInputs.recorded };

export async function keptOf(reader: Reader, installId: string, sheet: BenchKey): Promise<KeptInputs | null> {
  const [row] = await reader
    .select(columns)
    .from(benchInputs)
    .innerJoin(users, eq(users.id, benchInputs.by))
    .where(and(eq(benchInputs.installId, installId), eq(benchInputs.sheet, sheet)));
  return row ?? null;
}

export async function allKeptOf(reader: Reader, installId: string): Promise<Map<BenchKey, KeptInputs>> {
  const rows = await reader
    .select(columns)
    .from(benchInputs)
    .innerJoin(users, eq(users.id, benchInputs.by))
    .where(eq(benchInputs.installId, installId));
  return new Map(rows.map(({ sheet, ...kept }) => [sheet, kept]));
}
