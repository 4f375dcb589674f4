import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import type { EditorGate, EditorRow, HiddenRow } from "#app/lib/views/board-edit";

interface LadderProps {
  gates: EditorGate[];
  commandId: string;
  may: boolean;
}

/** Every gate with its items in order: each leads to its form, and goes up or down by a fitting. */
export function BoardLadder({ gates, commandId, may }: LadderProps) {
  return (
    <ol>
      {gates.map((gate) => (
        <li key={gate.id} className="border-b-2 border-ink">
          <div
            id={gate.anchor}
            className="flex flex-wrap items-center gap-x-4 gap-y-2 bg-plate px-4 py-3 target:shadow-[inset_6px_0_0_var(--ink)] tablet:px-6"
          >
            <h2 className="min-w-0 flex-[1_1_14rem] text-h3">
              <span className="fig">{gate.key}</span> {may ? <Anchor href={gate.href}>{gate.words}</Anchor> : gate.words}
              {gate.marks.length > 0 && <span className="block text-note font-normal text-ink-2">{gate.marks.join(", ")}</span>}
            </h2>
            {may && <Moves row={gate} commandId={commandId} />}
            {may && gate.add && (
              <Fitting href={gate.add} label={`Add an item to ${gate.words}`}>
                Add an item
              </Fitting>
            )}
          </div>
          <ol>
            {gate.items.map((item) => (
              <li
                key={item.id}
                id={item.anchor}
                className="flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-line px-4 py-2 target:shadow-[inset_6px_0_0_var(--ink)] tablet:px-6"
              >
                <span className="fig w-16 font-bold">{item.key}</span>
                <p className="min-w-0 flex-[1_1_16rem]">
                  {may ? <Anchor href={item.href}>{item.words}</Anchor> : item.words}
                  {item.marks.length > 0 && <span className="block text-note text-ink-2">{item.marks.join(", ")}</span>}
                </p>
                {may && <Moves row={item} commandId={commandId} />}
              </li>
            ))}
          </ol>
        </li>
      ))}
    </ol>
  );
}

function Moves({ row, commandId }: { row: EditorRow; commandId: string }) {
  if (!row.up && !row.down) return null;
  return (
    <div className="flex gap-2">
      <Move what={row.up} commandId={`${commandId}-u-${row.id}`} label={`${row.key} one place up`} sign="↑" />
      <Move what={row.down} commandId={`${commandId}-d-${row.id}`} label={`${row.key} one place down`} sign="↓" />
    </div>
  );
}

function Move({ what, commandId, label, sign }: { what: string | null; commandId: string; label: string; sign: string }) {
  if (!what) return <span className="inline-block w-14" />;
  return (
    <Form method="post" preventScrollReset>
      <HiddenIds commandId={commandId} intent="make" also={{ what }} />
      <Fitting label={label} centred className="w-14">
        {sign}
      </Fitting>
    </Form>
  );
}

/** What is not asked; nothing is ever deleted. */
export function HiddenList({ rows, may }: { rows: HiddenRow[]; may: boolean }) {
  return (
    <section aria-labelledby="hidden-title" className="px-4 py-5 tablet:px-6">
      <h2 id="hidden-title" className="text-h3">
        Hidden
      </h2>
      <p className="max-w-[72ch] pb-2 text-ink-2">
        {rows.length
          ? "Not asked on this board. Nothing is deleted: each can be shown again, and the dossier lists them."
          : "Nothing is hidden. What is hidden will stand here, and can be shown again."}
      </p>
      <ul>
        {rows.map((row) => (
          <li key={row.id} className="flex flex-wrap items-center gap-x-4 gap-y-2 border-t border-line py-2">
            <span className="fig w-16 font-bold">{row.name}</span>
            <span className="min-w-0 flex-[1_1_16rem]">{row.words}</span>
            {may && row.show && (
              <Form method="post">
                <input type="hidden" name="what" value={row.show} />
                <Fitting name="intent" value="look" label={`Show ${row.name} again`}>
                  Show again
                </Fitting>
              </Form>
            )}
          </li>
        ))}
      </ul>
    </section>
  );
}
