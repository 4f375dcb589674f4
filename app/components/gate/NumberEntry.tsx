import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { NumberInput } from "#app/components/forms/NumberInput";
import { TextInput } from "#app/components/forms/TextInput";
import { type Entry, errorsOf, typedIn } from "#app/components/gate/entry";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import type { PartView } from "#app/lib/views/gate-parts";

interface NumberEntryProps {
  item: string;
  part: PartView;
  commandId: string;
  entry: Entry;
  setUpHref: string;
  /** Why this person may not enter it; empty = may. */
  reason: string;
}

/** A maker's number or mark that is missing, or a default to be confirmed: what it is, and where it was read. */
export function NumberEntry({ item, part, commandId, entry, setUpHref, reason }: NumberEntryProps) {
  if (part.kind !== "tick" && part.kind !== "measure" && part.kind !== "torque") return null;
  const criterion = part.kind === "tick" ? null : part.criterion;
  if (criterion && !criterion.enterable)
    return criterion.limitsMissing.length ? (
      <p className="number-missing">
        <b>A limit of the install is missing: {criterion.limitsMissing.join(", ")}.</b> Enter it with where it was read, in the{" "}
        <Anchor href={setUpHref}>set-up</Anchor>.
      </p>
    ) : null;
  const missing = part.missing;
  if (!missing && (part.kind === "tick" || !criterion?.isDefault)) return null;
  const title = part.kind === "tick" ? part.asks : part.label;
  const id = (field: string) => `${item}-n${part.n}-${field}`;
  const field = (name: string) => `n${part.n}.${name}`;
  const form = (
    <Form method="post" className="number-entry" preventScrollReset>
      <HiddenIds commandId={commandId} intent="number" also={{ item, part: part.n }} />
      {part.kind === "tick" ? (
        <TextInput
          id={id("text")}
          name={field("text")}
          label="What the maker says"
          rows={2}
          maxLength={400}
          defaultValue={typedIn(entry, field("text"), 0)}
          errors={errorsOf(entry, field("text"))}
        />
      ) : (
        <div className="field-row">
          <NumberInput
            id={id("min")}
            name={field("min")}
            label="At least"
            optional
            unit={criterion?.unit}
            size={7}
            defaultValue={typedIn(entry, field("min"), 0, criterion?.typed.min)}
            errors={errorsOf(entry, field("min"))}
          />
          <NumberInput
            id={id("max")}
            name={field("max")}
            label="At most"
            optional
            unit={criterion?.unit}
            size={7}
            defaultValue={typedIn(entry, field("max"), 0, criterion?.typed.max)}
            errors={errorsOf(entry, field("max"))}
          />
        </div>
      )}
      <TextInput
        id={id("source")}
        name={field("source")}
        label="Where it was read"
        hint="Manual and page, service letter, or the person at the maker’s."
        maxLength={200}
        defaultValue={typedIn(entry, field("source"), 0)}
        errors={errorsOf(entry, field("source"))}
      />
      <Fitting reason={reason || undefined}>{missing ? "Enter it" : "Confirm it"}</Fitting>
    </Form>
  );
  return missing ? (
    <div className="number-missing">
      <p>
        <b>The maker’s number is missing: {title}.</b> Nobody can prove this item without it.
      </p>
      {form}
    </div>
  ) : (
    <details className="number-default">
      <summary>Confirm the default: {title}</summary>
      {form}
    </details>
  );
}
