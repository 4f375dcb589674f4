import { eq, sql } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, it, vi } from "vitest";
import { db, write } from "#app/db/client.server";
import { instanceMail, mailCounts } from "#app/db/queries/instance-mail.server";
import { accountLinks } from "#app/db/schema/account-links";
import { apiTokens } from "#app/db/schema/api-tokens";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";
import { readApiToken } from "#app/lib/auth/api-token.server";
import { hash, matches } from "#app/lib/auth/hash.server";
import { hashPin, verifyPin } from "#app/lib/auth/pin.server";
import { absoluteLimit, sessionsOf, startSession } from "#app/lib/auth/session.server";
import { setClock } from "#app/lib/clock";
import { newRequestFacts, withRequest } from "#app/lib/http/request.server";
import { newId } from "#app/lib/ids";
import { mailWorker } from "#app/lib/mail/worker.server";
import { disableAccount, enableAccount, sendReset, tryMailAgain } from "#app/lib/services/administer.server";
import { endApiToken, makeApiToken } from "#app/lib/services/api-tokens.server";
import {
  ADDRESS_LASTS,
  askForAddress,
  changePassword,
  confirmAddress,
  readAddressLink,
  setPin,
} from "#app/lib/services/change-account.server";
import { firstPersonLink, isStartOpen, makeFirstPerson } from "#app/lib/services/first-person.server";
import { endOneSession, signOutEverywhere } from "#app/lib/services/own-choices.server";
import { askForReset, isResetOpen, RESET_LASTS, resetPassword } from "#app/lib/services/reset-password.server";
import { handClock } from "../support/clock";
import { freshDatabase } from "../support/db";
import { value } from "../support/workshop";

// Watched, not replaced.
vi.mock("#app/lib/auth/hash.server", { spy: true });

const PASSWORD = "four damp cotter pins";
const OTHER = "nine loose jam nuts there";
const PIN = "271828";
const HOUR = 3_600_000;
let clock: ReturnType<typeof handClock>;

beforeEach(async () => {
  await freshDatabase();
  clock = handClock(Date.UTC(2026, 11, 3, 9, 0));
});
afterEach(() => {
  setClock(clock.before);
});

async function people(): Promise<void> {
  const [passwordHash, pinHash] = [await hash(PASSWORD), await hashPin(PIN)];
  const row = (id: string, name: string, isAdmin = false) => ({
    id,
    email: `${id}@n0100.example`,
    name,
    passwordHash,
    pinHash,
    isAdmin,
    createdAt: 0,
  });
  await write((tx) => tx.insert(users).values([row("ada", "Ada Quill"), row("tor", "Tor Spindle"), row("adm", "Admin Istrator", true)]));
}
const refused = (status: number, code: string) => ({ ok: false, status, code });
const me = async (id = "ada") => {
  const [row] = await db().select().from(users).where(eq(users.id, id));
  if (!row) throw new Error("Nobody");
  return row;
};
const mails = (kind: string) => db().select().from(outbox).where(eq(outbox.kind, kind)).orderBy(sql`rowid`);
const tokenIn = (text: string | undefined) => /\/([0-9A-Za-z]{43})\n/.exec(text ?? "")?.[1] ?? "";
const session = (userId: string) => write((tx) => startSession(tx, userId, "Firefox/1 (Android)"));
const act = (id = "ada", sessionId = "", commandId = newId()) => ({ actor: { userId: id, sessionId }, commandId });
const from = <T>(address: string, work: () => Promise<T>) => withRequest(newRequestFacts(address), work);

