import { type KeyboardEvent, type PointerEvent, useEffect, useMemo, useRef, useState } from 'react';
import { textWidth } from '@/components/drawing/geometry/text-width';
import { ticksPath } from '@/components/drawing/marks/paths';
import { formatQuantity } from '@/engine/quantity';
import { AT_A_PLACE, isNew, type LengthTool, newPlaceAt, type PlaceTool, type Target, wholeOf } from './add';
import { type Bay, bayAt, drawnBays, type Place, placesOf, snapped } from './places';
import type { Sketch } from './sketch';
import type { StageLayout } from './stage-layout';

export type Tool = PlaceTool | LengthTool;
export const isPlaceTool = (tool: Tool): tool is PlaceTool => AT_A_PLACE.some((one) => one === tool);

interface PlacingProps {
  readonly sketch: Sketch;
  readonly layout: StageLayout;
  /** What is placed: "the roller". */
  readonly what: string;
  readonly onLeave: () => void;
}

/** A pointer this near draws to a place, px. */
const REACH = 11;
/** Places of one's own are made to this step, m. */
const STEP = 0.05;

const metres = (si: number): string => formatQuantity(si, 'm');
const xOf = (target: Target): number => (isNew(target) ? target.bay.from.x + target.offset : target.x);
const textOf = (target: Target): string =>
  isNew(target) ? `a new length, ${metres(target.offset)} from ${target.bay.from.text}` : target.text;

/** Where a part goes: drawn to the places that there are expressions for, or to a length of its own between them. */
export function PlacePicker(props: PlacingProps & { readonly onPlace: (target: Target) => void }) {
  const { sketch, layout, onPlace } = props;
  const places = useMemo(() => placesOf(sketch), [sketch]);
  const [target, setTarget] = useState<Target | null>(() => places.at(-1) ?? null);
  const perPx = layout.toMetres(1) - layout.toMetres(0);
  const pick = (wanted: number): Target | null => {
    const x = within(sketch, wanted);
    return snapped(places, x, REACH * perPx) ?? newPlaceAt(sketch, x, STEP);
  };
  const onKey = (event: KeyboardEvent): boolean => {
    const side = sideOf(event.key);
    if (side === null || !target) return false;
    const next = event.shiftKey
      ? newPlaceAt(sketch, within(sketch, xOf(target) + side * STEP), STEP)
      : nextPlace(places, xOf(target), side);
    setTarget(next ?? target);
    return true;
  };
  return (
    <Picker
      {...props}
      at={target ? xOf(target) : 0}
      text={target ? textOf(target) : ''}
      stops={places.map(({ x }) => x)}
      onPoint={(x) => setTarget(pick(x))}
      onKey={onKey}
      onDone={(x) => {
        const chosen = x === undefined ? target : pick(x);
        if (chosen) onPlace(chosen);
      }}
    />
  );
}

const within = ({ instance }: Sketch, x: number): number => Math.min(instance.beam.length, Math.max(0, x));

function nextPlace(places: readonly Place[], x: number, side: number): Place | undefined {
  const beyond = places.filter((place) => (place.x - x) * side > 1e-9);
  return side > 0 ? beyond[0] : beyond.at(-1);
}

const sideOf = (key: string): 1 | -1 | null =>
  key === 'ArrowRight' || key === 'ArrowUp' ? 1 : key === 'ArrowLeft' || key === 'ArrowDown' ? -1 : null;

/** What a load or section covers: the part of the beam that is pressed, or from place to place where it is dragged. */
export function LengthPicker(props: PlacingProps & { readonly onPlace: (bay: Bay) => void }) {
  const { sketch, layout, onPlace } = props;
  const places = useMemo(() => placesOf(sketch), [sketch]);
  const bays = useMemo(() => choices(sketch), [sketch]);
  const [bay, setBay] = useState<Bay | null>(() => bays[0] ?? null);
  const begun = useRef<Place | null>(null);
  const perPx = layout.toMetres(1) - layout.toMetres(0);
  const nearest = (x: number) => snapped(places, x, REACH * perPx) ?? closest(places, x);
  const over = (x: number): Bay | null => {
    const end = nearest(x);
    const from = begun.current;
    if (!from || !end || Math.abs(end.x - from.x) < REACH * perPx) return bayAt(drawnBays(sketch), x) ?? null;
    return end.x < from.x ? { from: end, to: from } : { from, to: end };
  };
  const onKey = (event: KeyboardEvent): boolean => {
    const side = sideOf(event.key);
    if (side === null) return false;
    const index = bays.findIndex((one) => one.from.text === bay?.from.text && one.to.text === bay.to.text);
    setBay(bays[(index + side + bays.length) % bays.length] ?? bay);
    return true;
  };
  return (
    <Picker
      {...props}
      at={bay?.from.x ?? 0}
      to={bay?.to.x}
      text={bay ? `${bay.from.text} to ${bay.to.text}` : ''}
      stops={places.filter(({ isFixed }) => isFixed).map(({ x }) => x)}
      onPress={(x) => {
        begun.current = nearest(x);
      }}
      onPoint={(x) => setBay(over(x))}
      onKey={onKey}
      onDone={(x) => {
        const chosen = x === undefined ? bay : over(x);
        begun.current = null;
        if (chosen) onPlace(chosen);
      }}
    />
  );
}

