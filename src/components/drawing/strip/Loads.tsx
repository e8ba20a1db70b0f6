import { arrowPath, combPaths, turnPaths } from '../marks/paths';
import type { Frame } from './frame';
import type { LoadLayout } from './load-layout';

export function Turn({
  x,
  y,
  radius,
  clockwise,
  className,
}: {
  x: number;
  y: number;
  radius: number;
  clockwise: boolean;
  className: string;
}) {
  const { arc, head } = turnPaths(x, y, radius, clockwise);
  return (
    <>
      <path className={`${className} arc`} d={arc} />
      <path className={`${className} head`} d={head} />
    </>
  );
}

/** The loads above the member whose top is at y = top. */
export function Loads({
  loads,
  frame,
  top,
  centre,
}: {
  loads: LoadLayout;
  frame: Frame;
  top: number;
  centre: number;
}) {
  const step = frame.mode === 'phone' ? 15 : 22;
  return (
    <>
      {loads.combs.map(({ x1, x2, rise, tall1, tall2, upward }) => {
        const { arrows, cap } = combPaths([x1, x2], top - rise, [tall1, tall2], { step, upward });
        const sense = upward ? ' upward' : '';
        return (
          <g key={`${x1} ${x2} ${rise}`}>
            <path className={`load${sense}`} d={arrows} />
            <path className={`load-cap${sense}`} d={cap} />
          </g>
        );
      })}
      {loads.curvatures.map(({ x1, x2, rise, sagging }) => (
        <path
          key={`${x1} ${x2} ${rise}`}
          className="medium upward"
          d={`M${x1} ${top - rise}Q${(x1 + x2) / 2} ${top - rise + (sagging ? 9 : -9)} ${x2} ${top - rise}`}
        />
      ))}
      {loads.points.map(({ x, tall, upward }) => (
        <path
          key={`${x} ${tall}`}
          className={`load-point${upward ? ' upward' : ''}`}
          d={
            upward
              ? arrowPath(x, top - 2, x, top - tall, 10, 2.6)
              : arrowPath(x, top - tall, x, top - 2, 10, 2.6)
          }
        />
      ))}
      {loads.couples.map(({ x, clockwise, leader }) => (
        <g key={`${x} ${leader}`}>
          <path className="fine" d={`M${x} ${top - leader}V${top - 14}`} />
          <Turn
            x={x}
            y={centre}
            radius={Math.round(centre - top + 12)}
            clockwise={clockwise}
            className="load-couple"
          />
        </g>
      ))}
    </>
  );
}
