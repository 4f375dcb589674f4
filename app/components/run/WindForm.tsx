import { Form } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { Fitting } from "#app/components/ui/Fitting";

interface WindFormProps {
  newest: string | null;
  limit: string;
  may: { ok: boolean; why: string };
  commandId: string;
  errors?: { speed?: string[]; gust?: string[]; tail?: string[] };
  typed?: { speed?: string; gust?: string };
}

/** The wind as it was read at the aircraft; any member enters it. */
export function WindForm({ newest, limit, may, commandId, errors = {}, typed = {} }: WindFormProps) {
  return (
    <section aria-labelledby="wind" id="wind-form" className="flex flex-col gap-2">
      <h2 id="wind" className="text-h3">
        Wind
      </h2>
      <p>
        <b>{newest ?? "Not read yet."}</b> Limit {limit}.
      </p>
      {may.ok ? (
        <Form method="post" className="flex flex-col gap-2">
          <HiddenIds commandId={`${commandId}-wind`} intent="wind" />
          <div className="flex flex-wrap gap-4">
            <NumberInput name="speed" label="Wind at the aircraft" unit="kt" errors={errors.speed} defaultValue={typed.speed} required />
            <NumberInput name="gust" label="Highest gust" unit="kt" errors={errors.gust} defaultValue={typed.gust} required />
          </div>
          <ChoiceGroup
            name="tail"
            label="Does any of it come from behind?"
            options={[
              { value: "no", label: "No, nose into wind" },
              { value: "yes", label: "Yes, from behind" },
            ]}
            errors={errors.tail}
            required
          />
          <Fitting className="self-start">Enter the wind</Fitting>
        </Form>
      ) : (
        <p>{may.why}</p>
      )}
    </section>
  );
}
