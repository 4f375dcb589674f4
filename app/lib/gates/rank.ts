/** "What stops us": root causes instead of chains, and their order by how soon somebody can clear them. */
import type { Facts } from "#app/lib/gates/facts";
import type { Blocker, BlockerCode, GateResult } from "#app/lib/gates/result";
import { blocker, count, inSentence, ownerOf } from "#app/lib/gates/who";

/** Blockers for the gates that themselves hold up `required`: those whose own prerequisites all stand. The rest only wait. */
export function rootsOf(facts: Facts, gates: Map<string, GateResult>, required: string[]): Blocker[] {
  const seen = new Set<string>();
  const roots: string[] = [];
  const stack = [...required].reverse();
  while (stack.length) {
    const id = stack.pop() as string;
    const gate = gates.get(id);
    if (seen.has(id) || !gate || gate.stands || !gate.present) continue;
    seen.add(id);
    const waits = gate.prerequisites.filter((p) => !gates.get(p)?.stands);
    if (!waits.length) roots.push(id);
    else stack.push(...waits.reverse());
  }
  // Gates that wait for each other have no root: name the first of them.
  const found = roots.length || !seen.size ? roots : [[...seen][0] as string];
  return found.map((id) => gateBlocker(facts, gates.get(id) as GateResult));
}

function gateBlocker(facts: Facts, result: GateResult): Blocker {
  const gate = facts.gates.get(result.id);
  const name = gate?.name ?? "A gate";
  const first = result.blockers[0];
  const left = result.of - result.done;
  const base = {
    subject: ["gate", result.id] as ["gate", string],
    page: "gate" as const,
    id: result.id,
    item: first?.link.item ?? null,
    owner: first?.owner ?? ownerOf(facts, ["builder"]),
  };
  if (result.ready)
    return blocker({
      ...base,
      code: "not-signed",
      title: result.state === "half signed" ? `${name} waits for its second signature` : `${name} is ready to sign`,
      sentence: first?.sentence ?? "",
    });
  // The finding or loose end itself says it better than "has lapsed".
  if (first && (first.code === "grounding" || first.code === "loose-end"))
    return blocker({ ...base, code: "gate-in-work", title: `${name} is stopped`, sentence: `${first.title}. ${first.sentence}` });
  if (result.state === "lapsed")
    return blocker({ ...base, code: "gate-lapsed", title: `${name} has lapsed`, sentence: first?.sentence ?? "" });
  const detail =
    left && result.blockers[0]?.code === "item-to-do"
      ? `${count(left, "item")} of ${result.of} left. Next: ${inSentence(first?.title ?? "").replace(/\.$/, "")}.`
      : (first?.sentence ?? "");
  return blocker({
    ...base,
    code: "gate-in-work",
    title: result.done ? `${name} is not finished` : `${name} is not begun`,
    sentence: detail,
  });
}

const WEIGHT: Partial<Record<BlockerCode, number>> = {
  "review-first": 0,
  "other-run": 0,
  "earlier-rung": 0,
  grounding: 0,
  "not-signed": 1,
  "gate-lapsed": 2,
  "gate-in-work": 3,
  "loose-end": 4,
  "limit-unconfirmed": 5,
  "not-planned": 6,
  clearance: 6,
  "position-empty": 7,
  people: 7,
  pair: 7,
  "not-active": 7,
  "not-acknowledged": 8,
  "no-go": 9,
  "no-answer": 9,
  "wind-missing": 10,
  "wind-over": 10,
};

/** Soonest first: a signature takes a minute, a lapsed proof a job, the crew answers when the rest is done. Equal ones keep their order. */
export function rank(blockers: Blocker[], gates: Map<string, GateResult>): Blocker[] {
  const left = (b: Blocker) => {
    const gate = b.subject.kind === "gate" ? gates.get(b.subject.id) : undefined;
    return gate ? gate.of - gate.done : 0;
  };
  return blockers
    .map((b, n) => ({ b, n }))
    .sort((x, y) => (WEIGHT[x.b.code] ?? 5) - (WEIGHT[y.b.code] ?? 5) || left(x.b) - left(y.b) || x.n - y.n)
    .map((x) => x.b);
}
