import { afterAll, beforeAll, describe, expect, it, vi } from "vitest";
import { db } from "#app/db/client.server";
import { allKeptOf, keptOf } from "#app/db/queries/bench-inputs.server";
import { boardNow } from "#app/db/queries/board-now.server";
import type { TypedForm } from "#app/lib/bench/bench-def";
import { now } from "#app/lib/clock";
import { keepBenchInputs } from "#app/lib/services/keep-bench-inputs.server";
import { MINUTE, type Workshop, workshop } from "../support/workshop";

vi.setConfig({ testTimeout: 30_000, hookTimeout: 120_000 });

let w: Workshop;
beforeAll(async () => {
  w = await workshop();
}, 60_000);
afterAll(() => w.clock.stop());

const typed = (rest: string): TypedForm => ({ units: "us", fields: { chemistry: ["lead"], rest: [rest] } });

const headOf = async (installId: string) => (await boardNow(db(), installId, now()))?.head;

describe("inputs of the bench", () => {
  it("are kept for everybody on the install; the last writer counts, and the record does not speak of it", async () => {
    const { installId } = w;
    const head = await headOf(installId);
    await keepBenchInputs({ installId, userId: "lio", sheet: "battery", inputs: typed("12.5") });
    w.clock.add(MINUTE);
    expect(await keepBenchInputs({ installId, userId: "cal", sheet: "battery", inputs: typed("12.7") })).toMatchObject({ ok: true });
    const kept = await keptOf(db(), installId, "battery");
    expect(kept).toMatchObject({ inputs: typed("12.7"), by: "Cal" });
    expect([...(await allKeptOf(db(), installId)).keys()]).toEqual(["battery"]);
    expect(await keptOf(db(), installId, "torque")).toBeNull();
    expect(await headOf(installId)).toEqual(head);
  });

  it("cannot be kept by somebody who is no member", async () => {
    const outcome = await keepBenchInputs({ installId: w.installId, userId: "olga", sheet: "crank", inputs: typed("12") });
    expect(outcome).toMatchObject({ ok: false, status: 404 });
    expect(await keptOf(db(), w.installId, "crank")).toBeNull();
  });
});
