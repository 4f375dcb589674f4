// A program with other rules than the one before it: what stands is derived, so it changes by itself; this writes it into each
// record, and holds every GO, which was called under the old rules.
import { and, asc, desc, eq, inArray } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { events } from "#app/db/schema/events";
import { installs } from "#app/db/schema/installs";
import { RULES_VERSION } from "#app/lib/gates/rules-version";
import { beginRecord, evaluateIn } from "#app/lib/services/perform.server";
import { writeHold } from "#app/lib/services/write-hold.server";

/** The rules of records that do not name theirs. */
const FIRST_RULES = "1";

/** Looks at every install. Returns how many had other rules. */
export async function applyRules(): Promise<number> {
  let changed = 0;
  for (const { id, by } of await db().select({ id: installs.id, by: installs.createdBy }).from(installs).orderBy(asc(installs.id))) {
    const from = await rulesOf(id);
    if (from !== RULES_VERSION) {
      await apply(id, from, by);
      changed++;
    }
  }
  return changed;
}

async function rulesOf(installId: string): Promise<string> {
  const [row] = await db()
    .select({ body: events.body })
    .from(events)
    .where(and(eq(events.installId, installId), inArray(events.type, ["install-created", "rules-changed"])))
    .orderBy(desc(events.seq))
    .limit(1);
  const data = row ? (JSON.parse(row.body) as { data: { to?: string; rulesVersion?: string } }).data : {};
  return data.to ?? data.rulesVersion ?? FIRST_RULES;
}

function apply(installId: string, from: string, by: string): Promise<void> {
  return write(async (tx) => {
    const { writer, e } = await beginRecord(tx, installId);
    const lead = e.snapshot.members.find((m) => m.roles.some((r) => r.role === "lead" && r.to === null))?.id ?? by;
    const who = { by: lead, as: "lead" as const };
    const stands = e.snapshot.gates.filter((g) => e.result.gates[g.id]?.stands).map((g) => g.key);
    await writer.record(who, { type: "rules-changed", data: { from, to: RULES_VERSION, stands } });
    if (!e.result.runs.some((r) => r.go || r.goLost)) return;
    const now = await evaluateIn(tx, installId, writer.now);
    for (const run of now.result.runs)
      if (run.go || run.goLost)
        await writeHold({
          ...{ tx, writer, e: now, run, who, auto: true },
          reason: "The rules of the board changed. Look at what stops the run, and call GO again.",
        });
  });
}
