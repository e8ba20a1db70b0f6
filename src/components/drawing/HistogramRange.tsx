import { type KeyboardEvent, type PointerEvent, useMemo, useRef } from 'react';
import { roundStep } from '@/lib/round-step';
import { hatchOf, rectangle } from './geometry/hatch';
import { type Bins, type Cursor, keyedRange, movedTo, type Range } from './histogram/histogram';
import { ticksPath } from './marks/paths';
import { plumbPath } from './strip/plumb-path';
import { useWidth } from './use-width';

export type HistogramRangeProps = {
  /** In the unit that is shown. */
  bins: Bins;
  /** Rows by bin: all of them, and those that meet every range. */
  all: readonly number[];
  meeting: readonly number[];
  /** Rows between the cursors. */
  count: number;
  range: Range;
  onRange: (range: Range) => void;
  step: number;
  /** "depth": the cursors are "Least depth" and "Greatest depth". */
  name: string;
  unit: string;
  /** "in this depth": follows the count between the cursors. */
  within: string;
};

const HEIGHT = 134;
const BASE = 74;
const TALLEST = 60;
const MARGIN = 14;
const LINE = BASE + 37;
/** The baseline of the axis's figures. */
const FIGURES = BASE + 17;

const stopText = (stop: number): string => String(Number(stop.toPrecision(6)));

type Scale = { toX: (value: number) => number; toValue: (x: number) => number; width: number };

function scaleOf({ from, to }: Bins, width: number): Scale {
  const perUnit = (width - 2 * MARGIN) / (to - from);
  return {
    toX: (value) => MARGIN + (value - from) * perUnit,
    toValue: (x) => from + (x - MARGIN) / perUnit,
    width,
  };
}

function Bars({
  all,
  meeting,
  bins,
  scale: { toX },
}: Pick<HistogramRangeProps, 'all' | 'meeting' | 'bins'> & { scale: Scale }) {
  const perRow = TALLEST / Math.max(1, ...all);
  const box = (count: number, i: number) => {
    const left = toX(bins.from + i * bins.bin) + 1;
    const width = Math.max(1, toX(bins.from + (i + 1) * bins.bin) - left - 1);
    return { left, width, top: BASE - count * perRow, height: count * perRow };
  };
  const outline = (counts: readonly number[]) =>
    counts.map((count, i) => {
      const { left, width, height } = box(count, i);
      return count === 0 ? '' : `M${left} ${BASE}v${-height}h${width}v${height}`;
    });
  const hatch = meeting.map((count, i) => {
    const { left, width, top, height } = box(count, i);
    return count === 0 ? '' : hatchOf(rectangle(left, top, width, height), -45, 5);
  });
  return (
    <>
      <path className="medium-rule" d={outline(all).join('')} />
      <path className="chosen-hatch" d={hatch.join('')} />
      <path className="chosen-bar" d={outline(meeting).join('')} />
    </>
  );
}

function stopsOf({ from, to }: Bins, width: number): number[] {
  const step = roundStep((44 * (to - from)) / (width - 2 * MARGIN));
  const first = Math.ceil(from / step);
  return Array.from({ length: Math.floor(to / step) - first + 1 }, (_, i) => (first + i) * step);
}

function Axis({ bins, scale: { toX, width } }: { bins: Bins; scale: Scale }) {
  const stops = stopsOf(bins, width);
  return (
    <>
      <path className="thin" d={`M${MARGIN} ${BASE}H${width - MARGIN}`} />
      <path className="fine" d={stops.map((stop) => `M${toX(stop)} ${BASE}v5`).join('')} />
      {stops.map((stop) => (
        <text key={stop} x={toX(stop)} y={FIGURES} textAnchor="middle" className="axis">
          {stopText(stop)}
        </text>
      ))}
    </>
  );
}

function CursorMark({ cursor, scale, ...props }: HistogramRangeProps & { cursor: Cursor; scale: Scale }) {
  const { range, bins, step, name, unit, onRange } = props;
  const value = range[cursor];
  const x = scale.toX(value);
  const figures = stopsOf(bins, scale.width).map((stop) => ({
    x: scale.toX(stop),
    y: FIGURES,
    text: stopText(stop),
    anchor: 'middle' as const,
  }));
  const drag = (event: PointerEvent<SVGElement>) => {
    const box = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
    if (!box || box.width === 0) return;
    const at = ((event.clientX - box.left) * scale.width) / box.width;
    onRange(movedTo(range, cursor, scale.toValue(at), bins, step));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    const next = keyedRange(event, range, cursor, bins, step);
    if (!next) return;
    event.preventDefault();
    onRange(next);
  };
  return (
    <g
      className="plumb"
      role="slider"
      tabIndex={0}
      aria-label={`${cursor === 'low' ? 'Least' : 'Greatest'} ${name}`}
      aria-valuemin={cursor === 'low' ? bins.from : range.low}
      aria-valuemax={cursor === 'low' ? range.high : bins.to}
      aria-valuenow={value}
      aria-valuetext={`${value} ${unit}`}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        drag(event);
      }}
      onPointerMove={(event) => event.currentTarget.hasPointerCapture(event.pointerId) && drag(event)}
      onKeyDown={onKeyDown}
    >
      <path className="plumb-line" d={plumbPath(x, [[12, LINE]], figures)} />
      <path className="plumb-bob" d={`M${x - 7} 4h14v8l-7 7l-7 -7z`} />
      {/* Each grip reaches away from the other cursor, so that both can be taken hold of where they stand close. */}
      <rect x={cursor === 'low' ? x - 22 : x - 6} y={0} width={28} height={HEIGHT} className="grip" />
    </g>
  );
}

/** A column's histogram: rows that meet every range are hatched, and two cursors set the range of this one. */
export function HistogramRange(props: HistogramRangeProps) {
  const { all, meeting, count, bins, range, name, unit, within } = props;
  const host = useRef<HTMLDivElement>(null);
  const width = useWidth(host, 420);
  const scale = useMemo(() => scaleOf(bins, width), [bins, width]);
  const [low, high] = [scale.toX(range.low), scale.toX(range.high)];
  const bars = useMemo(
    () => <Bars all={all} meeting={meeting} bins={bins} scale={scale} />,
    [all, meeting, bins, scale],
  );
  const met = meeting.reduce((sum, rows) => sum + rows, 0);
  return (
    <div ref={host}>
      <svg className="drawing" viewBox={`0 0 ${width} ${HEIGHT}`}>
        <title>{`${name}, ${unit}: ${count} ${within}, ${met} of them meet every range`}</title>
        {bars}
        <Axis bins={bins} scale={scale} />
        <path className="selection" d={`M${low} ${LINE}H${high}`} />
        <path className="selection-tick" d={ticksPath([low, high], LINE)} />
        <text
          x={Math.min(Math.max((low + high) / 2, 60), width - 60)}
          y={LINE + 18}
          textAnchor="middle"
          className="plumb-text"
        >
          {`${count} ${within}`}
        </text>
        <CursorMark {...props} cursor="low" scale={scale} />
        <CursorMark {...props} cursor="high" scale={scale} />
      </svg>
    </div>
  );
}
