import { TextInput } from "#app/components/forms/TextInput";
import { Photos } from "#app/components/happenings/Photos";
import { RowForm } from "#app/components/happenings/RowForm";
import { SeverityFields } from "#app/components/happenings/SeverityFields";
import { SeveritySign } from "#app/components/happenings/SeveritySign";
import { Trail } from "#app/components/happenings/Trail";
import type { FormReply } from "#app/lib/schemas/form-reply";
import type { FindingRow } from "#app/lib/views/findings";

interface FindingItemProps {
  row: FindingRow;
  commandId: string;
  reply: FormReply | undefined;
}

/** One finding: how bad, what, what it does to the runs; fixed, closed or graded here. */
export function FindingItem({ row, commandId, reply }: FindingItemProps) {
  return (
    <li
      id={row.anchor}
      className="grid scroll-mt-2 grid-cols-[72px_minmax(0,1fr)] border-b border-line target:shadow-[inset_6px_0_0_var(--ink)] tablet:grid-cols-[104px_minmax(0,1fr)]"
    >
      <div className="flex flex-col items-center gap-1 border-r border-line bg-plate px-1 py-4 text-center text-[0.8rem] leading-tight font-[640] tablet:text-note">
        <SeveritySign severity={row.severity} size={52} />
        {row.severity}
      </div>
      <div className="min-w-0 px-3 py-4 tablet:px-6">
        <div className="flex flex-wrap items-start justify-between gap-x-6 gap-y-2">
          <div className="min-w-0 flex-1 basis-[320px]">
            <h3 className="text-lead leading-tight">
              <span className="fig mr-1">{row.tag}</span> {row.words}
            </h3>
            <p>
              {row.system}. <b>{row.effect}</b>
            </p>
          </div>
          <p className="leading-snug">
            <b className="block">{row.state}</b>
            <span className="text-note text-ink-2">{row.since}</span>
          </p>
        </div>
        <div className="mt-3 flex flex-wrap items-start gap-x-8 gap-y-4">
          <div className="min-w-0 flex-1 basis-[420px] max-tablet:basis-full">
            <Trail steps={row.trail} />
          </div>
          <Photos files={row.photos} of={`Finding ${row.tag}`} />
        </div>
        {row.told.length > 0 && (
          <ul className="mt-3 max-w-[76ch] text-note">
            {row.told.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        )}
        {row.state !== "closed" && <FindingActs row={row} commandId={commandId} reply={reply} />}
      </div>
    </li>
  );
}

function FindingActs({ row, commandId, reply }: FindingItemProps) {
  const shared = { also: { finding: row.id }, about: row.tag, commandId: `${commandId}-${row.id}`, reply };
  const sharper = row.grades.some((g) => g.may.ok && g.severity !== row.severity);
  const lower = row.grades.every((g) => g.may.ok);
  return (
    <div className="mt-4 flex flex-col gap-2">
      {row.state === "open" && (
        <RowForm
          {...shared}
          id={`${row.anchor}-fix`}
          intent="fix"
          may={row.fix}
          says={
            row.fix.ok ? "What was opened to fix it is recorded as an opening too: it makes the proofs of that system lapse." : undefined
          }
          fields={(field) => (
            <TextInput {...field("words")} label="What was done" rows={2} maxLength={1000} className="w-full max-w-[640px]" />
          )}
          act="Fixed"
          note="an inspector looks, then closes it"
          big
        />
      )}
      {row.state === "fixed" && (
        <RowForm
          {...shared}
          id={`${row.anchor}-close`}
          intent="close"
          may={row.close}
          fields={(field) => (
            <TextInput {...field("words")} label="What you looked at" rows={2} maxLength={1000} className="w-full max-w-[640px]" />
          )}
          act="Close it"
          note="it is fixed"
          other={{ intent: "reject", act: "Not fixed", note: "open again" }}
          big
        />
      )}
      {(sharper || row.severity === "limiting" || lower) && (
        <RowForm
          {...shared}
          id={`${row.anchor}-grade`}
          intent="grade"
          opens={lower ? "Make it sharper or lower it" : "Make it sharper"}
          may={{ ok: true, why: "" }}
          fields={(field) => (
            <>
              <SeverityFields label="How bad is it now?" field={field} severity={row.severity} cap={row.cap} grades={row.grades} />
              <TextInput {...field("words")} label="Why" rows={2} maxLength={1000} className="w-full max-w-[640px]" />
            </>
          )}
          act="Set it"
          note="with your reason in the record"
        />
      )}
    </div>
  );
}
