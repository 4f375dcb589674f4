/** Pages of sample components for the eye: rendered to static HTML and photographed by render-gallery.ts. */
import type { ReactNode } from "react";
import { ChoiceGroup } from "#app/components/forms/ChoiceGroup";
import { ErrorSummary } from "#app/components/forms/ErrorSummary";
import { NumberInput } from "#app/components/forms/NumberInput";
import { PinInput } from "#app/components/forms/PinInput";
import { Select } from "#app/components/forms/Select";
import { TextInput } from "#app/components/forms/TextInput";
import { Line } from "#app/components/line/Line";
import { MiniLine } from "#app/components/line/MiniLine";
import type { LineProps } from "#app/components/line/types";
import { Balloon } from "#app/components/ui/Balloon";
import { BandRule } from "#app/components/ui/BandRule";
import { CautionSlab } from "#app/components/ui/CautionSlab";
import { ClearanceBars } from "#app/components/ui/ClearanceBars";
import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { FloorPlan, type PlanStation } from "#app/components/ui/FloorPlan";
import { Foot } from "#app/components/ui/Foot";
import { ItemNut } from "#app/components/ui/ItemNut";
import { Mark } from "#app/components/ui/Mark";
import { Notice } from "#app/components/ui/Notice";
import { Picker } from "#app/components/ui/Picker";
import { Stamp } from "#app/components/ui/Stamp";
import { Strip } from "#app/components/ui/Strip";
import { NUT_WORD, type NutState, type ShownValve, VALVE_WORD } from "#app/components/ui/states";
import { Tally } from "#app/components/ui/Tally";
import { TitlePipe } from "#app/components/ui/TitlePipe";
import { ValveSign } from "#app/components/ui/ValveSign";
import { fewGates, firstWeek, heldBeforeRun3, manyGates, oneGate, released, twoThings } from "./sample-line";

const ROLE = "builder";
const WORDS = ["Board", "Build-up", "Findings", "Loose ends", "Crib", "Bench", "Record"];

function Page({ current = "Board", foot, children }: { current?: string; foot?: ReactNode; children: ReactNode }) {
  return (
    <div className="page">
      <a className="skip-link" href="#main">
        To the work
      </a>
      <Strip
        homeHref="/"
        registration="N0417B"
        ship="Bramble"
        navLabel="Install"
        links={WORDS.map((label) => ({
          label,
          href: `/${label}`,
          current: label === current,
          ...(label === "Loose ends" ? { count: 2, countLabel: "open" } : {}),
        }))}
        person="Mirela Tansen"
        role={ROLE}
        saved="saved 10:42 CET"
        network="online"
      />
      <main id="main">{children}</main>
      {foot}
    </div>
  );
}

const Board = ({
  line,
  valve,
  held,
  title,
  state,
}: {
  line: LineProps;
  valve?: ShownValve;
  held?: boolean;
  title: string;
  state: string;
}) => (
  <Page>
    <TitlePipe title={title} state={state} valve={valve} held={held} then="Then the day check, then the walk-round." />
    <Line {...line} />
    <section className="p-6 grid gap-4 tablet:grid-cols-2">
      <Fitting size="act" href="/gates/OP" note="Next: torque the plugs with TW-5">
        Carry on with Oil prime
      </Fitting>
      <Fitting size="act" href="/gates/FP" note="Pump 1, pump 2, return flow, leaks">
        Prime the fuel again
      </Fitting>
    </section>
  </Page>
);

const STATIONS: PlanStation[] = [
  { position: "operator", letter: "E", label: "Engine operator", answer: "go" },
  { position: "runlead", letter: "L", label: "Run lead", answer: "go" },
  { position: "fireguard", letter: "F", label: "Fire guard 1", answer: "go", you: true },
  { position: "fireguard", letter: "F", label: "Fire guard 2", answer: "no-go" },
  { position: "areaguard", letter: "A", label: "Area guard", answer: "go" },
  { position: "observer", letter: "O", label: "Observer", answer: "go" },
  { position: "recorder", letter: "R", label: "Recorder", answer: "none" },
  { position: "swinger", letter: "S", label: "Swinger", answer: "none" },
];

const LIMITS = [
  { name: "this run’s plan", source: "run card, version 3", rpm: 1375, text: "1,375", binds: true },
  { name: "straps and surface", source: "restraint sheet, 08:12 CET", rpm: 1450, text: "1,450", binds: false },
  { name: "finding F-3, cowl rub", source: "limiting, Hanne Oduya", rpm: 2300, text: "2,300", binds: false },
  { name: "redline", source: "maker’s manual p. 12", rpm: 2900, text: "2,900", binds: false },
];

const VALVES = Object.keys(VALVE_WORD) as ShownValve[];
const NUTS = Object.keys(NUT_WORD) as NutState[];

