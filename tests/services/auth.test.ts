import { statSync } from "node:fs";
import { join } from "node:path";
import { eq } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { db, write } from "#app/db/client.server";
import { outbox } from "#app/db/schema/outbox";
import { sessions } from "#app/db/schema/sessions";
import { users } from "#app/db/schema/users";
import { authenticator, SignInRefused } from "#app/lib/auth/authenticator.server";
import { hash, matches, matchesNobody } from "#app/lib/auth/hash.server";
import { judgePassword } from "#app/lib/auth/password.server";
import { hashPin, judgePin, verifyPin } from "#app/lib/auth/pin.server";
import { absoluteLimit, endAllSessions, endSession, idleLimit, readSession, sessionsOf } from "#app/lib/auth/session.server";
import { setClock } from "#app/lib/clock";
import { env, secret } from "#app/lib/env.server";
import { newRequestFacts, withRequest } from "#app/lib/http/request.server";
import { handClock } from "../support/clock";
import { freshDatabase } from "../support/db";

// Watched, not replaced: each function still does its work.
vi.mock("#app/lib/auth/hash.server", { spy: true });

const password = "four damp cotter pins";
const minute = 60_000;
let clock: ReturnType<typeof handClock>;

beforeEach(async () => {
  await freshDatabase();
  clock = handClock(Date.UTC(2026, 11, 3, 9, 0));
  const row = {
    id: "u1",
    email: "ada@n0100.example",
    name: "Ada Quill",
    passwordHash: await hash(password),
    pinHash: await hashPin("271828"),
    createdAt: 0,
  };
  await write((tx) => tx.insert(users).values(row));
});
afterEach(() => {
  setClock(clock.before);
});

function signIn(fields: Record<string, string>, address = "192.0.2.1") {
  const body = new URLSearchParams({ email: "ada@n0100.example", password, ...fields });
  const request = new Request("http://board.example/sign-in", {
    method: "POST",
    body,
    headers: { "User-Agent": "Mozilla/5.0 (X11; Linux) Firefox/140.0" },
  });
  return withRequest(newRequestFacts(address), () => authenticator.authenticate("password", request));
}
const refused = async (attempt: Promise<unknown>) => {
  const error = await attempt.then(
    () => undefined,
    (e: unknown) => e,
  );
  if (!(error instanceof SignInRefused)) throw new Error(`Not a refusal: ${String(error)}`);
  return { status: error.status, message: error.message };
};
const withCookie = (setCookie: string, headers: Record<string, string> = {}) =>
  new Request("http://board.example/hangar", { headers: { Cookie: `a=1; ${setCookie.split(";")[0]}`, ...headers } });

