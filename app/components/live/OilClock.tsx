import { Fitting } from "#app/components/ui/Fitting";
import { type OilMarks, oilFace } from "#app/lib/bench/live-clock";

interface OilClockProps {
  fired: number;
  marks: OilMarks;
  now: number;
  onMark: (marks: OilMarks) => void;
}

const WORD = { shows: "OIL PRESSURE?", above: "ABOVE ITS LEAST?", good: "OIL PRESSURE", stop: "STOP" } as const;
const TONE = { shows: "rest", above: "rest", good: "seen", stop: "stop" } as const;

/** The two waits after the start: pressure shows, pressure is above its least; else STOP, over the whole width. */
export function OilClock({ fired, marks, now, onMark }: OilClockProps) {
  const face = oilFace(fired, marks, now);
  const waits = face.word === "shows" || face.word === "above";
  return (
    <section className={`face face-${TONE[face.word]}`} aria-label="Oil pressure">
      <p className="face-word" role={face.word === "stop" ? "alert" : "status"}>
        {WORD[face.word]}
      </p>
      {waits && (
        <p className="fig text-[96px] leading-none font-bold" aria-hidden="true">
          {face.left}
        </p>
      )}
      <p className="face-says">{face.sentence}</p>
      {waits && (
        <p className="mt-3 flex flex-wrap justify-center gap-3">
          {marks.shows === null && (
            <Fitting size="act" variant="outline" type="button" onClick={() => onMark({ ...marks, shows: Date.now() })}>
              It shows
            </Fitting>
          )}
          <Fitting size="act" type="button" onClick={() => onMark({ shows: marks.shows ?? Date.now(), above: Date.now() })}>
            Above its least
          </Fitting>
        </p>
      )}
    </section>
  );
}
