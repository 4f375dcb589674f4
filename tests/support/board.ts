/**
 * A snapshot that is being written, record by record, on a coarse clock: keeps the instant and the sequence. People and texts are invented.
 */
import type {
  Cover,
  Finding,
  Gate,
  Instant,
  Item,
  LooseEnd,
  Member,
  Opening,
  PlanVersion,
  Proof,
  Recorded,
  Role,
  Run,
  RunAct,
  Rung,
  Signature,
  Snapshot,
  Tool,
} from "#app/lib/gates/snapshot";
import type { SystemKey, Value, ValueDef, ValueKey } from "#app/lib/template/types";
import { CARD, CREW, emptySnapshot, passing, START, TICK, tick } from "./parts";

type By = { by?: string; as?: Role };

/** A snapshot that is being written: every call adds one record at the board's present instant. */
export class Board {
  now: Instant = START;
  private last = 0;
  /** Items that `work` takes as not applicable, with an inspector's acceptance. */
  notApplicable: (item: Item) => boolean = () => false;
  constructor(readonly s: Snapshot = emptySnapshot()) {}

  wait(ticks = 1): this {
    this.now += ticks * TICK;
    return this;
  }
  id(prefix: string): string {
    this.last += 1;
    return `${prefix}-${this.last}`;
  }
  record(prefix: string, { by = "bo", as = "builder" }: By = {}): Recorded {
    const id = this.id(prefix);
    return { id, seq: this.last, recorded: this.now, by, as };
  }

  // ------------------------------------------------------------ set-up
  member(id: string, ...roles: Role[]): Member {
    const member = { id, name: `Member ${id}`, roles: roles.map((role) => ({ role, from: START, to: null })) };
    this.s.members.push(member);
    return member;
  }
  /** Lead who also builds, two builders, two inspectors, one crew. */
  cast(): this {
    this.member("la", "lead", "builder");
    this.member("bo", "builder");
    this.member("cy", "builder");
    this.member("di", "inspector");
    this.member("ed", "inspector");
    this.member("fi", "crew");
    return this;
  }
  value(key: ValueKey, value: number | null, source: string | null = "manual p. 3", more: Partial<ValueDef> = {}): ValueDef & Value {
    const base = { key, label: key, quantity: "rotation" as const, preset: null, basis: { kind: "maker" as const }, help: "" };
    const made = { ...base, card: key === "redline", limit: true, ...more, value, source };
    this.s.values.push(made);
    return made;
  }
  tool(id: string, due: Instant = START + 9999 * TICK): Tool {
    const tool: Tool = { id, name: `Wrench ${id}`, checks: [{ id: `${id}-check`, at: START, good: true, due, since: null }] };
    this.s.tools.push(tool);
    return tool;
  }
  extinguishers(): this {
    const due = START + 9999 * TICK;
    const base = { agent: "co2" as const, classB: true, charge: 2.3, lookDue: due, serviceDue: due, withdrawn: false };
    this.s.extinguishers.push({ id: "ext-1", name: "Cart one", ...base }, { id: "ext-2", name: "Cart two", ...base });
    return this;
  }
  gate(id: string, more: Partial<Gate> = {}): Gate {
    const gate: Gate = {
      id, key: id, name: `Gate ${id}`, short: id, revision: 1, needs: [], after: [], requiredBy: { kind: "runs-and-release" }, eachRun: false,
      lookBack: null, validity: null, policy: [["builder"], ["inspector"]], caution: null, hidden: false, ...more,
    }; // biome-ignore format: a list of fields
    this.s.gates.push(gate);
    return gate;
  }
  item(id: string, gate: string, more: Partial<Item> = {}): Item {
    const item: Item = {
      id, key: id, gate, words: `Work ${id}`, killer: false, secondEyes: false, guarded: false, onCard: false, systems: [], parts: [tick],
      follows: [], step: null, validity: null, caution: null, offersLooseEnd: null, revision: 1, hidden: false, ...more,
    }; // biome-ignore format: a list of fields
    this.s.items.push(item);
    return item;
  }
  rung(key: string, rpm: number | null = 20, more: Partial<Rung> = {}): Rung {
    const order = this.s.rungs.length + 1;
    const rung: Rung = { key, name: `Rung ${key}`, order, rpm, share: 0.5, card: CARD, crew: CREW, leftOut: null, setBack: [], ...more };
    this.s.rungs.push(rung);
    return rung;
  }