const closest = (places: readonly Place[], x: number): Place | null =>
  places.reduce<Place | null>(
    (best, place) => (best && Math.abs(best.x - x) <= Math.abs(place.x - x) ? best : place),
    null,
  );

/** Each part of the beam between supports, and the whole. */
function choices(sketch: Sketch): Bay[] {
  const bays = drawnBays(sketch);
  const whole = wholeOf(sketch);
  return bays.length > 1 && whole ? [...bays, whole] : bays;
}

interface PickerProps extends PlacingProps {
  /** m; up to `to`, where it is a length. */
  readonly at: number;
  readonly to?: number | undefined;
  readonly text: string;
  readonly stops: readonly number[];
  readonly onPress?: (x: number) => void;
  readonly onPoint: (x: number) => void;
  /** Whether the key was one of its own. */
  readonly onKey: (event: KeyboardEvent) => boolean;
  /** By a pointer at x, or by key at what is shown. */
  readonly onDone: (x?: number) => void;
}

/** A slider over the drawing: it follows the pointer and the arrow keys, and is let go where the part is to stand. */
function Picker({ layout, what, at, to, text, stops, ...on }: PickerProps) {
  const { toX, size, width, height } = layout;
  const slider = useRef<SVGGElement>(null);
  useEffect(() => slider.current?.focus(), []);
  const metresAt = (event: PointerEvent<SVGGElement>): number => {
    const box = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
    return box ? layout.toMetres(((event.clientX - box.left) * width) / box.width) : 0;
  };
  const onKeyDown = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey) return;
    if (event.key === 'Escape') on.onLeave();
    else if (event.key === 'Enter' || event.key === ' ') on.onDone();
    else if (!on.onKey(event)) return;
    event.preventDefault();
  };
  return (
    <g
      ref={slider}
      className="plumb"
      role="slider"
      tabIndex={0}
      aria-label={`Where ${what} goes`}
      aria-valuemin={0}
      aria-valuemax={Number(layout.toMetres(width - size.margin).toFixed(3))}
      aria-valuenow={Number(at.toFixed(3))}
      aria-valuetext={to === undefined ? `${text}, ${metres(at)}` : text}
      onKeyDown={onKeyDown}
      onPointerDown={(event) => on.onPress?.(metresAt(event))}
      onPointerMove={(event) => on.onPoint(metresAt(event))}
      onPointerUp={(event) => on.onDone(metresAt(event))}
    >
      <rect x={0} y={0} width={width} height={height} className="grip" />
      {stops.map((x) => (
        <circle key={x} cx={toX(x)} cy={size.base} r={3} className="place" />
      ))}
      <Pointed x={toX(at)} to={to === undefined ? undefined : toX(to)} text={text} layout={layout} />
    </g>
  );
}

interface PointedProps {
  readonly x: number;
  readonly to: number | undefined;
  readonly text: string;
  readonly layout: StageLayout;
}

function Pointed({ x, to, text, layout: { size, width, height } }: PointedProps) {
  const middle = to === undefined ? x : (x + to) / 2;
  const half = textWidth(text, 13, 600) / 2 + 5;
  const at = Math.min(width - half, Math.max(half, middle));
  return (
    <>
      {to === undefined ? (
        <path className="plumb-line" d={`M${x} 16V${height - 4}`} />
      ) : (
        <>
          <path className="selection" d={`M${x} ${size.base + 10}H${to}`} />
          <path className="selection-tick" d={ticksPath([x, to], size.base + 10)} />
        </>
      )}
      <rect x={at - half} y={-2} width={2 * half} height={18} className="paper" />
      <text x={at} y={11} textAnchor="middle" className="plumb-text">
        {text}
      </text>
    </>
  );
}
