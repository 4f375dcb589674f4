import { and, eq, sql } from "drizzle-orm";
import { afterEach, beforeEach, describe, expect, it } from "vitest";
import { db, write } from "#app/db/client.server";
import { openInvitations } from "#app/db/queries/invitations.server";
import { mailLog } from "#app/db/queries/mail-log.server";
import { memberOf } from "#app/db/queries/membership.server";
import { events } from "#app/db/schema/events";
import { invitations } from "#app/db/schema/invitations";
import { outbox } from "#app/db/schema/outbox";
import { users } from "#app/db/schema/users";
import { verifyPin } from "#app/lib/auth/pin.server";
import { mailWorker } from "#app/lib/mail/worker.server";
import { acceptInvitation, joinAsNewPerson, readInvitation } from "#app/lib/services/accept-invitation.server";
import { INVITATION_LASTS, invite, sendInvitationAgain, withdrawInvitation } from "#app/lib/services/invitations.server";
import { addMember, endRole, giveRole, leaveInstall } from "#app/lib/services/members.server";
import { type Person, value, type Workshop, workshop } from "../support/workshop";

let w: Workshop;
beforeEach(async () => {
  w = await workshop();
});
afterEach(() => w.clock.stop());

const STRANGER = "rhea@n0200.example";
const NEW = { name: "Rhea Bellcrank", newPassword: "five odd rivets in a jar", pin: "314159" };
const refused = (status: number, code: string) => ({ ok: false, status, code });

const mails = (kind: string) => db().select().from(outbox).where(eq(outbox.kind, kind)).orderBy(sql`rowid`);
const tokenIn = (text: string | undefined) => /\/invitation\/([0-9A-Za-z]{43})\n/.exec(text ?? "")?.[1] ?? "";
async function inviteOf(by: Person, email: string, role: "lead" | "builder" | "inspector" | "crew") {
  const before = new Set((await mails("invitation")).map((m) => m.id));
  const { invitation } = value(await invite(w.act(by), { email, role }));
  const mail = (await mails("invitation")).find((m) => !before.has(m.id));
  return { invitation, token: tokenIn(mail?.text), mail };
}
const rolesOf = async (userId: string) => (await memberOf(db(), w.installId, userId))?.roles ?? null;
const lastOnPeople = async (most: number) =>
  (await db().select().from(events).where(eq(events.installId, w.installId)).orderBy(events.seq))
    .map((row) => JSON.parse(row.body) as { type: string; by: string; data: object })
    .filter((body) => body.type === "member-added" || body.type === "role-ended")
    .slice(-most);

