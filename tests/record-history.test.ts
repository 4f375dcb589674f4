import { execFileSync } from "node:child_process";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join, resolve } from "node:path";
import { afterAll, describe, expect, it } from "vitest";
import { canonical } from "#app/lib/record/canonical";
import { FIRST, type Line, link } from "#app/lib/record/chain";
import { type EventBody, parseEvent, type RecordEvent } from "#app/lib/record/events";
import { namesIn } from "#app/lib/record/names";
import { tell } from "#app/lib/record/tell";
import { recordFilter, recordView } from "#app/lib/views/record";

const at = Date.UTC(2026, 11, 3, 9, 0);

type Entry = { body: EventBody; by?: string; id?: string };

function chain(entries: Entry[]): Line<RecordEvent>[] {
  const lines: Line<RecordEvent>[] = [];
  for (const [n, { body, by = "bea", id = `e${n + 1}` }] of entries.entries()) {
    const prev = lines.at(-1)?.hash ?? FIRST;
    const event = parseEvent({ v: 1, install: "in1", seq: n + 1, recorded: at + n * 60_000, by, as: "builder", id, ...body });
    lines.push({ event, prev, hash: link(prev, event) });
  }
  return lines;
}

const measurePart = {
  kind: "measure",
  label: "Gap",
  places: ["left", "right"],
  criterion: { quantity: "length", band: null, source: null },
};
const story: Entry[] = [
  {
    body: {
      type: "install-created",
      data: {
        registration: "N0200W",
        name: "Wren",
        timeZone: "Europe/Berlin",
        traits: {},
        templateVersion: "1",
        values: [],
        gates: [
          { id: "g1", key: "FP", name: "Fuel prime" },
          { id: "g2", key: "IG", name: "Ignition" },
        ],
        items: [
          { id: "i1", key: "FP1", words: "Purge the line.", gate: "g1", parts: [{ kind: "tick", reference: null }] },
          { id: "i2", key: "IG1", words: "Set the plug gap.", gate: "g2", parts: [measurePart] },
        ],
        rungs: [],
        leftOut: [],
      },
    },
  },
  { body: { type: "member-added", data: { member: "bea", name: "Bea Holm", role: "builder" } } },
  { body: { type: "member-added", data: { member: "ivo", name: "Ivo Lind", role: "inspector" } } },
  {
    body: {
      type: "proof",
      data: { item: "i2", key: "IG1", revision: 1, did: "ivo", counts: at, late: true, state: "done", evidence: [{ kind: "measure", values: [0.0005, 0.0006] }], tools: [], note: "cold" },
    },
    id: "p1",
  },
  { body: { type: "opened", data: { systems: ["fuelsup"], reason: "strainer out", opened: at } }, id: "o1" },
  { body: { type: "proof-withdrawn", data: { proof: "p1", reason: "wrong engine side" } }, by: "ivo" },
  { body: { type: "opening-closed", data: { opening: "o1", closed: at, note: "new seal" } } },
]; // biome-ignore format: a story is read line by line

const lines = chain(story);
const names = namesIn(lines.map((l) => l.event));
const told = lines.map((l) => tell(l.event, names, "si"));

