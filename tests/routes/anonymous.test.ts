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

/**
 * Addresses that anybody may ask: the front door, signing in and out, the theme, the server's pulse, what leads nowhere, and what is
 * opened by the link of a mail or of the server's start.
 */
const BY_LINK = ["/invitation/:token", "/reset/:token", "/confirm-address/:token", "/start/:token"];
const PUBLIC = ["/", "/sign-in", "/sign-out", "/forgot", "/theme", "/health", "/ready", "/*", ...BY_LINK];

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
  ids.sheet = "restraint";
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

describe.each(BY_LINK)("%s", (path) => {
  it("leads nowhere with a token that nobody was sent, whoever has it", async () => {
    for (const cookie of ["", cookies.member]) {
      for (const token of ["x", "A".repeat(43)]) {
        const at = path.replace(":token", token);
        expect((await ask(at, { cookie })).status).toBe(404);
        const name = "Somebody New";
        const form = { name, email: "new@n0.example", newPassword: PASSWORD, pin: "314159", pinAgain: "314159" };
        const body = new URLSearchParams(form);
        const sent = await fetch(`${address}${at}`, {
          method: "POST",
          body,
          headers: { Cookie: cookie, Origin: address },
          redirect: "manual",
        });
        expect(sent.status).toBe(409);
        expect(sent.headers.getSetCookie().filter((c) => c.startsWith("bladecount="))).toEqual([]);
      }
    }
  });
});

describe.each(guarded.filter((p) => p.path.startsWith("/admin")))("$path", ({ path, page, acts }) => {
  it("is not there for whoever does not administer the instance", async () => {
    const { member } = cookies;
    expect((await ask(path, { cookie: member })).status).toBe(404);
    if (page) expect((await ask(`${path}.data`, { cookie: member })).status).toBe(404);
    if (acts) expect((await ask(path, { method: "POST", cookie: member })).status).toBe(404);
  });
});

describe("a token of the API", () => {
  const board = "/api/v1/installs/:installId/board";
  const signatures = "/api/v1/installs/:installId/gates/:gateId/signatures";
  const as = (token: string, path: string, method = "GET") =>
    fetch(`${address}${addressOf(path)}`, {
      method,
      body: method === "GET" ? undefined : JSON.stringify({ commandId: newId(), as: "inspector", pin: PIN, covers: [] }),
      headers: { Authorization: `Bearer ${token}`, "Content-Type": "application/json" },
      redirect: "manual",
    });
  async function made(may: string, cookie: string | undefined): Promise<string> {
    const form = { commandId: newId(), name: "a display", may, days: "30", password: PASSWORD };
    const answer = await fetch(`${address}/account/tokens`, {
      method: "POST",
      body: new URLSearchParams(form),
      headers: { Cookie: cookie ?? "", Origin: address },
    });
    return /bladecount_[0-9A-Za-z]{43}/.exec(await answer.text())?.[0] ?? "";
  }

  it("reads what its owner may read, and records only with that scope; no page opens with it", async () => {
    const [reads, records] = [await made("read", cookies.member), await made("record", cookies.member)];
    expect((await as(reads, board)).status).toBe(200);
    const refused = await as(reads, signatures, "POST");
    expect([refused.status, await refused.json()]).toEqual([403, expect.objectContaining({ code: "token-scope" })]);
    // As far as the rules of signing: the gate's items are not done.
    const judged = await as(records, signatures, "POST");
    expect([judged.status, await judged.json()]).toEqual([403, expect.objectContaining({ code: "not-your-role" })]);
    const page = await as(records, "/installs/:installId");
    expect([page.status, page.headers.get("Location")]).toEqual([302, expect.stringContaining("/sign-in")]);
  });

  it("of another install's member finds nothing, and an unknown one nobody", async () => {
    expect((await as(await made("read", cookies.outsider), board)).status).toBe(404);
    const unknown = await as(`bladecount_${"A".repeat(43)}`, board);
    expect([unknown.status, unknown.headers.get("WWW-Authenticate")]).toEqual([401, 'Bearer realm="bladecount"']);
    // Beside a good session too: the token alone is judged.
    const both = await fetch(`${address}${addressOf(board)}`, {
      headers: { Authorization: "Bearer nothing", Cookie: cookies.member ?? "" },
    });
    expect(both.status).toBe(401);
  });
});