describe("signing in", () => {
  it("starts a session whose cookie is a random token that the database does not hold", async () => {
    const { cookie } = await signIn({});
    expect(cookie).toMatch(/^bladecount=[0-9A-Za-z]{43}; Max-Age=1209600; Path=\/; HttpOnly; SameSite=Lax$/);
    const [row] = await db().select().from(sessions);
    expect(cookie).not.toContain(row?.id);
    expect(row).toMatchObject({ userId: "u1", userAgent: "Firefox on Linux" });
    expect(await readSession(withCookie(cookie))).toMatchObject({ userId: "u1", name: "Ada Quill", units: "si", sessionId: row?.id });
  });

  it("takes the address in any case and the password only as it is", async () => {
    await signIn({ email: " Ada@N0100.Example " });
    expect((await refused(signIn({ password: password.toUpperCase() }))).status).toBe(400);
    expect((await refused(signIn({ password: `${password} ` }))).status).toBe(400);
  });

  it("gives a new token at each sign-in", async () => {
    expect((await signIn({})).cookie).not.toBe((await signIn({})).cookie);
    expect(await sessionsOf("u1")).toHaveLength(2);
  });

  it("answers the same for a wrong password, an unknown account and a disabled one", async () => {
    const wrong = await refused(signIn({ password: "not this one, surely" }));
    expect(await refused(signIn({ email: "nobody@n0100.example" }))).toEqual(wrong);
    await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, "u1")));
    expect(await refused(signIn({}))).toEqual(wrong);
  });

  it("compares with a hash for an unknown account too, so that it takes as long", async () => {
    vi.mocked(matchesNobody).mockClear();
    await refused(signIn({ email: "nobody@n0100.example" }));
    expect(matchesNobody).toHaveBeenCalledExactlyOnceWith(password);
    expect(await matchesNobody("no account has this password")).toBe(false);
  });

  it("refuses a password of more than 72 bytes in words", async () => {
    const refusal = await refused(signIn({ password: "ü".repeat(37) }));
    expect(refusal).toEqual({ status: 400, message: expect.stringContaining("72 bytes") });
  });

  it("makes an account wait longer with each wrong try, and forgets them at the right one", async () => {
    for (let i = 0; i < 5; i++) expect((await refused(signIn({ password: "wrong" }, `192.0.2.${i}`))).status).toBe(400);
    expect(await refused(signIn({}))).toEqual({ status: 429, message: "Too many wrong tries. Wait 2 seconds, then try again." });
    clock.add(2_000);
    expect((await refused(signIn({ password: "wrong" }))).status).toBe(400);
    expect((await refused(signIn({}))).message).toContain("4 seconds");
    clock.add(4_000);
    await signIn({});
    expect((await refused(signIn({ password: "wrong" }))).status).toBe(400);
    await signIn({});
  });

  it("never makes an account wait more than a minute", async () => {
    for (let i = 0; i < 15; i++) {
      await refused(signIn({ password: "wrong" }, `192.0.2.${i}`));
      clock.add(minute);
    }
    await signIn({});
  });

  it("stops an address that tries many accounts, and no other address", async () => {
    for (let i = 0; i < 20; i++) await refused(signIn({ email: `p${i}@n0100.example` }));
    expect((await refused(signIn({}))).status).toBe(429);
    await signIn({}, "192.0.2.2");
  });

  it("judges no more tries of fifty sent at once than of fifty in turn", async () => {
    const all = await Promise.all(Array.from({ length: 50 }, (_, i) => refused(signIn({ password: "wrong" }, `192.0.2.${i}`))));
    expect(all.filter((r) => r.status === 400)).toHaveLength(5);
  });
});

describe("a session", () => {
  it("ends after 7 days without use, and after 14 in any case", async () => {
    const { cookie } = await signIn({});
    clock.add(idleLimit - 1);
    expect(await readSession(withCookie(cookie))).not.toBeNull();
    clock.add(idleLimit - 1);
    expect(await readSession(withCookie(cookie))).not.toBeNull();
    clock.add(absoluteLimit - 2 * (idleLimit - 1));
    expect(await readSession(withCookie(cookie))).toBeNull();

    const idle = (await signIn({})).cookie;
    clock.add(idleLimit);
    expect(await readSession(withCookie(idle))).toBeNull();
  });

  it("is not read beside a bearer token, which is exempt from the origin check", async () => {
    const { cookie } = await signIn({});
    expect(await readSession(withCookie(cookie, { Authorization: "Bearer x" }))).toBeNull();
  });

  it("can be ended by its owner alone, one or all", async () => {
    const [first, second, third] = [await signIn({}), await signIn({}), await signIn({})].map((s) => withCookie(s.cookie)) as [
      Request,
      Request,
      Request,
    ];
    const idOf = async (request: Request) => (await readSession(request))?.sessionId ?? "";
    const firstId = await idOf(first);
    await write((tx) => endSession(tx, "somebody else", firstId));
    expect(await readSession(first)).not.toBeNull();
    await write((tx) => endSession(tx, "u1", firstId));
    expect(await readSession(first)).toBeNull();
    const keep = await idOf(second);
    await write((tx) => endAllSessions(tx, "u1", keep));
    expect(await readSession(second)).not.toBeNull();
    expect(await readSession(third)).toBeNull();
    await write((tx) => endAllSessions(tx, "u1"));
    expect(await readSession(second)).toBeNull();
  });

  it("ends when the account is disabled", async () => {
    const { cookie } = await signIn({});
    await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, "u1")));
    expect(await readSession(withCookie(cookie))).toBeNull();
  });

  it.each(["", "bladecount=", "bladecount=x", `bladecount=${"A".repeat(43)}`, "bladecount='; DROP TABLE users --"])(
    "is not found in %j",
    async (cookie) => {
      expect(await readSession(new Request("http://board.example/", { headers: { Cookie: cookie } }))).toBeNull();
    },
  );
});

