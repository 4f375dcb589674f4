import { parseWithZod } from "@conform-to/zod/v4";
import { describe, expect, it } from "vitest";
import type { z } from "zod";
import * as account from "#app/lib/schemas/account";
import * as crib from "#app/lib/schemas/crib-forms";
import * as happenings from "#app/lib/schemas/happening-forms";
import { ratingsForm } from "#app/lib/schemas/new-install";
import * as run from "#app/lib/schemas/run-forms";
import { createInstallSchema } from "#app/lib/schemas/set-up";
import * as setUp from "#app/lib/schemas/set-up-forms";
import { signInForm } from "#app/lib/schemas/sign-in";
import { crewRule } from "#app/lib/template/positions";
import { valueDefs } from "#app/lib/template/values";
import { SAMPLES } from "./support/sample-traits";

const [redline] = valueDefs(SAMPLES.boostedConstantSpeed)
  .filter((v) => v.key === "redline")
  .map((v) => ({ ...v, value: null, source: null }));
if (!redline) throw new Error("No redline");
const rules = {
  rung: { key: "1", rpm: 20, crew: crewRule("1", SAMPLES.boostedConstantSpeed) },
  redline: 45,
  windMost: 7,
  gustMost: 11,
  nameOf: (m: string) => m,
  isMember: () => true,
};

/** Every form that a page sends, with its fields and, where a form says which it is, what it says. */
const FORMS: Record<string, { schema: z.ZodType; fields: string[]; intent?: string }> = {
  "sign in": { schema: signInForm, fields: ["email", "password"] },
  "new install": {
    schema: createInstallSchema.pick({ registration: true, name: true, timeZone: true }),
    fields: ["registration", "name", "timeZone"],
  },
  ratings: { schema: ratingsForm([redline], "si"), fields: ["commandId", "values.redline.value", "values.redline.source"] },
  value: { schema: setUp.valueForm(redline, "si"), fields: ["commandId", "key", "value", "source"] },
  invite: { schema: account.inviteForm, fields: ["commandId", "email", "role"] },
  "invitation again": { schema: account.invitationForm, fields: ["commandId", "invitation"] },
  "further role": { schema: account.giveRoleForm, fields: ["commandId", "member", "role"] },
  leave: { schema: account.leaveForm, fields: ["commandId"] },
  "new person": { schema: account.newPersonForm, fields: ["name", "newPassword", "pin", "pinAgain"] },
  "first person": { schema: account.firstPersonForm, fields: ["name", "email", "newPassword", "pin", "pinAgain"] },
  "forgot the password": { schema: account.forgotForm, fields: ["email"] },
  "reset the password": { schema: account.resetForm, fields: ["newPassword"] },
  "change the password": { schema: account.passwordForm, fields: ["commandId", "password", "newPassword"] },
  "change the address": { schema: account.addressForm, fields: ["commandId", "email", "password"] },
  "change the PIN": { schema: account.pinForm, fields: ["commandId", "password", "pin", "pinAgain"] },
  "end a session": { schema: account.sessionForm, fields: ["session"] },
  "make a token": { schema: account.tokenForm, fields: ["commandId", "name", "may", "days", "password"] },
  "end a token": { schema: account.endTokenForm, fields: ["token"] },
  "person of the instance": { schema: account.personForm, fields: ["person"] },
  "mail of the instance": { schema: account.instanceMailForm, fields: ["mail"] },
  "end role": { schema: setUp.endRoleForm, fields: ["commandId", "member", "role"] },
  "add tool": { schema: crib.addToolForm, fields: ["commandId", "name", "serial"], intent: "add-tool" },
  "good check": { schema: crib.goodCheckForm, fields: ["commandId", "tool", "on", "due", "note"], intent: "good-check" },
  "bad check": { schema: crib.badCheckForm, fields: ["commandId", "tool", "on", "note"], intent: "bad-check" },
  "add extinguisher": {
    schema: crib.addExtinguisherForm("si"),
    fields: ["commandId", "name", "agent", "charge"],
    intent: "add-extinguisher",
  },
  look: { schema: crib.lookForm, fields: ["commandId", "extinguisher", "due", "note"], intent: "look" },
  service: { schema: crib.serviceForm, fields: ["commandId", "extinguisher", "due", "note"], intent: "service" },
  withdraw: { schema: crib.withdrawForm, fields: ["commandId", "extinguisher", "note"], intent: "withdrawn" },
  open: { schema: happenings.openForm("UTC", 0), fields: ["commandId", "systems[0]", "closed", "reason", "happened"] },
  "close opening": { schema: happenings.closeOpeningForm, fields: ["commandId", "opening", "note"] },
  mistake: { schema: happenings.markMistakeForm, fields: ["commandId", "opening", "reason"] },
  "loose end": { schema: happenings.makeLooseEndForm, fields: ["commandId", "what", "count", "system", "why", "due", "askedBy"] },
  "loose end restored": { schema: happenings.looseEndForm, fields: ["commandId", "looseEnd"] },
  "loose end accepted": { schema: happenings.acceptLooseEndForm, fields: ["commandId", "looseEnd", "rung", "reason"] },
  "raise finding": { schema: happenings.raiseFindingForm("si"), fields: ["commandId", "system", "words", "severity", "cap"] },
  "grade finding": { schema: happenings.gradeFindingForm("si"), fields: ["commandId", "finding", "words", "severity", "cap"] },
  "fix finding": { schema: happenings.fixFindingForm, fields: ["commandId", "finding", "words"] },
  acknowledge: { schema: run.acknowledgeForm, fields: ["commandId", "version"], intent: "acknowledge" },
  "go answer": { schema: run.goAnswerForm, fields: ["commandId", "version"], intent: "go" },
  "no-go answer": { schema: run.noGoAnswerForm, fields: ["commandId", "version", "reason"], intent: "no-go" },
  wind: { schema: run.windForm, fields: ["commandId", "speed", "gust", "tail"], intent: "wind" },
  "any of the run's page": { schema: run.runPageForm, fields: ["commandId", "intent"] },
  reason: { schema: run.reasonForm, fields: ["commandId", "reason"] },
  "mail again": { schema: setUp.mailAgainForm, fields: ["commandId", "mail"] },
  go: { schema: run.goForm, fields: ["commandId", "version", "pin"] },
  plan: { schema: run.planForm(rules, "UTC"), fields: ["commandId", "date", "time", "place", "rpm", "windLimit", "gustLimit"] },
};

