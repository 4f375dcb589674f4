import { cleanup, render, screen, within } from "@testing-library/react";
import userEvent from "@testing-library/user-event";
import { afterEach, describe, expect, it, vi } from "vitest";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { NumberInput } from "#app/components/forms/NumberInput";
import { PinInput } from "#app/components/forms/PinInput";
import { Line } from "#app/components/line/Line";
import { BandRule } from "#app/components/ui/BandRule";
import { bandScale } from "#app/components/ui/bandScale";
import { ClearanceBars } from "#app/components/ui/ClearanceBars";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { FloorPlan } from "#app/components/ui/FloorPlan";
import { ItemNut } from "#app/components/ui/ItemNut";
import { Stamp } from "#app/components/ui/Stamp";
import { Strip } from "#app/components/ui/Strip";
import { NUT_WORD, type NutState } from "#app/components/ui/states";
import { Valve } from "#app/components/ui/Valve";
import { heldBeforeRun3, twoThings } from "./support/sample-line";

afterEach(cleanup);

describe("valve", () => {
  const lever = (state: Parameters<typeof Valve>[0]["state"], part?: number) => {
    const { container } = render(
      <svg aria-hidden="true">
        <Valve state={state} part={part} />
      </svg>,
    );
    return container;
  };

  it.each([
    ["waiting", "0"],
    ["in-work", "0"],
    ["ready", "0"],
    ["half-signed", "45"],
    ["signed", "90"],
    ["shut", "0"],
  ] as const)("%s: the handle stands at %s degrees", (state, angle) => {
    expect(lever(state).querySelector(".lever")?.parentElement).toHaveAttribute("transform", `rotate(${angle})`);
  });

  it("breaks the handle when lapsed, with a mark of seal paint", () => {
    const drawn = lever("lapsed");
    expect(drawn.querySelectorAll(".lever")).toHaveLength(2);
    expect(drawn.querySelector(".seal-mark")).not.toBeNull();
  });

  it("fills the handle by how many items stand", () => {
    const filled = (part: number) =>
      Number(/V(-[\d.]+)H/.exec(lever("in-work", part).querySelector(".lever-part")?.getAttribute("d") ?? "")?.[1] ?? 0);
    expect(filled(1)).toBeLessThan(filled(0.5));
    expect(lever("in-work", 0).querySelector(".lever-part")).toBeNull();
  });

  it("rings a valve that is ready to sign", () => {
    expect(lever("ready").querySelector(".valve-ring")).not.toBeNull();
    expect(lever("signed").querySelector(".valve-ring")).toBeNull();
  });
});

describe("the Line", () => {
  it("names every valve: the words seen, then the full name and the reason", () => {
    render(<Line {...twoThings} />);
    const [lying] = screen.getAllByRole("group", { name: "The Line: 16 gates, 6 runs, release" });
    if (!lying) throw new Error("no lying Line");
    const links = within(lying).getAllByRole("link");
    // gates, walk-round, runs, post-run valves, service, release
    expect(links).toHaveLength(15 + 1 + 6 + 6 + 1 + 1);
    for (const link of links) expect(link).toHaveAttribute("href");
    const name = within(lying)
      .getByRole("link", { name: /^Fuel prime, lapsed 3 Dec, 1 in what stops us/ })
      .getAttribute("aria-label");
    expect(name).toContain("Fuel flow and prime, lapsed: fuel system opened 3 Dec 14:10 CET");
    expect(within(lying).getByRole("link", { name: /^Mount, signed 24 Nov; Mount and firewall/ })).toBeInTheDocument();
    expect(within(lying).getByRole("link", { name: "After run 1, waits for run 1" })).toBeInTheDocument();
    expect(within(lying).getByRole("link", { name: "Service before run 6, waits for run 5" })).toBeInTheDocument();
  });

  it("tells every state by a word", () => {
    render(<Line {...heldBeforeRun3} />);
    const [lying, standing] = screen.getAllByRole("group", { name: /^The Line/ });
    if (!lying || !standing) throw new Error("both Lines are in the page");
    expect(within(lying).getByRole("link", { name: /^3, HOLD.*run 3, Middle power, to 2,340 rpm, HOLD$/ })).toBeInTheDocument();
    expect(within(standing).getByRole("link", { name: /^2 Change-over reviewed/ })).toBeInTheDocument();
    expect(standing.querySelectorAll(".spade")).toHaveLength(1);
  });

  it("says the same as a list", () => {
    render(<Line {...twoThings} />);
    const list = screen.getByRole("list");
    expect(within(list).getAllByRole("listitem")).toHaveLength(15 + 1 + 6 + 6 + 1 + 1);
    const row = within(list).getByRole("link", { name: "Fuel flow and prime" }).closest("li");
    expect(row).toHaveTextContent("lapsed: fuel system opened 3 Dec 14:10 CET");
    expect(within(list).getByRole("link", { name: "Run 1, First start" }).closest("li")).toHaveTextContent("next, to 1,375 rpm");
  });

  it("says how to start when there are no gates", () => {
    render(<Line {...twoThings} gates={[]} />);
    expect(screen.getByText(/Answer the set-up questions/)).toBeInTheDocument();
  });

  it("lets flow come in only after a change", () => {
    const { container, rerender } = render(<Line {...twoThings} />);
    expect(container.querySelector(".pipe-flow-new")).toBeNull();
    rerender(<Line {...heldBeforeRun3} walkRound={twoThings.walkRound} runs={twoThings.runs} />);
    expect(container.querySelector(".pipe-flow-new")).not.toBeNull();
  });
});

