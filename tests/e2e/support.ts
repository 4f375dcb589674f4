// What browser tests share: the demo's people and places, an instance, pages as each of the people, on which nothing may complain.
import { randomUUID } from "node:crypto";
import { cpSync, rmSync } from "node:fs";
import type { AddressInfo } from "node:net";
import { createServer } from "node:net";
import { type APIResponse, type BrowserContext, test as base, expect, type Page } from "@playwright/test";
import type { DemoPlace } from "../../scripts/demo-places.mjs";
import type { Message } from "../../scripts/mail-fake.mjs";
import { type DemoPerson, startInstance } from "../../scripts/running.mjs";

export { expect };

export const people: DemoPerson[] = JSON.parse(process.env.E2E_PEOPLE ?? "[]");
const places: Record<string, DemoPlace> = JSON.parse(process.env.E2E_PLACES ?? "{}");

export const SIZES = { tablet: { width: 1180, height: 820 }, phone: { width: 390, height: 844 } };
export type Size = keyof typeof SIZES;

/** One of the demo's people by first name. */
export function personOf(first: string): DemoPerson {
  const person = people.find((p) => p.name.startsWith(first));
  if (!person) throw new Error(`Nobody in the demo is called ${first}`);
  return person;
}

/** Where things are on an install of the demo. */
export function placeOf(registration: string) {
  const place = places[registration];
  if (!place) throw new Error(`The demo has no ${registration}`);
  const board = `/installs/${place.id}`;
  return {
    ...place,
    board,
    gate: (key: string) => `${board}/gates/${place.gates[key]}`,
    run: (label: string) => `${board}/runs/${place.runs[label]}`,
    item: (key: string) => place.items[key] ?? "",
  };
}

interface Instance {
  address: string;
  inbox: string;
}

/** `javaScript: false` for a browser without scripts, `theme` for one of the two themes. */
type Visit = (first: string, size: Size, options?: { javaScript?: boolean; theme?: "apron" | "hangar" }) => Promise<Page>;

interface TestParts {
  complaints: string[];
  visit: Visit;
}
interface WorkerParts {
  /** A name: tests with the same one share an instance of their own; "" = the one that all share and none may change. */
  own: string;
  instance: Instance;
  /** Cookies of whoever has signed in on this instance, by person: a sign-in is made once. */
  sessions: Map<string, Awaited<ReturnType<BrowserContext["cookies"]>>>;
}

export const test = base.extend<TestParts, WorkerParts>({
  own: ["", { option: true, scope: "worker" }],
  instance: [
    async ({ own }, use, { project }) => {
      const shared = project.use.baseURL ?? "";
      if (!own) return use({ address: shared, inbox: process.env.E2E_INBOX ?? "" });
      const folder = `${process.env.E2E_DEMO}-${own}-${randomUUID()}`;
      cpSync(process.env.E2E_DEMO ?? "", folder, { recursive: true });
      const started = await startInstance({ folder, host: "127.0.0.1", port: await freePort(), quiet: true });
      await use({ address: started.address, inbox: started.mail.url });
      await started.stop();
      rmSync(folder, { recursive: true, force: true });
    },
    { scope: "worker", timeout: 60_000 },
  ],
  sessions: [
    // biome-ignore lint/correctness/noEmptyPattern: Playwright reads which fixtures one needs from the braces
    async ({}, use) => use(new Map()),
    { scope: "worker" },
  ],
  baseURL: async ({ instance }, use) => use(instance.address),
  /** What pages wrote to the console as error or warning, or threw. A test fails on what is left of it. */
  complaints: [
    async ({ page }, use) => {
      const complaints: string[] = [];
      listen(page, complaints);
      await use(complaints);
      expect(complaints).toEqual([]);
    },
    { auto: true },
  ],
  visit: async ({ browser, instance, sessions, complaints }, use) => {
    const contexts: BrowserContext[] = [];
    await use(async (first, size, { javaScript = true, theme = "apron" } = {}) => {
      const context = await browser.newContext({
        baseURL: instance.address,
        viewport: SIZES[size],
        hasTouch: true,
        javaScriptEnabled: javaScript,
      });
      contexts.push(context);
      await context.addCookies([{ name: "theme", value: theme, url: instance.address }]);
      const known = sessions.get(first);
      if (known) await context.addCookies(known);
      else {
        await signInByRequest(context, instance.address, personOf(first));
        sessions.set(
          first,
          (await context.cookies()).filter((c) => c.name !== "theme"),
        );
      }
      const page = await context.newPage();
      listen(page, complaints);
      return page;
    });
    for (const context of contexts) await context.close();
  },
});

function listen(page: Page, complaints: string[]): void {
  page.on("console", (message) => {
    if (message.type() === "error" || message.type() === "warning") complaints.push(message.text());
  });
  page.on("pageerror", (error) => complaints.push(error.message));
}

async function signInByRequest(context: BrowserContext, address: string, person: DemoPerson): Promise<void> {
  const { email, password } = person;
  const answer = await context.request.post("/sign-in", { form: { email, password }, headers: { Origin: address }, maxRedirects: 0 });
  expect(answer.status(), "signing in").toBe(303);
}

function freePort(): Promise<number> {
  return new Promise((done) => {
    const probe = createServer().listen(0, "127.0.0.1", () => {
      const { port } = probe.address() as AddressInfo;
      probe.close(() => done(port));
    });
  });
}

/** Signs in through the page, as a person does. */
export async function signIn(page: Page, person: { email: string; password: string }): Promise<void> {
  await page.goto("/sign-in");
  await page.getByLabel("E-mail").fill(person.email);
  await page.getByLabel("Password", { exact: true }).fill(person.password);
  await page.getByRole("button", { name: /^Sign in/ }).click();
  await page.waitForURL("**/hangar");
}

type Sent = Record<string, string>;

/** A form sent by hand, past every page, with the person's own session. */
export function postForm(page: Page, path: string, form: Sent): Promise<APIResponse> {
  const headers = { Origin: new URL(page.url()).origin, Accept: "text/html" };
  return page.request.post(path, { form: { commandId: randomUUID(), ...form }, headers, maxRedirects: 0 });
}

/** The same by the API. */
export function postJson(page: Page, path: string, body: object): Promise<APIResponse> {
  const headers = { Origin: new URL(page.url()).origin };
  return page.request.post(path, { data: { commandId: randomUUID(), ...body }, headers });
}

/** What a person reads of an answered page. */
export async function textOf(page: Page, answer: APIResponse): Promise<string> {
  const html = await answer.text();
  return page.evaluate((text) => {
    const body = new DOMParser().parseFromString(text, "text/html").body;
    for (const script of body.querySelectorAll("script")) script.remove();
    return (body.textContent ?? "").replace(/\s+/g, " ");
  }, html);
}

/** What a gate's signature would cover now, as the API tells it. */
export async function coversOf(page: Page, registration: string, gate: string) {
  const place = placeOf(registration);
  const answer = await page.request.get(`/api/v1${place.board}/board`);
  const { gates } = (await answer.json()) as { gates: Record<string, { covers: object[]; state: string }> };
  const found = gates[place.gates[gate] ?? ""];
  if (!found) throw new Error(`No gate ${gate}`);
  return found;
}

export const messagesIn = async (inbox: string): Promise<Message[]> => (await fetch(`${inbox}/messages.json`)).json();