/** How the parser itself speaks where no sentence of ours stands. */
const RAW = /expected|received|invalid|too (big|small)|required/i;

describe.each(Object.entries(FORMS))("the form “%s”", (_, { schema, fields, intent }) => {
  const said = (fill: string) => {
    const form = new FormData();
    if (intent) form.set("intent", intent);
    for (const name of fields) form.set(name, fill);
    const sent = parseWithZod(form, { schema });
    return sent.status === "success" ? {} : (sent.reply().error ?? {});
  };

  it.each([
    ["empty", ""],
    ["blank", "   "],
    ["far too long", "x".repeat(5000)],
    ["of another kind", "-1"],
  ])("has a plain sentence at each field that is %s", (_, fill) => {
    const errors = said(fill);
    for (const [field, messages] of Object.entries(errors)) {
      expect(fields).toContain(field.replace(/\[\d+\]$/, "[0]").replace(/^systems$/, "systems[0]"));
      for (const message of messages ?? []) {
        expect(message, field).not.toMatch(RAW);
        expect(message, field).toMatch(/^["A-Z\d-].{1,160}[.!]$/);
      }
    }
  });
});

describe("an empty field", () => {
  it.each([
    ["value", "source", "Say where it was read, such as the manual and its page."],
    ["add tool", "name", "Give it its name, such as the mark on its handle and its range."],
    ["bad check", "note", "Say what was found, in a few words."],
    ["good check", "due", "Enter the last day in date, as the label or certificate says."],
    ["invite", "email", "Enter the mail address of whoever is to join."],
    ["reason", "reason", "Say why, in a few words."],
    ["go", "pin", "Enter your PIN."],
    ["new install", "registration", "Enter the registration, as painted on the side."],
  ])("of “%s”, %s, says: %s", (name, field, sentence) => {
    const { schema, fields, intent } = FORMS[name] ?? FORMS.reason ?? { schema: run.reasonForm, fields: [] };
    const form = new FormData();
    if (intent) form.set("intent", intent);
    for (const f of fields) form.set(f, "");
    const sent = parseWithZod(form, { schema });
    expect(sent.status).toBe("error");
    expect(sent.reply().error?.[field]).toEqual([sentence]);
  });
});

describe("a registration", () => {
  it("has one limit, on the page and in the act", () => {
    const read = (registration: string) => createInstallSchema.shape.registration.safeParse(registration);
    expect(read("n0123456789a").data).toBe("N0123456789A");
    expect(read("N0123456789AB").error?.issues[0]?.message).toBe("Use at most 12 characters.");
  });
});