describe("parts", () => {
  it.each(Object.keys(NUT_WORD) as NutState[])("an item nut says %s", (state) => {
    render(<ItemNut state={state} spoken />);
    expect(screen.getByRole("img", { name: NUT_WORD[state] })).toBeInTheDocument();
  });

  it("a fitting that cannot be pressed says why and does nothing", async () => {
    const press = vi.fn();
    const submit = vi.fn((event: { preventDefault: () => void }) => event.preventDefault());
    render(
      <form onSubmit={submit}>
        <Fitting size="act" reason="when all 7 have said go" onClick={press}>
          Call GO
        </Fitting>
      </form>,
    );
    const button = screen.getByRole("button", { name: "Call GO when all 7 have said go" });
    expect(button).toHaveAttribute("aria-disabled", "true");
    await userEvent.click(button);
    expect(press).not.toHaveBeenCalled();
    expect(submit).not.toHaveBeenCalled();
  });

  it("a fitting with an address is a link, even without a router", () => {
    render(
      <Fitting href="/gates/OP" note="Next: torque the plugs">
        Oil prime
      </Fitting>,
    );
    expect(screen.getByRole("link", { name: "Oil prime Next: torque the plugs" })).toHaveAttribute("href", "/gates/OP");
  });

  it("a figure reads as value and unit", () => {
    const { container } = render(<Figure value="1,375" unit="rpm" />);
    expect(container).toHaveTextContent(/^1,375 rpm$/);
  });

  it("a band rule marks a value that is out", () => {
    const { container, rerender } = render(<BandRule min={22} max={26} value={24} label="24 N·m, in the band" />);
    expect(container.querySelector(".rule-value-out")).toBeNull();
    rerender(<BandRule min={22} max={26} value={26.1} label="26.1 N·m, over 26" />);
    expect(container.querySelector(".rule-value-out")).not.toBeNull();
    expect(screen.getByRole("img", { name: "26.1 N·m, over 26" })).toBeInTheDocument();
  });

  it.each([
    [22, 26, 24],
    [null, 0.2, 0.34],
    [10, null, null],
    [-2, 2, 1],
    [5, 5, 5],
    [0, 0.0004, 0.0002],
  ])("a rule for %s to %s holds band and value on at most 9 numbers", (min, max, value) => {
    const { from, to, step } = bandScale(min, max, value);
    for (const n of [min, max, value]) if (n !== null) expect(n >= from - 1e-9 && n <= to + 1e-9).toBe(true);
    expect((to - from) / step).toBeGreaterThanOrEqual(2);
    expect((to - from) / step).toBeLessThanOrEqual(8.001);
  });

  it("clearance bars say which limit binds", () => {
    render(
      <ClearanceBars
        limits={[
          { name: "this run’s plan", source: "card 3", rpm: 1375, text: "1,375", binds: true },
          { name: "redline", source: "manual p. 12", rpm: 2900, text: "2,900", binds: false },
        ]}
      />,
    );
    expect(screen.getByRole("rowheader", { name: /this run’s plan \(binds\)/ })).toBeInTheDocument();
    expect(screen.getByRole("rowheader", { name: /^redline/ })).not.toHaveTextContent("binds");
  });

  it("a floor plan says each answer in words", () => {
    render(
      <FloorPlan
        gear="tail"
        stations={[
          { position: "fireguard", letter: "F", label: "Fire guard 1", answer: "no-go", you: true },
          { position: "fireguard", letter: "F", label: "Fire guard 2", answer: "none" },
        ]}
      />,
    );
    expect(screen.getByRole("img", { name: /Fire guard 1: no-go, you; Fire guard 2: no answer/ })).toBeInTheDocument();
  });

  it("a stamp keeps the half that waits apart from the one that was given", () => {
    const { container } = render(
      <Stamp
        signatures={[
          { role: "signed as builder", name: "Mirela Tansen", time: "4 Dec 2026 10:51 CET" },
          { role: "inspector", name: "Hanne Oduya", time: "asked 10:51 CET", waits: true },
        ]}
      />,
    );
    expect(container.querySelectorAll(".stamp-fill")).toHaveLength(1);
    expect(container.querySelectorAll(".stamp-ghost")).toHaveLength(1);
    expect(screen.getAllByRole("listitem")[1]).toHaveTextContent("inspector Hanne Oduya asked 10:51 CET");
  });

  it("a stamp that no longer holds is split and not filled", () => {
    const signature = { role: "signed as builder, lapsed", name: "Mirela Tansen", time: "4 Dec 2026 10:51 CET", lapsed: true };
    const { container } = render(<Stamp signatures={[signature]} />);
    expect(container.querySelectorAll(".stamp-fill, .stamp-edge")).toHaveLength(0);
    expect(container.querySelectorAll(".stamp-split")).toHaveLength(1);
    expect(screen.getByRole("listitem")).toHaveTextContent("signed as builder, lapsed Mirela Tansen");
  });

  it("the strip marks the page that is open", () => {
    render(
      <Strip
        homeHref="/"
        registration="N0417B"
        navLabel="Install"
        links={[
          { label: "Board", href: "/b", current: true },
          { label: "Crib", href: "/c" },
        ]}
        network="offline"
      />,
    );
    expect(screen.getByRole("link", { name: "Board" })).toHaveAttribute("aria-current", "page");
    expect(screen.getByRole("link", { name: "Crib" })).not.toHaveAttribute("aria-current");
    expect(screen.getByRole("img", { name: "no network" })).toBeInTheDocument();
  });

  it("the strip brings the page that is shown into sight, and moves nothing else", () => {
    const box = (left: number, width: number) => ({ left, width }) as DOMRect;
    vi.spyOn(HTMLElement.prototype, "getBoundingClientRect").mockImplementation(function (this: HTMLElement) {
      return this.tagName === "NAV" ? box(0, 390) : this.hasAttribute("aria-current") ? box(700, 80) : box(0, 0);
    });
    const into = vi.spyOn(window, "scrollTo").mockImplementation(() => {});
    render(
      <Strip
        homeHref="/"
        navLabel="Install"
        links={[
          { label: "Board", href: "/b" },
          { label: "Crib", href: "/c", current: true },
        ]}
      />,
    );
    expect(screen.getByRole("navigation").scrollLeft).toBe(740 - 195);
    expect(into).not.toHaveBeenCalled();
    vi.restoreAllMocks();
  });
});

