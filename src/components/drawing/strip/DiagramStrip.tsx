import { memo } from 'react';
import type { Beam } from '@/engine/model/index';
import type { DrawingFormat } from '../format';
import { textWidth } from '../geometry/text-width';
import { namedSupports } from '../names';
import type { Quantity } from '../signs';
import { type DiagramLayout, PURPOSE, SYMBOL, TITLE } from './diagram-layout';
import { type Frame, xOf } from './frame';

function Gutter({
  quantity,
  top,
  plotTop,
  notes,
  frame,
  format,
}: Pick<DiagramLayout, 'quantity' | 'top' | 'plotTop' | 'notes'> & { frame: Frame; format: DrawingFormat }) {
  const unit = format.unit(PURPOSE[quantity]);
  if (frame.mode === 'phone') {
    return (
      <>
        <text x={14} y={top + 17} className="strip-name">{`${TITLE[quantity]}, ${unit}`}</text>
        <path className={`curve-${quantity}`} d={`M122 ${top + 12.5}h26`} />
      </>
    );
  }
  const left = frame.mode === 'print' ? 10 : 14;
  return (
    <>
      <text x={left} y={plotTop + 22} className="strip-name">
        {TITLE[quantity]}
      </text>
      <text x={left} y={plotTop + 39} className="note">{`${SYMBOL[quantity]}, ${unit}`}</text>
      <path className={`curve-${quantity}`} d={`M${left} ${plotTop + 50.5}h34`} />
      {notes.map((note, i) => (
        <text key={note} x={left} y={plotTop + 66 + i * frame.notePitch} className="note">
          {note}
        </text>
      ))}
    </>
  );
}

type Props = { beam: Beam; frame: Frame; format: DrawingFormat; layout: DiagramLayout };

/** One diagram over the shared x axis: hatch, baseline, curve, dots and labels. */
export const DiagramStrip = memo(function DiagramStrip({ beam, frame, format, layout }: Props) {
  const { quantity, base, bottom } = layout;
  const moves = quantity === 'slope' || quantity === 'deflection';
  return (
    <g>
      {layout.hatch !== '' && <path className={`hatch-${quantity}`} d={layout.hatch} />}
      <path className="thin" d={`M${frame.x0 - 8} ${base}H${frame.x1 + 8}`} />
      {layout.lines.map((line) => (
        <path key={line} className={`curve-${quantity}`} d={line} />
      ))}
      {moves &&
        namedSupports(beam).map(({ letter, support }) => (
          <circle key={letter} cx={xOf(frame, support.at)} cy={base} r={2.4} className="thin on-paper" />
        ))}
      {layout.dots.map(([x, y]) => (
        <circle key={`${x} ${y}`} cx={x} cy={y} r={2.8} className={`dot-${quantity}`} />
      ))}
      {layout.labels.map(({ x, y, anchor, text, leader, from }) => (
        <g key={text}>
          {leader && <path className="leader" d={`M${from[0]} ${from[1]}L${leader[0]} ${leader[1]}`} />}
          <text x={x} y={y} textAnchor={anchor} className={`peak text-${quantity}`}>
            {text}
          </text>
        </g>
      ))}
      <Gutter {...layout} frame={frame} format={format} />
      <path className="strip-rule" d={`M0 ${bottom}H${frame.width}`} />
    </g>
  );
});

/** A strip without a result keeps its name and its baseline, and one of them says why. */
export function EmptyStrip({
  quantity,
  frame,
  top,
  bottom,
  message,
}: {
  quantity: Quantity;
  frame: Frame;
  top: number;
  bottom: number;
  message: string | undefined;
}) {
  const phone = frame.mode === 'phone';
  const base = phone ? (top + frame.head + bottom) / 2 : (top + bottom) / 2;
  const middle = (frame.x0 + frame.x1) / 2;
  const gap = message ? textWidth(message, 13.5) / 2 + 8 : 0;
  const baseline = `M${frame.x0} ${base}H${middle - gap}M${middle + gap} ${base}H${frame.x1}`;
  return (
    <g>
      <path className="medium-rule" d={baseline} />
      <text x={frame.mode === 'print' ? 10 : 14} y={phone ? top + 17 : base + 4} className="strip-name">
        {TITLE[quantity]}
      </text>
      {message && (
        <text x={middle} y={base + 4} textAnchor="middle" className="figure not-drawn">
          {message}
        </text>
      )}
      <path className="strip-rule" d={`M0 ${bottom}H${frame.width}`} />
    </g>
  );
}
