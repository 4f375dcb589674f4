import {
  columnFilteringFeature,
  createColumnHelper,
  createFilteredRowModel,
  createSortedRowModel,
  globalFilteringFeature,
  rowSortingFeature,
  sortFn_alphanumeric,
  sortFn_basic,
  tableFeatures,
} from "@tanstack/react-table";
import { MiniLine } from "#app/components/line/MiniLine";
import { Anchor } from "#app/components/ui/Anchor";
import { Fitting } from "#app/components/ui/Fitting";
import { Tally } from "#app/components/ui/Tally";
import type { HangarRow } from "#app/lib/views/hangar";

export const features = tableFeatures({
  rowSortingFeature,
  columnFilteringFeature,
  globalFilteringFeature,
  sortedRowModel: createSortedRowModel(),
  filteredRowModel: createFilteredRowModel(),
  sortFns: {},
  filterFns: {},
});

const column = createColumnHelper<typeof features, HangarRow>();

/** What the table sorts by is a plain value; what it shows is drawn from the whole row. */
export const columns = column.columns([
  column.accessor("registration", { header: "Aircraft", sortFn: sortFn_alphanumeric, cell: ({ row }) => <Aircraft {...row.original} /> }),
  column.accessor("progress", {
    header: "Where it stands",
    sortFn: sortFn_basic,
    sortDescFirst: true,
    cell: ({ row }) => <Stands {...row.original} />,
  }),
  column.accessor((row) => row.waits.length, {
    id: "waits",
    header: "Waits for you",
    sortFn: sortFn_basic,
    sortDescFirst: true,
    cell: ({ row }) => <Waits {...row.original} />,
  }),
  column.accessor("changedAt", {
    header: "Last change",
    sortFn: sortFn_basic,
    sortDescFirst: true,
    cell: ({ row }) => <span className="text-note text-ink-2">{row.original.changed}</span>,
  }),
]);

function Aircraft({ href, registration, name, roles }: HangarRow) {
  return (
    <div className="max-tablet:flex max-tablet:flex-wrap max-tablet:items-baseline max-tablet:gap-x-3">
      <Anchor href={href} className="inline-flex min-h-hit items-center text-ink decoration-fitting">
        <span className="fig text-h3 font-bold">{registration}</span>
      </Anchor>
      <span className="block">{name}</span>
      <span className="block text-note text-ink-2">you are {roles}</span>
    </div>
  );
}

function Stands({ answer, clearance, planned, line }: HangarRow) {
  return (
    <div className="flex flex-col gap-1">
      <p className={answer.held ? "text-lead font-[680] text-stop-ink" : "text-lead font-[680]"}>{answer.title}</p>
      <p className="text-ink-2">
        {answer.state}. {clearance} {planned}
      </p>
      <MiniLine {...line} />
    </div>
  );
}

const SHOWN = 2;

function Waits({ waits, first, href, registration }: HangarRow) {
  if (!waits.length)
    return (
      <div className="max-w-[34ch]">
        <p className="font-semibold text-ink-2">Nothing to sign or answer</p>
        {first && <p className="text-ink-2">{first}</p>}
      </div>
    );
  return (
    <div className="flex flex-col gap-2">
      <p className="flex items-center gap-3 text-ink-2">
        <Tally count={waits.length} label={`${waits.length} for you`} size={28} />
        {waits[0]?.note}
      </p>
      {waits.slice(0, SHOWN).map((act) => (
        <Fitting key={act.href + act.label} href={act.href} label={`${act.label}, ${registration}`}>
          {act.label}
        </Fitting>
      ))}
      {waits.length > SHOWN && (
        <Anchor href={href} className="inline-flex min-h-hit items-center">
          and {waits.length - SHOWN} more on the board of {registration}
        </Anchor>
      )}
    </div>
  );
}
