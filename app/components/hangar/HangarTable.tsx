import { useTable } from "@tanstack/react-table";
import { useState } from "react";
import { Form } from "react-router";
import { TextInput } from "#app/components/forms/TextInput";
import { columns, features } from "#app/components/hangar/columns";
import { cx } from "#app/components/ui/cx";
import { Fitting } from "#app/components/ui/Fitting";
import { useLive } from "#app/components/ui/useLive";
import type { HangarRow } from "#app/lib/views/hangar";

interface HangarTableProps {
  rows: HangarRow[];
  /** What the address asks to look for. */
  search: string;
  newHref: string;
}

const SORT_WORD = { asc: "ascending", desc: "descending" } as const;

/** The installs in a table that sorts and filters where scripts run; without them the order is the server's and the filter a form. */
export function HangarTable({ rows, search, newHref }: HangarTableProps) {
  const [text, setText] = useState(search);
  const live = useLive();
  const table = useTable({
    features,
    columns,
    data: rows,
    initialState: { globalFilter: search, sorting: [{ id: "waits", desc: true }] },
    getRowId: (row) => row.id,
    globalFilterFn: (row, _column, sought: string) => row.original.words.includes(sought.trim().toLowerCase()),
  });
  const find = (next: string) => {
    setText(next);
    table.setGlobalFilter(next);
  };
  const shown = table.getRowModel().rows;
  return (
    <section aria-labelledby="installs">
      <div className="flex flex-wrap items-end gap-x-4 gap-y-3 px-4 py-4 tablet:px-6">
        <h2 id="installs" className="self-center text-lead">
          Your installs
        </h2>
        <Form method="get" role="search" className="flex min-w-0 flex-[1_1_20rem] items-end gap-3">
          <TextInput
            name="q"
            type="search"
            label="Registration, name, role or what waits"
            value={text}
            onChange={find}
            className="min-w-0 flex-1"
          />
          {!live && <Fitting>Find</Fitting>}
        </Form>
        <Fitting href={newHref}>New install</Fitting>
      </div>
      <p role="status" className={shown.length ? "sr-only" : "border-t border-line px-4 py-6 text-lead tablet:px-6"}>
        {shown.length
          ? `${shown.length} of ${rows.length} installs shown`
          : `None of your installs has “${text.trim()}” in it. Empty the field to see all ${rows.length}.`}
      </p>
      <table className={cx("hangar", !shown.length && "hidden")}>
        <thead>
          {table.getHeaderGroups().map((group) => (
            <tr key={group.id}>
              {group.headers.map((header) => {
                const sorted = header.column.getIsSorted();
                return (
                  <th key={header.id} scope="col" aria-sort={sorted ? SORT_WORD[sorted] : undefined}>
                    {live ? (
                      <button type="button" onClick={header.column.getToggleSortingHandler()}>
                        <table.FlexRender header={header} />
                        <SortSign sorted={sorted} />
                      </button>
                    ) : (
                      <table.FlexRender header={header} />
                    )}
                  </th>
                );
              })}
            </tr>
          ))}
        </thead>
        <tbody>
          {shown.map((row) => (
            <tr key={row.id}>
              {row.getAllCells().map((cell) => (
                <td key={cell.id}>
                  <table.FlexRender cell={cell} />
                </td>
              ))}
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  );
}

function SortSign({ sorted }: { sorted: false | "asc" | "desc" }) {
  return (
    <svg viewBox="0 0 14 18" width="14" height="18" aria-hidden="true" fill="none" stroke="currentColor" strokeWidth="2">
      <path d="M2 7 7 2l5 5" className={sorted === "asc" ? "fill-current" : sorted ? "opacity-0" : undefined} />
      <path d="M2 11l5 5 5-5" className={sorted === "desc" ? "fill-current" : sorted ? "opacity-0" : undefined} />
    </svg>
  );
}
