interface HiddenIdsProps {
  /** Made once when the form is drawn; a replay of it gets the first outcome. */
  commandId: string;
  /** The version that the writer saw; a newer one on the server refuses the write. */
  version?: number | string;
  /** Which act of several the page's action serves. */
  intent?: string;
  /** Further ids that go with it. */
  also?: Record<string, string | number>;
}

/** The hidden fields that every writing form carries. */
export function HiddenIds({ commandId, version, intent, also = {} }: HiddenIdsProps) {
  return (
    <>
      <input type="hidden" name="commandId" value={commandId} />
      {version !== undefined && <input type="hidden" name="version" value={version} />}
      {intent !== undefined && <input type="hidden" name="intent" value={intent} />}
      {Object.entries(also).map(([name, value]) => (
        <input key={name} type="hidden" name={name} value={value} />
      ))}
    </>
  );
}
