import { Form } from "react-router";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Fitting } from "#app/components/ui/Fitting";
import { Notice } from "#app/components/ui/Notice";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { TemplateRow } from "#app/lib/views/own-templates";

interface TemplateItemProps {
  row: TemplateRow;
  zones: string[];
  serverZone: string;
  commandId: string;
  reply: FormReply | undefined;
}

/** A template of one's own: what it drops, a new install from it, its file, or away with it. */
export function TemplateItem({ row, zones, serverZone, commandId, reply }: TemplateItemProps) {
  const { field, back, faults } = fieldsOf(row.anchor, reply);
  const about = <span className="sr-only">: {row.name}</span>;
  return (
    <li id={row.anchor} className="border-b-2 border-ink px-4 py-4 tablet:px-6">
      <div className="flex flex-wrap items-center gap-x-4 gap-y-2">
        <div className="min-w-0 flex-[1_1_16rem]">
          <h2 className="text-h3 break-words">{row.name}</h2>
          <p className="text-ink-2">{row.says}</p>
        </div>
        <Fitting href={row.file} document label={`Save ${row.name} as a file`}>
          Save as a file
        </Fitting>
      </div>
      {row.lives > 0 && (
        <div className="pt-3">
          <Notice kind="danger" title={`It drops ${row.lives === 1 ? "an item that guards" : `${row.lives} items that guard`} a life.`}>
            A propeller, fuel or fire hurts whoever relies on a look that nobody takes. Read each below, and what the maker’s manual and the
            local rules say, before you start an install from it.
          </Notice>
        </div>
      )}
      <details>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">
          What did we drop, beside the built-in template? {row.compared.dropped.length} dropped, {row.compared.changed.length} changed,{" "}
          {row.compared.own.length} of our own{about}
        </summary>
        <Listed title="Dropped" rows={row.compared.dropped} none="Nothing." />
        <Listed title="Says or asks something else" rows={row.compared.changed} none="Nothing." />
        <Listed title="Our own" rows={row.compared.own} none="Nothing." />
      </details>
      <details open={back}>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">Start a new install from it{about}</summary>
        <Form method="post" encType="application/x-www-form-urlencoded" className="flex flex-col items-start gap-3 pb-2">
          <FormFaults faults={faults} />
          <HiddenIds commandId={`${commandId}-s`} also={{ template: row.id }} />
          <p className="max-w-[72ch]">
            Its answers about the engine come along. Its numbers come as starting points: each waits for where you read it, in this engine’s
            papers.
          </p>
          <div className="flex w-full flex-wrap items-start gap-x-4 gap-y-3">
            <TextInput {...field("registration")} label="Registration" figures size={12} maxLength={12} />
            <TextInput {...field("name")} label="Name" size={16} maxLength={80} />
            <Select
              {...field("timeZone", serverZone)}
              label="Time zone of the place where it runs"
              options={zones.map((name) => ({ value: name, label: name }))}
              className="min-w-0 max-w-full"
            />
          </div>
          <Fitting name="intent" value="start" size="act" className="tablet:min-w-80" note="you become its lead">
            Make the board
          </Fitting>
        </Form>
      </details>
      <details>
        <summary className="min-h-hit py-3 font-semibold text-fitting-ink">Throw it away{about}</summary>
        <Form method="post" className="pb-2">
          <input type="hidden" name="template" value={row.id} />
          <Fitting name="intent" value="away" note="installs made from it stay as they are" label={`Throw ${row.name} away`}>
            Throw it away
          </Fitting>
        </Form>
      </details>
    </li>
  );
}

interface ListedProps {
  title: string;
  rows: { key: string; words: string; killer?: boolean }[];
  none: string;
}

function Listed({ title, rows, none }: ListedProps) {
  return (
    <div className="pb-3">
      <h3 className="text-lead">{title}</h3>
      {rows.length === 0 && <p className="text-ink-2">{none}</p>}
      <ul>
        {rows.map((row) => (
          <li key={row.key} className="grid gap-x-4 border-t border-line py-2 tablet:grid-cols-[72px_minmax(0,1fr)]">
            <span className="fig font-bold">{row.key}</span>
            <span>
              {row.words}
              {row.killer && <b> Guards a life.</b>}
            </span>
          </li>
        ))}
      </ul>
    </div>
  );
}
