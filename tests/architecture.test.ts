import { readdirSync, readFileSync } from "node:fs";
import { join } from "node:path";
import { describe, expect, it } from "vitest";
import { breaches, type SourceFile } from "./support/layers";

function sources(folder: string): SourceFile[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    const path = join(folder, entry.name);
    if (entry.isDirectory()) return sources(path);
    return /\.tsx?$/.test(entry.name) && !entry.name.endsWith(".d.ts") ? [{ path, text: readFileSync(path, "utf8") }] : [];
  });
}

describe("the architecture", () => {
  it("holds in every file of the program", () => {
    const files = sources("app");
    expect(files.length).toBeGreaterThan(20);
    expect(breaches(files)).toEqual([]);
  });

  it.each([
    ["app/lib/gates/a.ts", '// head\nimport { eq } from "drizzle-orm";', "2: gates may not import drizzle-orm"],
    ["app/lib/gates/a.ts", 'import {\n  a,\n  b,\n} from "#app/lib/runlog/x";', "4: gates may not import #app/lib/runlog/x"],
    ["app/lib/units/a.ts", 'import { x } from "../bench/x";', "1: units may not import ../bench/x"],
    ["app/lib/units/a.ts", 'import { readFileSync } from "node:fs";', "1: units may not import node:fs"],
    ["app/lib/bench/a.ts", "const a = 1;\nconst t = Date.now();", "2: a pure module is told the time and the dice"],
    ["app/lib/record/a.ts", "const t = new Date();", "1: a pure module is told the time and the dice"],
    ["app/lib/services/a.server.ts", 'import { data } from "react-router";', "1: services may not import react-router"],
    ["app/lib/services/a.server.ts", 'import { A } from "#app/components/ui/A";', "1: services may not import #app/components/ui/A"],
    [
      "app/lib/services/a.server.ts",
      "await db().transaction(async () => {});",
      "1: transactions are opened in db/client.server.ts alone: use write()",
    ],
    [
      "app/db/queries/a.server.ts",
      'import { sign } from "#app/lib/services/sign.server";',
      "1: db queries may not import #app/lib/services/sign.server",
    ],
    ["app/lib/mail/a.server.ts", 'const m = await import("#app/routes/_app");', "1: a route may not be imported (#app/routes/_app)"],
    [
      "app/components/ui/A.tsx",
      'import type { U } from "#app/lib/auth/actor.server";',
      "1: components may not import #app/lib/auth/actor.server, which is for the server",
    ],
    ["app/components/ui/A.tsx", 'import { users } from "#app/db/schema/users";', "1: components may not import #app/db/schema/users"],
    ["app/components/ui/A.tsx", '<i className="text-[#fff]" />', "1: a raw colour: use a role of the theme"],
    ["app/components/ui/A.tsx", '<i style={{ color: "rgb(1 2 3)" }} />', "1: a raw colour: use a role of the theme"],
    ["app/routes/a.tsx", 'import { x } from "./b";', "1: a route may not be imported (./b)"],
    ["app/routes/a.tsx", "export function loader() {}\nexport const helper = 1;", "2: a route file exports route exports only, not helper"],
    ["app/routes/a.tsx", "const x = 1;\nexport { x as other };", "2: a route file exports route exports only, not other"],
    ["app/routes/a.test.tsx", "", "1: a test in the routes folder becomes a route; move it to tests/"],
    ["app/lib/http/a.server.ts", "const p = process.env.PORT;", "1: settings come from lib/env.server.ts"],
    ["app/lib/odd/a.ts", "", "1: belongs to no layer; add its folder to the table or move it"],
    ["app/components/ui/index.ts", "", "1: no barrels: import the file that has it"],
  ])("is broken by %s: %s", (path, text, expected) => {
    expect(breaches([{ path, text }])).toContain(`${path}:${expected}`);
  });

  it.each([
    ["app/lib/gates/a.ts", '// Date.now() is not for here\nimport { z } from "zod";\nimport type { Q } from "#app/lib/units/quantity";'],
    [
      "app/routes/a/route.tsx",
      'import { Part } from "./part";\nimport type { Route } from "./+types/route";\nexport async function action() {}\nexport default function A() {}',
    ],
    ["app/components/ui/A.tsx", '<a href="#main" style={{ mask: "url(#b)" }} className="fill-flow" />'],
    [
      "app/lib/services/a.server.ts",
      'import { write } from "#app/db/client.server";\nimport { eq } from "drizzle-orm";\nimport { now } from "#app/lib/clock";',
    ],
  ])("is kept by %s", (path, text) => {
    expect(breaches([{ path, text }])).toEqual([]);
  });
});