describe("the record in words", () => {
  it("says what was measured, who did it, when it was late, and with what remark", () => {
    expect(told[3]).toMatchObject({ kind: "work", did: "proved “IG1 Set the plug gap”", gate: "g2", about: null });
    expect(told[3]?.details).toEqual([
      "Gap: left 0.5 mm, right 0.6 mm",
      "Done by Ivo Lind",
      "Entered late: done 3 Dec 2026 10:00 CET",
      "cold",
    ]);
  });

  it("points back from a withdrawal and a closing to the line that they speak of", () => {
    expect(told[5]).toMatchObject({ did: "withdrew the proof of “IG1 Set the plug gap”", gate: "g2", about: 4 });
    expect(told[6]).toMatchObject({ did: "closed the opening “strainer out”", about: 5 });
  });

  it("says which value was confirmed and which number was entered, in the reader's units", () => {
    const more = chain([
      ...story,
      { body: { type: "value-confirmed", data: { key: "redline", value: 45, source: "manual p. 9", revised: [] } } },
      {
        body: {
          type: "number-entered",
          data: { item: "i2", key: "IG1", part: 0, entered: { min: 0.0004, max: 0.0005 }, source: "plug box", revision: 2 },
        },
      },
    ]).map((l) => l.event);
    const words = (n: number, units: "si" | "us") => tell(more[n] as RecordEvent, namesIn(more), units);
    expect(words(7, "si").did).toBe("confirmed the install's redline: 2700 rpm");
    expect(words(8, "si").details).toEqual([expect.stringMatching(/^Gap: .*0\.4.*0\.5 mm$/), "Read in: plug box", "Revision 2"]);
    expect(words(8, "us").details[0]).toContain("in");
  });

  it("keeps what was withdrawn readable, and says what became of it", () => {
    const view = recordView(lines, recordFilter(new URLSearchParams()), "in1", "si");
    const proof = view.rows.find((r) => r.seq === 4);
    expect(proof?.details[0]).toContain("0.5 mm");
    expect(proof?.later).toEqual([
      expect.objectContaining({ seq: 6, who: "Ivo Lind", did: "withdrew the proof of “IG1 Set the plug gap”" }),
    ]);
    expect(view.head).toEqual({ seq: 7, hash: lines[6]?.hash });
    expect(view.rows.map((r) => r.seq)).toEqual([7, 6, 5, 4, 3, 2, 1]);
  });

  it.each([
    ["gate=g2", [6, 4]],
    ["person=ivo", [6]],
    ["kind=openings", [7, 5]],
    ["gate=g2&person=bea", [4]],
    ["kind=nonsense", [7, 6, 5, 4, 3, 2, 1]],
    ["gate=nowhere", []],
    ["upTo=2", [2, 1]],
    ["upTo=-5", [7, 6, 5, 4, 3, 2, 1]],
  ])("filtered by %s shows lines %j", (query, seqs) => {
    expect(recordView(lines, recordFilter(new URLSearchParams(query)), "in1", "si").rows.map((r) => r.seq)).toEqual(seqs);
  });

  it("goes on to older pages and back without losing the filter", () => {
    const many = chain([...story, ...Array.from({ length: 130 }, (_, n): Entry => ({ body: { type: "opened", data: { systems: ["oil"], reason: `drain ${n}`, opened: at } } }))]); // biome-ignore format: one thought
    const seen: number[] = [];
    let query = "kind=openings";
    for (let n = 0; n < 10; n++) {
      const view = recordView(many, recordFilter(new URLSearchParams(query)), "in1", "si");
      seen.push(...view.rows.map((r) => r.seq));
      if (!view.older) break;
      query = view.older.split("?")[1] ?? "";
    }
    expect(seen).toHaveLength(132);
    expect(new Set(seen).size).toBe(132);
  });
});

describe("verify-record, without the application", () => {
  const folder = mkdtempSync(join(tmpdir(), "bladecount-record-"));
  afterAll(() => rmSync(folder, { recursive: true, force: true }));
  const saved = lines.map(({ event, hash }) => `{"event":${canonical(event)},"hash":"${hash}"}`);

  function check(text: string, ...options: string[]): { code: number; said: string } {
    const file = join(folder, "record.jsonl");
    writeFileSync(file, text);
    try {
      return {
        code: 0,
        said: execFileSync(process.execPath, [resolve("scripts/verify-record.mjs"), file, ...options], { encoding: "utf8" }),
      };
    } catch (error) {
      const failed = error as { status: number; stdout: string; stderr: string };
      return { code: failed.status, said: failed.stdout + failed.stderr };
    }
  }
  const join_ = (list: string[]) => `${list.join("\n")}\n`;

  it("finds a record whole, and its head", () => {
    const { code, said } = check(join_(saved));
    expect(code).toBe(0);
    expect(said).toContain(`WHOLE. 7 lines follow from each other.\nHead ${lines[6]?.hash}`);
  });

  it("finds an earlier head in it, and says up to which line", () => {
    const { code, said } = check(join_(saved), "--head", String(lines[4]?.hash));
    expect(code).toBe(0);
    expect(said).toContain("that of line 5");
  });

  it.each([
    ["a value edited", () => saved.map((s) => s.replace("strainer out", "strainer in")), 5],
    ["a line deleted", () => saved.toSpliced(2, 1), 3],
    ["a line doubled", () => saved.toSpliced(3, 0, String(saved[2])), 4],
    ["two lines swapped", () => saved.with(1, String(saved[2])).with(2, String(saved[1])), 2],
    ["text that is no line", () => saved.with(5, "{"), 6],
  ])("finds %s", (_, tampered, line) => {
    const { code, said } = check(join_(tampered()));
    expect(code).toBe(1);
    expect(said).toContain(`BROKEN. Line ${line} `);
  });

  it("finds a cut tail and a rebuilt chain against a head that was printed before", () => {
    const printed = String(lines[6]?.hash);
    expect(check(join_(saved.slice(0, 5)), "--head", printed).code).toBe(1);
    const rebuilt = chain(
      story.map((s, n) => (n === 5 ? { ...s, body: { type: "proof-withdrawn", data: { proof: "p1", reason: "nothing" } } } : s)),
    );
    const again = check(join_(rebuilt.map(({ event, hash }) => `{"event":${canonical(event)},"hash":"${hash}"}`)), "--head", printed); // biome-ignore format: one thought
    expect(again.said).toContain("WHOLE");
    expect(again.said).toContain("NOT THE SAME RECORD");
    expect(again.code).toBe(1);
  });

  it("says what it wants when it gets no file, and that an empty one proves nothing", () => {
    expect(check("").code).toBe(1);
    expect(check("").said).toContain("EMPTY");
  });
});
