import { type KeyboardEvent, type PointerEvent, useMemo } from 'react';
import { flushSync } from 'react-dom';
import { type DrawingFormat, figure } from '../format';
import { textWidth } from '../geometry/text-width';
import { ticksPath } from '../marks/paths';
import type { DiagramLayout } from './diagram-layout';
import type { Figure } from './figures';
import { type Frame, xOf } from './frame';
import { plumbPath } from './plumb-path';
import { readingsAt } from './readings';
import type { StripLayout } from './strip-layout';
import { stationAt, stationByKey } from './use-plumb';

type Props = {
  frame: Frame;
  format: DrawingFormat;
  layout: StripLayout;
  height: number;
  x: number;
  from: string;
  /** Values that stand on the elevation, and are not crossed. */
  values: readonly Figure[];
  onMove: (x: number) => void;
};

function Readings({
  frame,
  format,
  diagram,
  x,
}: {
  frame: Frame;
  format: DrawingFormat;
  diagram: DiagramLayout;
  x: number;
}) {
  const readings = readingsAt(diagram, x, format);
  const right = frame.width - 14;
  if (frame.mode === 'phone') {
    const unit = readings.length > 1 ? '' : ` ${readings[0]?.note.split(', ').at(-1)}`;
    return (
      <text
        x={right}
        y={diagram.top + 17}
        textAnchor="end"
        className={`reading-inline text-${diagram.quantity}`}
      >
        {readings.map(({ text }) => text).join('  to  ')}
        {unit}
      </text>
    );
  }
  const middle = (diagram.plotTop + diagram.bottom) / 2;
  const small = readings.length > 1 || (readings[0]?.text.includes('/') ?? false);
  return readings.map(({ text, note }, i) => {
    const y = readings.length > 1 ? middle - 10 + i * 32 : middle + 2;
    return (
      <g key={note}>
        <text
          x={right}
          y={y}
          textAnchor="end"
          className={`reading${small ? ' small-reading' : ''} text-${diagram.quantity}`}
        >
          {text}
        </text>
        <text x={right} y={y + (readings.length > 1 ? 13 : 17)} textAnchor="end" className="note">
          {note}
        </text>
      </g>
    );
  });
}

/** The chosen station, dimensioned from the left end. */
function Chosen({ frame, y, at, text }: { frame: Frame; y: number; at: number; text: string }) {
  const width = textWidth(text, 13, 600) + 10;
  const middle = Math.max(4 + width / 2, (frame.x0 + at) / 2);
  return (
    <>
      <path className="selection" d={`M${frame.x0} ${y}H${at}`} />
      <path className="selection-tick" d={ticksPath([frame.x0, at], y)} />
      <rect x={middle - width / 2} y={y - 8} width={width} height={16} className="paper" />
      <text x={middle} y={y + 4.5} textAnchor="middle" className="plumb-text">
        {text}
      </text>
    </>
  );
}

function Rings({ frame, format, layout, x }: Pick<Props, 'frame' | 'format' | 'layout' | 'x'>) {
  const at = xOf(frame, x);
  return layout.diagrams.map((diagram) => {
    const marks = readingsAt(diagram, x, format).flatMap(({ y }) => y);
    return (
      <g key={diagram.quantity}>
        <path className="ordinate" d={marks.map((y) => `M${at} ${diagram.base}V${y}`).join('')} />
        {marks.map((y) => (
          <circle key={y} cx={at} cy={y} r={4} className={`ring-${diagram.quantity}`} />
        ))}
      </g>
    );
  });
}

/** Dragging and keys; the drawing's place on the page is read in the event, never while rendering. */
function handlersOf({ frame, format, x, onMove }: Props) {
  const toMetres = (px: number) => (px - frame.x0) / frame.perMetre;
  // In this frame: what is only scheduled would be painted with the next one.
  const drag = (event: PointerEvent<SVGElement>) =>
    flushSync(() => onMove(stationAt(event, toMetres, frame.width)));
  return {
    onPointerDown(event: PointerEvent<SVGElement>) {
      event.currentTarget.setPointerCapture(event.pointerId);
      drag(event);
    },
    onPointerMove(event: PointerEvent<SVGElement>) {
      if (event.currentTarget.hasPointerCapture(event.pointerId)) drag(event);
    },
    onKeyDown(event: KeyboardEvent) {
      const next = stationByKey(event, x, frame.length, format.station);
      if (next === null || event.ctrlKey || event.metaKey || event.altKey) return;
      event.preventDefault();
      onMove(next);
    },
  };
}

/** The one line through all strips: a handle, a ring on each curve, its reading and the distance from the left end. */
export function PlumbLine(props: Props) {
  const { frame, format, layout, height, x, from, values } = props;
  const at = xOf(frame, x);
  const phone = frame.mode === 'phone';
  const text = `x = ${figure(format, 'length', x)}`;
  const handle = phone ? 8 : 18;
  const texts = useMemo(
    () => [...values, ...layout.elevation.figures, ...layout.diagrams.flatMap(({ labels }) => labels)],
    [layout, values],
  );
  const line = plumbPath(
    at,
    [
      [handle + 12, layout.elevation.height],
      [layout.from, layout.to + 24],
    ],
    texts,
  );
  return (
    <>
      {!phone && (
        <>
          <text x={frame.width - 14} y={18} textAnchor="end" className="note">
            Reading at plumb line
          </text>
          <text x={frame.width - 14} y={36} textAnchor="end" className="plumb-text">
            {text}
          </text>
        </>
      )}
      <Chosen frame={frame} y={layout.to + (phone ? 34 : 36)} at={at} text={text} />
      <g
        className="plumb"
        role="slider"
        tabIndex={0}
        aria-label="Plumb line"
        aria-orientation="horizontal"
        aria-valuemin={0}
        aria-valuemax={Number(frame.length.toFixed(3))}
        aria-valuenow={Number(x.toFixed(3))}
        aria-valuetext={`${figure(format, 'length', x)} from ${from}`}
        {...handlersOf(props)}
      >
        <path className="plumb-line" d={line} />
        <path className="plumb-bob" d={`M${at - 7} ${handle}h14v9l-7 8l-7 -8z`} />
        <Rings {...props} />
        <rect x={at - 22} y={0} width={44} height={height} className="grip" />
      </g>
      {layout.diagrams.map((diagram) => (
        <Readings key={diagram.quantity} frame={frame} format={format} diagram={diagram} x={x} />
      ))}
    </>
  );
}
