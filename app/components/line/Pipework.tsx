import { useState } from "react";
import type { Pipework as Drawn } from "#app/components/line/pipework";

/** Walls, bores, flow, fronts, in that order. Flow that was not there at the last drawing comes in once, in 600 ms. */
export function Pipework({ drawn }: { drawn: Drawn }) {
  const fresh = useFresh(drawn.flow);
  return (
    <>
      <path className="pipe-wall" d={drawn.pipes} />
      <path className="pipe-bore" d={drawn.pipes} />
      <path className="pipe-flow" d={drawn.flow.filter((d) => !fresh.has(d)).join("")} />
      {[...fresh].map((d) => (
        <path key={d} className="pipe-flow pipe-flow-new" pathLength={1} d={d} />
      ))}
      <path className="pipe-front" d={drawn.fronts} />
    </>
  );
}

const NONE: ReadonlySet<string> = new Set();

function useFresh(flow: string[]): ReadonlySet<string> {
  const key = flow.join("");
  const [last, setLast] = useState({ key, flow, fresh: NONE });
  if (last.key === key) return last.fresh;
  const before = new Set(last.flow);
  const fresh = new Set(flow.filter((d) => !before.has(d)));
  setLast({ key, flow, fresh });
  return fresh;
}
