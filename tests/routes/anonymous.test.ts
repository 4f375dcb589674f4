// Every route of the build is asked by nobody and by a member of another install, over HTTP, on a real database file. A new route
// is covered as soon as it is there: what is public has to be named here.
import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync } from "node:fs";
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
import { planRun } from "#app/lib/services/plan-run.server";
import { toSI } from "#app/lib/units/convert";
import { buildIfStale } from "../../scripts/prepare.mjs";
import { startInstance } from "../../scripts/running.mjs";
import { TRAITS, value } from "../support/workshop";

interface RouteFacts {
  id: string;
  path?: string;
  index?: boolean;
  parentId?: string;
  page: boolean;
  loads: boolean;
  acts: boolean;
}

/** Addresses that anybody may ask: the front door, signing in and out, the theme, the server's pulse, and what leads nowhere. */
const PUBLIC = ["/", "/sign-in", "/sign-out", "/theme", "/health", "/ready", "/*"];

const PASSWORD = "four loose words of a test";
const PIN = "271828";
const folder = mkdtempSync(join(tmpdir(), "bladecount-routes-"));
const ids: Record<string, string> = {};
let address = "";
let stop: () => Promise<void> = async () => {};
const cookies: Record<"member" | "outsider", string> = { member: "", outsider: "" };

function routesOfBuild(): RouteFacts[] {
  const script = `const { routes } = await import(${JSON.stringify(pathToFileURL("build/server/index.js").href)});
    const facts = Object.values(routes).map(({ id, path, index, parentId, module: m }) =>
      ({ id, path, index, parentId, page: Boolean(m.default), loads: Boolean(m.loader), acts: Boolean(m.action) }));
    console.log("ROUTES" + JSON.stringify(facts)); process.exit(0);`;
  const env = { ...process.env, DATA_DIR: folder, NODE_ENV: "production" };
  const printed = execFileSync(process.execPath, ["--input-type=module", "-e", script], { encoding: "utf8", env });
  return JSON.parse(printed.split("ROUTES")[1] ?? "[]");
}

buildIfStale();
const all = routesOfBuild();
/** What answers a request: an index, or a route that no other one lies in and that has something to answer with. */
const answering = all.filter((r) => (r.index || !all.some((other) => other.parentId === r.id)) && (r.page || r.loads || r.acts));
const places = answering.map((route) => ({ ...route, path: pathOf(route) }));
const guarded = places.filter((p) => !PUBLIC.includes(p.path));
const ofInstall = guarded.filter((p) => p.path.includes(":installId"));

function pathOf(route: RouteFacts): string {
  const parts: string[] = [];
  for (let at: RouteFacts | undefined = route; at; at = all.find((r) => r.id === at?.parentId)) if (at.path) parts.unshift(at.path);
  return `/${parts.join("/")}`.replace(/\/{2,}/g, "/");
}

/** The address with the ids of the install that was made; parameters that nothing was made for get an id of nothing. */
const addressOf = (path: string) => path.replace(/:(\w+)\??/g, (_, name: string) => ids[name] ?? "0000000000000000000000");

async function freePort(): Promise<number> {
  return new Promise((done) => {
    const probe = createServer().listen(0, "127.0.0.1", () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => done(port));
    });
  });
}

function ask(path: string, { method = "GET", cookie = "" } = {}): Promise<Response> {
  const json = path.startsWith("/api/");
  // The right PIN and a body that can be read: what is refused is refused for who asks.
  const sent = { commandId: newId(), as: "inspector", pin: PIN };
  const body = method === "GET" ? undefined : json ? JSON.stringify({ ...sent, covers: [] }) : new URLSearchParams(sent);
  const headers = { Cookie: cookie, Origin: address, ...(json ? { "Content-Type": "application/json" } : {}) };
  return fetch(`${address}${addressOf(path)}`, { method, body, headers, redirect: "manual" });
}

async function signIn(email: string): Promise<string> {
  const answer = await fetch(`${address}/sign-in`, {
    method: "POST",
    body: new URLSearchParams({ email, password: PASSWORD }),
    headers: { Origin: address },
    redirect: "manual",
  });
  return (
    answer.headers
      .getSetCookie()
      .find((c) => c.startsWith("bladecount="))
      ?.split(";")[0] ?? ""
  );
}

