import fc from "fast-check";
import { describe, expect, it } from "vitest";
import type { RunMailKind, RunMailReader } from "#app/lib/mail/compose/model";
import { composeRunMail } from "#app/lib/mail/compose/run-mail";
import { wrap } from "#app/lib/mail/compose/text";
import { dayAndTime, duration, oneLine, speedRange, timeInBoth } from "#app/lib/mail/compose/words";
import { runMailModel, STOPS } from "./support/run-mail-model";

const KINDS: RunMailKind[] = ["go", "no-go", "hold", "scrub"];
const reader = (member: string, name: string): RunMailReader => ({ member, name, units: "si" });
const joss = reader("joss", "Joss Amaral");
const flat = (text: string) => text.replace(/\s+/g, " ");
/** What a person reads in the HTML. */
const seen = (html: string | undefined) =>
  flat((html ?? "").replace(/<style>[\s\S]*?<\/style>/g, "").replace(/<[^>]+>/g, " "))
    .replaceAll("&#39;", "'")
    .replaceAll("&quot;", '"')
    .replaceAll("&nbsp;", " ");

describe("the GO mail", () => {
  const model = runMailModel();
  const { subject, text, html } = composeRunMail("go", model, joss);

  it("says in its subject which run, when and up to what", () => {
    expect(subject).toBe("GO: run 1 of N0417B, Sat 5 Dec 09:30 CET, cleared to 1,375 rpm");
  });

  it("begins with the reader's own place and what to do there", () => {
    expect(text.split("\n")[0]).toBe("Joss Amaral: you are fire guard.");
    expect(flat(text)).toContain("Outboard of the propeller's plane, extinguisher in hand. Watches for fire;");
    expect(seen(html)).toContain("Joss Amaral: you are fire guard.");
  });

  it.each([
    ["both times", "Sat 5 Dec 09:30 CET (08:30 UTC), apron south."],
    ["how long it stands", "GO stands until Sat 5 Dec 13:30 CET (12:30 UTC)."],
    ["what binds and what is next", "What binds: plan, run card version 3. Next: straps and surface, 1,450 rpm."],
    ["the wind limit", "15 kt, gusts 23 kt, none from behind"],
    ["the last wind", "6 kt, gusts 8.9 kt"],
    ["a default that nobody confirmed", "200 kPa, a default, not confirmed"],
    ["a limit that is not there", "not entered"],
    ["what ends it", "GO turns into HOLD by itself"],
    ["the caution", "The maker's manuals, the local rules and the judgement of licensed people come before this mail."],
    ["the record", model.head.hash],
  ])("says %s in text and HTML alike", (_, words) => {
    expect(flat(text)).toContain(words);
    expect(seen(html)).toContain(words);
  });

  it("has every step of the card, every abort word and every link in both", () => {
    for (const step of model.card.steps) {
      expect(flat(text)).toContain(flat(step.see));
      expect(seen(html)).toContain(flat(step.see));
    }
    for (const line of [...model.card.abort.stop, ...model.card.abort.kill, ...model.card.abort.fire].map((l) =>
      l.replace(/^(STOP|KILL): /, ""),
    )) {
      expect(flat(text)).toContain(line);
      expect(seen(html).toLowerCase()).toContain(line.toLowerCase());
    }
    expect(text.split("\n")).toContain(model.links.run);
    expect(html).toContain(`href="${model.links.run}"`);
  });

  it("rounds the clearance down, never up", () => {
    const limit = { kind: "restraint" as const, id: "s", label: "straps", rpm: 1374.9 / 60 };
    expect(composeRunMail("go", runMailModel({ clearance: { rpm: limit.rpm, binds: limit, limits: [limit] } }), joss).subject).toContain(
      "1,374 rpm",
    );
  });
});

