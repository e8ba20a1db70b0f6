import { type ReactNode, type RefObject, useEffect, useMemo, useRef, useState } from 'react';
import { useWidth } from '@/components/drawing/use-width';
import { Button } from '@/components/ui/Button';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { UnitSystemName } from '@/engine/quantity';
import type { Written } from '@/features/review/draft';
import { type Added, addOverhang, addSpan, noOverhang } from '../add';
import type { EditorState } from '../edit';
import { addAt, addOver } from './add';
import { beamOf } from './beam-reading';
import { Findings } from './Findings';
import { NotDrawn } from './NotDrawn';
import { PartBar } from './PartBar';
import { isPlaceTool, LengthPicker, PlacePicker, type Tool } from './Placing';
import { type Drag, partMoves } from './part-moves';
import { drawnOf, type Part } from './parts';
import { focusParts, isChosen, Stage } from './Stage';
import type { Sketch } from './sketch';
import { layStage, type StageLayout } from './stage-layout';
import { type AnyTool, type Extending, Tools, WHAT } from './Tools';
import { useSketch } from './use-sketch';
import { ValueStrip } from './ValueStrip';

interface DraftDrawingProps {
  readonly editor: EditorState;
  readonly letter?: string;
  readonly system?: UnitSystemName;
}

/** Of the drawing before the page lives, px. */
const WIDTH = 760;

/**
 * A draft drawn as it is written: its parts chosen, added, moved and taken away, at values that can be changed. The
 * beam itself stays in view above the form.
 */
export function DraftDrawing({ editor, letter = 'A', system = 'metric' }: DraftDrawingProps) {
  const { template, sketch, isNow, faults } = useSketch(editor);
  const [tool, setTool] = useState<Tool | null>(null);
  const stage = useRef<HTMLDivElement>(null);
  const follow = useFollow(stage, editor);
  const add = ({ edits, select }: Added) => {
    if (tool !== null) follow();
    setTool(null);
    editor.edit(...edits);
    editor.select(select);
  };
  const canAdd = !editor.readOnly && (isNow || sketch === null);
  const { document } = editor;
  const extend = (way: Extending) => add(way === 'span' ? addSpan(document) : addOverhang(document, way));
  return (
    <>
      <section
        className="grid gap-10 px-(--pad) pt-12 pb-10 [&>*]:min-w-0"
        aria-label="Drawing"
        data-drawing="tools"
      >
        <ZoneHeading letter={letter}>Drawing</ZoneHeading>
        {!isNow && <NotDrawn editor={editor} isEmpty={sketch === null} />}
        {canAdd && (
          <Tools
            tool={tool}
            why={(one) => whyNot(document, one, sketch !== null)}
            onExtend={extend}
            onTake={setTool}
          />
        )}
      </section>
      {sketch && (
        <Beam
          stage={stage}
          editor={editor}
          sketch={sketch}
          isNow={isNow}
          system={system}
          tool={isNow ? tool : null}
          onAdd={add}
          onFollow={follow}
          onLeave={() => setTool(null)}
        >
          {template && template.parameters.length > 0 && (
            <ValueStrip editor={editor} template={template} system={system} faults={faults} />
          )}
        </Beam>
      )}
    </>
  );
}

/**
 * Lets the focus follow what is placed or taken away: it waits on the drawing, where the page stays, until the drawing
 * shows the change, which is a moment after the form does, and goes to the chosen part if it is waiting still.
 */
function useFollow(stage: RefObject<HTMLDivElement | null>, { document }: EditorState): () => void {
  const isWanted = useRef(false);
  // biome-ignore lint/correctness/useExhaustiveDependencies: it runs when another document is drawn
  useEffect(() => {
    if (isWanted.current && stage.current?.contains(window.document.activeElement)) focusParts(stage.current);
    isWanted.current = false;
  }, [stage, document]);
  return () => {
    isWanted.current = true;
    stage.current?.focus({ preventScroll: true });
  };
}

/** Why a tool cannot be taken now; null where it can. */
function whyNot(document: Written, tool: AnyTool, hasBeam: boolean): string | null {
  if (tool === 'span') return null;
  if (tool === 'left' || tool === 'right') return noOverhang(document, tool);
  return hasBeam ? null : 'Add a span first.';
}

interface BeamProps {
  readonly stage: RefObject<HTMLDivElement | null>;
  readonly editor: EditorState;
  readonly sketch: Sketch;
  readonly isNow: boolean;
  readonly system: UnitSystemName;
  readonly tool: Tool | null;
  readonly onAdd: (added: Added) => void;
  /** What comes is to be followed by the focus. */
  readonly onFollow: () => void;
  readonly onLeave: () => void;
  /** The values that it is shown at. */
  readonly children: ReactNode;
}