describe("a lost password", () => {
  beforeEach(people);
  const ask = async (email: string) => {
    const outcome = await askForReset(email);
    return { outcome, sent: outcome.ok ? await outcome.value.sent : null };
  };
  const link = async () => {
    await ask("ada@n0100.example");
    return tokenIn((await mails("reset")).at(-1)?.text);
  };

  it("is answered the same whether there is an account or not, and mailed only where there is", async () => {
    const [known, unknown] = [await ask("ada@n0100.example"), await ask("nobody@n0100.example")];
    expect([known.outcome.ok, unknown.outcome.ok]).toEqual([true, true]);
    expect([known.sent, unknown.sent]).toEqual([true, false]);
    await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, "tor")));
    expect((await ask("tor@n0100.example")).outcome.ok).toBe(true);
    expect((await mails("reset")).map((m) => m.toAddress)).toEqual(["ada@n0100.example"]);
    expect((await mails("reset"))[0]?.text).toContain("3 Dec 2026 10:00 UTC");
  });

  it("is asked for only so often for one mailbox, account or not, and from one network address", async () => {
    const answers = async (email: string) => {
      const list: number[] = [];
      for (let i = 0; i < 6; i++) {
        const { outcome } = await from(`192.0.2.${i}`, () => ask(email));
        list.push(outcome.ok ? 200 : outcome.status);
      }
      return list;
    };
    const known = await answers("ada@n0100.example");
    expect(known).toEqual([200, 200, 200, 200, 429, 429]);
    expect(await answers("nobody@n0100.example")).toEqual(known);
    let stopped = 0;
    for (let i = 0; i < 22; i++) if (!(await from("198.51.100.9", () => ask(`p${i}@n0100.example`))).outcome.ok) stopped++;
    expect(stopped).toBeGreaterThan(0);
  });

  it("gets a new one by the link, once, which ends every session and token and is told", async () => {
    await session("ada");
    await session("tor");
    value(await makeApiToken(act(), { name: "display", scopes: ["read"], days: 30, password: PASSWORD }));
    const token = await link();
    expect(JSON.stringify(await db().select().from(accountLinks))).not.toContain(token);
    expect(await resetPassword(token, "short")).toMatchObject(refused(422, "password-weak"));
    value(await resetPassword(token, OTHER));
    expect(await matches(OTHER, (await me()).passwordHash)).toBe(true);
    expect([await sessionsOf("ada"), await db().select().from(apiTokens)]).toEqual([[], []]);
    expect(await sessionsOf("tor")).toHaveLength(1);
    expect((await mails("account")).at(-1)).toMatchObject({ toAddress: "ada@n0100.example", subject: "Your password was changed" });
    expect(await resetPassword(token, PASSWORD)).toMatchObject(refused(409, "link-over"));
    expect(await matches(OTHER, (await me()).passwordHash)).toBe(true);
  });

  it("ends all links of the person with the first that is used", async () => {
    const [first, second] = [await link(), await link()];
    expect([await isResetOpen(first), await isResetOpen(second)]).toEqual([true, true]);
    value(await resetPassword(second, OTHER));
    expect(await isResetOpen(first)).toBe(false);
  });

  it("has a link that is good for an hour, and for one of two who use it at once", async () => {
    const token = await link();
    clock.add(RESET_LASTS - 1);
    expect(await isResetOpen(token)).toBe(true);
    const both = await Promise.all([resetPassword(token, OTHER), resetPassword(token, "six blunt twist drills")]);
    expect(both.filter((o) => o.ok)).toHaveLength(1);
    const late = await link();
    clock.add(RESET_LASTS);
    expect(await resetPassword(late, PASSWORD)).toMatchObject(refused(409, "link-over"));
  });

  it("stops whoever tries out links, and nobody else", async () => {
    const wrong = () => from("192.0.2.9", () => resetPassword("A".repeat(43), OTHER));
    for (let i = 0; i < 20; i++) expect(await wrong()).toMatchObject(refused(409, "link-over"));
    expect(await wrong()).toMatchObject(refused(429, "too-often"));
    const token = await link();
    value(await from("192.0.2.10", () => resetPassword(token, OTHER)));
  });

  it("leaves no link behind in the outbox once the mail is sent", async () => {
    const token = await link();
    await mailWorker(async () => {}).drain();
    expect(JSON.stringify(await db().select().from(outbox))).not.toContain(token);
  });
});

