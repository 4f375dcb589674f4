// What somebody hostile sends, over HTTP, to a server on a real database file: forms built to stall it, ways to another site,
// ids of another install inside the forms of one's own, pictures that carry more than a picture.
import { mkdtempSync, readdirSync, rmSync } from "node:fs";
import { request } from "node:http";
import type { AddressInfo } from "node:net";
import { createServer } from "node:net";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { pathToFileURL } from "node:url";
import { afterAll, beforeAll, describe, expect, it } from "vitest";
import { db, openDatabase, setDatabase, write } from "#app/db/client.server";
import { migrateDatabase } from "#app/db/migrate.server";
import { gates } from "#app/db/schema/gates";
import { items } from "#app/db/schema/items";
import { users } from "#app/db/schema/users";
import { hash } from "#app/lib/auth/hash.server";
import { hashPin } from "#app/lib/auth/pin.server";
import { newId } from "#app/lib/ids";
import { confirmValue } from "#app/lib/services/confirm-value.server";
import { createInstall } from "#app/lib/services/create-install.server";
import { addTool } from "#app/lib/services/crib.server";
import { planRun } from "#app/lib/services/plan-run.server";
import { raiseFinding } from "#app/lib/services/raise-finding.server";
import { imageType } from "#app/lib/storage/image-type";
import { rewritePicture } from "#app/lib/storage/picture.server";
import { toSI } from "#app/lib/units/convert";
import { buildIfStale } from "../scripts/prepare.mjs";
import { startInstance } from "../scripts/running.mjs";
import { jpeg, png } from "./support/picture";
import { TRAITS, value } from "./support/workshop";

const PASSWORD = "four loose words of a test";
const PIN = "271828";
const FORM = "application/x-www-form-urlencoded";
const folder = mkdtempSync(join(tmpdir(), "bladecount-attacks-"));
let address = "";
let cookie = "";
let stop: () => Promise<void> = async () => {};
const mine = { install: "", gate: "" };
const theirs = { install: "", gate: "", item: "", run: "", finding: "", tool: "" };

async function freePort(): Promise<number> {
  return new Promise((done) => {
    const probe = createServer().listen(0, "127.0.0.1", () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => done(port));
    });
  });
}

function post(path: string, body: string | FormData | Record<string, string>, headers: Record<string, string> = {}): Promise<Response> {
  const sent = typeof body === "string" || body instanceof FormData ? body : new URLSearchParams({ commandId: newId(), ...body });
  return fetch(`${address}${path}`, {
    method: "POST",
    body: sent,
    headers: { Origin: address, Cookie: cookie, ...(typeof sent === "string" ? { "Content-Type": FORM } : {}), ...headers },
    redirect: "manual",
  });
}

const get = (path: string): Promise<Response> => fetch(`${address}${path}`, { headers: { Cookie: cookie }, redirect: "manual" });
const nobody = { Cookie: "" };

beforeAll(async () => {
  buildIfStale();
  const file = openDatabase(pathToFileURL(join(folder, "bladecount.db")).href);
  setDatabase(file);
  await migrateDatabase({ target: file });
  const [passwordHash, pinHash] = [await hash(PASSWORD), await hashPin(PIN)];
  const account = (id: string) => ({ id, email: `${id}@n0.example`, name: id, passwordHash, pinHash, createdAt: 0 });
  await write((tx) => tx.insert(users).values([account("lio"), account("olga")]));
  const setUp = (registration: string) => ({ registration, name: "Test install", timeZone: "Europe/Zurich", traits: TRAITS, values: {} });
  mine.install = value(await createInstall({ actor: { userId: "lio" }, commandId: newId() }, setUp("N0206S"))).install;
  theirs.install = value(await createInstall({ actor: { userId: "olga" }, commandId: newId() }, setUp("N0207T"))).install;
  const act = () => ({ installId: theirs.install, actor: { userId: "olga" }, commandId: newId() });
  const rpm = toSI(2700, "rpm");
  for (const key of ["ratedRpm", "redline"]) value(await confirmValue(act(), { key, value: rpm, source: "maker's manual p. 9" }));
  const plan = { run: null, rung: "1", plannedStart: null, place: "apron", rpm: rpm / 2, positions: [], windLimit: 5, gustLimit: 8 };
  theirs.run = value(await planRun(act(), plan)).run;
  const seen = { system: "oil", words: "weeps at the cooler", severity: "watch", cap: null, photo: null } as const;
  theirs.finding = value(await raiseFinding(act(), seen)).finding;
  // Only builders, leads and inspectors keep the crib; olga is the lead.
  theirs.tool = value(await addTool(act(), { name: "Wrench, 5 to 50 N·m", serial: "" })).tool;
  const found = await db().select({ id: gates.id, key: gates.key, at: gates.installId }).from(gates);
  const gateOf = (install: string) => found.find((g) => g.key === "MF" && g.at === install)?.id as string;
  mine.gate = gateOf(mine.install);
  theirs.gate = gateOf(theirs.install);
  const rows = await db().select({ id: items.id, gate: items.gateId }).from(items);
  theirs.item = rows.find((i) => i.gate === theirs.gate)?.id as string;
  file.close();
  setDatabase(undefined);

  const instance = await startInstance({ folder, host: "127.0.0.1", port: await freePort(), quiet: true });
  address = instance.address;
  stop = instance.stop;
  const signedIn = await post("/sign-in", { email: "lio@n0.example", password: PASSWORD });
  cookie = signedIn.headers.getSetCookie()[0]?.split(";")[0] ?? "";
}, 180_000);

