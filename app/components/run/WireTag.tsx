import type { ReactNode } from "react";

interface WireTagProps {
  /** "N0417B Wren, run 1, first start" */
  kicker: string;
  title: string;
  /** What is declared, read back in one sentence. */
  says: ReactNode;
  /** Left of the perforation: who gets what, cautions, the way back. */
  children: ReactNode;
  /** Right of it: PIN and the one act. */
  stub: ReactNode;
}

/** A tag on a wire: what is called is read back on it, and the stub at its right takes the PIN. */
export function WireTag({ kicker, title, says, children, stub }: WireTagProps) {
  return (
    <main id="main" className="bg-sunk p-4 tablet:p-7 wide:p-9">
      <div className="relative mx-auto grid max-w-[1130px] bg-plate wide:grid-cols-[minmax(0,1fr)_368px] wide:[clip-path:polygon(64px_0,100%_0,100%_100%,64px_100%,0_calc(100%-64px),0_64px)]">
        <svg
          className="absolute top-1/2 left-0 hidden -translate-y-1/2 overflow-visible wide:block"
          viewBox="0 0 120 160"
          width="120"
          height="160"
          aria-hidden="true"
        >
          <path className="fill-none stroke-pipe" strokeWidth="3" d="M58 96C40 60 10 40-20 36M58 96C34 74 6 70-20 66" />
          <circle className="fill-sunk stroke-line" strokeWidth="2" cx="58" cy="96" r="27" />
          <circle className="fill-ground stroke-ink" strokeWidth="3.5" cx="58" cy="96" r="12" />
        </svg>
        <div className="flex flex-col gap-4 p-5 tablet:p-8 wide:py-10 wide:pr-10 wide:pl-32">
          <div>
            <p className="text-note font-semibold text-ink-2">{kicker}</p>
            <h1 className="text-h1 tracking-[-0.032em]">{title}</h1>
          </div>
          <p className="border-y-2 border-ink py-4 text-h3 leading-snug tracking-[-0.015em]">{says}</p>
          {children}
        </div>
        <div className="flex flex-col justify-between gap-6 border-ink-2 p-5 max-wide:border-t-2 max-wide:border-dashed tablet:p-8 wide:border-l-2 wide:border-dashed wide:py-12">
          {stub}
        </div>
      </div>
    </main>
  );
}