describe("a change of the account", () => {
  beforeEach(people);
  const person = { name: "Ada Quill", email: "ada@n0100.example" };

  it("takes the password, and nothing changes without it", async () => {
    const before = await me();
    const wrong = "not this one at all";
    expect(await changePassword(act(), { password: wrong, newPassword: OTHER, ...person })).toMatchObject(refused(403, "password-wrong"));
    expect(await setPin(act(), { password: wrong, pin: "314159" })).toMatchObject(refused(403, "password-wrong"));
    expect(await askForAddress(act(), { password: wrong, email: "new@n0100.example" })).toMatchObject(refused(403, "password-wrong"));
    expect(await makeApiToken(act(), { name: "x", scopes: ["read"], days: 30, password: wrong })).toMatchObject(
      refused(403, "password-wrong"),
    );
    expect(await me()).toEqual(before);
    expect(await db().select().from(outbox)).toEqual([]);
    expect(await db().select().from(apiTokens)).toEqual([]);
  });

  it("is held up after five wrong passwords, like a sign-in", async () => {
    for (let i = 0; i < 5; i++) await from(`192.0.2.${i}`, () => setPin(act(), { password: "wrong", pin: "314159" }));
    expect(await setPin(act(), { password: PASSWORD, pin: "314159" })).toMatchObject(refused(429, "too-often"));
    clock.add(60_000);
    value(await setPin(act(), { password: PASSWORD, pin: "314159" }));
  });

  it("of the password ends every other session and is told by mail", async () => {
    await session("ada");
    const [here] = await sessionsOf("ada");
    await session("ada");
    expect(await changePassword(act("ada", here?.id), { password: PASSWORD, newPassword: "adaquill adaquill", ...person })).toMatchObject(
      refused(422, "password-weak"),
    );
    const change = act("ada", here?.id);
    value(await changePassword(change, { password: PASSWORD, newPassword: OTHER, ...person }));
    expect((await sessionsOf("ada")).map((s) => s.id)).toEqual([here?.id]);
    expect(await matches(OTHER, (await me()).passwordHash)).toBe(true);
    // The same form once more, as a double click sends it: done once, and no wrong password.
    value(await changePassword(change, { password: PASSWORD, newPassword: OTHER, ...person }));
    expect((await mails("account")).map((m) => m.subject)).toEqual(["Your password was changed"]);
  });

  it("of the PIN lifts its lock, counts from the next signature on and is told", async () => {
    for (let i = 0; i < 5; i++) await verifyPin("ada", "000001");
    expect(await verifyPin("ada", PIN)).toMatchObject({ ok: false, code: "pin-locked" });
    expect(await setPin(act(), { password: PASSWORD, pin: "111111" })).toMatchObject(refused(422, "pin-weak"));
    value(await setPin(act(), { password: PASSWORD, pin: "314159" }));
    expect(await verifyPin("ada", PIN)).toMatchObject({ ok: false, code: "pin-wrong" });
    expect(await verifyPin("ada", "314159")).toEqual({ ok: true });
    expect((await mails("account")).at(-1)?.text).not.toContain("314159");
  });

  it("of the address counts when the new one has confirmed it; the old one is told before and after", async () => {
    value(await askForAddress(act(), { password: PASSWORD, email: "ada@n0101.example" }));
    expect((await me()).email).toBe("ada@n0100.example");
    const [mail] = await mails("new-address");
    const token = tokenIn(mail?.text);
    expect(mail?.toAddress).toBe("ada@n0101.example");
    expect(await readAddressLink(token)).toEqual({ name: "Ada Quill", address: "ada@n0101.example" });
    value(await askForReset("ada@n0100.example"));
    value(await confirmAddress(token));
    expect((await me()).email).toBe("ada@n0101.example");
    expect((await mails("account")).map((m) => m.toAddress).sort()).toEqual([
      "ada@n0100.example",
      "ada@n0100.example",
      "ada@n0101.example",
    ]);
    // A link that went to the old address opens this account no more.
    expect(await isResetOpen(tokenIn((await mails("reset"))[0]?.text))).toBe(false);
    expect(await confirmAddress(token)).toMatchObject(refused(409, "link-over"));
  });

  it("of the address has a link for a day, which a newer one ends", async () => {
    const ask = async (email: string) => {
      value(await askForAddress(act(), { password: PASSWORD, email }));
      return tokenIn((await mails("new-address")).find((m) => m.toAddress === email)?.text);
    };
    const first = await ask("a1@n0101.example");
    const second = await ask("a2@n0101.example");
    expect([await readAddressLink(first), (await readAddressLink(second))?.address]).toEqual([null, "a2@n0101.example"]);
    clock.add(ADDRESS_LASTS);
    expect(await confirmAddress(second)).toMatchObject(refused(409, "link-over"));
  });

  it("to somebody else's address is answered like any other, and never comes about", async () => {
    const free = await askForAddress(act(), { password: PASSWORD, email: "free@n0101.example" });
    const taken = await askForAddress(act(), { password: PASSWORD, email: "tor@n0100.example" });
    expect(taken).toEqual(free);
    expect((await mails("new-address")).map((m) => m.toAddress)).toEqual(["free@n0101.example"]);
    // Taken only after the link went out.
    value(await askForAddress(act(), { password: PASSWORD, email: "soon@n0101.example" }));
    const token = tokenIn((await mails("new-address")).at(-1)?.text);
    await write((tx) => tx.update(users).set({ email: "soon@n0101.example" }).where(eq(users.id, "tor")));
    expect(await confirmAddress(token)).toMatchObject(refused(409, "link-over"));
    expect((await me()).email).toBe("ada@n0100.example");
  });

  it("ends one session or all, one's own alone", async () => {
    for (const who of ["ada", "ada", "tor"]) await session(who);
    const [first, second] = await sessionsOf("ada");
    await endOneSession("tor", first?.id ?? "");
    expect(await sessionsOf("ada")).toHaveLength(2);
    await endOneSession("ada", first?.id ?? "");
    expect((await sessionsOf("ada")).map((s) => s.id)).toEqual([second?.id]);
    await signOutEverywhere("ada");
    expect([(await sessionsOf("ada")).length, (await sessionsOf("tor")).length]).toEqual([0, 1]);
  });
});

