import type { ReactNode } from "react";
import { bladePath } from "#app/components/ui/bladePath";

export type CautionSign = "propeller" | "strap" | "fire" | "general";

interface CautionSlabProps {
  /** First words, in bold: "The propeller turns." */
  title: string;
  /** What to do and what not. */
  children: ReactNode;
  sign?: CautionSign;
}

const BLADE = bladePath(36, 15);

const SIGNS: Record<CautionSign, ReactNode> = {
  propeller: (
    <>
      <circle cx="44" cy="44" r="40" fill="none" stroke="currentColor" strokeWidth="3.5" strokeDasharray="3 7" strokeLinecap="round" />
      <g fill="currentColor" transform="translate(44 44) rotate(38)">
        <path d={BLADE} />
        <path transform="rotate(180)" d={BLADE} />
        <circle r="6.5" />
      </g>
    </>
  ),
  strap: (
    <g fill="none" stroke="currentColor" strokeWidth="4">
      <path d="M8 20 44 44 80 20M44 44V80" />
      <circle cx="44" cy="44" r="9" fill="currentColor" />
    </g>
  ),
  fire: (
    <path
      fill="none"
      stroke="currentColor"
      strokeWidth="4.5"
      strokeLinejoin="round"
      d="M44 8C50 24 68 32 68 54A24 24 0 0 1 20 54C20 44 26 38 30 30 34 36 36 38 38 40 42 32 44 22 44 8ZM44 78C36 78 33 72 33 67 33 59 41 56 44 48 48 56 55 60 55 67 55 72 52 78 44 78Z"
    />
  ),
  general: (
    <>
      <path fill="none" stroke="currentColor" strokeWidth="5" strokeLinejoin="round" d="M44 10 82 76H6Z" />
      <path stroke="currentColor" strokeWidth="7" strokeLinecap="round" d="M44 34V53M44 65V66" />
    </>
  ),
};

/** The caution above the first tick: a full-width slab, ink turned over. It never jokes and never hides. */
export function CautionSlab({ title, children, sign = "general" }: CautionSlabProps) {
  return (
    <aside className="caution-slab" aria-label={`Caution: ${title}`}>
      <svg viewBox="0 0 88 88" width="76" height="76" aria-hidden="true">
        {SIGNS[sign]}
      </svg>
      <p>
        <b>Caution: {title}</b> {children}
      </p>
    </aside>
  );
}
