import { type KeyboardEvent, useRef, useState } from 'react';
import type { Tool } from './Placing';

/** What makes the beam longer at once. */
const EXTENDING = ['span', 'left', 'right'] as const;
export type Extending = (typeof EXTENDING)[number];
export type AnyTool = Extending | Tool;

const isExtending = (tool: AnyTool): tool is Extending => EXTENDING.some((one) => one === tool);

const GROUPS: readonly { readonly name: string; readonly tools: readonly (readonly [AnyTool, string])[] }[] =
  [
    {
      name: 'Length',
      tools: [
        ['span', 'Span'],
        ['left', 'Left overhang'],
        ['right', 'Right overhang'],
      ],
    },
    {
      name: 'Support',
      tools: [
        ['pin', 'Pin'],
        ['roller', 'Roller'],
        ['fixed', 'Fixed'],
        ['guided', 'Guided'],
        ['spring', 'Spring'],
      ],
    },
    {
      name: 'Member',
      tools: [
        ['hinge', 'Hinge'],
        ['segment', 'Section'],
      ],
    },
    {
      name: 'Load',
      tools: [
        ['point', 'Point load'],
        ['uniform', 'Uniform'],
        ['triangle', 'Triangle'],
        ['couple', 'Couple'],
        ['curvature', 'Curvature'],
      ],
    },
  ];

/** "the roller": what is placed, in a sentence. */
export const WHAT: Readonly<Record<Tool, string>> = {
  pin: 'the pin',
  roller: 'the roller',
  fixed: 'the fixed support',
  guided: 'the guided support',
  spring: 'the spring',
  hinge: 'the hinge',
  segment: 'the section',
  point: 'the point load',
  uniform: 'the uniform load',
  triangle: 'the triangular load',
  couple: 'the couple',
  curvature: 'the curvature',
};

interface ToolsProps {
  /** The tool in hand. */
  readonly tool: Tool | null;
  /** Why a tool cannot be taken now. */
  readonly why: (tool: AnyTool) => string | null;
  readonly onExtend: (tool: Extending) => void;
  readonly onTake: (tool: Tool | null) => void;
}

/** What can be added; one stop of the Tab key, and arrow keys from tool to tool. */
export function Tools({ tool, why, onExtend, onTake }: ToolsProps) {
  const bar = useRef<HTMLDivElement>(null);
  const [stop, setStop] = useState<AnyTool>('span');
  const onKeyDown = (event: KeyboardEvent) => {
    const side = { ArrowLeft: -1, ArrowRight: 1 }[event.key];
    if (event.key === 'Escape' && tool) onTake(null);
    const buttons = [...(bar.current?.querySelectorAll('button') ?? [])];
    const at = buttons.indexOf(event.target as HTMLButtonElement);
    if (side === undefined || at < 0) return;
    event.preventDefault();
    buttons[(at + side + buttons.length) % buttons.length]?.focus();
  };
  const press = (pressed: AnyTool) => {
    if (why(pressed) !== null) return;
    if (isExtending(pressed)) onExtend(pressed);
    else onTake(pressed === tool ? null : pressed);
  };
  return (
    <div
      ref={bar}
      role="toolbar"
      aria-label="Add to the beam"
      className="flex items-end gap-x-14 gap-y-6 max-md:overflow-x-auto max-md:pb-6 md:flex-wrap"
      onKeyDown={onKeyDown}
    >
      {GROUPS.map(({ name, tools }) => (
        <fieldset key={name} className="flex-none">
          <legend className="caps mb-2">{name}</legend>
          <div className="flex md:flex-wrap">
            {tools.map(([id, word]) => {
              const reason = why(id) ?? undefined;
              const isOff = reason !== undefined;
              return (
                <button
                  key={id}
                  type="button"
                  tabIndex={id === stop ? 0 : -1}
                  aria-pressed={isExtending(id) ? undefined : id === tool}
                  aria-disabled={isOff || undefined}
                  title={reason}
                  onFocus={() => setStop(id)}
                  onClick={() => press(id)}
                  className={`-ml-px min-h-28 border border-ink px-9 py-2 text-schedule font-semibold first:ml-0 focus-visible:relative focus-visible:z-1 max-md:min-h-44 pointer-coarse:min-h-44 ${
                    isOff ? 'cursor-not-allowed border-dashed text-ink-2 hatch-off' : 'hover:bg-paper-3'
                  } ${id === tool ? 'bg-ochre-wash' : ''}`}
                >
                  {word}
                </button>
              );
            })}
          </div>
        </fieldset>
      ))}
    </div>
  );
}
