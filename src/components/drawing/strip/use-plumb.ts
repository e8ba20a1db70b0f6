import { type KeyboardEvent, type PointerEvent, useCallback, useEffect, useState } from 'react';
import type { DrawingFormat } from '../format';

export type PlumbControl = {
  /** Station in m; give it together with onPlumb to hold the plumb line from outside. */
  plumb?: number | undefined;
  initialPlumb?: number | undefined;
  onPlumb?: ((x: number) => void) | undefined;
};

/** The plumb line's station, kept on the beam and on the unit system's small steps. */
export function usePlumb(length: number, { snap }: DrawingFormat['station'], control: PlumbControl) {
  const [own, setOwn] = useState(control.initialPlumb ?? length * 0.4);
  const { onPlumb } = control;
  const held = control.plumb ?? own;
  const x = Math.min(Math.max(held, 0), length);
  const move = useCallback(
    (to: number) => {
      const onStep = Math.round(to / snap) * snap;
      const next = to >= length ? length : Math.min(Math.max(onStep, 0), length);
      setOwn(next);
      onPlumb?.(next);
    },
    [length, snap, onPlumb],
  );
  return [x, move] as const;
}

/** What is said once the line has rested: nothing while it moves, so that a reader is not talked over. */
export function useRested(text: string, rest = 300): string {
  const [said, setSaid] = useState('');
  const [first] = useState(text);
  useEffect(() => {
    // What stood there on arrival is in the picture's own summary.
    if (text === first && said === '') return;
    const timer = setTimeout(() => setSaid(text), rest);
    return () => clearTimeout(timer);
  }, [text, first, said, rest]);
  return said;
}

/** Arrow keys, Home and End; Shift leaps. Returns the new station, or null for other keys. */
export function stationByKey(
  { key, shiftKey }: Pick<KeyboardEvent, 'key' | 'shiftKey'>,
  x: number,
  length: number,
  { nudge, leap }: DrawingFormat['station'],
): number | null {
  const step = shiftKey ? leap : nudge;
  if (key === 'ArrowLeft' || key === 'ArrowDown') return Math.max(0, x - step);
  if (key === 'ArrowRight' || key === 'ArrowUp') return Math.min(length, x + step);
  if (key === 'Home') return 0;
  return key === 'End' ? length : null;
}

/** The station under a pointer, from the drawing's own box at the moment of the event. */
export function stationAt(
  event: PointerEvent<SVGElement>,
  toMetres: (px: number) => number,
  width: number,
): number {
  const box = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
  if (!box) return 0;
  return toMetres(((event.clientX - box.left) * width) / box.width);
}
