const r = (n: number) => Math.round(n * 10) / 10;

/** Outline of a propeller blade, root at 0,0, tip at 0,-length; both in drawing units. */
export function bladePath(length: number, width: number): string {
  const h = length;
  const a = width / 2;
  const k = width * 0.2;
  return (
    `M${r(-k)} 0V${r(-h * 0.08)}C${r(-k)} ${r(-h * 0.2)} ${r(-a)} ${r(-h * 0.24)} ${r(-a)} ${r(-h * 0.46)}` +
    `C${r(-a)} ${r(-h * 0.7)} ${r(-a * 0.55)} ${r(-h)} ${r(a * 0.1)} ${r(-h)}` +
    `C${r(a * 0.5)} ${r(-h)} ${r(a * 0.72)} ${r(-h * 0.78)} ${r(a * 0.72)} ${r(-h * 0.5)}` +
    `C${r(a * 0.72)} ${r(-h * 0.28)} ${r(k)} ${r(-h * 0.2)} ${r(k)} ${r(-h * 0.08)}V0Z`
  );
}
