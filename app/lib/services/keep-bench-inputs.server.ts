// Remembers what was typed into a calculator of the bench, for everybody on the install. No record speaks of it, so there is no event;
// nothing on the board rests on it. The last writer counts.
import { write } from "#app/db/client.server";
import { memberOf } from "#app/db/queries/membership.server";
import { benchInputs } from "#app/db/schema/bench-inputs";
import type { BenchKey, TypedForm } from "#app/lib/bench/bench-def";
import { now } from "#app/lib/clock";
import { done, notFound, type Outcome } from "#app/lib/services/outcome";

interface Keeping {
  installId: string;
  userId: string;
  sheet: BenchKey;
  inputs: TypedForm;
}

export function keepBenchInputs({ installId, userId, sheet, inputs }: Keeping): Promise<Outcome<null>> {
  return write(async (tx) => {
    if (!(await memberOf(tx, installId, userId))) return notFound("That install");
    const kept = { inputs, by: userId, recorded: now() };
    await tx
      .insert(benchInputs)
      .values({ installId, sheet, ...kept })
      .onConflictDoUpdate({ target: [benchInputs.installId, benchInputs.sheet], set: kept });
    return done(null);
  });
}