describe("a new password", () => {
  const judge = (text: string) => judgePassword(text, { name: "Ada Quill", email: "ada@n0100.example" });
  it.each(["four damp cotter pins", "plain words without end", "ααααβγδεζηθικλμνξ", `${"x1!ü ".repeat(2)}long enough?`])(
    "may be %j",
    (text) => {
      expect(judge(text)).toEqual({ ok: true });
    },
  );
  it.each([
    ["fourteen chars", "at least 15"],
    ["ü".repeat(18) + "x".repeat(37), "72 bytes"],
    ["Password Password", "lists"],
    ["aaaaaaaaaaaaaaaaa", "repeats"],
    ["xy1!xy1!xy1!xy1!xy", "repeats"],
    ["ada@n0100.example", "your name or address"],
    ["QuillQuill bladecount 1", "your name or address"],
  ])("may not be %j: %s", (text, why) => {
    const verdict = judge(text);
    expect(verdict.ok ? "" : verdict.message).toContain(why);
  });
});

describe("the signing PIN", () => {
  it.each([
    ["271828", true],
    ["90217764", true],
    ["12345", false],
    ["27182a", false],
    ["222222", false],
    ["123456", false],
    ["987654", false],
    ["1".repeat(80), false],
  ])("%s: may be used, %s", (pin, ok) => {
    expect(judgePin(pin).ok).toBe(ok);
  });

  it("is right or wrong, and wrong ones are forgotten at a right one", async () => {
    for (let round = 0; round < 2; round++) {
      for (let i = 0; i < 4; i++) expect(await verifyPin("u1", "000001")).toMatchObject({ ok: false, code: "pin-wrong" });
      expect(await verifyPin("u1", "271828")).toEqual({ ok: true });
    }
  });

  it("is locked for 15 minutes after five wrong ones, even for the right one, and its owner is told once by mail", async () => {
    const codes: string[] = [];
    for (let i = 0; i < 7; i++) {
      const verdict = await verifyPin("u1", "000001");
      codes.push(verdict.ok ? "ok" : verdict.code);
    }
    expect(codes).toEqual(["pin-wrong", "pin-wrong", "pin-wrong", "pin-wrong", "pin-locked", "pin-locked", "pin-locked"]);
    expect(await verifyPin("u1", "271828")).toMatchObject({ code: "pin-locked", message: expect.stringContaining("15 minutes") });
    const mails = await db().select().from(outbox);
    expect(mails.map((m) => [m.toAddress, m.kind])).toEqual([["ada@n0100.example", "pin-locked"]]);
    expect(mails[0]?.text).not.toContain("271828");
    clock.add(15 * minute);
    expect(await verifyPin("u1", "271828")).toEqual({ ok: true });
  });

  it("locks for longer the second time", async () => {
    for (let i = 0; i < 5; i++) await verifyPin("u1", "000001");
    clock.add(15 * minute);
    for (let i = 0; i < 5; i++) await verifyPin("u1", "000001");
    expect(await verifyPin("u1", "271828")).toMatchObject({ message: expect.stringContaining("30 minutes") });
    expect(await db().select().from(outbox)).toHaveLength(2);
  });

  it("gives thirty tries at once no more than five", async () => {
    const all = await Promise.all(Array.from({ length: 30 }, () => verifyPin("u1", "000001")));
    expect(all.filter((v) => !v.ok && v.code === "pin-wrong")).toHaveLength(4);
  });

  it("says how to get one", async () => {
    await write((tx) => tx.update(users).set({ pinHash: null }));
    expect(await verifyPin("u1", "271828")).toMatchObject({ code: "pin-unset", message: expect.stringContaining("account page") });
  });
});

describe("hashing", () => {
  it("runs beside the event loop, in order, and refuses what bcrypt would cut", async () => {
    const hashes = await Promise.all(["a", "b", "c"].map(hash));
    expect(await Promise.all(hashes.map((h, i) => matches(["a", "b", "c"][i] ?? "", h)))).toEqual([true, true, true]);
    expect(await matches("b", hashes[0] ?? "")).toBe(false);
    await expect(hash("x".repeat(73))).rejects.toThrow("Longer than bcrypt reads");
    expect(await matches("x".repeat(73), await hash("x".repeat(72)))).toBe(false);
  });
});

describe("a secret of the instance", () => {
  it("is made once, and only its owner can read it", () => {
    const folder = join(env.dataFolder, "secret-test");
    const made = secret("links", folder);
    expect(made).toMatch(/^[0-9a-f]{64}$/);
    expect(secret("links", folder)).toBe(made);
    expect(statSync(join(folder, "secrets", "links")).mode & 0o777).toBe(0o600);
  });
});