const Parts = () => (
  <Page>
    <TitlePipe title="Parts" state="page 1 of 3: what hangs on it" fill={0.33} aside={<Fitting href="/record">In the record</Fitting>} />
    <CautionSlab title="The propeller turns." sign="propeller">
      Nobody inside the arc. Ignition and injection dead, seen by two people, before anyone touches the starter.
    </CautionSlab>
    <Notice band kind="hold" title="GO of 09:14 CET is over.">
      6 people were told at 09:21, 4 have read it. Nobody starts the engine. HOLD stays until a lead calls GO again.
    </Notice>
    <Notice
      band
      kind="offline"
      title="No network. As of 14:10 CET, 3 waiting to be sent"
      action={<Fitting href="/waiting">See the 3</Fitting>}
    >
      What others did since 14:10 is not in the picture.
    </Notice>
    <section className="grid grid-cols-1 gap-4 p-6">
      <ul className="flex flex-wrap gap-x-8 gap-y-4">
        {VALVES.map((state) => (
          <li key={state} className="flex items-center gap-3">
            <ValveSign state={state} part={0.7} size={88} fed />
            {VALVE_WORD[state]}
          </li>
        ))}
      </ul>
      <ul className="flex flex-wrap gap-x-8 gap-y-4">
        {NUTS.map((state) => (
          <li key={state} className="flex items-center gap-2">
            <ItemNut state={state} /> {NUT_WORD[state]}
          </li>
        ))}
      </ul>
      <div className="flex flex-wrap items-center gap-6">
        <Mark size={96} title="Bladecount" />
        <Mark size={32} />
        <Mark size={16} />
        <Tally count={4} label="4 plugs out" />
        <Tally count={12} of={14} label="12 of 14" />
        <Balloon n={1} />
        <Balloon n="a" />
        <Balloon n={2} small />
        <span className="text-h3 font-bold">
          <Figure value="1,375" unit="rpm" /> <Figure value="24.0" unit="N·m" /> <Figure value="0:49" />
        </span>
      </div>
      <div className="flex flex-wrap items-start gap-6">
        <div className="w-[340px] max-w-full">
          <BandRule min={22} max={26} value={24} label="24.0 N·m, in the band 22 to 26" />
        </div>
        <div className="w-[340px] max-w-full">
          <BandRule min={null} max={0.2} value={0.34} label="0.34 V, over 0.2" />
        </div>
        <div className="w-[340px] max-w-full">
          <BandRule min={10} max={null} value={null} label="at least 10 V" />
        </div>
        <div className="w-[340px] max-w-full">
          <BandRule min={-2} max={2} value={1} label="+1 degree, band −2 to +2" />
        </div>
      </div>
      <div className="grid items-start gap-4 tablet:grid-cols-3">
        <Fitting size="act" note="24.0 N·m with TW-5">
          Put down 4 plugs
        </Fitting>
        <Fitting size="act" variant="outline" note="holds the run, says why">
          No-go
        </Fitting>
        <Fitting size="act" variant="stop" centred note="throttle closed, ignition off">
          STOP
        </Fitting>
        <Fitting size="act" reason="when all 7 have said go">
          Call GO
        </Fitting>
        <div className="flex flex-wrap gap-2">
          <Fitting>Opening</Fitting>
          <Fitting variant="filled">Save</Fitting>
          <Fitting variant="quiet" pressed>
            Fuel filter
          </Fitting>
          <Fitting variant="quiet">Plugs out</Fitting>
          <Fitting reason="needs the network">Sign</Fitting>
        </div>
        <div className="grid gap-2">
          <Notice kind="lapsed" title="Lapsed: wrench TW-2 was due on 30 Nov.">
            Torque all four again with a wrench in date.
          </Notice>
          <Notice kind="refused" title="Not saved: Tibor Vale changed this at 10:41 CET.">
            Read what he entered, then enter yours again.
          </Notice>
          <Notice kind="done" title="Saved 10:42 CET." />
          <Notice kind="plain" title="What you see wrong goes here.">
            Anyone may raise one.
          </Notice>
        </div>
      </div>
      <Stamp
        signatures={[
          { role: "signed as builder", name: "Mirela Tansen", time: "4 Dec 2026 10:51 CET", hash: "7f3a 91c2 e04b" },
          { role: "inspector", name: "Hanne Oduya", time: "asked 10:51 CET", waits: true },
        ]}
      />
      <Stamp
        signatures={[
          { role: "signed as builder", name: "Mirela Tansen", time: "4 Dec 2026 10:51 CET", hash: "7f3a 91c2 e04b" },
          { role: "countersigned as inspector", name: "Hanne Oduya", time: "4 Dec 2026 11:26 CET", hash: "c81d 0a6e 55f9" },
        ]}
      />
      <MiniLine gates={[...twoThings.gates].map(({ state, part }) => ({ state, part }))} runs={twoThings.runs} />
      <MiniLine gates={heldBeforeRun3.gates} runs={heldBeforeRun3.runs} />
      <MiniLine gates={released.gates} runs={released.runs} released />
    </section>
  </Page>
);