describe("forms", () => {
  it("wires label, hint and error to the field", () => {
    render(<NumberInput name="torque" label="True torque" unit="N·m" hint="22 to 26 N·m" errors={["Enter a number, as 24.0"]} />);
    const field = screen.getByRole("textbox", { name: "True torque" });
    expect(field).toHaveAttribute("inputmode", "decimal");
    expect(field).toBeInvalid();
    expect(field).toHaveAccessibleDescription("22 to 26 N·m Enter a number, as 24.0");
  });

  it("reads the question with its answers", async () => {
    const answered = vi.fn();
    render(
      <ChoiceGroup
        name="gear"
        label="Gear"
        options={[
          { value: "nose", label: "nose wheel" },
          { value: "tail", label: "tail wheel" },
        ]}
        onChange={answered}
      />,
    );
    const group = screen.getByRole("group", { name: "Gear" });
    await userEvent.click(within(group).getByRole("radio", { name: "tail wheel" }));
    expect(answered).toHaveBeenCalledWith("tail", true);
    expect(within(group).getByRole("radio", { name: "tail wheel" })).toBeChecked();
  });

  it("takes a PIN from the keys or the keyboard, digits only", async () => {
    const length = vi.fn();
    render(<PinInput name="pin" label="Your signing PIN" keypad onLength={length} />);
    const field = screen.getByLabelText("Your signing PIN");
    expect(field).toHaveAttribute("type", "password");
    await userEvent.type(field, "12a3");
    await userEvent.click(screen.getByRole("button", { name: "4" }));
    expect(field).toHaveValue("1234");
    expect(screen.getByRole("img", { name: "4 of 6 digits" })).toBeInTheDocument();
    await userEvent.click(screen.getByRole("button", { name: /^Back/ }));
    expect(field).toHaveValue("123");
    expect(length).toHaveBeenLastCalledWith(3);
  });

  it("puts the focus on the error summary, and each line leads to its field", () => {
    render(<ErrorSummary errors={[{ field: "torque", message: "True torque: enter a number" }]} />);
    expect(screen.getByRole("alert")).toHaveFocus();
    expect(screen.getByRole("link", { name: "True torque: enter a number" })).toHaveAttribute("href", "#torque");
  });
});
