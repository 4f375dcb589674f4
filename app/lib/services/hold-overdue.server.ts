// The clock's part: a GO whose window is over, or that time alone has made unclear, becomes HOLD. GO is over then even if this
// never runs; this writes it down and tells the crew.
import { desc, inArray } from "drizzle-orm";
import { db, write } from "#app/db/client.server";
import { runActs } from "#app/db/schema/runs";
import { beginRecord } from "#app/lib/services/perform.server";
import { writeHold } from "#app/lib/services/write-hold.server";

/** Looks at every run whose newest word is GO. Returns how many were held. */
export async function holdOverdue(): Promise<number> {
  let held = 0;
  for (const installId of await installsWithGo()) held += await holdIn(installId);
  return held;
}

async function installsWithGo(): Promise<string[]> {
  const rows = await db()
    .select({ installId: runActs.installId, runId: runActs.runId, act: runActs.act })
    .from(runActs)
    .where(inArray(runActs.act, ["go", "hold", "take-back", "start", "scrub"]))
    .orderBy(desc(runActs.recorded), desc(runActs.seq));
  const newest = new Map<string, (typeof rows)[number]>();
  for (const row of rows) if (!newest.has(row.runId)) newest.set(row.runId, row);
  return [...new Set([...newest.values()].filter((r) => r.act === "go").map((r) => r.installId))];
}

function holdIn(installId: string): Promise<number> {
  return write(async (tx) => {
    const { writer, e } = await beginRecord(tx, installId);
    let held = 0;
    for (const run of e.result.runs) {
      const facts = run.id ? e.facts.runs.get(run.id) : undefined;
      const go = facts?.word?.act === "go" && !facts.start && !facts.scrub ? facts.word : null;
      if (!go || run.go) continue;
      const [first] = run.blockers;
      const over = `Its window ended on ${e.facts.when(go.ends)}.`;
      // In the name of the lead whose GO it ends; `auto` says that the board wrote it.
      await writeHold({
        tx,
        writer,
        e,
        run,
        who: { by: go.by, as: go.as },
        reason: first ? `${first.title}. ${first.sentence}` : over,
        auto: true,
      });
      held++;
    }
    return held;
  });
}
