// An invented install on a real database file, worked through the services as its people would: nothing is written past them.
// Lio leads, Bea and Tom build, Ines inspects, Cal is crew; Olga belongs to another install.
import { copyFileSync } from "node:fs";
import { fileURLToPath } from "node:url";
import { database, db, openDatabase, setDatabase, write } from "#app/db/client.server";
import { boardNow } from "#app/db/queries/board-now.server";
import { users } from "#app/db/schema/users";
import { hashPin } from "#app/lib/auth/pin.server";
import { SHEET_VERSIONS, valuesTaken } from "#app/lib/bench/sheet";
import { now, setClock } from "#app/lib/clock";
import type { Evaluation } from "#app/lib/gates/evaluate";
import { bandInForce } from "#app/lib/gates/evidence";
import type { Evidence, Item, Role } from "#app/lib/gates/snapshot";
import { newId } from "#app/lib/ids";
import type { RecordProof } from "#app/lib/schemas/proof";
import { confirmProof } from "#app/lib/services/confirm-proof.server";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { createInstall } from "#app/lib/services/create-install.server";
import { addExtinguisher, addTool, recordLook, recordToolCheck } from "#app/lib/services/crib.server";
import { enterNumber } from "#app/lib/services/enter-number.server";
import { addMember } from "#app/lib/services/members.server";
import type { Outcome } from "#app/lib/services/outcome";
import type { Act } from "#app/lib/services/perform.server";
import { recordProof } from "#app/lib/services/record-proof.server";
import { signGates } from "#app/lib/services/sign-gates.server";
import { storePhoto } from "#app/lib/services/store-photo.server";
import { presetPageTwo } from "#app/lib/template/traits";
import type { Part, SheetKey, ValueKey } from "#app/lib/template/types";
import { toSI } from "#app/lib/units/convert";
import { emptyDatabaseUrl, freshDatabase } from "./db";
import { png } from "./picture";

export const PIN = "271828";
export const MINUTE = 60_000;
export const PEOPLE = ["lio", "bea", "tom", "ines", "cal", "olga"] as const;
export type Person = (typeof PEOPLE)[number];
const ROLE: Partial<Record<Person, Role>> = { bea: "builder", tom: "builder", ines: "inspector", cal: "crew" };

export const TRAITS = presetPageTwo({
  delivery: "gravity",
  metering: "carb",
  ignition: "mag",
  computers: 0,
  cooling: "air",
  lubrication: "wet",
  drive: "direct",
  propeller: "fixed",
  gear: "nose",
  starter: "estart",
  history: "new",
});

/** The maker's figures of an invented engine, SI. */
const VALUES: Partial<Record<ValueKey, number>> = {
  ratedPower: toSI(80, "hp"),
  ratedRpm: toSI(2700, "rpm"),
  takeoffFlow: toSI(6, "US gal/h"),
  propDiameter: 1.6,
  reductionRatio: 1,
  mass: 480,
  redline: toSI(2850, "rpm"),
};

/** The value, or an error that names the refusal. */
export function value<T>(outcome: Outcome<T>): T {
  if (!outcome.ok) throw new Error(`${outcome.status} ${outcome.code}: ${outcome.message}`);
  return outcome.value;
}

export type Workshop = Awaited<ReturnType<typeof workshop>>;