describe("an invitation", () => {
  it("makes nobody a member, and says the same whether the address has an account or not", async () => {
    const first = await invite(w.act("lio"), { email: "olga@n0200.example", role: "builder" });
    const second = await invite(w.act("lio"), { email: STRANGER, role: "builder" });
    expect([first, second]).toEqual([
      { ok: true, value: { invitation: expect.any(String) } },
      { ok: true, value: { invitation: expect.any(String) } },
    ]);
    expect(await rolesOf("olga")).toBeNull();
    // What the lead can see of the two differs in the address alone.
    const shown = (await openInvitations(db(), w.installId)).map(({ id: _, email: __, ...rest }) => rest);
    expect(shown[0]).toEqual(shown[1]);
    const logged = (await mailLog(db(), w.installId)).map((m) => m.name);
    expect(logged).toEqual([null, null]);
  });

  it("keeps only a hash of its token, and leaves no link behind once it was sent", async () => {
    const { token } = await inviteOf("lio", STRANGER, "crew");
    expect(token).toHaveLength(43);
    const [row] = await db().select().from(invitations);
    expect(JSON.stringify(row)).not.toContain(token);
    expect(row?.tokenHash).toMatch(/^[0-9a-f]{64}$/);
    const sent: string[] = [];
    await mailWorker(async (mail) => {
      sent.push(mail.text);
    }).drain();
    expect(sent.join()).toContain(token);
    expect(JSON.stringify(await mails("invitation"))).not.toContain(token);
  });

  it("is a lead's to make, and nobody makes themselves the inspector with one", async () => {
    expect(await invite(w.act("bea"), { email: STRANGER, role: "crew" })).toMatchObject(refused(403, "not-your-role"));
    expect(await invite(w.act("olga"), { email: STRANGER, role: "crew" })).toMatchObject(refused(404, "not-found"));
    expect(await invite(w.act("lio"), { email: "lio@n0200.example", role: "inspector" })).toMatchObject(refused(403, "own-work"));
    expect(await openInvitations(db(), w.installId)).toEqual([]);
  });

  it("cannot be turned into one's own by taking over the invited address", async () => {
    const { token } = await inviteOf("lio", STRANGER, "inspector");
    await write((tx) => tx.update(users).set({ email: STRANGER }).where(eq(users.id, "lio")));
    expect(await acceptInvitation(token, { userId: "lio" })).toMatchObject(refused(403, "own-work"));
    expect(await rolesOf("lio")).toEqual(["lead"]);
  });

  it("is joined with by the person themselves, once, and the record tells it as given by the lead", async () => {
    const { token } = await inviteOf("lio", "olga@n0200.example", "builder");
    expect(await acceptInvitation(token, { userId: "bea" })).toMatchObject(refused(403, "other-person"));
    expect(await joinAsNewPerson(token, NEW)).toMatchObject(refused(409, "have-account"));
    expect(await acceptInvitation(token, { userId: "olga" })).toEqual({ ok: true, value: { install: w.installId, member: "olga" } });
    expect(await rolesOf("olga")).toEqual(["builder"]);
    expect((await lastOnPeople(1))[0]).toMatchObject({ type: "member-added", by: "lio", data: { member: "olga", role: "builder" } });
    expect(await acceptInvitation(token, { userId: "olga" })).toMatchObject(refused(409, "link-over"));
    expect(await openInvitations(db(), w.installId)).toEqual([]);
  });

  it("lets a new person in who makes an account with it, and signs with the PIN from then on", async () => {
    const { token } = await inviteOf("lio", STRANGER, "builder");
    expect(await joinAsNewPerson(token, { ...NEW, newPassword: "short" })).toMatchObject(refused(422, "password-weak"));
    expect(await joinAsNewPerson(token, { ...NEW, pin: "123456" })).toMatchObject(refused(422, "pin-weak"));
    const { member } = value(await joinAsNewPerson(token, NEW));
    const [person] = await db().select().from(users).where(eq(users.id, member));
    expect(person).toMatchObject({ email: STRANGER, name: NEW.name, isAdmin: false });
    expect(await rolesOf(member)).toEqual(["builder"]);
    expect(await verifyPin(member, NEW.pin)).toEqual({ ok: true });
    expect(await joinAsNewPerson(token, NEW)).toMatchObject(refused(409, "link-over"));
  });

  it("is good for seven days", async () => {
    const { token } = await inviteOf("lio", STRANGER, "crew");
    w.clock.add(INVITATION_LASTS - 1);
    expect(await readInvitation(token)).toMatchObject({ email: STRANGER, account: null });
    w.clock.add(1);
    expect(await readInvitation(token)).toBeNull();
    expect(await joinAsNewPerson(token, NEW)).toMatchObject(refused(409, "link-over"));
    expect(await db().select().from(users).where(eq(users.email, STRANGER))).toEqual([]);
  });

  it("can be sent again, with a new link and seven days more, and withdrawn; older links are over", async () => {
    const first = await inviteOf("lio", STRANGER, "crew");
    w.clock.add(INVITATION_LASTS);
    value(await sendInvitationAgain(w.act("lio"), first));
    const second = tokenIn((await mails("invitation")).at(-1)?.text);
    expect(second).not.toBe(first.token);
    expect(await readInvitation(first.token)).toBeNull();
    expect(await readInvitation(second)).not.toBeNull();
    // Inviting the same address to the same role is the same as sending it again.
    const third = await inviteOf("lio", STRANGER, "crew");
    expect(third.invitation).toBe(first.invitation);
    expect(await readInvitation(second)).toBeNull();
    expect(await withdrawInvitation(w.act("bea"), first)).toMatchObject(refused(403, "not-your-role"));
    value(await withdrawInvitation(w.act("lio"), first));
    expect(await readInvitation(third.token)).toBeNull();
    expect(await sendInvitationAgain(w.act("lio"), first)).toMatchObject(refused(404, "not-found"));
  });

  it("of another install is not there to be withdrawn or sent again", async () => {
    const { invitation } = await inviteOf("lio", STRANGER, "crew");
    const elsewhere = { ...w.act("olga"), installId: w.otherInstall };
    expect(await withdrawInvitation(elsewhere, { invitation })).toMatchObject(refused(404, "not-found"));
    expect(await sendInvitationAgain({ ...elsewhere, commandId: "f".repeat(22) }, { invitation })).toMatchObject(refused(404, "not-found"));
  });

  it("lets nobody in once whoever invited is not lead any more, and stays for another lead to send", async () => {
    value(await addMember(w.act("lio"), { email: "bea@n0200.example", role: "lead" }));
    const { invitation, token } = await inviteOf("bea", STRANGER, "crew");
    value(await endRole(w.act("lio"), { member: "bea", role: "lead" }));
    expect(await joinAsNewPerson(token, NEW)).toMatchObject(refused(409, "inviter-gone"));
    expect(await db().select().from(users).where(eq(users.email, STRANGER))).toEqual([]);
    value(await sendInvitationAgain(w.act("lio"), { invitation }));
    value(await joinAsNewPerson(tokenIn((await mails("invitation")).at(-1)?.text), NEW));
  });

  it("is accepted by one of two who answer at once", async () => {
    const { token } = await inviteOf("lio", STRANGER, "crew");
    const both = await Promise.all([joinAsNewPerson(token, NEW), joinAsNewPerson(token, { ...NEW, name: "Rhea Other" })]);
    expect(both.filter((o) => o.ok)).toHaveLength(1);
    expect(await db().select().from(users).where(eq(users.email, STRANGER))).toHaveLength(1);
  });

  it("goes to one mailbox only so often, and to no fewer where there is an account", async () => {
    const tries = async (email: string) => {
      const codes: string[] = [];
      for (let i = 0; i < 6; i++) {
        const outcome = await invite(w.act("lio"), { email, role: "crew" });
        codes.push(outcome.ok ? "sent" : `${outcome.status} ${outcome.code}`);
      }
      return codes;
    };
    const known = await tries("olga@n0200.example");
    expect(known.slice(0, 3)).toEqual(["sent", "sent", "sent"]);
    expect(known.at(-1)).toBe("429 too-often");
    expect(await tries(STRANGER)).toEqual(known);
  });
});

