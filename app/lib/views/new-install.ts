/**
 * A new install on its way: its answers as they travel in the address from page to page, and what is still wrong with them.
 * Pure: nothing is kept on the server until the last page is sent.
 */
import { identitySchema } from "#app/lib/schemas/new-install";
import { applies } from "#app/lib/template/condition";
import { traitWords } from "#app/lib/template/trait-words";
import {
  PAGE_ONE,
  PAGE_TWO,
  type PageOne,
  type PageOneKey,
  presetPageTwo,
  type Question,
  settleCycle,
  traitsSchema,
} from "#app/lib/template/traits";
import type { Traits } from "#app/lib/template/types";

export interface Draft {
  registration: string;
  name: string;
  /** IANA name; empty = not chosen yet. */
  timeZone: string;
  /** Page one as far as it is answered, and of page two what was answered there. */
  answers: Partial<Traits>;
}

export type TraitKey = keyof Traits;
export type Errors = Partial<Record<TraitKey | keyof Omit<Draft, "answers">, string[]>>;

const FIRST_KEYS: ReadonlySet<string> = new Set(PAGE_ONE.map((q) => q.key));
const isFirst = (key: string): key is PageOneKey => FIRST_KEYS.has(key);

/** Pages of the new install. */
export const PAGES = ["/installs/new", "/installs/new/details", "/installs/new/ratings"] as const;

// ---------------------------------------------------------------- the address

/** An answer as it stands in the address and in its radio. */
export function codeOf(value: Traits[TraitKey]): string {
  if (value === true) return "yes";
  if (value === false) return "no";
  return value === null ? "not-one" : String(value);
}

/** What an address says. Answers that the questions do not know are as good as none. */
export function readDraft(query: URLSearchParams): Draft {
  const given = [...PAGE_ONE, ...PAGE_TWO].flatMap((q) => {
    const found = q.options.find((option) => codeOf(option.value) === query.get(q.key));
    return found ? [[q.key, found.value]] : [];
  });
  return {
    registration: (query.get("registration") ?? "").trim().toUpperCase(),
    name: (query.get("name") ?? "").trim(),
    timeZone: query.get("zone") ?? "",
    answers: Object.fromEntries(given) as Partial<Traits>,
  };
}

/** The address of a draft. Of page two it carries only what differs from the preset, so that a changed page one presets anew. */
export function writeDraft({ registration, name, timeZone, answers }: Draft): URLSearchParams {
  const one = pageOneOf(answers);
  const preset: Partial<Traits> = one ? presetPageTwo(one) : {};
  const query = new URLSearchParams();
  for (const [key, text] of [
    ["registration", registration],
    ["name", name],
    ["zone", timeZone],
  ] as const)
    if (text) query.set(key, text);
  for (const { key } of [...PAGE_ONE, ...PAGE_TWO]) {
    const value = answers[key];
    if (value !== undefined && (isFirst(key) || value !== preset[key])) query.set(key, codeOf(value));
  }
  return query;
}

export const placeOfPage = (page: 1 | 2 | 3, draft: Draft): string => `${PAGES[page - 1]}?${writeDraft(draft)}`;

// ---------------------------------------------------------------- from answers to traits

function pageOneOf(answers: Partial<Traits>): PageOne | null {
  return PAGE_ONE.every((q) => answers[q.key] !== undefined) ? (answers as PageOne) : null;
}

/** Page two for what page one says; a question that does not apply is answered by that. Page one is left as it was answered. */
function settled(traits: Traits): Traits {
  const { ignition, lubrication } = traits;
  const out: Traits = { ...settleCycle(traits), ignition, lubrication };
  if (!asked("return", out)) out.return = false;
  if (!asked("pump2", out)) out.pump2 = false;
  if (!asked("lithium", out)) out.lithium = false;
  return out;
}

function asked(key: TraitKey, traits: Traits): boolean {
  return applies(PAGE_TWO.find((q) => q.key === key)?.when, traitWords(traits));
}

/** The traits as answered so far, page two preset where nothing was said. Null until page one is answered. They may contradict themselves. */
export function traitsOf({ answers }: Draft): Traits | null {
  const one = pageOneOf(answers);
  return one && settled({ ...presetPageTwo(one), ...answers });
}