/** A new install with its people on a fresh database, and hands to work it. */
export async function workshop() {
  await freshDatabase();
  // Hours pass only by hand.
  let turned = 0;
  const start = Date.UTC(2026, 11, 3, 7, 0);
  const before = setClock({ now: () => start + turned });
  const clock = {
    add: (ms: number) => {
      turned += ms;
    },
    stop: () => setClock(before),
  };
  const pinHash = await hashPin(PIN);
  await write(async (tx) => {
    for (const id of PEOPLE)
      await tx
        .insert(users)
        .values({ id, email: `${id}@n0200.example`, name: id[0]?.toUpperCase() + id.slice(1), passwordHash: "-", pinHash, createdAt: 0 });
  });
  const setUp = (registration: string) => ({ registration, name: "Test install", timeZone: "Europe/Zurich", traits: TRAITS, values: {} });
  const made = value(await createInstall({ actor: { userId: "lio" }, commandId: newId() }, setUp("N0200W")));
  const other = value(await createInstall({ actor: { userId: "olga" }, commandId: newId() }, setUp("N0201X")));
  const installId = made.install;

  const act = (person: Person, commandId = newId()): Act => ({ installId, actor: { userId: person }, commandId });
  for (const [person, role] of Object.entries(ROLE)) value(await addMember(act("lio"), { email: `${person}@n0200.example`, role }));
  clock.add(MINUTE);

  async function board(): Promise<Evaluation> {
    const found = await boardNow(database().db, installId, now());
    if (!found) throw new Error("No board");
    return found.e;
  }
  async function gate(key: string) {
    const e = await board();
    const found = e.snapshot.gates.find((g) => g.key === key);
    const result = found && e.result.gates[found.id];
    if (!found || !result) throw new Error(`No gate ${key}`);
    return { e, ...found, ...result };
  }
  async function item(key: string): Promise<Item> {
    const found = (await board()).snapshot.items.find((i) => i.key === key);
    if (!found) throw new Error(`No item ${key}`);
    return found;
  }

  /** Ratings and limits, each confirmed; a limit without a preset gets a round figure. */
  async function confirmValues(): Promise<void> {
    for (const v of (await board()).snapshot.values) {
      const known = VALUES[v.key] ?? v.value ?? 100;
      value(await confirmValue(act("lio"), { key: v.key, value: known, source: "maker's manual p. 9" }));
    }
  }

  async function enterNumbers(): Promise<void> {
    const e = await board();
    for (const i of e.snapshot.items)
      for (const [n, part] of i.parts.entries()) {
        const source = "maker's manual p. 12";
        if (part.kind === "tick" && part.reference && part.reference.text === null)
          value(await enterNumber(act("bea"), { item: i.id, part: n, band: null, text: "to the upper mark", source }));
        if ((part.kind === "measure" || part.kind === "torque") && !bandNow(e, part))
          value(await enterNumber(act("bea"), { item: i.id, part: n, band: { min: 10, max: 20 }, text: null, source }));
      }
  }

  /** A wrench in date and two extinguishers in date. */
  async function stockCrib(): Promise<{ wrench: string }> {
    const { tool } = value(await addTool(act("bea"), { name: "Torque wrench", serial: "T1" }));
    value(await recordToolCheck(act("bea"), { tool, on: null, good: true, due: "2027-12-03", note: "" }));
    for (const agent of ["co2", "foam"] as const) {
      const { extinguisher } = value(await addExtinguisher(act("bea"), { name: `${agent} bottle`, agent, classB: true, charge: 5 }));
      for (const kind of ["look", "service"] as const)
        value(await recordLook(act("bea"), { extinguisher, kind, due: "2027-01-31", note: "" }));
    }
    return { wrench: tool };
  }

  let shade = 0;
  async function evidenceFor(e: Evaluation, i: Item): Promise<(Evidence | null)[]> {
    const list: (Evidence | null)[] = [];
    for (const part of i.parts) {
      if (part.kind !== "photo") list.push(evidence(e, part));
      else
        list.push({
          kind: "photo",
          stored: false,
          files: [value(await storePhoto(act("bea"), { bytes: png(shade++), name: "a.png" })).file],
        });
    }
    return list;
  }

  async function proofInput(key: string, over: Partial<RecordProof> = {}): Promise<RecordProof> {
    const e = await board();
    const i = e.snapshot.items.find((x) => x.key === key);
    if (!i) throw new Error(`No item ${key}`);
    const wrench = e.snapshot.tools[0]?.id;
    const tools = i.parts.some((p) => p.kind === "torque") && wrench ? [wrench] : [];
    const base = {
      item: i.id,
      revision: i.revision,
      as: "builder",
      state: "done",
      tools,
      note: "",
      did: null,
      at: null,
      told: false,
    } as const;
    return { ...base, evidence: await evidenceFor(e, i), ...over };
  }

  /** Bea proves the item; Tom is her second pair of eyes where one is asked. */
  async function prove(key: string): Promise<string> {
    clock.add(MINUTE);
    const { proof } = value(await recordProof(act("bea"), await proofInput(key)));
    const i = await item(key);
    if (i.secondEyes) value(await confirmProof(act("tom"), { proof, as: "builder" }));
    return proof;
  }

  async function proveGate(key: string): Promise<void> {
    const { e, id } = await gate(key);
    const open = e.snapshot.items.filter((i) => i.gate === id && !i.hidden && !i.parts.some((p) => p.kind === "computed"));
    const proved = new Set<string>();
    while (open.length > 0) {
      const at = open.findIndex((i) => i.follows.every((f) => proved.has(f) || !open.some((o) => o.id === f)));
      const [next] = open.splice(Math.max(at, 0), 1);
      if (!next) break;
      if (!(await board()).result.items[next.id]?.stands) await prove(next.key);
      proved.add(next.id);
    }
  }

  const sheetOf = async (key: string) => {
    const { id, covers } = await gate(key);
    return [{ gate: id, covers }];
  };
  async function sign(key: string, person: Person, as: "builder" | "inspector" | "lead") {
    clock.add(MINUTE);
    return signGates(act(person), { as, gates: await sheetOf(key), pin: PIN });
  }
  async function signBoth(key: string): Promise<void> {
    value(await sign(key, "bea", "builder"));
    value(await sign(key, "ines", "inspector"));
  }

  /** Works and signs every gate that a run of the next rung requires, in an order in which each comes after what it waits for. */
  async function readyForRun(): Promise<void> {
    await confirmValues();
    await enterNumbers();
    await stockCrib();
    for (;;) {
      const e = await board();
      const wanted = new Set(e.result.next?.requiredGates);
      const next = e.snapshot.gates.find((g) => {
        const r = e.result.gates[g.id];
        return wanted.has(g.id) && r?.present && !r.stands && r.prerequisites.every((p) => e.result.gates[p]?.stands);
      });
      if (!next) return;
      await proveGate(next.key);
      await signBoth(next.key);
    }
  }

  /** Keeps the database and the hour as they are; what it returns goes back there, on a copy, as often as it is called. */
  async function save(): Promise<() => void> {
    const url = emptyDatabaseUrl();
    const hour = now();
    await database().client.execute({ sql: "VACUUM INTO ?", args: [fileURLToPath(url)] });
    return () => {
      const copy = emptyDatabaseUrl();
      copyFileSync(fileURLToPath(url), fileURLToPath(copy));
      setDatabase(openDatabase(copy));
      setClock({ now: () => hour + turned });
      turned = 0;
    };
  }

  return {
    ...{ clock, installId, otherInstall: other.install, leftOut: made.leftOut, db, act, board, gate, item, save },
    ...{ confirmValues, enterNumbers, stockCrib, proofInput, prove, proveGate, sign, signBoth, sheetOf, readyForRun },
  };
}