describe("a token of the API", () => {
  beforeEach(people);
  const make = async (scopes: ("read" | "record")[]) =>
    value(await makeApiToken(act(), { name: "display", scopes, days: 30, password: PASSWORD })).token;
  const asked = (token: string, scope: "read" | "record") =>
    readApiToken(new Request("http://board.example/api/v1/x", { headers: { Authorization: `Bearer ${token}` } }), scope);

  it("is shown once and stored as a hash, and asks in its owner's name", async () => {
    const same = act();
    const { token } = value(await makeApiToken(same, { name: "display", scopes: ["read"], days: 30, password: PASSWORD }));
    expect(await makeApiToken(same, { name: "display", scopes: ["read"], days: 30, password: PASSWORD })).toMatchObject(
      refused(409, "already"),
    );
    const all = JSON.stringify([await db().select().from(apiTokens), await db().select().from(outbox)]);
    expect(all).not.toContain(token);
    expect(await asked(token, "read")).toMatchObject({ ok: true, actor: { userId: "ada", sessionId: "" } });
    expect((await db().select().from(apiTokens))[0]?.lastUsedAt).toBe(Date.UTC(2026, 11, 3, 9, 0));
  });

  it("reaches as far as its scope", async () => {
    const token = await make(["read"]);
    expect(await asked(token, "record")).toMatchObject({ ok: false, status: 403, code: "token-scope" });
    expect(await asked(await make(["read", "record"]), "record")).toMatchObject({ ok: true });
  });

  it("ends by its owner's hand alone, with its time, and with the account", async () => {
    const token = await make(["read"]);
    const [row] = await db().select().from(apiTokens);
    await endApiToken("tor", row?.id ?? "");
    expect(await asked(token, "read")).toMatchObject({ ok: true });
    clock.add(30 * 24 * HOUR);
    expect(await asked(token, "read")).toMatchObject({ status: 401, code: "token-unknown" });
    const second = await make(["read"]);
    await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, "ada")));
    expect(await asked(second, "read")).toMatchObject({ status: 401 });
    await write((tx) => tx.update(users).set({ disabledAt: null }).where(eq(users.id, "ada")));
    const third = await make(["read"]);
    for (const one of await db().select().from(apiTokens)) await endApiToken("ada", one.id);
    expect(await asked(third, "read")).toMatchObject({ status: 401 });
  });

  it("is asked for in no other way, and wrong ones are stopped by network address", async () => {
    expect(await readApiToken(new Request("http://board.example/"), "read")).toBeNull();
    for (const wrong of ["x", "A".repeat(43), `bladecount_${"A".repeat(43)}`, "bladecount_"])
      expect(await from("192.0.2.1", () => asked(wrong, "read"))).toMatchObject({ status: 401 });
    let last: unknown;
    for (let i = 0; i < 18; i++) last = await from("192.0.2.1", () => asked(`bladecount_${"A".repeat(43)}`, "read"));
    expect(last).toMatchObject({ status: 429 });
    const token = await make(["read"]);
    expect(await from("192.0.2.1", () => asked(token, "read"))).toMatchObject({ ok: true });
  });
});

describe("the first person of an instance", () => {
  const FIRST = { name: "Ada Quill", email: "ada@n0100.example", newPassword: PASSWORD, pin: PIN };
  const tokenOf = (link: string | null) => /\/start\/([0-9A-Za-z]{43})$/.exec(link ?? "")?.[1] ?? "";

  it("becomes its administrator by the link that the newest start printed, once", async () => {
    const [first, second] = [tokenOf(await firstPersonLink()), tokenOf(await firstPersonLink())];
    expect([await isStartOpen(first), await isStartOpen(second)]).toEqual([false, true]);
    expect(JSON.stringify(await db().select().from(accountLinks))).not.toContain(second);
    expect(await makeFirstPerson(first, FIRST)).toMatchObject(refused(409, "link-over"));
    expect(await makeFirstPerson(second, { ...FIRST, pin: "1" })).toMatchObject(refused(422, "pin-weak"));
    const { userId } = value(await makeFirstPerson(second, FIRST));
    expect(await me(userId)).toMatchObject({ isAdmin: true, email: "ada@n0100.example" });
    expect(await makeFirstPerson(second, { ...FIRST, email: "tor@n0100.example" })).toMatchObject(refused(409, "link-over"));
    expect(await firstPersonLink()).toBeNull();
  });

  it("is one of two who come at once", async () => {
    const token = tokenOf(await firstPersonLink());
    const both = await Promise.all([makeFirstPerson(token, FIRST), makeFirstPerson(token, { ...FIRST, email: "tor@n0100.example" })]);
    expect(both.filter((o) => o.ok)).toHaveLength(1);
    expect(await db().$count(users)).toBe(1);
  });

  it("cannot come by an old link once somebody is there", async () => {
    const token = tokenOf(await firstPersonLink());
    await people();
    expect(await isStartOpen(token)).toBe(false);
    expect(await makeFirstPerson(token, { ...FIRST, email: "new@n0100.example" })).toMatchObject(refused(409, "link-over"));
  });
});

