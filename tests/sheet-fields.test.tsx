import { readFileSync } from "node:fs";
import { cleanup, render } from "@testing-library/react";
import { afterEach, describe, expect, it } from "vitest";
import { NO_ENTRY } from "#app/components/gate/entry";
import { SheetFields } from "#app/components/gate/SheetFields";
import type { FormField } from "#app/lib/bench/form";
import { SHEET_FORMS } from "#app/lib/bench/sheet";
import type { FieldView, SheetView } from "#app/lib/views/gate-parts";

afterEach(cleanup);

const css = readFileSync("app/styles/gate.css", "utf8");
type Fixed = Record<string, string>;

const fieldView =
  (fixed: Fixed) =>
  (f: FormField): FieldView => ({
    kind: f.kind,
    name: f.name,
    label: f.label,
    help: f.help,
    optional: f.optional,
    when: f.when,
    unit: "",
    options: f.kind === "choice" ? f.options : [],
    value: fixed[f.name] ?? "",
    fixed: f.name in fixed,
  });

function draw(sheet: keyof typeof SHEET_FORMS, fixed: Fixed = {}) {
  const { title, formula, caution, fields, groups } = SHEET_FORMS[sheet];
  const view: SheetView = {
    ...{ sheet, title, formula, caution },
    fields: fields.map(fieldView(fixed)),
    groups: groups.map(({ name, label, row, fields: own }) => ({ name, label, row, rows: 1, fields: own.map(fieldView(fixed)) })),
  };
  return render(<SheetFields item="i" n={0} entry={NO_ENTRY} units="si" sheet={view} live={false} />).container;
}

describe.each(Object.keys(SHEET_FORMS) as (keyof typeof SHEET_FORMS)[])("the fields of the %s sheet", (sheet) => {
  it("that hang on a choice have their rule in the style sheet, so that they show without scripts", () => {
    const { fields, groups } = SHEET_FORMS[sheet];
    const asked = [fields, ...groups.map((g) => g.fields)].flatMap((list) => list.flatMap((f) => (f.when ? [f.when] : [])));
    for (const { field, is } of asked)
      expect(css).toContain(`.field-row:has(> [data-field="${field}"] [value="${is}"]:checked) > [data-when="${field}=${is}"]`);
    const shown = [...draw(sheet).querySelectorAll("[data-when]")].map((el) => el.getAttribute("data-when"));
    expect(new Set(shown)).toEqual(new Set(asked.map(({ field, is }) => `${field}=${is}`)));
  });
});

describe("a choice that the install has decided", () => {
  const restraint = (gear: string) => draw("restraint", { gear });
  const tailField = (el: HTMLElement) => el.querySelector('[data-field="tailArm"]');

  it("is sent along, and what hangs on it is there or not, whatever the browser can do", () => {
    const nose = restraint("nose");
    expect(nose.querySelector('input[type="hidden"][value="nose"]')).not.toBeNull();
    expect(tailField(nose)).toHaveAttribute("hidden");
    cleanup();
    const tail = restraint("tail");
    expect(tailField(tail)).not.toHaveAttribute("hidden");
    expect(tailField(tail)).not.toHaveAttribute("data-when");
  });
  it("leaves the hidden field in the form, so that each row sends as many texts", () => {
    expect(tailField(restraint("nose"))?.querySelector("input")?.name).toBe("p0.s.tailArm");
  });
});
