// The crew reads the card and says go or no-go; somebody reads the wind at the aircraft.
import { acks, answers, winds } from "#app/db/schema/runs";
import { endOfDay } from "#app/lib/gates/local-time";
import { mayAcknowledge, mayAnswer, mayRecordWind } from "#app/lib/gates/run-verdicts";
import type { AnswerRollCall, RecordWind, RunVersion } from "#app/lib/schemas/run";
import { done, invalid, type Outcome, refusalOf } from "#app/lib/services/outcome";
import { roleOf } from "#app/lib/services/parts.server";
import { type Act, perform } from "#app/lib/services/perform.server";

export function acknowledgeBrief(act: Act, input: RunVersion): Promise<Outcome<{ ack: string }>> {
  return perform({ ...act, kind: "acknowledge-brief", input }, async (d) => {
    const refusal = refusalOf(mayAcknowledge(d.e, { ...input, member: d.member.id }));
    if (refusal) return refusal;
    const { run, version } = input;
    const base = await d.record(roleOf(d.member, "crew"), { type: "brief-acknowledged", data: { run, version } });
    await d.tx.insert(acks).values({ ...base, runId: run, version });
    return done({ ack: base.id });
  });
}

export function answerRollCall(act: Act, input: AnswerRollCall): Promise<Outcome<{ answer: string }>> {
  return perform({ ...act, kind: "answer-roll-call", input }, async (d) => {
    const { run, version, answer, reason, queueEmpty } = input;
    const refusal = refusalOf(mayAnswer(d.e, { run, version, answer, member: d.member.id }));
    if (refusal) return refusal;
    if (answer === "no-go" && reason.length < 3) return invalid("Say why it is no-go, in a few words.");
    const row = { version, answer, reason, queueEmpty };
    const base = await d.record(roleOf(d.member, "crew"), { type: "roll-call-answered", data: { run, ...row } });
    await d.tx.insert(answers).values({ ...base, runId: run, ...row });
    return done({ answer: base.id });
  });
}

export function recordWind(act: Act, input: RecordWind): Promise<Outcome<{ wind: string }>> {
  return perform({ ...act, kind: "record-wind", input }, async (d) => {
    const { run, speed, gust, tail } = input;
    const refusal = refusalOf(mayRecordWind(d.e, { run, member: d.member.id }));
    if (refusal) return refusal;
    const row = { speed, gust, tail, dayEnds: endOfDay(d.now, d.e.snapshot.install.timeZone) };
    const base = await d.record(roleOf(d.member, "crew"), { type: "wind-recorded", data: { run, ...row } });
    await d.tx.insert(winds).values({ ...base, runId: run, ...row });
    return done({ wind: base.id });
  });
}