describe.each(KINDS)("the %s mail", (kind) => {
  const model = runMailModel(kind === "go" ? {} : { stops: STOPS, goEnds: null });

  it.each(model.crew.map((c) => [c.name, c] as const))("tells %s their own places, and the whole crew", (_, member) => {
    const { text, html } = composeRunMail(kind, model, reader(member.member, member.name));
    const first = text.split("\n")[0] ?? "";
    for (const p of member.positions) expect(first.toLowerCase()).toContain(p.name.toLowerCase());
    for (const other of model.crew) {
      expect(text).toContain(other.name);
      expect(seen(html)).toContain(other.name);
    }
    expect(text).toContain(`${member.name} (you)`);
  });

  it("tells a reader without a place that they have none", () => {
    expect(composeRunMail(kind, model, reader("hanne", "Hanne Oduya")).text).toMatch(/^Hanne Oduya: you hold no place on this run/);
  });

  it("keeps every line to 72 characters, save links", () => {
    const long = composeRunMail(kind, model, joss)
      .text.split("\n")
      .filter((l) => l.length > 72 && !l.startsWith("https://"));
    expect(long).toEqual([]);
  });

  it("fetches nothing: no picture, script, font or style from anywhere", () => {
    const html = composeRunMail(kind, model, joss).html ?? "";
    expect(html).not.toMatch(/<(img|script|link|iframe|video|object|form)\b|url\(|@import|\bsrc=/i);
    for (const [, address] of html.matchAll(/(?:href|src|action|background)="([^"]*)"/g)) expect(address).toBe(model.links.run);
    expect(html).toContain('name="color-scheme" content="light dark"');
  });

  it("escapes whatever people typed, wherever it stands", () => {
    const evil = `<b onclick="x">&amp;'"</b>`;
    const html =
      composeRunMail(
        kind,
        runMailModel({
          install: { ...model.install, name: evil },
          run: { ...model.run, place: evil, rung: evil, label: evil },
          crew: model.crew.map((c) => ({ ...c, name: evil })),
          limits: [{ label: evil, quantity: "rotation", value: 1, confirmed: false }],
          stops: [{ title: evil, sentence: evil, who: [evil], next: null }],
          act: { ...model.act, by: evil, reason: evil },
          cautions: [evil],
        }),
        reader("joss", evil),
      ).html ?? "";
    expect(html).not.toContain("<b onclick");
    expect(html).not.toContain("&amp;amp;amp;");
    expect(html).toContain("&lt;b onclick=&quot;x&quot;&gt;&amp;amp;&#39;&quot;&lt;/b&gt;");
  });

  it("stays one line in the subject and keeps its layout, whatever is typed", () => {
    const typed = fc.string({ unit: fc.constantFrom("\r", "\n", "\u2028", "\u202e", "\0", "a", " ", "é", "😀", ":", "<"), maxLength: 200 });
    fc.assert(
      fc.property(typed, typed, typed, (name, reason, title) => {
        const { subject, text } = composeRunMail(
          kind,
          runMailModel({
            install: { ...model.install, registration: name, name },
            run: { ...model.run, label: name, place: reason },
            crew: model.crew.map((c) => ({ ...c, name })),
            stops: [{ title, sentence: reason, who: [name], next: null }],
            act: { ...model.act, by: name, reason },
          }),
          reader("joss", name),
        );
        // biome-ignore lint/suspicious/noControlCharactersInRegex: control characters are what must not be there
        expect(subject).not.toMatch(/[\u0000-\u001f\u007f\u2028\u2029\u202a-\u202e]/);
        expect([...subject].length).toBeLessThanOrEqual(150);
        expect(text.split("\n").filter((l) => l.length > 72 && !l.startsWith("https://"))).toEqual([]);
      }),
      { numRuns: 60 },
    );
  });
});

describe("no-go and HOLD", () => {
  it("a no-go says that there is no run then, what stops it, who is on it and what comes first where nobody is", () => {
    const { subject, text } = composeRunMail(
      "no-go",
      runMailModel({ stops: STOPS, goEnds: null, act: { ...runMailModel().act, reason: "Again at two." } }),
      joss,
    );
    expect(subject).toBe("No-go: run 1 of N0417B, Sat 5 Dec 09:30 CET, 2 things stop it");
    expect(flat(text)).toContain("There is no run on Sat 5 Dec 09:30 CET.");
    expect(flat(text)).toContain("1. Fuel prime has lapsed.");
    expect(flat(text)).toContain("On it: Mirela Tansen and Osei Brandt.");
    expect(flat(text)).toContain("Nobody here can: invite an inspector on the Crew page.");
    expect(flat(text)).toContain("In their words: Again at two.");
    expect(flat(text)).toContain("No GO mail means no run.");
  });

  it("a HOLD of the board's own says so, and that nobody starts the engine", () => {
    const act = { by: "Ana Reyl", at: Date.UTC(2026, 11, 5, 8, 21), reason: "Fuel prime has lapsed.", auto: true };
    const { subject, text } = composeRunMail("hold", runMailModel({ stops: STOPS, goEnds: null, act }), joss);
    expect(subject).toBe("HOLD: run 1 of N0417B, Sat 5 Dec 09:30 CET, Fuel prime has lapsed");
    expect(flat(text)).toContain("Nobody starts the engine. It turned to HOLD by itself, Sat 5 Dec 09:21 CET.");
    expect(text).not.toContain("Ana Reyl called HOLD");
  });

  it("a HOLD called by a person gives their name and words", () => {
    const act = { by: "Ana Reyl", at: Date.UTC(2026, 11, 5, 8, 21), reason: "Dog on the apron", auto: false };
    const { text, subject } = composeRunMail("hold", runMailModel({ goEnds: null, act }), joss);
    expect(flat(text)).toContain("Ana Reyl called HOLD, Sat 5 Dec 09:21 CET.");
    expect(flat(text)).toContain("In their words: Dog on the apron");
    expect(subject).toContain("Dog on the apron");
  });
});

describe("SCRUB", () => {
  const act = { by: "Ana Reyl", at: Date.UTC(2026, 11, 5, 8, 21), reason: "Rain all day", auto: false };
  const { subject, text, html } = composeRunMail("scrub", runMailModel({ goEnds: null, act }), joss);

  it("has the reason in its subject", () => expect(subject).toBe("SCRUB: run 1 of N0417B, Sat 5 Dec 09:30 CET, Rain all day"));
  it.each([
    ["that there is no run", "There is no run on Sat 5 Dec 09:30 CET."],
    ["that no GO stands", "Nobody starts the engine; no GO of it stands."],
    ["who gave it up, and when", "Ana Reyl, Sat 5 Dec 09:21 CET"],
    ["why", "Rain all day"],
    ["what comes next", "another run of it is planned and called anew"],
  ])("says %s in text and HTML alike", (_, words) => {
    expect(flat(text)).toContain(words);
    expect(seen(html)).toContain(words);
  });
});

describe("words and figures of mails", () => {
  it("gives a time with its day, zone and UTC, once where they are the same", () => {
    expect(dayAndTime(Date.UTC(2026, 6, 4, 7, 0), "Europe/Berlin")).toBe("Sat 4 Jul 09:00 CEST");
    expect(timeInBoth(Date.UTC(2026, 6, 4, 22, 30), "Europe/Berlin")).toBe("Sun 5 Jul 00:30 CEST (4 Jul 22:30 UTC)");
    expect(timeInBoth(Date.UTC(2026, 6, 4, 7, 0), "UTC")).toBe("Sat 4 Jul 07:00 UTC");
  });
  it.each([
    [30, "30 s"],
    [60, "1 min"],
    [90, "1 min 30 s"],
  ])("%d s reads %s", (s, words) => expect(duration(s)).toBe(words));
  it("writes a speed or a range", () => {
    expect(speedRange({ min: 15, max: 15 })).toBe("900 rpm");
    expect(speedRange({ min: 1100 / 60, max: 1237.5 / 60 })).toBe("1,100 to 1,238 rpm");
  });
  it("makes one line of several", () => expect(oneLine(" a\r\nBcc: b\u202e ")).toBe("a Bcc: b"));
  it("breaks a word that fits no line, and leaves a link whole", () => {
    expect(wrap("x".repeat(100)).map((l) => l.length)).toEqual([72, 28]);
    const link = `https://board.example/${"y".repeat(100)}`;
    expect(wrap(`see ${link}`)).toEqual(["see", link]);
  });
});
