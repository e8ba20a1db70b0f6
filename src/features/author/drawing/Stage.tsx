import { type KeyboardEvent, type PointerEvent, type ReactNode, useMemo, useRef } from 'react';
import { flushSync } from 'react-dom';
import { Bubble } from '@/components/drawing/marks/Bubble';
import { ticksPath } from '@/components/drawing/marks/paths';
import { displacedPath } from '@/components/drawing/schematic/displaced';
import { NamedLengths } from '@/components/drawing/schematic/NamedLengths';
import { SchematicFrame, SchematicMember } from '@/components/drawing/schematic/SchematicFrame';
import { SchematicLoads } from '@/components/drawing/schematic/SchematicLoads';
import { SchematicSegments } from '@/components/drawing/schematic/SchematicSegments';
import type { DisplacedShape } from '@/engine/model';
import type { Pointer } from '../edit';
import type { Drawn, Part } from './parts';
import { type Grip, gripsOf, type StageLayout } from './stage-layout';

interface StageProps {
  readonly drawn: Drawn;
  readonly layout: StageLayout;
  readonly selected: Pointer | null;
  /** How it moves, where nothing holds it. */
  readonly motion: DisplacedShape | undefined;
  /** Not what the document says now. */
  readonly isLastGood: boolean;
  readonly onSelect: (pointer: Pointer | null) => void;
  readonly onRemove: (part: Part) => void;
  /** By so many metres, or by one step to a side. */
  readonly onDrag: (part: Part, by: number, isBegun: boolean) => void;
  readonly onNudge: (part: Part, steps: number) => void;
  readonly onOpen: () => void;
  /** What is being placed, over the drawing; parts cannot be taken hold of then. */
  readonly children?: ReactNode;
}

/** The draft as a drawing whose parts can be chosen, moved and taken away. */
export function Stage(props: StageProps) {
  const { drawn, layout, isLastGood, children } = props;
  return (
    <div className={`elevation-strip ${isLastGood ? 'last-good' : ''}`}>
      <Picture {...props} />
      {!isLastGood && (
        <svg className="drawing drawing-handles" viewBox={`0 0 ${layout.width} ${layout.height}`}>
          <title>Parts of the beam</title>
          {children ?? (drawn.parts.length > 0 && <Parts {...props} />)}
        </svg>
      )}
    </div>
  );
}

function Picture({ drawn: { beam }, layout, motion }: StageProps) {
  const { toX, size, loads, rows, below } = layout;
  return (
    <SchematicFrame width={layout.width} height={layout.height} label={undefined}>
      <SchematicSegments segments={beam.segments} toX={toX} base={size.base} />
      <SchematicMember beam={beam} toX={toX} size={size} />
      <SchematicLoads
        loads={beam.loads}
        length={beam.length}
        toX={toX}
        base={size.base}
        scale={loads}
        names={beam.loadNames}
      />
      {motion && <path className="error-line heavy" d={displacedPath(motion, toX, size.base, 24)} />}
      {beam.supports.map(({ letter, at }) => (
        <Bubble key={letter} x={toX(at)} y={size.base + 42} letter={letter} radius={9} />
      ))}
      <NamedLengths rows={rows} toX={toX} width={layout.width} from={below} />
    </SchematicFrame>
  );
}

/** Drawn later is taken hold of first. */
const ORDER: Readonly<Record<Part['kind'], number>> = {
  segment: 0,
  line: 1,
  curvature: 2,
  dimension: 3,
  support: 4,
  couple: 5,
  point: 6,
  hinge: 7,
};

/** Whether the part, or something inside it, is the one that is pointed out. */
export const isChosen = (pointer: Pointer, selected: Pointer | null): boolean =>
  selected === pointer || (selected?.startsWith(`${pointer}/`) ?? false);

function Parts(props: StageProps) {
  const { drawn, layout, selected, onSelect, onRemove, onNudge, onOpen } = props;
  const { beam, parts } = drawn;
  const grips = useMemo(() => gripsOf(beam, parts, layout), [beam, parts, layout]);
  const elements = useRef(new Map<number, SVGGElement>());
  const chosen = parts.findIndex(({ pointer }) => isChosen(pointer, selected));
  const stop = Math.max(0, chosen);
  const goTo = (index: number) => {
    const part = parts[index];
    if (!part) return;
    flushSync(() => onSelect(part.pointer));
    elements.current.get(index)?.focus();
  };
  const onKeyDown = (event: KeyboardEvent, index: number) => {
    const part = parts[index];
    if (!part || event.ctrlKey || event.metaKey || event.altKey) return;
    const act = keyAct(event, index, parts.length);
    if (!act) return;
    event.preventDefault();
    if (act.do === 'go') goTo(act.to);
    else if (act.do === 'nudge') onNudge(part, act.steps);
    else if (act.do === 'remove') onRemove(part);
    else if (act.do === 'open') {
      onSelect(part.pointer);
      onOpen();
    } else onSelect(null);
  };
  const inOrder = parts.map((_, index) => index).sort((a, b) => orderOf(parts[a]) - orderOf(parts[b]));
  return (
    <g role="listbox" aria-label="Parts of the beam" aria-orientation="horizontal">
      {inOrder.map((index) => {
        const [part, grip] = [parts[index], grips[index]];
        if (!part || !grip) return null;
        return (
          <PartGrip
            key={`${part.pointer} ${part.nth}`}
            part={part}
            place={index + 1}
            count={parts.length}
            grip={grip}
            layout={layout}
            isStop={index === stop}
            isChosen={isChosen(part.pointer, selected)}
            register={(element) => {
              if (element) elements.current.set(index, element);
              else elements.current.delete(index);
            }}
            onKeyDown={(event) => onKeyDown(event, index)}
            onSelect={() => onSelect(part.pointer)}
            onDrag={(by, isBegun) => props.onDrag(part, by, isBegun)}
          />
        );
      })}
    </g>
  );
}