describe("an administrator", () => {
  beforeEach(people);
  const adm = { userId: "adm" };

  it("disables and enables accounts, which ends their sessions and is told; never their own", async () => {
    await session("ada");
    value(await disableAccount(adm, "ada"));
    expect(await sessionsOf("ada")).toEqual([]);
    expect(await disableAccount(adm, "ada")).toMatchObject(refused(409, "already"));
    expect(await sendReset(adm, "ada")).toMatchObject(refused(409, "disabled"));
    value(await enableAccount(adm, "ada"));
    expect((await me()).disabledAt).toBeNull();
    expect(await disableAccount(adm, "adm")).toMatchObject(refused(409, "own-account"));
    expect(await enableAccount(adm, "nobody")).toMatchObject(refused(404, "not-found"));
    expect((await mails("account")).map((m) => m.subject)).toEqual(["Your account was disabled", "Your account was enabled again"]);
  });

  it("is asked for by every act, whoever sends it", async () => {
    for (const by of [{ userId: "ada" }, { userId: "nobody" }]) {
      expect(await disableAccount(by, "tor")).toMatchObject(refused(403, "not-admin"));
      expect(await enableAccount(by, "tor")).toMatchObject(refused(403, "not-admin"));
      expect(await sendReset(by, "tor")).toMatchObject(refused(403, "not-admin"));
      expect(await tryMailAgain(by, "m")).toMatchObject(refused(403, "not-admin"));
    }
    await write((tx) => tx.update(users).set({ disabledAt: 1 }).where(eq(users.id, "adm")));
    expect(await disableAccount(adm, "tor")).toMatchObject(refused(403, "not-admin"));
    expect(await mails("reset")).toEqual([]);
  });

  it("sends a link for a new password and never sees it", async () => {
    value(await sendReset(adm, "ada"));
    const [mail] = await mails("reset");
    expect(mail).toMatchObject({ toAddress: "ada@n0100.example", toUserId: "ada" });
    expect(mail?.text).toContain("Admin Istrator");
    value(await resetPassword(tokenIn(mail?.text), OTHER));
    const shown = JSON.stringify(await instanceMail(db(), "waiting"));
    expect(shown).not.toContain(tokenIn(mail?.text));
  });

  it("does not send a GO mail again", async () => {
    const row = { id: "g", kind: "go", toAddress: "ada@n0100.example", subject: "GO", text: "", messageId: "<g>", dedupeKey: "go:a:ada" };
    await write((tx) => tx.insert(outbox).values({ ...row, createdAt: 0, nextTryAt: 0, failedAt: 1 }));
    expect(await tryMailAgain(adm, "g")).toMatchObject(refused(409, "go-over"));
    expect(await tryMailAgain(adm, "nothing")).toMatchObject(refused(404, "not-found"));
  });

  it("sees what became of the mail, and has what was given up tried again", async () => {
    value(await sendReset(adm, "ada"));
    const fail = mailWorker(async () => {
      throw new Error("no way out");
    });
    for (let i = 0; i < 10; i++) {
      await fail.drain();
      clock.add(HOUR);
    }
    const [lost] = await instanceMail(db(), "given up");
    expect(lost).toMatchObject({ to: "ada@n0100.example", tries: 10, lastError: "no way out" });
    value(await tryMailAgain(adm, lost?.id ?? ""));
    expect(await tryMailAgain(adm, lost?.id ?? "")).toMatchObject(refused(409, "already"));
    await mailWorker(async () => {}).drain();
    expect(await mailCounts(db())).toEqual({ sent: 1, waiting: 0, "given up": 0 });
  });
});

it("a session ends by itself, whatever its list says", async () => {
  await people();
  await session("ada");
  clock.add(absoluteLimit);
  expect(await sessionsOf("ada")).toEqual([]);
});