const bandNow = (e: Evaluation, part: Extract<Part, { kind: "measure" | "torque" }>) =>
  bandInForce(part.criterion, (key) => e.facts.values.get(key)?.value ?? null);

/** Evidence that meets a part, in the middle of its band. */
function evidence(e: Evaluation, part: Exclude<Part, { kind: "photo" }>): Evidence | null {
  switch (part.kind) {
    case "tick":
      return { kind: "tick" };
    case "measure":
      return { kind: "measure", values: part.places.map(() => within(bandNow(e, part))) };
    case "torque":
      return {
        kind: "torque",
        values: part.places.map(() => within(bandNow(e, part))),
        count: part.count ?? 6,
        adapter: null,
        wrenchLength: null,
      };
    case "reading":
      return { kind: "reading", values: part.places.map(() => 1) };
    case "tally": {
      const n = part.expected ?? 4;
      return { kind: "tally", places: [{ place: "bench", out: part.mode === "in" ? null : n, in: part.mode === "out" ? null : n }] };
    }
    case "text":
      return { kind: "text", text: "written down" };
    case "crank":
      return { kind: "crank", bursts: [{ at: now(), seconds: 10, pressureAfter: 6 }] };
    case "sheet":
      return sheet(e, part.sheet);
    case "computed":
      return null;
  }
}

function within(band: { min: number | null; max: number | null } | null): number {
  if (!band) throw new Error("A number is missing");
  if (band.min === null) return (band.max ?? 0) - Math.abs(band.max ?? 0) / 2;
  return band.max === null ? band.min + Math.abs(band.min) / 2 : (band.min + band.max) / 2;
}

function sheet(e: Evaluation, key: SheetKey): Evidence {
  const known = (k: ValueKey) => e.facts.values.get(k)?.value ?? 1;
  const inputs = key === "fuel-flow" ? fuelFlow(known) : key === "restraint" ? restraint(known) : compression();
  const took = Object.fromEntries(valuesTaken(key).flatMap((k) => (e.facts.values.get(k)?.value == null ? [] : [[k, known(k)]])));
  return { kind: "sheet", sheet: key, version: SHEET_VERSIONS[key], inputs, took };
}

type Known = (key: ValueKey) => number;

const fuelFlow = (known: Known) => ({
  ...{ supply: "gravity", takeoffFlow: known("takeoffFlow"), density: 720, measuredAt: "inlet", noseUp: toSI(15, "deg"), fuelInTank: 0.01 },
  pumps: [{ name: "tank", catches: [1, 2].map(() => ({ volume: 0.004, seconds: 0.004 / (2 * known("takeoffFlow")) })) }],
});

const strap = (name: string, azimuth: number) => ({
  name,
  pair: "a",
  elevation: toSI(10, "deg"),
  azimuth,
  wll: 20_000,
  anchor: "rated",
  rating: 20_000,
});
const restraint = (known: Known) => ({
  ...{
    planned: toSI(2700, "rpm"),
    power: known("ratedPower"),
    reference: known("ratedRpm"),
    reduction: known("reductionRatio"),
    diameter: known("propDiameter"),
  },
  ...{ merit: 0.75, pressureAltitude: 300, temperature: 288.15, factor: 1.5, mass: known("mass"), slope: 0, wheels: "none", gear: "nose" },
  straps: [strap("left", -0.3), strap("right", 0.3)],
});

const compression = () => ({
  ...{ count: 4, supply: toSI(80, "psi"), orifice: toSI(0.04, "in"), maxLoss: 0.25 },
  cylinders: ["1", "2", "3", "4"].map((name) => ({ name, reading: toSI(76, "psi"), leak: "none" })),
});
