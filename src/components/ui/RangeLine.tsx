import { type KeyboardEvent, type PointerEvent, useRef } from 'react';
import { flushSync } from 'react-dom';
import { formatQuantity } from '@/engine/quantity';
import { nudge, placeInRange, type QuantityRange, snapToStep, valueAtPlace } from './range';

interface RangeLineProps {
  range: QuantityRange;
  /** What stands under the ends: figures, or a symbol such as L; nothing where a message does. */
  ends?: readonly [string, string] | undefined;
  /** SI; absent while the field does not read. */
  value: number | undefined;
  unit: string;
  label: string;
  onChange: (value: number) => void;
}

const LARGE_STEPS = 10;

/** The range as a dimension line; its ochre tick is dragged, or moved by the arrow keys. */
export function RangeLine({ range, ends, value, unit, label, onChange }: RangeLineProps) {
  const line = useRef<HTMLDivElement>(null);
  const shown = value ?? range.low;
  const drag = (event: PointerEvent) => {
    const box = line.current?.getBoundingClientRect();
    if (!box || box.width === 0) return;
    const to = snapToStep(valueAtPlace((event.clientX - box.left) / box.width, range), range, unit);
    // In this frame: what is only scheduled would be painted with the next one.
    if (to !== value) flushSync(() => onChange(to));
  };
  const onKeyDown = (event: KeyboardEvent) => {
    const moved = keyedValue(event, shown, range, unit);
    if (moved === undefined) return;
    event.preventDefault();
    onChange(moved);
  };
  return (
    <div className="mt-4 text-note text-ink-2">
      <div
        className="flex h-18 cursor-ew-resize touch-pan-y items-center pointer-coarse:h-44"
        onPointerDown={(event) => {
          event.currentTarget.setPointerCapture(event.pointerId);
          drag(event);
        }}
        onPointerMove={(event) => event.currentTarget.hasPointerCapture(event.pointerId) && drag(event)}
      >
        <div ref={line} className="relative h-9 flex-1 border-x border-rule-strong">
          <span className="absolute inset-x-0 top-4 h-1 bg-rule-strong" />
          <span
            role="slider"
            tabIndex={0}
            aria-label={`${label}, range`}
            aria-valuemin={range.low}
            aria-valuemax={range.high}
            aria-valuenow={shown}
            aria-valuetext={value === undefined ? 'not read' : formatQuantity(shown, unit)}
            onKeyDown={onKeyDown}
            style={{ left: `${placeInRange(shown, range) * 100}%` }}
            className={`absolute -top-3 h-14 w-3 -translate-x-1/2 bg-ochre ${value === undefined ? 'invisible' : ''}`}
          />
        </div>
      </div>
      {ends && (
        <div className="flex justify-between">
          <span>{ends[0]}</span>
          <span>{ends[1]}</span>
        </div>
      )}
    </div>
  );
}

function keyedValue(
  event: KeyboardEvent,
  value: number,
  range: QuantityRange,
  unit: string,
): number | undefined {
  const size = event.shiftKey ? LARGE_STEPS : 1;
  switch (event.key) {
    case 'ArrowRight':
    case 'ArrowUp':
    case ']':
      return nudge(value, size, range, unit);
    case 'ArrowLeft':
    case 'ArrowDown':
    case '[':
      return nudge(value, -size, range, unit);
    case 'Home':
      return range.low;
    case 'End':
      return range.high;
    default:
      return undefined;
  }
}
