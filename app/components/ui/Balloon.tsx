interface BalloonProps {
  /** Number or letter. */
  n: number | string;
  /** Read aloud instead of the bare number; without it the balloon is decoration. */
  label?: string;
  small?: boolean;
}

/** Item balloon, as on a workshop drawing: ties what stops us to its valve. */
export function Balloon({ n, label, small = false }: BalloonProps) {
  const name = label ? { role: "img", "aria-label": label } : { "aria-hidden": true };
  return (
    <span className={small ? "balloon balloon-small" : "balloon"} {...name}>
      {n}
    </span>
  );
}
