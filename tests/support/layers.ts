// Who may import whom, and what else a layer keeps its hands off. Pure checks over source text; the table is the rule.

export type SourceFile = { path: string; text: string };

const lib = (...names: string[]) => names.map((name) => `lib/${name}/`);
const base = ["lib/clock", "lib/ids", "lib/env.server", "lib/log.server"];
const pure = lib("units", "bench", "template", "gates", "runlog", "record", "schemas");
const adapters = lib("auth", "mail", "storage", "pdf", "live");
const purePackages = ["zod", "papaparse", "csv-parse", "@noble/hashes", "canonicalize", "simple-statistics"];

type Layer = {
  /** Paths under app/ that belong to it; the first layer that fits counts. */
  where: string[];
  /** Paths under app/ that it may import. */
  app: string[];
  /** Packages that it may import; left out: any but `not`. */
  packages?: string[];
  not?: RegExp;
};

const routing = /^(react|react-dom|react-router)(\/|$)/;
const serverOnly = /^(node:|drizzle-orm|@libsql|nodemailer|bcryptjs|pino|remix-auth)/;

export const layers: Record<string, Layer> = {
  units: { where: lib("units"), app: lib("units"), packages: purePackages },
  // Of the template the bench takes the types alone: which sheets there are, and the keys of an install's values.
  bench: { where: lib("bench"), app: [...lib("bench", "units"), "lib/template/types"], packages: purePackages },
  template: { where: lib("template"), app: lib("template", "bench", "units"), packages: purePackages },
  gates: { where: lib("gates"), app: lib("gates", "template", "bench", "units"), packages: purePackages },
  runlog: { where: lib("runlog"), app: lib("runlog", "units"), packages: purePackages },
  record: { where: lib("record"), app: lib("record", "gates", "runlog", "template", "bench", "units"), packages: purePackages },
  schemas: { where: lib("schemas"), app: pure, packages: purePackages },
  // View models: from an evaluation to what a page or a mail shows. Pure; they know how places are addressed, not how they are drawn.
  views: { where: lib("views"), app: [...lib("views"), "components/line/types", "components/ui/states", ...pure], packages: purePackages },
  // What routes share: the request's context, and services' outcomes as responses.
  http: { where: lib("http"), app: [...lib("http", "auth", "services", "views"), "db/queries/", "db/client.server", ...pure, ...base] },
  base: { where: base, app: base, not: routing },
  "db schema": { where: ["db/schema/"], app: ["db/schema/", ...pure], packages: ["drizzle-orm"] },
  "db queries": { where: ["db/queries/"], app: ["db/schema/", "db/client.server", "db/queries/", ...pure], packages: ["drizzle-orm"] },
  // The demo's people and installs are plain data in fixtures/; the seed tells their story through the services.
  seed: { where: ["db/seed"], app: ["db/", "lib/", "fixtures/"], not: routing },
  db: { where: ["db/"], app: ["db/schema/", "db/client.server", ...base], not: routing },
  services: { where: lib("services"), app: [...lib("services", "auth", "mail", "storage"), "db/", ...pure, ...base], not: routing },
  adapters: { where: adapters, app: [...adapters, "lib/http/", "db/", ...pure, ...base] },
  components: { where: ["components/"], app: ["components/", ...lib("views"), ...pure], not: serverOnly },
  routes: { where: ["routes/", "root", "entry.", "routes.ts"], app: [""] },
};

/** Every breach in these files, as "file:line: what is wrong". Paths begin with app/. */
export function breaches(files: SourceFile[]): string[] {
  return files.flatMap((file) => [...importBreaches(file), ...habitBreaches(file)]);
}

function importBreaches({ path, text }: SourceFile): string[] {
  const inApp = path.slice("app/".length);
  const [name, layer] = Object.entries(layers).find(([, l]) => l.where.some((start) => inApp.startsWith(start))) ?? [];
  if (!name || !layer) return [`${path}:1: belongs to no layer; add its folder to the table or move it`];
  return importsOf(text).flatMap(({ from, line }) => {
    const why = wrongImport(inApp, name, layer, from);
    return why ? [`${path}:${line}: ${why}`] : [];
  });
}

function wrongImport(inApp: string, name: string, layer: Layer, from: string): string | undefined {
  if (from.startsWith("./+types/")) return undefined;
  const target = from.startsWith("#app/") ? from.slice("#app/".length) : from.startsWith(".") ? resolveFrom(inApp, from) : undefined;
  if (target === undefined) {
    const allowed = layer.packages ? layer.packages.some((p) => from === p || from.startsWith(`${p}/`)) : !layer.not?.test(from);
    return allowed ? undefined : `${name} may not import ${from}`;
  }
  if (target.startsWith("routes/") && routeOf(target) !== routeOf(inApp)) return `a route may not be imported (${from})`;
  if (name === "components" && target.includes(".server")) return `components may not import ${from}, which is for the server`;
  return layer.app.some((start) => target.startsWith(start)) ? undefined : `${name} may not import ${from}`;
}

