import { useEffect, useRef, useState } from "react";
import { Form, useNavigation } from "react-router";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { FormFaults } from "#app/components/forms/FormFaults";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { LapsePanel } from "#app/components/happenings/LapsePanel";
import { Fitting } from "#app/components/ui/Fitting";
import { Foot } from "#app/components/ui/Foot";
import { count } from "#app/lib/gates/who";
import { type FormReply, fieldsOf } from "#app/lib/schemas/form-reply";
import type { SystemKey } from "#app/lib/template/types";
import { type OpeningsView, type OpenShown, openWords } from "#app/lib/views/openings";

interface OpeningFormProps {
  view: OpeningsView;
  /** Systems that the address names: chosen already. */
  chosen: SystemKey[];
  /** Of the address, kept when the form is sent. */
  search: string;
  commandId: string;
  reply: (FormReply & { open?: OpenShown }) | undefined;
}

/** What was opened, why and when; beside it what lapses; in the foot the look at it, then the act. */
export function OpeningForm({ view, chosen, search, commandId, reply }: OpeningFormProps) {
  const { field, faults } = fieldsOf("open", reply);
  const open = reply?.open;
  // What was shown counts for the choice that it was shown for.
  const [changed, setChanged] = useState<string | null>(null);
  const stale = changed !== null && changed === (open?.stamp ?? "");
  const shown = stale ? null : (open?.chosen ?? null);
  const busy = useNavigation().state === "submitting";
  const form = useRef<HTMLFormElement>(null);
  const refused = reply?.form === "open" && Object.keys(reply.errors).length > 0 ? reply : null;
  useEffect(() => {
    // The form is long and its acts stand in the foot: without this the fault stays out of sight.
    const fault = refused && form.current?.querySelector(".field-errors, [role=alert]");
    fault?.closest("fieldset, .field")?.querySelector<HTMLElement>("input, textarea")?.focus({ preventScroll: true });
    fault?.scrollIntoView({ block: "center" });
  }, [refused]);
  return (
    <>
      <div className="grid wide:grid-cols-[minmax(0,1fr)_520px]">
        <Form
          ref={form}
          method="post"
          id="open"
          className="flex min-w-0 flex-col gap-4 px-4 py-5 tablet:px-6"
          preventScrollReset
          onChange={(event) => {
            const { name } = event.target as unknown as HTMLInputElement;
            if (name === "systems" || name === "closed") setChanged(open?.stamp ?? "");
          }}
        >
          {/* The return key looks first, and presses no preset. */}
          <button type="submit" name="intent" value="preview" className="hidden" tabIndex={-1} aria-hidden="true" />
          <h2 className="text-h3">Record an opening</h2>
          <FormFaults faults={faults} />
          <HiddenIds commandId={commandId} also={shown ? { seen: shown.seen } : {}} />
          <Systems key={open?.stamp} view={view} chosen={open?.systems ?? chosen} errors={field("systems").errors} />
          <TextInput
            {...field("reason")}
            label="What was done, and why"
            hint="What was taken apart or disturbed, as the record and the mail will tell it."
            rows={2}
            maxLength={900}
          />
          <ChoiceGroup
            key={`closed ${open?.stamp}`}
            id="open-closed"
            name="closed"
            label="How it is now"
            errors={field("closed").errors}
            defaultValue={field("closed", "open").defaultValue}
            options={[
              { value: "open", label: "Still open", note: "closed later, here" },
              { value: "closed", label: "Closed again", note: "put together, nothing left off" },
            ]}
          />
          <TextInput
            {...field("happened")}
            type="datetime-local"
            label="When it happened"
            optional
            hint={`Leave it empty for ${view.now}. A time that you type is shown, but the opening counts from when it is recorded.`}
            className="max-w-[380px]"
          />
        </Form>
        <LapsePanel
          lapses={shown?.lapses ?? null}
          staysOpen={shown ? !shown.closed : false}
          changed={stale}
          refused={refused !== null}
          focus={open?.asked === "preview" && faults.length === 0 ? open.stamp : null}
        />
      </div>
      <OpeningFoot view={view} search={search} shown={shown} busy={busy} />
    </>
  );
}

function Systems({ view, chosen, errors }: { view: OpeningsView; chosen: string[]; errors?: string[] }) {
  return (
    <>
      <fieldset className="min-w-0">
        <legend className="font-semibold">Common work: one press chooses its systems</legend>
        <div className="mt-2 flex flex-wrap gap-2">
          {view.presets.map((preset) => (
            <Fitting
              key={preset.key}
              variant="quiet"
              name="preset"
              value={preset.key}
              className={preset.systems.every((s) => chosen.includes(s)) ? "shadow-[inset_0_-3px_0_var(--fitting)]" : undefined}
            >
              {preset.name}
            </Fitting>
          ))}
        </div>
      </fieldset>
      <div className="tablet:[&_.choices-row]:grid tablet:[&_.choices-row]:grid-cols-2">
        <ChoiceGroup
          id="open-systems"
          name="systems"
          kind="checkbox"
          label="What was opened or disturbed?"
          hint="One or more. The engine bay is opened with any of them: hands were in it."
          options={view.systems.map(({ value, label }) => ({ value, label }))}
          defaultValue={chosen}
          errors={errors}
        />
      </div>
      <div className="max-w-[62ch] text-note text-ink-2">
        <p className="font-semibold">Not an opening:</p>
        <ul className="list-disc pl-5">
          {view.notOpenings.map((words) => (
            <li key={words}>{words}</li>
          ))}
        </ul>
      </div>
    </>
  );
}

function OpeningFoot({ view, search, shown, busy }: { view: OpeningsView; search: string; shown: OpenShown["chosen"]; busy: boolean }) {
  const reason = view.may.ok ? undefined : view.may.why;
  if (!shown)
    return (
      <Foot says="Nothing is recorded until you confirm" note="First look at what it makes lapse.">
        <Fitting
          form="open"
          size="act"
          name="intent"
          value="preview"
          formAction={`${search}#lapses`}
          note="before it counts"
          reason={reason}
          busy={busy}
        >
          See what will lapse
        </Fitting>
      </Foot>
    );
  const { lapses, systems } = shown;
  const says = `${count(systems.length, "system")}, ${lapses.gates.length ? count(lapses.gates.length, "gate") : "no gate changes"}`;
  return (
    <Foot
      says={
        lapses.hold ? (
          <>
            <strong className="text-stop-ink">HOLD for run {lapses.hold.run}</strong>, {says}
          </>
        ) : (
          says
        )
      }
      note={`${view.person}, ${view.now}. It cannot be taken back; an inspector can keep a proof that is still true.`}
    >
      <Fitting form="open" size="act" name="intent" value="open" note="the record says so from now" reason={reason} busy={busy}>
        {openWords(systems)}
      </Fitting>
    </Foot>
  );
}
