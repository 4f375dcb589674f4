import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { TextInput } from "#app/components/forms/TextInput";
import { DueLadder } from "#app/components/happenings/DueLadder";
import { Photos } from "#app/components/happenings/Photos";
import { RowForm } from "#app/components/happenings/RowForm";
import { Choice } from "#app/components/ui/Choice";
import { Notice } from "#app/components/ui/Notice";
import type { FieldProps, FormReply } from "#app/lib/schemas/form-reply";
import type { ClaimView, LooseEndRow } from "#app/lib/views/loose-ends";

interface LooseEndItemProps {
  row: LooseEndRow;
  commandId: string;
  reply: FormReply | undefined;
}

/** One loose end on its tag: what, until when, what it stops; put back, looked at, or accepted for a run. */
export function LooseEndItem({ row, commandId, reply }: LooseEndItemProps) {
  const shared = { also: { looseEnd: row.id }, about: `${row.tag}, ${row.title}`, commandId: `${commandId}-${row.id}`, reply };
  return (
    <li
      id={row.anchor}
      className="grid scroll-mt-2 items-start gap-x-4 gap-y-3 border-b border-line px-4 py-4 target:shadow-[inset_6px_0_0_var(--ink)] tablet:grid-cols-[96px_minmax(0,1fr)] tablet:px-6 wide:grid-cols-[96px_minmax(0,1fr)_236px_280px]"
    >
      <Tag text={row.tag} />
      <div className="min-w-0">
        <h2 className="text-lead leading-tight">{row.title}</h2>
        <p>{row.why}</p>
        <p className="text-note text-ink-2">{row.made}</p>
        {row.restored && <p className="mt-1 font-semibold">{row.restored}</p>}
        {row.photos.length > 0 && (
          <div className="mt-3">
            <Photos files={row.photos} of={`${row.tag}, ${row.title}`} />
          </div>
        )}
      </div>
      <div className="min-w-0 leading-snug max-wide:tablet:col-start-2">
        <DueLadder {...row.ladder} />
        <p>
          <b>{row.due}</b>
        </p>
        <p className="text-note">{row.stops}</p>
        {row.accepted && <p className="text-note text-ink-2">{row.accepted}</p>}
      </div>
      <div className="flex min-w-0 flex-col gap-3 max-wide:tablet:col-start-2">
        {row.restored ? (
          <RowForm
            {...shared}
            id={`${row.anchor}-confirm`}
            intent="confirm"
            may={row.confirm}
            act="Seen, it is back"
            note="you looked at it yourself"
            big
          />
        ) : (
          <PutBack row={row} shared={shared} />
        )}
        <Claims claims={row.claims} commandId={commandId} reply={reply} />
        <RowForm
          {...shared}
          id={`${row.anchor}-accept`}
          intent="accept"
          opens="Accept it for a run"
          may={row.accept.may}
          fields={(field) =>
            row.accept.rungs.length > 0 ? (
              <>
                <ChoiceGroup {...field("rung")} label="For which run?" options={row.accept.rungs} stacked />
                <TextInput {...field("reason")} label="Why that run can go with it" rows={2} maxLength={1000} className="w-full" />
              </>
            ) : (
              <p>Every run before it is due is accepted or settled.</p>
            )
          }
          act="Accept for this run"
          note="as inspector"
        />
      </div>
    </li>
  );
}

type Shared = Pick<Parameters<typeof RowForm>[0], "also" | "about" | "commandId" | "reply">;

function PutBack({ row, shared }: { row: LooseEndRow; shared: Shared }) {
  return (
    <RowForm
      {...shared}
      id={`${row.anchor}-restore`}
      intent="restore"
      may={row.restore}
      says={
        row.lapses && (
          <div className="flex flex-col gap-2 text-note">
            {row.lapses.hold && (
              <Notice kind="hold" title={row.lapses.hold}>
                Putting it back counts as an opening.
              </Notice>
            )}
            <p>Putting it back counts as an opening of its system. {row.lapses.says}</p>
          </div>
        )
      }
      fields={row.lapses ? (field) => <Undisturbed {...field("undisturbed")} label="Putting it back disturbed nothing" /> : undefined}
      act="Put back"
      note="then a second person looks"
      big
    />
  );
}

/** What somebody says of nothing having been disturbed; a second person confirms it here. */
export function Claims({ claims, commandId, reply }: { claims: ClaimView[]; commandId: string; reply: FormReply | undefined }) {
  return claims.map((claim) => (
    <RowForm
      key={claim.opening}
      id={claim.form}
      intent="undisturbed"
      also={{ opening: claim.opening, looseEnd: claim.looseEnd }}
      about={claim.says}
      commandId={`${commandId}-${claim.opening}`}
      reply={reply}
      may={claim.may}
      says={claim.says}
      act="Nothing was disturbed"
      note="you looked at it yourself"
    />
  ));
}

/** A claim that counts once a second person has confirmed it. */
export function Undisturbed({ id, name, defaultValue, label }: FieldProps & { label: string }) {
  return (
    <Choice
      kind="checkbox"
      id={id}
      name={name}
      value="on"
      defaultChecked={defaultValue === "on"}
      note="it counts as an opening until a second person has looked and confirms that"
    >
      {label}
    </Choice>
  );
}

function Tag({ text }: { text: string }) {
  return (
    <svg viewBox="0 0 96 64" width="90" height="60" role="img" aria-label={text}>
      <path className="fill-plate stroke-ink" strokeWidth="2.5" strokeLinejoin="round" d="M20 6H92V58H20L4 42V22Z" />
      <circle className="fill-ground stroke-ink" strokeWidth="2.5" cx="22" cy="32" r="6" />
      <text x="60" y="39" textAnchor="middle" className="fill-ink font-bold" style={{ fontFamily: "var(--font-fig)", fontSize: 19 }}>
        {text}
      </text>
    </svg>
  );
}
