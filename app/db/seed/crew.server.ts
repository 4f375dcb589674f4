// Hands for one install of the demo: everything they do goes through the services, as its people would do it.
import { readFileSync } from "node:fs";
import { database } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import type { PastClock } from "#app/db/seed/clock";
import { evidenceOf } from "#app/db/seed/evidence";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Evidence, Item } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import { confirmProof } from "#app/lib/services/confirm-proof.server";
import type { Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { signGates } from "#app/lib/services/sign-gates.server";
import { storePhoto } from "#app/lib/services/store-photo.server";
import { PIN } from "../../../fixtures/demo/people";
import type { DemoInstall } from "../../../fixtures/demo/types";

/** The value, or an error that names the refusal: the demo's story must be one that the rules allow. */
export function value<T>(outcome: Outcome<T>): T {
  if (outcome.ok) return outcome.value;
  throw new Error(`The demo was refused: ${outcome.code}, ${outcome.message}`);
}

export type Crew = ReturnType<typeof crewOf>;

/** @param ids user ids by the keys of the demo's people. */
export function crewOf(installId: string, data: DemoInstall, clock: PastClock, ids: ReadonlyMap<string, string>) {
  const act = (person: string): Act => ({ installId, actor: { userId: idOf(person) }, commandId: newId() });
  function idOf(person: string): string {
    const id = ids.get(person);
    if (!id) throw new Error(`Nobody in the demo is called ${person}`);
    return id;
  }

  async function board(): Promise<Evaluation> {
    const found = await boardNow(database().db, installId, clock.now());
    if (!found) throw new Error("The demo's install is not there");
    return found.e;
  }

  async function evidence(e: Evaluation, item: Item, person: string): Promise<(Evidence | null)[]> {
    const list: (Evidence | null)[] = [];
    for (const [n, part] of item.parts.entries()) {
      if (part.kind === "photo") list.push({ kind: "photo", stored: false, files: [await photo(item.key, person)] });
      else list.push(evidenceOf(e, data, part, data.found[item.key]?.[n] ?? {}, clock.now()));
    }
    return list;
  }

  async function photo(key: string, person: string): Promise<string> {
    const bytes = readFileSync(new URL(`../../../fixtures/demo/photos/${key}.png`, import.meta.url));
    return value(await storePhoto(act(person), { bytes, name: `${key}.png` })).file;
  }

  /** One item, proved by whose gate it is and confirmed by the second person where one is asked. */
  async function prove(item: Item, gateKey: string): Promise<void> {
    const [does, looks] = data.hands[gateKey.replace(/ .*/, "")] ?? data.hands[""] ?? [];
    if (!does || !looks) throw new Error(`Nobody works ${gateKey}`);
    const e = await board();
    const wrench = e.snapshot.tools[0]?.id;
    const { proof } = value(
      await recordProof(act(does), {
        item: item.id,
        revision: item.revision,
        as: "builder",
        state: "done",
        evidence: await evidence(e, item, does),
        tools: wrench && item.parts.some((p) => p.kind === "torque") ? [wrench] : [],
        note: "",
        did: null,
        at: null,
        told: false,
      }),
    );
    clock.minutes(1);
    if (item.secondEyes) value(await confirmProof(act(looks), { proof, as: "builder" }));
  }

  /** Proves what does not stand in these gates, one after the other, `pace` minutes apart; `but` are left to do. */
  async function work(gates: string[], { pace = 6, but = [] }: { pace?: number; but?: string[] } = {}): Promise<void> {
    for (const key of gates) {
      const first = await board();
      const gate = first.snapshot.gates.find((g) => g.key === key);
      if (!gate) throw new Error(`No gate ${key} on the demo's board`);
      const mine = first.snapshot.items.filter((i) => i.gate === gate.id && !i.hidden && !but.includes(i.key));
      for (const item of mine.filter((i) => !i.parts.some((p) => p.kind === "computed"))) {
        if ((await board()).result.items[item.id]?.stands) continue;
        await prove(item, key);
        clock.minutes(pace - 1);
      }
    }
  }

  /** One sheet, one PIN: all of these gates that are not signed. */
  async function sign(person: string, as: "builder" | "inspector" | "lead", keys: string[]): Promise<void> {
    const e = await board();
    const gates = e.snapshot.gates
      .filter((g) => keys.includes(g.key) && !e.result.gates[g.id]?.stands)
      .map((g) => ({ gate: g.id, covers: e.result.gates[g.id]?.covers ?? [] }));
    value(await signGates(act(person), { as, gates, pin: PIN }));
    clock.minutes(2);
  }

  return { data, clock, idOf, act, board, work, sign };
}