/** The beam, which stays in view, and below it what is said of the chosen part and of the whole. */
function Beam({ stage, editor, sketch, isNow, system, tool, onAdd, onFollow, onLeave, children }: BeamProps) {
  const width = useWidth(stage, WIDTH);
  const drawn = useMemo(() => drawnOf(sketch), [sketch]);
  const layout = useMemo(() => layStage(drawn.beam, width), [drawn, width]);
  const reading = useMemo(() => beamOf(sketch), [sketch]);
  const bar = useRef<HTMLDivElement>(null);
  const drag = useRef<Drag | null>(null);
  const moves = partMoves(editor, sketch, drag);
  const part = drawn.parts.find(({ pointer }) => isChosen(pointer, editor.selected));
  const remove = (gone: Part) => {
    if (moves.remove(gone)) onFollow();
  };
  const shared = { sketch, layout, onLeave };
  return (
    <>
      <InView of={stage} height={layout.height}>
        <Stage
          drawn={drawn}
          layout={layout}
          selected={editor.selected}
          motion={'faults' in reading ? reading.faults.find((fault) => fault.motion)?.motion : undefined}
          isLastGood={!isNow}
          onSelect={editor.select}
          onRemove={remove}
          onDrag={moves.drag}
          onNudge={moves.nudge}
          onOpen={() => requestAnimationFrame(() => firstControl(bar.current)?.focus())}
        >
          {tool && <Placing {...shared} tool={tool} document={editor.document} onAdd={onAdd} />}
        </Stage>
      </InView>
      <section
        ref={bar}
        className="grid gap-10 border-b border-ink px-(--pad) pt-8 pb-14 [&>*]:min-w-0"
        aria-label="Chosen part, values and results"
        data-drawing="bar"
      >
        {tool && <PlacingHelp tool={tool} onLeave={onLeave} />}
        {isNow && part && !tool && (
          <PartBar editor={editor} sketch={sketch} part={part} onRemove={() => remove(part)} />
        )}
        {children}
        {isNow && (
          <Findings editor={editor} sketch={sketch} reading={reading} layout={layout} system={system} />
        )}
      </section>
    </>
  );
}

const firstControl = (within: Element | null): HTMLElement | null =>
  within?.querySelector('select, button') ?? null;

interface InViewProps {
  readonly of: RefObject<HTMLDivElement | null>;
  /** Of the drawing, px. */
  readonly height: number;
  readonly children: ReactNode;
}

/** Stays at the top while the form is scrolled, unless it is folded away; what is scrolled to stops below it. */
function InView({ of, height, children }: InViewProps) {
  const [isFolded, setFolded] = useState(false);
  const sticky = useRef<HTMLDivElement>(null);
  useEffect(() => {
    const { style } = window.document.documentElement;
    const covered = sticky.current?.offsetHeight ?? 0;
    style.scrollPaddingTop = `${isFolded ? covered : Math.max(covered, height)}px`;
    return () => {
      style.scrollPaddingTop = '';
    };
  }, [height, isFolded]);
  return (
    <div ref={sticky} className="sticky top-0 z-10 border-b border-rule bg-paper px-(--pad) print:static">
      <div className="flex justify-end md:hidden">
        <Button tone="text" aria-expanded={!isFolded} onClick={() => setFolded(!isFolded)}>
          {isFolded ? 'Show the beam' : 'Fold the beam away'}
        </Button>
      </div>
      <div
        ref={of}
        tabIndex={-1}
        data-drawing="beam"
        className={`outline-none ${isFolded ? 'max-md:hidden' : ''}`}
      >
        {children}
      </div>
    </div>
  );
}

interface PlacingProps {
  readonly tool: Tool;
  readonly sketch: Sketch;
  readonly layout: StageLayout;
  readonly document: Written;
  readonly onAdd: (added: Added) => void;
  readonly onLeave: () => void;
}

function Placing({ tool, document, onAdd, ...shared }: PlacingProps) {
  const { sketch } = shared;
  return isPlaceTool(tool) ? (
    <PlacePicker
      {...shared}
      what={WHAT[tool]}
      onPlace={(target) => onAdd(addAt(document, sketch, tool, target))}
    />
  ) : (
    <LengthPicker
      {...shared}
      what={WHAT[tool]}
      onPlace={(bay) => onAdd(addOver(document, sketch, tool, bay))}
    />
  );
}

function PlacingHelp({ tool, onLeave }: { readonly tool: Tool; readonly onLeave: () => void }) {
  return (
    <p className="flex flex-wrap items-center gap-x-14 gap-y-6 text-ink-2">
      {isPlaceTool(tool)
        ? `Press where ${WHAT[tool]} goes, or move with the arrow keys and press Enter. Between the marked places it takes a length of its own.`
        : `Press the part of the beam that ${WHAT[tool]} covers, or drag from place to place. Arrow keys choose, Enter puts it there.`}
      <Button tone="text" keyName="Esc" onClick={onLeave}>
        Leave it
      </Button>
    </p>
  );
}
