import type { SupportKind } from '@/engine/model/index';
import { groundHatch } from '../geometry/hatch';
import { spiralPath } from './paths';

/** Where a support meets the member: `underside` and `centre` are y; `end` is the end of the beam it stands at. */
export type Seat = {
  x: number;
  top: number;
  centre: number;
  underside: number;
  end: 'left' | 'right' | null;
  scale: number;
  /** A wall's thickness, and how far it reaches beyond the member on either side. */
  wall?: { thick: number; beyond: number } | undefined;
};

function Ground({ x, y, scale }: { x: number; y: number; scale: number }) {
  const half = 15 * scale;
  return (
    <>
      <path className="medium" d={`M${x - half} ${y}h${2 * half}`} />
      <path className="ground" d={groundHatch(x - half, y, 2 * half, 6 * scale)} />
    </>
  );
}

function Pin({ x, underside: y, scale: k }: Seat) {
  return (
    <>
      <path className="medium on-paper" d={`M${x} ${y}l${9 * k} ${14 * k}h${-18 * k}z`} />
      <Ground x={x} y={y + 14 * k} scale={k} />
    </>
  );
}

function Roller({ x, underside: y, scale: k }: Seat) {
  const wheel = { cy: y + 14.6 * k, r: 2.4 * k, className: 'thin on-paper' };
  return (
    <>
      <path className="medium on-paper" d={`M${x} ${y}l${9 * k} ${12 * k}h${-18 * k}z`} />
      <circle cx={x - 5 * k} {...wheel} />
      <circle cx={x + 5 * k} {...wheel} />
      <Ground x={x} y={y + 17.4 * k} scale={k} />
    </>
  );
}

/** Elastic support: a zigzag on ground. */
function Zigzag({ x, underside: y, scale: k }: Seat) {
  const turns = `v${3 * k}l${6 * k} ${2.5 * k}l${-12 * k} ${4 * k}l${12 * k} ${4 * k}l${-12 * k} ${4 * k}l${6 * k} ${2.5 * k}v${3 * k}`;
  return (
    <>
      <path className="medium" d={`M${x} ${y}${turns}`} />
      <Ground x={x} y={y + 23 * k} scale={k} />
    </>
  );
}

/** Fixed: a wall face with the member built into it; inside the beam, a wall that it passes through. */
function Wall({ x, top, centre, underside, end, scale: k, wall }: Seat) {
  const reach = (underside - top) / 2 + (wall?.beyond ?? 26 * k);
  const thick = wall?.thick ?? 26 * k;
  const left = end === 'left' ? x - thick : end === 'right' ? x : x - thick / 2;
  const high = centre - reach;
  const height = top - high;
  const faces = end ? [x] : [left, left + thick];
  return (
    <>
      <path
        className="ground"
        d={groundHatch(left, high, thick, height) + groundHatch(left, underside, thick, height)}
      />
      <path
        className="frame-line"
        d={faces.map((face) => `M${face} ${high}V${top}M${face} ${underside}v${height}`).join('')}
      />
      {end && <path className="fine" d={`M${end === 'left' ? left : left + thick} ${high}v${2 * reach}`} />}
    </>
  );
}

/** Guided: free to move across the member, held against turning: a wall on rollers. */
function Guided({ x, top, centre, underside, end, scale: k }: Seat) {
  const out = end === 'left' ? -1 : 1;
  const reach = (underside - top) / 2 + 10 * k;
  const face = x + out * 9 * k;
  const thick = 12 * k;
  const wheel = { cx: x + out * 4.5 * k, r: 3 * k, className: 'thin on-paper' };
  return (
    <>
      <path
        className="frame-line"
        d={`M${x} ${centre - reach}v${2 * reach}M${face} ${centre - reach}v${2 * reach}`}
      />
      <circle cy={centre - reach / 2} {...wheel} />
      <circle cy={centre + reach / 2} {...wheel} />
      <path
        className="ground"
        d={groundHatch(out < 0 ? face - thick : face, centre - reach, thick, 2 * reach)}
      />
    </>
  );
}

/** Rotational spring: a spiral from the member to a wall; at an end it stands clear of what the end carries. */
function Spiral({ x, centre, end, scale: k }: Seat) {
  const out = end === 'left' ? -1 : 1;
  const hub = end ? x + out * 10 * k : x;
  const face = hub + out * 13 * k;
  const thick = 7 * k;
  return (
    <>
      <path className="medium" d={spiralPath(hub, centre, out * 9 * k)} />
      <path
        className="medium"
        d={`M${x} ${centre}H${hub}M${hub + out * 9 * k} ${centre}H${face}M${face} ${centre - 10 * k}v${20 * k}`}
      />
      <path
        className="ground"
        d={groundHatch(out < 0 ? face - thick : face, centre - 10 * k, thick, 20 * k)}
      />
    </>
  );
}

/** What decides the symbol: the kind, and springs where it leaves a movement free. */
export type Held = { kind: SupportKind; vertical: { kind: string }; rotation: { kind: string } };

/** The symbol of a support as the model holds it; nothing for a free end. */
export function SupportMark({ support, seat }: { support: Held; seat: Seat }) {
  const { kind, vertical, rotation } = support;
  return (
    <>
      {kind === 'fixed' && <Wall {...seat} />}
      {kind === 'guided' && <Guided {...seat} />}
      {kind === 'pin' && <Pin {...seat} />}
      {kind === 'roller' && <Roller {...seat} />}
      {vertical.kind === 'spring' && <Zigzag {...seat} />}
      {rotation.kind === 'spring' && <Spiral {...seat} />}
    </>
  );
}