/** The same with each open question of page one answered in the plainest way that does not contradict the others. */
export function plainest({ answers }: Draft): Traits {
  const { ignition = "mag" } = answers;
  const { metering = ignition === "none" ? "mechinj" : "carb" } = answers;
  const one: PageOne = {
    delivery: metering === "carb" ? "gravity" : "enginepump",
    computers: metering === "efi" ? 1 : 0,
    cooling: "air",
    lubrication: "wet",
    drive: "direct",
    propeller: "fixed",
    gear: "nose",
    starter: "estart",
    history: "new",
    ...answers,
    metering,
    ignition,
  };
  return settled({ ...presetPageTwo(one), ...answers });
}

// ---------------------------------------------------------------- what is wrong

type Issue = { path: TraitKey; message: string };

function issuesOf(traits: Traits): Issue[] {
  const result = traitsSchema.safeParse(traits);
  return result.success ? [] : result.error.issues.map((issue) => ({ path: issue.path[0] as TraitKey, message: issue.message }));
}

function collect(issues: { path: keyof Errors; message: string }[]): Errors {
  const out: Errors = {};
  for (const { path, message } of issues) out[path] = [...new Set([...(out[path] ?? []), message])];
  return out;
}

export interface Judged {
  /** Questions of page one without an answer. */
  open: PageOneKey[];
  /** By question: answers that cannot be true together. */
  errors: Errors;
  /** Registration, name, zone. */
  identity: Errors;
  ready: boolean;
}

/** Page one. An open question is no error here: the page says so once it was asked to go on. */
export function judgeFirst(draft: Draft): Judged {
  const open = PAGE_ONE.flatMap((q) => (isFirst(q.key) && draft.answers[q.key] === undefined ? [q.key] : []));
  const firstOnly = Object.fromEntries(Object.entries(draft.answers).filter(([key]) => isFirst(key)));
  // With page two preset, a wrong cycle comes from the sump: the ignition has settled the cycle before.
  const own = issuesOf(plainest({ ...draft, answers: firstOnly })).map((i) =>
    isFirst(i.path) ? i : { ...i, path: "lubrication" as const },
  );
  const byPageTwo = issuesOf(plainest(draft)).filter((i) => isFirst(i.path));
  const parsed = identitySchema.safeParse({ registration: draft.registration, name: draft.name, timeZone: draft.timeZone });
  const identity = parsed.success ? [] : parsed.error.issues.map((i) => ({ path: i.path[0] as keyof Errors, message: i.message }));
  return {
    open,
    errors: collect([...own, ...byPageTwo]),
    identity: collect(identity),
    ready: open.length === 0 && own.length === 0 && identity.length === 0,
  };
}

/** Page two. What only page one can mend is said at the cycle, which it comes from; `onFirst` names the questions there. */
export function judgeSecond(traits: Traits): { errors: Errors; onFirst: PageOneKey[]; ready: boolean } {
  const issues = issuesOf(traits);
  return {
    errors: collect(issues.map((i) => (isFirst(i.path) ? { ...i, path: "cycle" as const } : i))),
    onFirst: issues.flatMap((i) => (isFirst(i.path) ? [i.path] : [])),
    ready: issues.length === 0,
  };
}

// ---------------------------------------------------------------- what the pages show

export interface ShownQuestion {
  key: TraitKey;
  no: number;
  label: string;
  help: string;
  options: { value: string; label: string }[];
  /** Code of the answer; null = open. */
  answer: string | null;
}

function shown(
  q: Question,
  at: number,
  answers: Partial<Traits>,
  options: readonly { value: Traits[TraitKey]; label: string }[],
): ShownQuestion {
  const answer = answers[q.key];
  return {
    key: q.key,
    no: at + 1,
    label: q.label,
    help: q.help,
    options: options.map(({ value, label }) => ({ value: codeOf(value), label })),
    answer: answer === undefined ? null : codeOf(answer),
  };
}

export const firstQuestions = ({ answers }: Draft): ShownQuestion[] => PAGE_ONE.map((q, n) => shown(q, n, answers, q.options));

/** The questions of page two that apply, each with its answer. */
export function secondQuestions(traits: Traits): ShownQuestion[] {
  const words = traitWords(traits);
  return PAGE_TWO.filter((q) => applies(q.when, words) && (q.key !== "twoStrokeOil" || traits.cycle === "2s")).map((q, n) =>
    shown(
      q,
      n,
      traits,
      q.options.filter((option) => option.value !== null),
    ),
  );
}

/** How many answers of page two differ from their presets. */
export function changedOf(traits: Traits): number {
  const preset = settled(presetPageTwo(traits));
  return secondQuestions(traits).filter(({ key }) => traits[key] !== preset[key]).length;
}
