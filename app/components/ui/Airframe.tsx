import { bladePath } from "#app/components/ui/bladePath";

interface AirframeProps {
  gear: "nose" | "tail";
  pusher: boolean;
}

const TRACTOR =
  "M-8-96C-16-84-20-60-20-36L-22-22-196-12V14L-22 24C-20 60-14 96-9 118L-62 126V144L-6 142 0 152 6 142 62 144V126L9 118C14 96 20 60 22 24L196 14V-12L22-22 20-36C20-60 16-84 8-96Z";
const PUSHER =
  "M0-128C-10-120-14-104-15-90L-74-86V-70L-17-68C-20-40-22-10-22 20L-196 52V76L-22 78-12 98H12L22 78 196 76V52L22 20C22-10 20-40 17-68L74-70V-86L15-90C14-104 10-120 0-128Z";
const BLADE = bladePath(56, 13);

/** Outline from above, nose up, with wheels, straps and the propeller's arc. A group for use inside an svg. */
export function Airframe({ gear, pusher }: AirframeProps) {
  const hub = pusher ? 104 : -98;
  const third = gear === "nose" ? (pusher ? -104 : -66) : pusher ? 84 : 132;
  return (
    <>
      <circle className="plan-arc" cy={hub} r="62" />
      <path className="airframe" d={pusher ? PUSHER : TRACTOR} />
      <path
        className="airframe-canopy"
        d={pusher ? "M-12-44C-10-58 10-58 12-44L14-4C8 2-8 2-14-4Z" : "M-14-30C-12-44 12-44 14-30L16 6C8 12-8 12-16 6Z"}
      />
      <path className="airframe-wheel" d={`M-46 ${pusher ? 34 : 2}v14M46 ${pusher ? 34 : 2}v14M0 ${third}v9`} />
      <g className="airframe-propeller" transform={`translate(0 ${hub}) rotate(74)`}>
        <path d={BLADE} />
        <path transform="rotate(180)" d={BLADE} />
        <circle r="7" />
      </g>
      <g className="plan-strap">
        <path d="M-44 16-96 84M44 16 96 84" />
        <path d="M-102 78l12 12M-90 78l-12 12M90 78l12 12M102 78l-12 12" />
        {!pusher && <path d="M0 146V166M-6 160l12 12M6 160l-12 12" />}
      </g>
    </>
  );
}