describe("members", () => {
  it("get a further role from a lead, who cannot make themselves the inspector", async () => {
    value(await giveRole(w.act("lio"), { member: "bea", role: "lead" }));
    expect(await rolesOf("bea")).toEqual(["builder", "lead"]);
    expect(await giveRole(w.act("lio"), { member: "lio", role: "inspector" })).toMatchObject(refused(403, "own-work"));
    expect(await giveRole(w.act("lio"), { member: "olga", role: "crew" })).toMatchObject(refused(404, "not-found"));
    expect(await giveRole(w.act("cal"), { member: "bea", role: "crew" })).toMatchObject(refused(403, "not-your-role"));
  });

  it("leave by themselves with all their roles; what they did stays, and the last lead cannot go", async () => {
    value(await giveRole(w.act("lio"), { member: "bea", role: "crew" }));
    value(await leaveInstall(w.act("bea")));
    expect(await rolesOf("bea")).toBeNull();
    expect((await lastOnPeople(2)).map((e) => [e.type, e.by])).toEqual([
      ["role-ended", "bea"],
      ["role-ended", "bea"],
    ]);
    expect(await leaveInstall(w.act("lio"))).toMatchObject(refused(409, "order"));
    expect(await rolesOf("lio")).toEqual(["lead"]);
    expect(await leaveInstall(w.act("olga"))).toMatchObject(refused(404, "not-found"));
  });

  it("a lead whose account is disabled does not count as the lead who is left", async () => {
    value(await giveRole(w.act("lio"), { member: "bea", role: "lead" }));
    await write((tx) =>
      tx
        .update(users)
        .set({ disabledAt: 1 })
        .where(and(eq(users.id, "bea"))),
    );
    expect(await leaveInstall(w.act("lio"))).toMatchObject(refused(409, "order"));
    expect(await endRole(w.act("lio"), { member: "lio", role: "lead" })).toMatchObject(refused(409, "order"));
  });
});
