/** The board for a program: the evaluator's answer under the head of the install, and the tag that tells one answer from another. */

import type { Evaluation } from "#app/lib/gates/evaluate";
import { itemOf } from "#app/lib/gates/facts";
import { canonical } from "#app/lib/record/canonical";
import { hashOf } from "#app/lib/record/chain";
import type { BoardAnswer } from "#app/lib/schemas/board-api";
import { answerOf } from "#app/lib/views/board";

/** `head` = newest event of the record. The instant of judging is left out, so that the same board gives the same bytes. */
export function boardAnswer(e: Evaluation, head: { seq: number; hash: string }): BoardAnswer {
  const { install } = e.snapshot;
  const { title, state } = answerOf(e);
  const { at: _, items, gates, ...rest } = e.result;
  const named = <T extends { id: string }, N extends object>(rows: Record<string, T>, nameOf: (id: string) => N): Record<string, T & N> =>
    Object.fromEntries(Object.values(rows).map((r) => [r.id, { ...r, ...nameOf(r.id) }]));
  return {
    install: { id: install.id, registration: install.registration, name: install.name, timeZone: install.timeZone },
    head,
    answer: { title, state },
    ...rest,
    gates: named(gates, (id) => {
      const gate = e.snapshot.gates.find((g) => g.id === id);
      return { key: gate?.key ?? "", name: gate?.name ?? "" };
    }),
    items: named(items, (id) => ({ key: itemOf(e.facts, id)?.key ?? "" })),
  };
}

/** Equal for equal answers: SHA-256 of the canonical form (RFC 8785). */
export const tagOf = (answer: BoardAnswer): string => `"${hashOf(canonical(answer)).slice(0, 32)}"`;