/** A route is a file, or a folder with its companions. */
const routeOf = (inApp: string) => /^routes\/([^/]+?)(\.tsx?)?(\/|$)/.exec(inApp)?.[1];

function resolveFrom(inApp: string, from: string): string {
  const parts = inApp.split("/").slice(0, -1);
  for (const step of from.split("/")) {
    if (step === "..") parts.pop();
    else if (step !== ".") parts.push(step);
  }
  return parts.join("/");
}

function importsOf(text: string): { from: string; line: number }[] {
  const statements = /(?:^|\n)[ \t]*(?:import|export)\s+(?:type\s+)?(?:[\w*{}\s,$]+?\s*from\s*)?["']([^"'\n]+)["']/g;
  const calls = /\bimport\(\s*["']([^"'\n]+)["']/g;
  return [statements, calls].flatMap((pattern) =>
    [...text.matchAll(pattern)].map((m) => ({ from: m[1] ?? "", line: lineOf(text, m.index + m[0].length) })),
  );
}

type Habit = { in: RegExp; except?: RegExp; pattern: RegExp; why: string };

const routeExports =
  /^(default|meta|links|loader|clientLoader|action|clientAction|middleware|clientMiddleware|headers|handle|shouldRevalidate|HydrateFallback|ErrorBoundary)$/;
const pureFolders = /^app\/lib\/(units|bench|template|gates|runlog|record|schemas|views)\//;

const habits: Habit[] = [
  { in: /^app\/routes\/.*\.(test|spec)\./, pattern: /^/, why: "a test in the routes folder becomes a route; move it to tests/" },
  { in: /(^|\/)index\.tsx?$/, except: /^app\/db\/schema\//, pattern: /^/, why: "no barrels: import the file that has it" },
  { in: /(^|\/)(utils|helpers|common)(\/|\.)/, pattern: /^/, why: "no drawer for odds and ends: name it by its noun" },
  {
    in: /./,
    except: /^app\/db\/client\.server\.ts$/,
    pattern: /\.transaction\(|\bBEGIN (IMMEDIATE|EXCLUSIVE|DEFERRED)\b/g,
    why: "transactions are opened in db/client.server.ts alone: use write()",
  },
  { in: /./, except: /^app\/lib\/env\.server\.ts$/, pattern: /\bprocess\.env\b/g, why: "settings come from lib/env.server.ts" },
  {
    in: pureFolders,
    pattern: /\bDate\.now\b|\bnew Date\(\s*\)|\bMath\.random\b|\bperformance\.now\b/g,
    why: "a pure module is told the time and the dice",
  },
  { in: /^app\/lib\/services\//, pattern: /\bDate\.now\b|\bnew Date\(\s*\)/g, why: "server time comes from lib/clock" },
  {
    in: /^app\/(components|routes)\//,
    pattern: /(?<=["'`\s[:(,])#(?:[0-9a-fA-F]{8}|[0-9a-fA-F]{6}|[0-9a-fA-F]{3,4})(?![\w-])|\b(?:rgba?|hsla?|oklch|oklab)\(/g,
    why: "a raw colour: use a role of the theme",
  },
];

function habitBreaches({ path, text }: SourceFile): string[] {
  const code = withoutComments(text);
  const found = habits
    .filter((habit) => habit.in.test(path) && !habit.except?.test(path))
    .flatMap((habit) =>
      (habit.pattern.global ? [...code.matchAll(habit.pattern)] : [{ index: 0 }]).map(
        (m) => `${path}:${lineOf(code, m.index)}: ${habit.why}`,
      ),
    );
  return path.startsWith("app/routes/") && /\/routes\/([^/]+|[^/]+\/route)\.tsx?$/.test(path)
    ? [...found, ...strayExports(path, code)]
    : found;
}

function strayExports(path: string, code: string): string[] {
  const declared = [...code.matchAll(/\bexport\s+(?:async\s+)?(?:const|let|function\*?|class|enum)\s+(\w+)/g)];
  const listed = [...code.matchAll(/\bexport\s*\{([^}]*)\}/g)].flatMap((m) =>
    (m[1] ?? "").split(",").map((entry) =>
      Object.assign(
        [
          m[0],
          entry
            .trim()
            .split(/\s+as\s+/)
            .at(-1) ?? "",
        ],
        { index: m.index },
      ),
    ),
  );
  return [...declared, ...listed]
    .filter((m) => m[1] && !routeExports.test(m[1]))
    .map((m) => `${path}:${lineOf(code, m.index)}: a route file exports route exports only, not ${m[1]}`);
}

/** Comments become blanks, so that lines keep their numbers. */
function withoutComments(text: string): string {
  return text.replace(/\/\*[\s\S]*?\*\/|(?<=^|\s)\/\/[^\n]*/g, (comment) => comment.replace(/[^\n]/g, " "));
}

const lineOf = (text: string, index: number) => text.slice(0, index).split("\n").length;
