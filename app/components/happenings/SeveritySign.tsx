import { bladePath } from "#app/components/ui/bladePath";
import type { Severity } from "#app/lib/views/findings";

/** Grounding: a spade across the pipe. Limiting: a blade under a bar. Watch: an eye. The word stands beside it. */
export function SeveritySign({ severity, size = 60 }: { severity: Severity; size?: number }) {
  return (
    <svg width={size} height={size} viewBox="-32 -32 64 64" className="flex-none" aria-hidden="true">
      {severity === "grounding" && (
        <g className="pipe-small">
          <path className="pipe-wall" d="M-32 0H32" />
          <path className="pipe-bore" d="M-32 0H32" />
          <path className="spade" d="M0-24V24" />
        </g>
      )}
      {severity === "limiting" && (
        <>
          <path className="fill-none stroke-ink-2" strokeWidth="2" d="M-26-26V24H28" />
          <path className="blade blade-next" transform="translate(0 23)" d={bladePath(48, 20)} />
          <path className="stroke-seal" strokeWidth="6" d="M-24-9H28" />
        </>
      )}
      {severity === "watch" && (
        <>
          <path className="fill-plate stroke-ink" strokeWidth="3" strokeLinejoin="round" d="M-30 0Q0-30 30 0 0 30-30 0Z" />
          <circle className="fill-ink" r="8" />
        </>
      )}
    </svg>
  );
}