  // ------------------------------------------------------------ work
  find(id: string): Item {
    const item = this.s.items.find((i) => i.id === id);
    if (!item) throw new Error(`no item ${id}`);
    return item;
  }
  proof(itemId: string, more: Partial<Proof> = {}): Proof {
    const item = this.find(itemId);
    const tools = item.parts.some((p) => p.kind === "torque") ? this.s.tools.slice(0, 1).map((t) => t.id) : [];
    const base = this.record("proof", { by: more.by ?? "bo", as: "builder" });
    const evidence = item.parts.map((part) => passing(part));
    const rest = { item: itemId, revision: item.revision, did: base.by, counts: this.now, late: false, note: "", withdrawn: null };
    const proof: Proof = { ...base, ...rest, state: "done", evidence, tools, ...more };
    this.s.proofs.push(proof);
    return proof;
  }
  withdraw(record: { withdrawn: Recorded | null }, who: By = {}): void {
    record.withdrawn = this.record("withdrawal", who);
  }
  confirm(proof: string, who: By = { by: "cy", as: "builder" }): void {
    this.s.confirmations.push({ ...this.record("confirmation", who), proof });
  }
  accept(proof: string, who: By = { by: "di", as: "inspector" }): void {
    this.s.acceptances.push({ ...this.record("acceptance", who), proof, reason: "not fitted" });
  }
  keep(proof: string, who: By = { by: "di", as: "inspector" }): void {
    this.s.keeps.push({ ...this.record("keep", who), proof, reason: "not disturbed" });
  }
  current(itemId: string): Proof | null {
    const list = this.s.proofs.filter((p) => p.item === itemId).sort((a, b) => a.counts - b.counts || a.seq - b.seq);
    return list.at(-1) ?? null;
  }
  covers(gateId: string): Cover[] {
    const items = this.s.items.filter((i) => i.gate === gateId && !i.hidden && !i.parts.some((p) => p.kind === "computed"));
    return items.map((i) => {
      const current = this.current(i.id);
      return { item: i.id, revision: i.revision, proof: current?.withdrawn ? null : (current?.id ?? null) };
    });
  }
  sign(gateId: string, by = "bo", as: Signature["as"] = "builder", more: Partial<Signature> = {}): Signature {
    const gateRevision = this.s.gates.find((g) => g.id === gateId)?.revision ?? 1;
    const base = { ...this.record("signature", { by, as }), as, gate: gateId, gateRevision, covers: more.covers ?? this.covers(gateId) };
    const signature: Signature = { ...base, meaning: "worked", rulesVersion: "1", withdrawn: null, ...more };
    this.s.signatures.push(signature);
    return signature;
  }
  /** Each place of the policy, by somebody of the cast who may sign there. */
  signGate(gateId: string): void {
    const who = { builder: "bo", inspector: "di", lead: "la" };
    for (const place of this.s.gates.find((g) => g.id === gateId)?.policy ?? []) {
      const as = place.at(-1) ?? "builder";
      this.sign(gateId, who[as], as);
    }
  }
  /** Works every item of the gate and signs it, strictly later only where the rules ask for it. */
  work(gate: Gate): void {
    const items = this.s.items.filter((i) => i.gate === gate.id && !i.hidden && !i.parts.some((p) => p.kind === "computed"));
    const level = new Map<string, number>();
    const levelOf = (item: Item, path: string[] = []): number => {
      const known = level.get(item.id);
      if (known !== undefined || path.includes(item.id)) return known ?? 0;
      const steps = items.filter((i) => i.step?.endedBy === item.id);
      const before = items.filter(
        (i) => item.follows.includes(i.id) || steps.includes(i) || steps.some((step) => i.id !== item.id && i.follows.includes(step.id)),
      );
      const found = before.length === 0 ? 0 : 1 + Math.max(...before.map((i) => levelOf(i, [...path, item.id])));
      level.set(item.id, found);
      return found;
    };
    const newest = Math.max(...items.map((i) => this.current(i.id)?.counts ?? 0), ...this.followedElsewhere(items));
    if (gate.after.length > 0 || gate.eachRun || gate.lookBack || gate.requiredBy.kind === "release" || newest >= this.now) this.wait();
    for (let n = 0; n <= Math.max(0, ...items.map((i) => levelOf(i))); n++) {
      if (n > 0) this.wait();
      for (const item of items.filter((i) => levelOf(i) === n)) {
        const na = this.notApplicable(item);
        const proof = this.proof(item.id, na ? { state: "na", evidence: [], tools: [], note: "not fitted" } : {});
        if (na) this.accept(proof.id);
        else if (item.secondEyes) this.confirm(proof.id);
      }
    }
    this.signGate(gate.id);
  }
  private followedElsewhere(items: Item[]): number[] {
    return items.flatMap((i) => i.follows).map((id) => this.current(id)?.counts ?? 0);
  }