const Forms = () => (
  <Page
    current="Record"
    foot={
      <Foot says="4 questions left" note="Draft kept on this tablet and on the server.">
        <Fitting size="act" reason="when all 11 are answered">
          Next: ratings and limits
        </Fitting>
      </Foot>
    }
  >
    <TitlePipe title="New install" state="page 1 of 3: what hangs on it" fill={0.33} />
    <form className="grid gap-5 p-6">
      <ErrorSummary
        focus={false}
        errors={[
          { field: "registration", message: "Registration: enter it as painted, letters and figures" },
          { field: "torque", message: "True torque: enter a number, as 24.0" },
        ]}
      />
      <div className="flex flex-wrap gap-4">
        <TextInput
          name="registration"
          label="Registration"
          figures
          size={8}
          defaultValue="N0550R"
          errors={["Enter it as painted, letters and figures"]}
        />
        <TextInput name="ship" label="Name" optional defaultValue="Ladle" />
        <NumberInput name="torque" label="True torque" unit="N·m" defaultValue="24.0" hint="22 to 26 N·m, maker’s manual p. 41" />
        <Select name="wrench" label="Wrench" empty="choose a wrench" options={[{ value: "5", label: "TW-5, due 14 Mar" }]} />
      </div>
      <TextInput name="why" label="Why" rows={3} hint="One line is enough." defaultValue="Injector 3 weeps at the rail. New seal." />
      <div>
        <ChoiceGroup
          no={1}
          name="delivery"
          label="Fuel delivery"
          hint="How fuel gets to the engine."
          defaultValue="electric"
          options={["gravity", "engine pump", "engine pump + electric", "electric"].map((label) => ({ value: label, label }))}
        />
        <ChoiceGroup
          no={2}
          open
          name="gear"
          label="Gear"
          options={["nose wheel", "tail wheel"].map((label) => ({ value: label, label }))}
        />
        <ChoiceGroup
          no={3}
          kind="checkbox"
          name="systems"
          label="What is opened?"
          defaultValue={["oil"]}
          options={[
            { value: "oil", label: "Oil lines, pump, cooler", note: "lapses OP5, OP6" },
            { value: "plugs", label: "Plugs, leads" },
            { value: "no", label: "Propeller", disabled: true },
          ]}
        />
      </div>
      <Picker
        legend="Show"
        name="show"
        defaultValue="all"
        options={["all 4", "waits for me", "not clear", "released"].map((label, i) => ({ value: i ? label : "all", label }))}
      />
      <div className="max-w-[370px]">
        <PinInput
          name="pin"
          label="Your signing PIN"
          hint="6 digits or more."
          errors={["That is not your PIN. 4 tries are left."]}
          keypad
        />
      </div>
    </form>
  </Page>
);

const Run = () => (
  <Page
    current="Build-up"
    foot={
      <Foot says="Clear for run 1" note="GO mails the card to 7 people and stands until 13:30 CET.">
        <Fitting size="act" note="lead’s PIN comes next">
          Call GO
        </Fitting>
      </Foot>
    }
  >
    <TitlePipe title="HOLD, run 3" state="since 09:21 CET, by itself: clearance fell below the plan" held />
    <div className="grid gap-6 p-6 wide:grid-cols-2">
      <section>
        <h2 className="text-lead text-ink-2">cleared to</h2>
        <p className="text-fig-l font-bold leading-none tracking-tight">
          <Figure value="1,375" /> <span className="text-h2 font-normal fig">rpm</span>
        </p>
        <ClearanceBars limits={LIMITS} />
      </section>
      <section>
        <FloorPlan stations={STATIONS} gear="tail" wind="340°, 6 kt, limit 12 kt" />
        <FloorPlan stations={STATIONS.slice(0, 7)} gear="nose" pusher />
      </section>
    </div>
  </Page>
);

export const PAGES: Record<string, ReactNode> = {
  board: <Board line={twoThings} valve="shut" title="Not clear for run 1" state="2 things stop it" />,
  "board-first-week": <Board line={firstWeek} valve="shut" title="Not clear for run 1" state="7 things stop it" />,
  "board-held": <Board line={heldBeforeRun3} held title="HOLD, run 3" state="1 thing stops it" />,
  "board-released": <Board line={released} valve="signed" title="Released for taxi tests" state="since 21 Dec 2026 11:02 CET" />,
  "board-few": <Board line={fewGates} valve="shut" title="Not clear for run 1" state="1 thing stops it" />,
  "board-one": <Board line={oneGate} valve="signed" title="Clear for run 1" state="nobody asked yet" />,
  "board-stale": <Board line={{ ...twoThings, stale: true }} valve="shut" title="Not clear for run 1" state="as of 14:10 CET" />,
  "board-sixty": <Board line={manyGates(60)} valve="shut" title="Not clear for run 1" state="9 things stop it" />,
  parts: <Parts />,
  forms: <Forms />,
  run: <Run />,
};
