import type { Drawing } from "#app/lib/views/bench-drawing";

type Torque = Extract<Drawing, { kind: "torque" }>;
const r = (n: number) => Math.round(n * 10) / 10;
const [DRIVE_X, DRIVE_Y, LENGTH] = [240, 92, 200];

/** The wrench from above: handle left, drive in the middle, the adapter at its angle to the fastener. */
export function TorqueDrawing({ drawing: { wrench, adapter, angle, reach } }: { drawing: Torque }) {
  const [dx, dy] = [LENGTH * reach * Math.cos(angle), -LENGTH * reach * Math.sin(angle)];
  const [x, y] = [r(DRIVE_X + dx), r(Math.max(24, DRIVE_Y + dy))];
  return (
    <figure className="bench-drawing">
      <svg
        viewBox="0 0 420 176"
        role="img"
        aria-label={`Wrench ${wrench}, adapter ${adapter} at ${Math.round((angle * 180) / Math.PI)} degrees`}
      >
        <path className="bench-tool" d={`M40 ${DRIVE_Y}H${DRIVE_X}`} />
        <path className="bench-grip" d={`M24 ${DRIVE_Y}H76`} />
        <path className="bench-adapter" d={`M${DRIVE_X} ${DRIVE_Y}L${x} ${y}`} />
        <rect className="bench-hull" x={DRIVE_X - 9} y={DRIVE_Y - 9} width="18" height="18" />
        <path className="bench-point" d={hexagon(x, y, 13)} />
        <path className="bench-hair" d={`M50 ${DRIVE_Y + 14}V144M${DRIVE_X} ${DRIVE_Y + 14}V144M50 138H${DRIVE_X}`} />
        <text className="bench-lab" x={(50 + DRIVE_X) / 2} y="160" textAnchor="middle">
          {wrench}
        </text>
        <text className="bench-lab" x={Math.min(330, Math.max(DRIVE_X + 18, x + 20))} y={Math.max(18, y - 18)}>
          {adapter}
        </text>
      </svg>
      <figcaption>Measured from the middle of the handle to the drive, and from the drive to the fastener.</figcaption>
    </figure>
  );
}

const hexagon = (x: number, y: number, size: number): string =>
  `${Array.from({ length: 6 }, (_, i) => {
    const at = (Math.PI / 3) * i;
    return `${i ? "L" : "M"}${r(x + size * Math.cos(at))} ${r(y + size * Math.sin(at))}`;
  }).join("")}Z`;
