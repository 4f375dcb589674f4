import type { ValveState } from "#app/components/ui/states";

/** The cap at the end of the pipe: flange and cap, hanging down from 0,0. Filled when released. A group for use inside an svg. */
export function ReleaseCap({ state }: { state: ValveState }) {
  return (
    <g className={`valve-${state}`}>
      <path className="pipe-blank" d="M-13 0H13" />
      <path className="valve-body" d="M-15 3.5v10l6 6h18l6-6v-10z" />
      {state === "half-signed" && <path className="valve-fed" d="M-15 3.5v10l6 6h9v-16z" />}
      {state === "ready" && <path className="valve-ring" d="M-20 -1v16.500l8.500 8.500h23l8.500-8.500v-16.500" />}
      {state === "lapsed" && <path className="seal-mark" d="M-12 18 -4 9 3 13 12 4" />}
    </g>
  );
}
