import { Form } from "react-router";
import { HiddenIds } from "#app/components/forms/HiddenIds";
import { TextInput } from "#app/components/forms/TextInput";
import { StationMark } from "#app/components/run/RollCall";
import { Fitting } from "#app/components/ui/Fitting";
import { ItemNut } from "#app/components/ui/ItemNut";

interface Allowed {
  ok: boolean;
  why: string;
}

export interface BriefProps {
  version: number;
  title: string;
  places: { letter: string; name: string; place: string; duty: string }[];
  read: string | null;
  acknowledge: Allowed | null;
  go: Allowed;
  noGo: Allowed;
  said: { answer: "go" | "no-go" | "none"; words: string };
}

/** My places and what I do there. */
export function MyPlaces({ title, places, said }: Pick<BriefProps, "title" | "places" | "said">) {
  return (
    <div className="border-y-2 border-ink py-3">
      <h2 className="sr-only">{title}</h2>
      {places.map((p, n) => (
        <div key={p.letter} className="grid grid-cols-[62px_minmax(0,1fr)] gap-x-4 py-1">
          <StationMark letter={p.letter} answer={said.answer} large />
          <div>
            <p className="text-h3 font-[680] tracking-[-0.015em]" aria-hidden={n === 0 && places.length === 1}>
              {places.length === 1 ? title : p.name}
            </p>
            <p>
              {p.place}. {p.duty}
            </p>
          </div>
        </div>
      ))}
    </div>
  );
}

/** What I owe the run: read the card, then go; and, a gap away, no-go with its reason. */
export function MyAnswer({ brief, commandId, errors }: { brief: BriefProps; commandId: string; errors?: string[] }) {
  const { version, read, acknowledge, go, noGo, said } = brief;
  return (
    <section aria-labelledby="answer" id="my-answer" className="flex flex-col gap-3">
      <h2 id="answer" className="text-h3">
        {acknowledge ? "Read the card, then answer" : said.answer === "go" ? "You are go" : "Are you go?"}
      </h2>
      {read && (
        <p className="flex items-center gap-3">
          <ItemNut state="done" size={40} />
          {read}
        </p>
      )}
      {acknowledge ? (
        <Form method="post">
          <HiddenIds commandId={`${commandId}-ack`} version={version} intent="acknowledge" />
          <Fitting
            size="act"
            reason={acknowledge.ok ? undefined : acknowledge.why}
            note="the card, my place, the abort words"
            className="w-full"
          >
            I have read card version {version}
          </Fitting>
        </Form>
      ) : (
        <>
          <p>{said.words}</p>
          {said.answer !== "go" && (
            <Form method="post">
              <HiddenIds commandId={`${commandId}-go`} version={version} intent="go" />
              <Fitting size="act" reason={go.ok ? undefined : go.why} note="I am at my place, ready" className="w-full">
                Go
              </Fitting>
            </Form>
          )}
        </>
      )}
      <Form method="post" id="no-go" className="mt-9 flex flex-col gap-3 border-t border-line pt-4">
        <HiddenIds commandId={`${commandId}-no`} version={version} intent="no-go" />
        <TextInput
          name="reason"
          label="Why it is no-go"
          hint="A no-go is always taken. It stops the run until you say go."
          rows={2}
          maxLength={1000}
          errors={errors}
          required
        />
        <Fitting size="act" variant="outline" reason={noGo.ok ? undefined : noGo.why} note="stops the run, says why">
          No-go
        </Fitting>
      </Form>
    </section>
  );
}