beforeAll(async () => {
  const file = openDatabase(pathToFileURL(join(folder, "bladecount.db")).href);
  setDatabase(file);
  await migrateDatabase({ target: file });
  const [passwordHash, pinHash] = [await hash(PASSWORD), await hashPin(PIN)];
  const account = (id: string) => ({ id, email: `${id}@n0.example`, name: id, passwordHash, pinHash, createdAt: 0 });
  await write((tx) => tx.insert(users).values([account("lio"), account("olga")]));
  const setUp = (registration: string) => ({ registration, name: "Test install", timeZone: "Europe/Zurich", traits: TRAITS, values: {} });
  const made = value(await createInstall({ actor: { userId: "lio" }, commandId: newId() }, setUp("N0204R")));
  value(await createInstall({ actor: { userId: "olga" }, commandId: newId() }, setUp("N0205R")));
  const act = () => ({ installId: made.install, actor: { userId: "lio" }, commandId: newId() });
  const rpm = toSI(2700, "rpm");
  for (const key of ["ratedRpm", "redline"]) value(await confirmValue(act(), { key, value: rpm, source: "maker's manual p. 9" }));
  const plan = { run: null, rung: "1", plannedStart: null, place: "apron", rpm: rpm / 2, positions: [], windLimit: 5, gustLimit: 8 };
  ids.runId = value(await planRun(act(), plan)).run;
  ids.installId = made.install;
  ids.gateId = (await db().select({ id: gates.id, key: gates.key, at: gates.installId }).from(gates)).find(
    (g) => g.key === "OP" && g.at === made.install,
  )?.id as string;
  // The one that asks for cranking.
  ids.itemId = (await db().select({ id: items.id, key: items.key, at: items.installId }).from(items)).find(
    (i) => i.key === "OP4" && i.at === made.install,
  )?.id as string;
  file.close();
  setDatabase(undefined);

  const instance = await startInstance({ folder, host: "127.0.0.1", port: await freePort(), quiet: true });
  address = instance.address;
  stop = instance.stop;
  cookies.member = await signIn("lio@n0.example");
  cookies.outsider = await signIn("olga@n0.example");
}, 180_000);

afterAll(async () => {
  await stop();
  rmSync(folder, { recursive: true, force: true });
});

/** A page sends on to the sign-in, the API says 401; a page's data request is told to go there too. */
async function expectTurnedAway(answer: Response): Promise<void> {
  if (answer.status === 401) return expect(await answer.json()).toMatchObject({ code: "signed-out" });
  expect([202, 302, 303]).toContain(answer.status);
  const to = answer.status === 202 ? await answer.text() : (answer.headers.get("Location") ?? "");
  expect(to).toMatch(/\/sign-in/);
}

it("has the routes of the build before it", () => {
  expect(ofInstall.length).toBeGreaterThan(10);
  expect(PUBLIC.filter((path) => !places.some((p) => p.path === path))).toEqual([]);
  expect([cookies.member, cookies.outsider].filter(Boolean)).toHaveLength(2);
});

describe.each(guarded)("$path", ({ path, page, acts }) => {
  it("turns away somebody who is not signed in, whatever is asked", async () => {
    await expectTurnedAway(await ask(path));
    if (acts) await expectTurnedAway(await ask(path, { method: "POST" }));
    if (page) await expectTurnedAway(await ask(`${path}.data`));
  });
});

describe.each(ofInstall)("$path", ({ path, page, loads, acts }) => {
  it("is not there for a member of another install, and is there for its own", async () => {
    const { outsider, member } = cookies;
    if (page || loads) {
      const mine = await ask(path, { cookie: member });
      expect([200, 304, 405]).toContain(mine.status);
      // An address that takes POST alone says so to everybody who is signed in; it tells nothing of the install.
      if (mine.status !== 405) expect((await ask(path, { cookie: outsider })).status).toBe(404);
    }
    if (page) expect((await ask(`${path}.data`, { cookie: outsider })).status).toBe(404);
    if (acts) expect((await ask(path, { method: "POST", cookie: outsider })).status).toBe(404);
  });
});
