import { Form } from "react-router";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Select, type SelectOption } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { controlId, type Entry, errorsOf, typedIn } from "#app/components/gate/entry";
import { PartFields } from "#app/components/gate/PartFields";
import { Choice } from "#app/components/ui/Choice";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import type { ItemView } from "#app/lib/views/gate-item";

export interface SheetResultModel {
  passes: boolean;
  sentence: string;
  figures: { label: string; value: string; unit: string }[];
  caution: string;
}

interface ProveFormProps {
  item: ItemView;
  formId: string;
  commandId: string;
  entry: Entry;
  result: SheetResultModel | null;
  units: "si" | "us";
  tools: SelectOption[];
  people: SelectOption[];
  zone: string;
  live: boolean;
  busy: boolean;
}

/** What an item asks for, with every way out: done, not right, does not apply, done earlier or by somebody else. */
export function ProveForm(props: ProveFormProps) {
  const { item, formId, commandId, entry, result, units, tools, people, zone, live, busy } = props;
  const { prove, failed, na } = item;
  const hasPhoto = item.parts.some((p) => p.kind === "photo");
  const hasSheet = item.parts.some((p) => p.kind === "sheet" || p.kind === "torque");
  const summary = entry.errors.map((e) => ({ field: fieldId(item.id, e.field), message: e.message }));
  return (
    <Form method="post" id={formId} className="prove" encType={hasPhoto ? "multipart/form-data" : undefined} preventScrollReset noValidate>
      <HiddenIds commandId={commandId} also={{ item: item.id, revision: item.revision, seen: item.seen }} />
      <ErrorSummary errors={summary} title={summary.length === 1 ? "Not recorded: one thing to put right" : undefined} />
      {item.parts.map((part) => (
        <PartFields key={part.n} part={part} item={item.id} n={part.n} entry={entry} units={units} tools={tools} live={live} />
      ))}
      {result && (
        <Notice
          kind={result.passes ? "done" : "lapsed"}
          title={result.passes ? "The sheet passes" : "The sheet does not pass"}
          role="status"
        >
          <p>{result.sentence}</p>
          <dl className="sheet-figures">
            {result.figures.map((f) => (
              <div key={f.label}>
                <dt>{f.label}</dt>
                <dd className="fig">
                  {f.value} {f.unit}
                </dd>
              </div>
            ))}
          </dl>
        </Notice>
      )}
      {prove.told && (
        <Choice kind="checkbox" name="told" value="yes" note="The gate stands signed. A new proof needs new signatures.">
          I know that its signatures lapse
        </Choice>
      )}
      {prove.roles.length > 1 ? (
        <Select
          id={controlId(item.id, "as")}
          name="as"
          label="In the role of"
          options={prove.roles.map((r) => ({ value: r, label: r }))}
          defaultValue={typedIn(entry, "as", 0, prove.roles[0])}
          className="prove-as"
        />
      ) : (
        <input type="hidden" name="as" value={prove.roles[0] ?? ""} />
      )}
      <div className="prove-acts">
        <Fitting
          size={item.tickOnly ? "normal" : "act"}
          name="intent"
          value="prove"
          reason={prove.ok ? undefined : prove.reason}
          busy={busy}
          note={actNote(item)}
        >
          {item.nut === "lapsed" ? "Done again" : item.tickOnly ? "Done" : "Record it"}
        </Fitting>
        {hasSheet && (
          <Fitting name="intent" value="preview">
            Work it out first
          </Fitting>
        )}
      </div>
      <details className="prove-more" open={["note", "at", "did", "reason"].some((name) => errorsOf(entry, name).length > 0)}>
        <summary>Remark, done earlier, not right, does not apply</summary>
        <div className="prove-other">
          <TextInput
            id={controlId(item.id, "note")}
            name="note"
            label="Remark or reason"
            optional
            rows={2}
            maxLength={2000}
            defaultValue={typedIn(entry, "note", 0)}
            errors={errorsOf(entry, "note")}
          />
          {prove.lateAllowed ? (
            <div className="field-row">
              <TextInput
                id={controlId(item.id, "at")}
                name="at"
                type="datetime-local"
                label={`Done earlier, at (${zone})`}
                hint="A second person must then confirm it."
                optional
                size={16}
                defaultValue={typedIn(entry, "at", 0)}
                errors={errorsOf(entry, "at")}
              />
              <Select
                id={controlId(item.id, "did")}
                name="did"
                label="Done by"
                empty="me"
                options={people}
                defaultValue={typedIn(entry, "did", 0)}
                errors={errorsOf(entry, "did")}
              />
            </div>
          ) : (
            <p className="field-hint">This item is proved when it is done, not afterwards.</p>
          )}
          <div className="prove-acts">
            <Fitting name="intent" value="failed" reason={failed.ok ? undefined : failed.reason}>
              It is not right
            </Fitting>
            <Fitting name="intent" value="na" reason={na.ok ? undefined : na.reason}>
              It does not apply
            </Fitting>
          </div>
          <p className="field-hint">Both need a reason above. “Does not apply” counts once an inspector has accepted the reason.</p>
        </div>
      </details>
    </Form>
  );
}

function actNote(item: ProveFormProps["item"]): string {
  if (item.parts.some((p) => p.kind === "torque")) return "true torque, wrench and count";
  return item.tickOnly ? "as written above" : "with what is entered above";
}

/** "p0.value.1" of an item as the id of its control. */
function fieldId(item: string, field: string): string {
  const match = /^(.*?)(?:\.(\d+))?$/.exec(field);
  return controlId(item, match?.[1] ?? field, Number(match?.[2] ?? 0));
}
