import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { NumberInput } from "#app/components/forms/NumberInput";
import type { FieldProps } from "#app/lib/schemas/form-reply";
import type { Severity } from "#app/lib/views/findings";
import type { May } from "#app/lib/views/may";

export const SEVERITY_DOES: Record<Severity, string> = {
  grounding: "stops every run and the gates on its system",
  limiting: "caps the rpm, so runs below it may go on",
  watch: "is looked at again after each run",
};

interface SeverityFieldsProps {
  label: string;
  field: (name: string, otherwise?: string) => FieldProps;
  severity?: Severity;
  cap?: string;
  /** Those that this person may not set say why. */
  grades?: { severity: Severity; may: May }[];
}

const ALL: Severity[] = ["grounding", "limiting", "watch"];

/** How bad it is; the highest speed is asked on a limiting one alone. */
export function SeverityFields({ label, field, severity = undefined, cap = "", grades }: SeverityFieldsProps) {
  return (
    <div className="group/severity w-full">
      <ChoiceGroup
        {...field("severity", severity)}
        label={label}
        options={ALL.map((value) => {
          const may = grades?.find((g) => g.severity === value)?.may;
          return { value, label: value, note: may && !may.ok ? may.why : SEVERITY_DOES[value], disabled: may ? !may.ok : false };
        })}
      />
      <div className="hidden group-has-[[value=limiting]:checked]/severity:block">
        <NumberInput
          {...field("cap", cap)}
          label="Highest crankshaft speed allowed"
          hint="For a limiting finding: the runs are cleared to this and no further until it is closed."
          inputMode="numeric"
          unit="rpm"
          size={6}
        />
      </div>
    </div>
  );
}
