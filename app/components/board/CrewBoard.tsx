import { Figure } from "#app/components/ui/Figure";
import { Fitting } from "#app/components/ui/Fitting";
import { ItemNut } from "#app/components/ui/ItemNut";

interface CrewBoardProps {
  places: { letter: string; name: string; place: string; duty: string }[];
  runHref: string | null;
  when: string | null;
  highest: string | null;
  steps: string[];
  stop: string[];
  read: string | null;
}

/** A crew member's board: the own place, the run in short, the words that stop it. */
export function CrewBoard({ places, runHref, when, highest, steps, stop, read }: CrewBoardProps) {
  if (!runHref) return <p className="crew-none">No run is planned yet. When a lead plans one, your place and the card appear here.</p>;
  return (
    <div className="crew-board">
      <p className="crew-when">{when ?? "No time set yet"}</p>
      {places.length === 0 && <p>You have no place on this run. Stay outside the line.</p>}
      {places.map((p) => (
        <section key={p.name} className="crew-place">
          <span className="crew-letter" aria-hidden="true">
            {p.letter}
          </span>
          <div>
            <h2>You are {p.name.toLowerCase()}</h2>
            <p>
              {p.place}. {p.duty}
            </p>
          </div>
        </section>
      ))}
      <section>
        <h2>The run in short</h2>
        <p>
          {steps.join(", ")}.
          {highest && (
            <>
              {" "}
              Never above <Figure value={highest} className="font-bold" />.
            </>
          )}
        </p>
      </section>
      <div className="crew-stop">
        <p>
          <b>Shout STOP, or cross your arms overhead.</b>
        </p>
        {stop.length > 0 && <p>{stop[0]}</p>}
        <ul>
          {stop.slice(1).map((reason) => (
            <li key={reason}>{reason}</li>
          ))}
        </ul>
        <p>Never walk into the propeller’s arc. The maker’s manual and the run lead’s word come first.</p>
      </div>
      {read && (
        <p className="crew-read">
          <ItemNut state="done" size={44} /> {read}
        </p>
      )}
      <Fitting href={runHref}>Open the run card</Fitting>
    </div>
  );
}