  // ------------------------------------------------------------ what happens
  open(systems: SystemKey[], more: Partial<Opening> = {}): Opening {
    const opening: Opening = {
      ...this.record("opening"),
      systems,
      reason: "work",
      opened: this.now,
      closed: null,
      mistake: null,
      undisturbed: null,
      ...more,
    };
    this.s.openings.push(opening);
    return opening;
  }
  looseEnd(due: LooseEnd["due"], more: Partial<LooseEnd> = {}): LooseEnd {
    const base = { ...this.record("loose"), what: "lead off", system: "ign" as const, due };
    const end: LooseEnd = { ...base, restored: null, confirmed: null, accepted: [], ...more };
    this.s.looseEnds.push(end);
    return end;
  }
  finding(severity: Finding["severity"], more: Partial<Finding> = {}): Finding {
    const cap = severity === "limiting" ? 15 : null;
    const finding: Finding = {
      ...this.record("finding"),
      system: "oil",
      words: "weeps",
      severity,
      cap,
      fixed: null,
      closed: null,
      ...more,
    };
    this.s.findings.push(finding);
    return finding;
  }

  // ------------------------------------------------------------ runs
  run(rung: string, more: Partial<Run> = {}): Run {
    const label = `${rung}${"abcdefgh"[this.s.runs.filter((r) => r.rung === rung).length] ?? "z"}`;
    const run: Run = {
      ...{ id: this.id("run"), rung, label, plans: [], plannedStart: this.now + 4 * TICK, acks: [], answers: [], winds: [], acts: [] },
      exceedances: [],
      ...more,
    };
    this.s.runs.push(run);
    return run;
  }
  plan(run: Run, more: Partial<PlanVersion> = {}): PlanVersion {
    const rung = this.s.rungs.find((r) => r.key === run.rung);
    const kinds = ["runs-and-release", "runs"];
    const required = this.s.gates.filter(
      ({ requiredBy: r, lookBack }) =>
        (kinds.includes(r.kind) && lookBack?.kind !== "run") || (r.kind === "rung-and-release" && r.rung === run.rung),
    );
    const plan: PlanVersion = {
      version: run.plans.length + 1,
      recorded: this.now,
      rpm: rung?.rpm ?? 20,
      card: CARD,
      positions: [
        { position: "operator", member: "la" },
        { position: "runlead", member: "cy" },
        { position: "observer", member: "cy" },
        { position: "fireguard", member: "fi" },
      ],
      windLimit: 7,
      gustLimit: 10,
      requiredGates: required.map((g) => g.id),
      ...more,
    };
    run.plans.push(plan);
    return plan;
  }
  answer(run: Run, by: string, more: Partial<Run["answers"][number]> = {}): void {
    const version = run.plans.length;
    run.answers.push({ ...this.record("answer", { by, as: "crew" }), answer: "go", reason: "", version, queueEmpty: true, ...more });
  }
  wind(run: Run, more: Partial<Run["winds"][number]> = {}): void {
    const base = { ...this.record("wind"), speed: 3, gust: 5, tail: false, dayEnds: this.now + 40 * TICK };
    run.winds.push({ ...base, ...more });
  }
  act<K extends RunAct["act"]>(
    run: Run,
    act: K,
    more: Partial<Extract<RunAct, { act: K }>> = {},
    who: By = { by: "la", as: "lead" },
  ): void {
    const base: Record<RunAct["act"], object> = {
      go: { version: run.plans.length, plannedStart: this.now, ends: this.now + 16 * TICK, cap: 20, signatures: [] },
      hold: { reason: "rain", auto: false },
      scrub: { reason: "dark" },
      start: { unstarted: false },
      "take-back": {},
      ended: { at: this.now },
      outcome: { outcome: "completed" },
      "log-read": {},
      "no-log": { reason: "recorder failed" },
    };
    run.acts.push({ ...this.record("act", who), act, ...base[act], ...more } as RunAct);
  }
  /** Plan, brief, roll call and wind: what a run needs besides its gates. */
  brief(run: Run, more: Partial<PlanVersion> = {}): void {
    const plan = this.plan(run, more);
    this.wait();
    for (const member of new Set(plan.positions.map((p) => p.member))) {
      run.acks.push({ ...this.record("ack", { by: member, as: "crew" }), version: plan.version });
      this.answer(run, member);
    }
    this.wind(run);
  }
  /** The whole of a run up to the reviewed state, with its post-run gate of one item. */
  completeRun(run: Run): Gate {
    this.act(run, "go");
    this.act(run, "start");
    this.wait();
    this.act(run, "ended", {});
    this.act(run, "outcome", {});
    this.act(run, "log-read", {}, { by: "bo", as: "builder" });
    const gate = this.gate(`po-${run.id}`, { requiredBy: { kind: "release" }, lookBack: { kind: "run", run: run.id } });
    this.item(`po-${run.id}-dry`, gate.id, { words: "Dry and clean" });
    this.work(gate);
    return gate;
  }
}