afterAll(async () => {
  await stop();
  rmSync(folder, { recursive: true, force: true });
});

const password = "&password=x";

describe("a form that is built to stall the server", () => {
  it.each<[string, string]>([
    ["an index far out", `email[1000000]=x${password}`],
    ["an index of eight digits", `email[10000000]=x${password}`],
    ["dots alone", `${".".repeat(200_000)}=x${password}`],
    ["a name as long as a page", `${"a".repeat(101)}=x${password}`],
    ["lists in lists", `email[9][9][9]=x${password}`],
    ["one field over and over", `${"email=x&".repeat(10_000)}${password}`],
    ["fields that no form has", `${Array.from({ length: 10_000 }, (_, n) => `f${n}=x`).join("&")}${password}`],
    ["a name without end", `a${".b".repeat(20_000)}=x${password}`],
    ["a form library's own field, state", `__state__={&email=x${password}`],
    ["a form library's own field, intent", `__intent__={&email=x${password}`],
    [
      "an intent on a list that is none",
      `__intent__=${encodeURIComponent('{"type":"remove","payload":{"name":"email","index":0}}')}&email=x`,
    ],
  ])("is refused in few words, from somebody not signed in: %s", async (_, body) => {
    const answer = await post("/sign-in", body, nobody);
    expect([400, 413, 422]).toContain(answer.status);
    expect((await answer.text()).length).toBeLessThan(20_000);
  });

  it("is told why, in a sentence", async () => {
    const tooMany = await post("/sign-in", "email=x&".repeat(1501), nobody);
    expect([tooMany.status, await tooMany.text()]).toEqual([413, expect.stringContaining("more than 1500 fields")]);
    const strange = await post("/sign-in", "__intent__=x", nobody);
    expect([strange.status, await strange.text()]).toEqual([400, expect.stringContaining("a field that no form of this site has")]);
  });

  it("is none where every name is one that a page sends", async () => {
    const names = ["values.redline.source", "crew.operator[1]", "crew.operator[]", "p0.s.straps.wll", "commandId"];
    const answer = await post("/sign-in", `${names.map((name) => `${name}=x`).join("&")}&email=x${password}`, nobody);
    expect([answer.status, await answer.text()]).toEqual([400, expect.stringContaining("Enter an e-mail address")]);
  });

  it("is refused on a gate's page before the page looks at it", async () => {
    const answer = await post(`/installs/${mine.install}/gates/${mine.gate}`, `commandId=${newId()}&intent=prove&${"a=&".repeat(10_000)}`);
    expect([400, 413]).toContain(answer.status);
  });

  it.each<[string, string]>([
    ["of more parts than any form has", `--b\r\nContent-Disposition: form-data; name="a"\r\n\r\n\r\n`.repeat(1500)],
    ["of a part whose head has no end", `--b\r\nContent-Disposition: form-data; name="a"\r\nX: ${"y".repeat(50_000)}\r\n\r\n\r\n`],
  ])("is the sender's fault: %s", async (_, parts) => {
    const answer = await post(`/installs/${mine.install}/findings`, `${parts}--b--\r\n`, {
      "Content-Type": "multipart/form-data; boundary=b",
    });
    expect([400, 413]).toContain(answer.status);
  });

  it.each(["gates/log", "runs/log", "runs/logs.data"])("has no more room where an id in the address reads like a log: %s", async (path) => {
    const headers = { Origin: address, Cookie: cookie, "Content-Type": FORM, "Content-Length": 2 * 1024 * 1024 };
    // Announced and not sent: it is refused before it comes.
    const status = await new Promise((told, failed) => {
      const sent = request(`${address}/installs/${mine.install}/${path}`, { method: "POST", headers });
      sent.once("response", (answer) => {
        told(answer.statusCode);
        sent.destroy();
      });
      sent.on("error", failed);
      sent.flushHeaders();
    });
    expect(status).toBe(413);
  });
});

