import { memo } from 'react';
import type { Beam, LetteredSupport } from '@/engine/model/index';
import { type DrawingFormat, figure } from '../format';
import { Bubble } from '../marks/Bubble';
import { Dimension } from '../marks/Dimension';
import { arrowPath } from '../marks/paths';
import { type Seat, SupportMark } from '../marks/Supports';
import { namedSupports } from '../names';
import { forceArrow } from '../signs';
import type { ElevationLayout, ReactionMark } from './elevation-layout';
import { FigureText } from './FigureText';
import { type Frame, xOf } from './frame';
import { Loads } from './Loads';
import { ReactionLines, Reactions } from './Reactions';

/** A point where the member is held sideways, and the flange it is held by. */
export type SidewaysRestraint = { at: number; flange: 'top' | 'bottom' | 'both' };

type Props = {
  beam: Beam;
  frame: Frame;
  layout: ElevationLayout;
  marks: readonly ReactionMark[];
  format: DrawingFormat;
  restraints: readonly SidewaysRestraint[];
  /** Figures that open an input are drawn above the drawing, and left out here. */
  figuresOpen: boolean;
};

const endOf = (at: number, length: number): Seat['end'] =>
  at < length * 1e-6 ? 'left' : at > length * (1 - 1e-6) ? 'right' : null;

function Member({
  beam,
  frame,
  layout,
  restraints,
}: Pick<Props, 'beam' | 'frame' | 'layout' | 'restraints'>) {
  const { top, bottom, centre } = layout;
  const builtIn = (end: 'left' | 'right') =>
    beam.supports.some(({ kind, at }) => kind === 'fixed' && endOf(at, beam.length) === end) ? 10 : 0;
  const [left, right] = [frame.x0 - builtIn('left'), frame.x1 + builtIn('right')];
  const depth = bottom - top;
  const flange = Math.max(2, Math.min(4, depth * 0.09));
  const steps = beam.segments.slice(1).map(({ from }) => `M${xOf(frame, from)} ${top}v${depth}`);
  const cross = (x: number, y: number) => `M${x - 3.5} ${y - 3.5}l7 7M${x - 3.5} ${y + 3.5}l7 -7`;
  return (
    <>
      <rect x={left} y={top} width={right - left} height={depth} className="member" />
      {depth > 12 && (
        <path
          className="fine"
          d={`M${frame.x0} ${top + flange}H${frame.x1}M${frame.x0} ${bottom - flange}H${frame.x1}`}
        />
      )}
      {depth > 12 && <path className="centre-line" d={`M${frame.x0 - 26} ${centre}H${frame.x1 + 26}`} />}
      {steps.length > 0 && <path className="thin" d={steps.join('')} />}
      {restraints.length > 0 && (
        <path
          className="medium"
          d={restraints
            .map(({ at, flange: side }) => {
              const x = xOf(frame, at);
              return (side === 'bottom' ? '' : cross(x, top)) + (side === 'top' ? '' : cross(x, bottom));
            })
            .join('')}
        />
      )}
    </>
  );
}

function Movement({
  named,
  x,
  y,
  inward,
  format,
}: {
  named: LetteredSupport;
  x: number;
  y: number;
  /** Towards the member, where its right end leaves no room for words. */
  inward: boolean;
  format: DrawingFormat;
}) {
  const { vertical, rotation } = named.support;
  const rise = vertical.kind === 'free' ? 0 : vertical.movement;
  const turn = rotation.kind === 'free' ? 0 : rotation.movement;
  const words = [
    rise === 0 ? [] : [`${figure(format, 'deflection', Math.abs(rise))} ${forceArrow(rise).points}`],
    turn === 0
      ? []
      : [`${figure(format, 'slope', Math.abs(turn))} ${turn > 0 ? 'anticlockwise' : 'clockwise'}`],
  ].flat();
  if (words.length === 0) return null;
  const down = rise < 0;
  return (
    <>
      {rise !== 0 && (
        <path className="load-point" d={arrowPath(x, down ? y : y + 18, x, down ? y + 18 : y, 7, 2)} />
      )}
      <text x={inward ? x - 8 : x + 8} y={y + 14} textAnchor={inward ? 'end' : 'start'} className="figure">
        {words.join(', ')}
      </text>
    </>
  );
}

function SupportPlace({
  named,
  frame,
  layout,
  beam,
  format,
}: { named: LetteredSupport } & Pick<Props, 'frame' | 'layout' | 'beam' | 'format'>) {
  const { support, letter } = named;
  const end = endOf(support.at, beam.length);
  const x = xOf(frame, support.at);
  const phone = frame.mode === 'phone';
  const seat: Seat = {
    x,
    top: layout.top,
    centre: layout.centre,
    underside: layout.bottom,
    end,
    scale: frame.supportScale,
  };
  const bubbleX =
    end === 'left'
      ? x - frame.bubble[0]
      : end === 'right'
        ? x + frame.bubble[1]
        : x + 30 * frame.supportScale;
  const onAxis =
    end !== null && (support.kind === 'fixed' || support.kind === 'guided' || support.kind === 'free');
  return (
    <>
      <SupportMark support={support} seat={seat} />
      <Bubble
        x={bubbleX}
        y={onAxis ? layout.centre : layout.bottom + 12}
        letter={letter}
        radius={phone ? 8.5 : 10}
      />
      <Movement
        named={named}
        x={x}
        y={layout.bottom + (support.kind === 'fixed' ? 32 : 36) * frame.supportScale}
        inward={end === 'right'}
        format={format}
      />
    </>
  );
}

/** The member to scale, with supports, loads, reactions and dimensions. */
export const Elevation = memo(function Elevation(props: Props) {
  const { beam, frame, layout, marks, figuresOpen } = props;
  return (
    <g>
      {layout.dimensions.map((row) => (
        <Dimension key={row.y} {...row} />
      ))}
      <Member {...props} />
      {namedSupports(beam).map((named) => (
        <SupportPlace key={named.index} named={named} {...props} />
      ))}
      {beam.hinges.map((at) => (
        <circle key={at} cx={xOf(frame, at)} cy={layout.centre} r={4.5} className="hinge" />
      ))}
      <Loads loads={layout.loads} frame={frame} top={layout.top} centre={layout.centre} />
      {frame.mode === 'phone' ? (
        layout.reactionHeight > 0 && <ReactionLines frame={frame} layout={layout} marks={marks} />
      ) : (
        <Reactions beam={beam} frame={frame} layout={layout} marks={marks} />
      )}
      {layout.figures
        .filter(({ edits }) => !(figuresOpen && edits !== undefined))
        .map((each) => (
          <FigureText key={`${each.x} ${each.y}`} figure={each} />
        ))}
    </g>
  );
});