/** Moves the focus to the part that the Tab key comes to. */
export const focusParts = (within: Element | null): void =>
  within?.querySelector<SVGElement>('[role=option][tabindex="0"]')?.focus();

const orderOf = (part: Part | undefined): number => (part ? ORDER[part.kind] : 0);

type KeyAct =
  | { readonly do: 'go'; readonly to: number }
  | { readonly do: 'nudge'; readonly steps: number }
  | { readonly do: 'remove' | 'open' | 'leave' };

function keyAct({ key, shiftKey }: KeyboardEvent, index: number, count: number): KeyAct | null {
  const side = { ArrowLeft: -1, ArrowUp: -1, ArrowRight: 1, ArrowDown: 1 }[key];
  if (side !== undefined)
    return shiftKey
      ? { do: 'nudge', steps: side }
      : { do: 'go', to: Math.min(count - 1, Math.max(0, index + side)) };
  if (key === 'Home') return { do: 'go', to: 0 };
  if (key === 'End') return { do: 'go', to: count - 1 };
  if (key === 'Delete' || key === 'Backspace') return { do: 'remove' };
  if (key === 'Enter' || key === ' ') return { do: 'open' };
  return key === 'Escape' ? { do: 'leave' } : null;
}

interface GripProps {
  readonly part: Part;
  /** From the left, from 1; the order of drawing is another. */
  readonly place: number;
  readonly count: number;
  readonly grip: Grip;
  readonly layout: StageLayout;
  readonly isStop: boolean;
  readonly isChosen: boolean;
  readonly register: (element: SVGGElement | null) => void;
  readonly onKeyDown: (event: KeyboardEvent) => void;
  readonly onSelect: () => void;
  readonly onDrag: (by: number, isBegun: boolean) => void;
}

/** A hand that trembles does not drag. */
const STILL = 3;

function PartGrip({
  part,
  place,
  count,
  grip,
  layout,
  isStop,
  isChosen: isMarked,
  register,
  ...on
}: GripProps) {
  const { x, y, width, height } = grip;
  const held = useRef<{ readonly x: number; readonly perPx: number; isDragged: boolean } | null>(null);
  const onPointerDown = (event: PointerEvent<SVGGElement>) => {
    if (event.button !== 0) return;
    event.currentTarget.focus({ preventScroll: true });
    on.onSelect();
    const box = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
    if (!box) return;
    event.currentTarget.setPointerCapture(event.pointerId);
    const perPx = (layout.toMetres(1) - layout.toMetres(0)) * (layout.width / box.width);
    held.current = { x: event.clientX, perPx, isDragged: false };
  };
  const onPointerMove = (event: PointerEvent<SVGGElement>) => {
    const hold = held.current;
    if (!hold || (!hold.isDragged && Math.abs(event.clientX - hold.x) < STILL)) return;
    const isBegun = !hold.isDragged;
    hold.isDragged = true;
    // In this frame: what is only scheduled would be painted with the next one.
    flushSync(() => on.onDrag((event.clientX - hold.x) * hold.perPx, isBegun));
  };
  const letGo = () => {
    held.current = null;
  };
  return (
    <g
      ref={register}
      className="part"
      role="option"
      aria-selected={isMarked}
      aria-label={part.name}
      tabIndex={isStop ? 0 : -1}
      aria-posinset={place}
      aria-setsize={count}
      onPointerDown={onPointerDown}
      onPointerMove={onPointerMove}
      onPointerUp={letGo}
      onPointerCancel={letGo}
      onKeyDown={on.onKeyDown}
      onFocus={on.onSelect}
      onClick={on.onSelect}
    >
      <rect x={x} y={y} width={width} height={height} className="grip" />
      {isMarked && <Marked grip={grip} />}
    </g>
  );
}

/** Selection is dimensioned: an ochre line under the part, with a tick at each end. */
function Marked({ grip: { x, y, width, height } }: { readonly grip: Grip }) {
  const at = y + height + 2;
  return (
    <>
      <path className="selection" d={`M${x} ${at}H${x + width}`} />
      <path className="selection-tick" d={ticksPath([x, x + width], at)} />
    </>
  );
}
