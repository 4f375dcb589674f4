import { Photos } from "#app/components/happenings/Photos";
import { BandRule } from "#app/components/ui/BandRule";
import { Figure } from "#app/components/ui/Figure";
import { Tally } from "#app/components/ui/Tally";
import type { GivenView } from "#app/lib/views/gate-proof";

/** What was given as evidence: a value on its rule, strokes of a tally, pictures, words. */
export function Given({ given }: { given: GivenView[] }) {
  if (!given.length) return null;
  return (
    <div className="given">
      {given.map((one, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: parts keep their order
        <GivenPart key={i} one={one} />
      ))}
    </div>
  );
}

function GivenPart({ one }: { one: GivenView }) {
  switch (one.kind) {
    case "value":
      return (
        <div className="given-value">
          {one.rule && (
            <BandRule min={one.rule.min} max={one.rule.max} value={one.rule.at} label={`${one.value} ${one.unit}, ${one.says}`} />
          )}
          <p>
            {one.label && <span>{one.label}</span>}
            <Figure className="given-figure" value={one.value} unit={one.unit} />
            <span className="given-says">{one.says}</span>
          </p>
        </div>
      );
    case "tally":
      return (
        <div className="given-value">
          <Tally count={one.count} label={one.says} size={36} />
          <p>
            <b>{one.says}</b>
            <span className="given-says">{one.note}</span>
          </p>
        </div>
      );
    case "photos":
      return <Photos files={one.files} of={one.of} />;
    case "words":
      return <p className="given-words">{one.text}</p>;
  }
}
