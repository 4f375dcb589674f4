export interface AbortPart {
  word: "STOP" | "KILL" | "FIRE";
  first: string;
  lines: string[];
}

/** The words that end a run at once, always in plain sight. */
export function AbortWords({ parts }: { parts: AbortPart[] }) {
  return (
    <section aria-label="Abort words" className="flex flex-col gap-3 border-l-8 border-stop-edge bg-stop-wash p-4">
      {parts.map((part) => (
        <div key={part.word}>
          <p>
            <b className="text-stop-ink">{part.word}:</b> {part.first}
          </p>
          <ul className="list-disc pl-6">
            {part.lines.map((line) => (
              <li key={line}>{line}</li>
            ))}
          </ul>
        </div>
      ))}
    </section>
  );
}
