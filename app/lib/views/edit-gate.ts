/** A gate of the board, or a new one, as its form shows it. Pure. */
import { requiredWords } from "#app/lib/gates/edit-changes";
import { mayEditBoard } from "#app/lib/gates/edit-verdicts";
import type { Evaluation } from "#app/lib/gates/evaluate";
import type { Gate } from "#app/lib/gates/snapshot";
import { placeCode, SIGN_PLACES } from "#app/lib/schemas/edit-forms";
import type { RequiredBy } from "#app/lib/template/types";
import type { Viewer } from "#app/lib/views/board";
import { type May, mayOf } from "#app/lib/views/may";

type Option = { value: string; label: string };

export interface GateFormView {
  title: string;
  key: string;
  name: string;
  short: string;
  caution: string;
  hours: string;
  afterRun: string;
  requiredBy: string;
  required: Option[];
  /** Codes of the places in order, "" where there is none. */
  places: [string, string, string];
  /** False for the gate that nobody signs but the release. */
  signed: boolean;
  signers: Option[];
  edges: { id: string; name: string; now: "" | "needs" | "after" }[];
  /** Where a new gate is put; empty for one that is there. */
  before: Option[];
  hide: string | null;
  hidden: boolean;
  fixed: boolean;
  may: May;
}

const codeOf = (by: RequiredBy): string => (by.kind === "rung-and-release" ? `rung:${by.rung}` : by.kind);
const KINDS: RequiredBy[] = [{ kind: "runs-and-release" }, { kind: "runs" }, { kind: "release" }];
const text = (n: number | null | undefined): string => (n === null || n === undefined ? "" : String(n));
const capital = (words: string): string => `${words[0]?.toUpperCase()}${words.slice(1)}`;

/** @param gate null = a new one. */
export function gateFormView(e: Evaluation, me: Viewer, gate: Gate | null): GateFormView {
  const { gates, rungs } = e.snapshot;
  const others = gates.filter((g) => !g.hidden && g.lookBack?.kind !== "run" && g.id !== gate?.id);
  const by: RequiredBy[] = [...KINDS, ...rungs.map((r): RequiredBy => ({ kind: "rung-and-release", rung: r.key }))];
  const policy = gate?.policy ?? [["builder"], ["inspector"]];
  const place = (n: number) => (policy[n] ? placeCode(policy[n]) : "");
  const signers = [...new Set([...SIGN_PLACES, ...policy.map(placeCode)])];
  return {
    title: gate?.name ?? "New gate",
    key: gate?.key ?? "",
    name: gate?.name ?? "",
    short: gate?.short ?? "",
    caution: gate?.caution ?? "",
    hours: text(gate?.validity?.hours),
    afterRun: text(gate?.validity?.afterRunHours),
    requiredBy: codeOf(gate?.requiredBy ?? { kind: "runs-and-release" }),
    required: by.map((r) => ({ value: codeOf(r), label: capital(requiredWords(r)) })),
    places: [place(0), place(1), place(2)],
    signed: policy.length > 0,
    signers: signers.map((code) => ({ value: code, label: capital(code.replace("+", " or ")) })),
    edges: others.map(({ id, name }) => ({
      id,
      name,
      now: gate?.after.includes(id) ? "after" : gate?.needs.includes(id) ? "needs" : "",
    })),
    before: gate ? [] : others.map((g) => ({ value: g.id, label: `Before ${g.name}` })),
    hide: gate && !gate.hidden ? JSON.stringify({ kind: "hide", subject: { kind: "gate", id: gate.id } }) : null,
    hidden: gate?.hidden ?? false,
    fixed: gate?.lookBack?.kind === "run",
    may: mayOf(mayEditBoard(e, { member: me.id })),
  };
}