describe("the way back after signing in, or after a change of light", () => {
  const paths = ["/.//evil.example", "/x/..//evil.example", "/..//evil.example", "/%2e//evil.example", "/./\\evil.example", "/hangar"];
  const here = (answer: Response) => new URL(answer.headers.get("Location") ?? "", address).origin;

  it.each(paths)("stays on this site: %s", async (to) => {
    expect(here(await get(`/sign-in?to=${encodeURIComponent(to)}`))).toBe(address);
    expect(here(await post("/theme", { theme: "apron", to }))).toBe(address);
    expect(here(await post("/sign-in", { email: "lio@n0.example", password: PASSWORD, to }))).toBe(address);
  });
});

describe("ids of another install in the forms of one's own", () => {
  const headOf = async () => ((await (await get(`/api/v1/installs/${mine.install}/board`)).json()) as { head: unknown }).head;
  const sheet = () => JSON.stringify({ gate: theirs.gate, covers: [] });

  it.each<[string, () => string, () => Record<string, string>]>([
    ["an item", () => `gates/${mine.gate}`, () => ({ intent: "failed", item: theirs.item, revision: "1", note: "cracked" })],
    ["a gate in the address", () => `gates/${theirs.gate}/sign`, () => ({ as: "builder", pin: PIN, sheet: sheet() })],
    ["a gate on the sheet", () => `gates/${mine.gate}/sign`, () => ({ as: "builder", pin: PIN, sheet: sheet() })],
    ["a run's hold", () => `runs/${theirs.run}/hold`, () => ({ reason: "not mine to hold" })],
    ["a run's wind", () => `runs/${theirs.run}`, () => ({ intent: "wind", speed: "1", gust: "1", tail: "no" })],
    ["a run's GO", () => `runs/${theirs.run}/go`, () => ({ version: "1", pin: PIN })],
    ["a finding", () => "findings", () => ({ intent: "grade", finding: theirs.finding, severity: "grounding", words: "worse" })],
    ["a tool", () => "crib", () => ({ intent: "bad-check", tool: theirs.tool, on: "2026-01-05", note: "reads low" })],
    ["a member", () => "crew", () => ({ intent: "end-role", member: "olga", role: "lead" })],
  ])("are not there: %s", async (_, path, form) => {
    const before = await headOf();
    expect((await post(`/installs/${mine.install}/${path()}`, form())).status).toBe(404);
    expect(await headOf()).toEqual(before);
  });
});

describe("a picture", () => {
  it("loses what stands behind its end: another picture with its place in it, or anything else", async () => {
    const sent = Buffer.concat([jpeg(), jpeg("46.9 N 7.4 E"), Buffer.from("<script>alert(1)</script>")]);
    const bytes = Buffer.from((await rewritePicture(sent, "image/jpeg", 1000))?.bytes ?? []);
    expect(imageType(bytes)).toMatchObject({ type: "image/jpeg" });
    expect(bytes.includes("46.9 N")).toBe(false);
    expect(bytes.includes("<script>")).toBe(false);
  });

  const kept = () => readdirSync(join(folder, "files"), { recursive: true, withFileTypes: true }).filter((f) => f.isFile()).length;

  it("that is refused, or sent with an act that takes none, leaves nothing on the disk", async () => {
    const commandId = newId();
    const send = (shade: number, over: Record<string, string> = {}) => {
      const form = new FormData();
      const fields = { commandId, intent: "raise", system: "oil", severity: "watch", words: "weeps at the cooler", ...over };
      for (const [name, text] of Object.entries(fields)) form.append(name, text);
      form.append("photo", new Blob([new Uint8Array(png(shade))], { type: "image/png" }), "a.png");
      return post(`/installs/${mine.install}/findings`, form);
    };
    expect((await send(1)).status).toBe(303);
    const before = kept();
    // The same number with another picture is no repetition.
    for (const shade of [2, 3, 4]) expect((await send(shade)).status).toBe(422);
    expect(kept()).toBe(before);
    expect((await send(5, { commandId: newId(), intent: "no such act" })).status).toBe(400);
    expect((await send(6, { commandId: "short" })).status).toBe(400);
    expect(kept()).toBe(before);
  });
});
