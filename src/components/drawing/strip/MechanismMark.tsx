import type { Beam, DisplacedShape } from '@/engine/model/index';
import { arrowPath, cloudPath } from '../marks/paths';
import { holds } from '../names';
import { displacedPath } from '../schematic/displaced';
import { type ElevationLayout, MECHANISM_REACH } from './elevation-layout';
import { type Frame, xOf } from './frame';

type Props = {
  beam: Pick<Beam, 'length' | 'supports'>;
  frame: Frame;
  layout: ElevationLayout;
  motion: DisplacedShape | null;
};

function LooseEnd({
  x,
  layout,
  side,
  phone,
}: {
  x: number;
  layout: ElevationLayout;
  side: -1 | 1;
  phone: boolean;
}) {
  return (
    <>
      <path className="cloud" d={cloudPath(x - 34, layout.centre - 31, 68, 62)} />
      <text
        x={x + side * (phone ? 30 : 10)}
        y={layout.centre + 52}
        textAnchor={side < 0 === phone ? 'start' : 'end'}
        className="error-text"
      >
        no support
      </text>
    </>
  );
}

/** The movement that nothing stops, dashed over the member, and clouds at the ends that move without a support. */
export function MechanismMark({ beam, frame, layout, motion }: Props) {
  const { top, bottom, centre } = layout;
  const toX = (metres: number) => xOf(frame, metres);
  if (!motion) {
    const middle = (frame.x0 + frame.x1) / 2;
    return (
      <path
        className="error-arrow"
        d={arrowPath(middle - 40, bottom + 20, middle + 40, bottom + 20, 10, 3)}
      />
    );
  }
  const phone = frame.mode === 'phone';
  const edge = (y: number) => displacedPath(motion, toX, y, MECHANISM_REACH);
  const most = motion.reduce((far, corner) =>
    Math.abs(corner.deflection) > Math.abs(far.deflection) ? corner : far,
  );
  const rightOfMiddle = most.x > beam.length / 2;
  const loose = (at: number) =>
    motion.some(({ x, deflection }) => x === at && deflection !== 0) &&
    !beam.supports.some((support) => support.at === at && holds(support));
  return (
    <>
      <path className="error-line" d={edge(top) + edge(bottom)} />
      <path className="error-line heavy" d={edge(centre)} />
      <text
        x={toX(most.x) + (rightOfMiddle ? -60 : 60)}
        y={bottom + MECHANISM_REACH + 12}
        textAnchor={rightOfMiddle ? 'end' : 'start'}
        className="error-text"
      >
        moves this way
      </text>
      {loose(0) && <LooseEnd x={frame.x0} layout={layout} side={-1} phone={phone} />}
      {loose(beam.length) && <LooseEnd x={frame.x1} layout={layout} side={1} phone={phone} />}
    </>
  );
}
