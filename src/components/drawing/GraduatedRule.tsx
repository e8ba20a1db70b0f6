import { type KeyboardEvent, type PointerEvent, useMemo } from 'react';
import { firstRowAt, graduationsOf, rowY } from './histogram/graduations';

export type GraduatedRuleProps = {
  rows: number;
  /** The sort column in the schedule's order and the unit shown: of every row, or of rows evenly spaced. */
  column: readonly number[];
  unit: string;
  /** The rows in view. */
  first: number;
  size: number;
  height: number;
  /** The id of the schedule that it scrolls. */
  controls: string;
  onFirst: (row: number) => void;
};

const WIDTH = 62;
const HEAD = 50;
const FOOT = 14;

function rowByKey(key: string, first: number, size: number, rows: number): number | null {
  const last = Math.max(0, rows - size);
  const moves: Record<string, number> = {
    ArrowUp: first - 1,
    ArrowDown: first + 1,
    PageUp: first - size,
    PageDown: first + size,
    Home: 0,
    End: last,
  };
  const moved = moves[key];
  return moved === undefined ? null : Math.max(0, Math.min(last, moved));
}

/** The scroll bar of a sorted schedule, as a scale of the sort column; the ochre block is the window. */
export function GraduatedRule(props: GraduatedRuleProps) {
  const { rows, column, unit, first, size, height, controls, onFirst } = props;
  const [top, bottom] = [HEAD, Math.max(HEAD + 40, height - FOOT)];
  const { ticks, marks } = useMemo(() => graduationsOf(column, top, bottom), [column, top, bottom]);
  const [from, to] = [
    rowY(first, rows, top, bottom),
    rowY(Math.min(rows, first + size) - 1, rows, top, bottom),
  ];
  const drag = (event: PointerEvent<HTMLElement>) => {
    const box = event.currentTarget.getBoundingClientRect();
    onFirst(firstRowAt(event.clientY - box.top, rows, size, top, bottom));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const row = rowByKey(event.key, first, size, rows);
    if (row === null) return;
    event.preventDefault();
    onFirst(row);
  };
  return (
    <div
      className="graduated-rule"
      role="scrollbar"
      tabIndex={0}
      aria-label={`Rows by ${unit}`}
      aria-controls={controls}
      aria-orientation="vertical"
      aria-valuemin={0}
      aria-valuemax={Math.max(0, rows - size)}
      aria-valuenow={first}
      aria-valuetext={`rows ${first + 1} to ${Math.min(rows, first + size)} of ${rows}`}
      onPointerDown={(event) => {
        event.currentTarget.setPointerCapture(event.pointerId);
        drag(event);
      }}
      onPointerMove={(event) => event.currentTarget.hasPointerCapture(event.pointerId) && drag(event)}
      onKeyDown={onKeyDown}
    >
      <svg className="drawing schematic" width={WIDTH} height={height} aria-hidden="true">
        <text x={WIDTH - 8} y={20} textAnchor="end" className="axis">
          {unit}
        </text>
        <path className="fine" d={`M14 ${top}V${bottom}${ticks.map((y) => `M14 ${y}h4`).join('')}`} />
        <path className="thin" d={marks.map(({ y }) => `M14 ${y}h10`).join('')} />
        {marks.map(({ y, label }) => (
          <text key={y} x={28} y={y + 4} className="axis">
            {label}
          </text>
        ))}
        <rect x={6} y={from - 3} width={8} height={Math.max(8, to - from + 6)} className="plumb-bob" />
      </svg>
    </div>
  );
}
