import { getFormProps, type SubmissionResult, useForm } from "@conform-to/react";
import { Form, useNavigation } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { StationMark } from "#app/components/run/RollCall";
import { Fitting } from "#app/components/ui/Fitting";

export interface PlanFormProps {
  view: {
    label: string;
    zone: string;
    rules: string[];
    rpmHint: string;
    windHint: string;
    members: { value: string; label: string }[];
    positions: { key: string; letter: string; name: string; duty: string; slots: { wanted: boolean; member: string }[] }[];
    start: { rpm: string; windLimit: string; gustLimit: string };
  };
  when: { date: string; time: string };
  place: string;
  commandId: string;
  lastResult?: SubmissionResult<string[]>;
  act: string;
  note: string;
  back: string;
}

interface Typed {
  date: string;
  time: string;
  place: string;
  rpm: string;
  windLimit: string;
  gustLimit: string;
  crew: Record<string, string[]>;
}

/** Time, place, speed, wind, and who stands where. What was typed stays when something is refused. */
export function PlanForm({ view, when, place, commandId, lastResult, act, note, back }: PlanFormProps) {
  const busy = useNavigation().state === "submitting";
  const [form, fields] = useForm<Typed>({
    lastResult: busy ? undefined : lastResult,
    defaultValue: {
      ...when,
      place,
      ...view.start,
      crew: Object.fromEntries(view.positions.map((p) => [p.key, p.slots.map((s) => s.member)])),
    },
  });
  const errors = form.allErrors;
  const wrong = Object.entries(errors).flatMap(([name, list]) =>
    list.map((message) => ({ field: name === "" ? null : controlId(name), message: String(message) })),
  );
  const text = (name: "date" | "time" | "place" | "rpm" | "windLimit" | "gustLimit") => ({
    id: controlId(name),
    name,
    defaultValue: fields[name].initialValue,
    errors: fields[name].errors,
    required: true,
  });
  const crew = fields.crew.getFieldset();
  return (
    <Form method="post" {...getFormProps(form)} className="flex flex-col gap-6 px-4 py-5 tablet:px-6">
      <HiddenIds commandId={commandId} />
      <ErrorSummary errors={wrong} />
      <section className="flex flex-col gap-4">
        <h2 className="text-h3">When and where</h2>
        <div className="flex flex-wrap items-start gap-x-4 gap-y-3">
          <TextInput {...text("date")} type="date" label="Date" size={12} />
          <TextInput {...text("time")} type="time" label="Time" size={7} />
        </div>
        <p className="text-note text-ink-2">{view.zone}</p>
        <TextInput {...text("place")} label="Place" maxLength={200} />
      </section>
      <section className="flex flex-col gap-4">
        <h2 className="text-h3">How high, how much wind</h2>
        <NumberInput {...text("rpm")} label="Highest speed of this run" unit="rpm" hint={view.rpmHint} inputMode="numeric" />
        <div className="flex flex-wrap gap-x-4 gap-y-3">
          <NumberInput {...text("windLimit")} label="Wind limit" unit="kt" />
          <NumberInput {...text("gustLimit")} label="Gust limit" unit="kt" />
        </div>
        <p className="text-note text-ink-2">{view.windHint}</p>
      </section>
      <section>
        <h2 className="text-h3">Who stands where</h2>
        <ul className="list-disc pl-6">
          {view.rules.map((rule) => (
            <li key={rule}>{rule}</li>
          ))}
        </ul>
        <div className="mt-3 border-t border-line">
          {view.positions.map((p) => {
            const held = (crew[p.key]?.initialValue ?? []) as (string | undefined)[];
            const faults = crew[p.key]?.errors;
            return (
              <fieldset
                key={p.key}
                id={controlId(`crew.${p.key}`)}
                aria-describedby={faults ? `crew-${p.key}-faults` : undefined}
                className="grid grid-cols-[48px_minmax(0,1fr)] gap-x-4 gap-y-2 border-b border-line py-3 wide:grid-cols-[48px_minmax(0,1fr)_minmax(0,1fr)]"
              >
                <legend className="sr-only">{p.name}</legend>
                <StationMark letter={p.letter} answer="none" />
                <p>
                  <b aria-hidden="true">{p.name}</b> <span className="block text-note text-ink-2">{p.duty}</span>
                </p>
                <div className="col-start-2 flex flex-col gap-2 wide:col-start-3">
                  {p.slots.map((slot, i) => (
                    <Select
                      // biome-ignore lint/suspicious/noArrayIndexKey: the places of a position have no other name
                      key={i}
                      id={controlId(`crew.${p.key}[${i}]`)}
                      name={`crew.${p.key}[${i}]`}
                      label={p.slots.length > 1 ? `${p.name} ${i + 1}` : p.name}
                      optional={!slot.wanted}
                      labelHidden={p.slots.length === 1}
                      empty={slot.wanted ? "nobody yet" : "nobody"}
                      options={view.members}
                      defaultValue={held[i] ?? slot.member}
                      errors={i === 0 ? faults : undefined}
                    />
                  ))}
                </div>
              </fieldset>
            );
          })}
        </div>
      </section>
      <p className="flex flex-wrap gap-4">
        <Fitting size="act" note={note} busy={busy}>
          {act}
        </Fitting>
      </p>
      <p>
        <Fitting href={back} className="w-fit">
          Back, nothing is changed
        </Fitting>
      </p>
    </Form>
  );
}

const controlId = (name: string) => `plan-${name.replace(/[^A-Za-z]+(\d*)/g, "-$1").replace(/-$/, "")}`;
