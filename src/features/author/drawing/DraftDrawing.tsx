import { type ReactNode, useCallback, useMemo, useRef, useState } from 'react';
import { flushSync } from 'react-dom';
import { useWidth } from '@/components/drawing/use-width';
import { Button } from '@/components/ui/Button';
import type { Fault } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import type { Written } from '@/features/review/draft';
import { useRestedValue } from '@/features/template/use-live';
import { pointer as pointerOf } from '@/lib/pointer';
import { type Added, addOverhang, addSpan, noOverhang } from '../add';
import type { EditorState } from '../edit';
import { addAt, addOver } from './add';
import { PartBar } from './PartBar';
import { isPlaceTool, LengthPicker, PlacePicker, type Tool } from './Placing';
import { Preview } from './Preview';
import { partMoves } from './part-moves';
import { drawnOf, type Part } from './parts';
import { Releases } from './Releases';
import { type BeamReading, beamOf } from './releases';
import { focusParts, Stage } from './Stage';
import { drawableTemplate, type Sketch, sketchAt } from './sketch';
import { layStage, type StageLayout } from './stage-layout';
import { type AnyTool, Tools, WHAT } from './Tools';
import { ValueStrip } from './ValueStrip';

interface DraftDrawingProps {
  readonly editor: EditorState;
  readonly system?: UnitSystemName;
}

/** Of the drawing before the page lives, px. */
const WIDTH = 760;

/** A draft drawn as it is written: its parts chosen, added, moved and taken away, at values that can be changed. */
export function DraftDrawing({ editor, system = 'metric' }: DraftDrawingProps) {
  const host = useRef<HTMLDivElement>(null);
  const width = useWidth(host, WIDTH);
  const { template, sketch, isNow, valueFaults } = useSketch(editor);
  return (
    <details open className="group" aria-label="Drawing">
      <summary className="flex min-h-44 cursor-pointer items-center font-semibold md:hidden">Drawing</summary>
      <div ref={host} className="grid min-w-0 gap-10 [&>*]:min-w-0">
        {!isNow && <NotDrawn editor={editor} hasSketch={sketch !== null} hasTemplate={template !== null} />}
        <Board editor={editor} sketch={sketch} isNow={isNow} width={width} system={system}>
          {template && template.parameters.length > 0 && (
            <ValueStrip editor={editor} template={template} system={system} faults={valueFaults} />
          )}
        </Board>
      </div>
    </details>
  );
}

/** The draft at the values that are shown; while it cannot be drawn, as it was when it last could. */
function useSketch({ document, values }: EditorState) {
  const template = useMemo(() => drawableTemplate(document), [document]);
  const reading = useMemo(() => template && sketchAt(template, values), [template, values]);
  const last = useRef<Sketch | null>(null);
  if (reading?.ok) last.current = reading.sketch;
  return {
    template: template ?? last.current?.template ?? null,
    sketch: reading?.ok ? reading.sketch : last.current,
    isNow: reading?.ok ?? false,
    valueFaults:
      reading && !reading.ok
        ? reading.faults.map(({ path, code, message }) => ({
            pointer: pointerOf(['parameters', ...path]),
            code,
            message,
          }))
        : [],
  };
}

interface NotDrawnProps {
  readonly editor: EditorState;
  readonly hasSketch: boolean;
  readonly hasTemplate: boolean;
}

/** Why the drawing stands still, and a way to the first fault. */
function NotDrawn({ editor, hasSketch }: NotDrawnProps) {
  const { faults, select } = editor;
  const own = faults.filter(({ pointer }) => /^\/(parameters|derived|beam)/.test(pointer));
  const [first] = own;
  if (!hasSketch)
    return (
      <p className="border border-dashed border-rule-strong px-14 py-10 text-ink-2">
        Nothing is drawn yet. Add a span or an overhang: the beam starts there, with its length as a
        parameter.
      </p>
    );
  const count =
    own.length === 1 ? 'One fault keeps' : own.length === 0 ? 'A fault keeps' : `${own.length} faults keep`;
  return (
    <div
      className="hatch-edge flex flex-wrap items-center gap-x-14 gap-y-6 bg-ochre-wash px-10 py-6"
      role="status"
    >
      <span>{count} the draft from being drawn. The last good drawing stands.</span>
      {first && (
        <Button size="small" onClick={() => select(first.pointer)}>
          Go to the first
        </Button>
      )}
    </div>
  );
}

interface BoardProps {
  readonly editor: EditorState;
  readonly sketch: Sketch | null;
  readonly isNow: boolean;
  readonly width: number;
  readonly system: UnitSystemName;
  /** The values that it is shown at. */
  readonly children: ReactNode;
}

/** Tools, the drawing, and what is said of the chosen part and of the whole. */
function Board({ editor, sketch, isNow, width, system, children }: BoardProps) {
  const [tool, setTool] = useState<Tool | null>(null);
  const { document, readOnly } = editor;
  const add = ({ edits, select }: Added) => {
    setTool(null);
    editor.edit(...edits);
    editor.select(select);
  };
  const canAdd = !readOnly && (isNow || sketch === null);
  return (
    <>
      {canAdd && (
        <Tools
          tool={tool}
          why={(tool) => whyNot(editor.document, tool, isNow && sketch !== null)}
          onExtend={(way) => add(way === 'span' ? addSpan(document) : addOverhang(document, way))}
          onTake={setTool}
        />
      )}
      {!sketch && children}
      {sketch && (
        <Drawing
          editor={editor}
          sketch={sketch}
          isNow={isNow}
          width={width}
          system={system}
          tool={isNow ? tool : null}
          onAdd={add}
          onLeave={() => setTool(null)}
        >
          {children}
        </Drawing>
      )}
    </>
  );
}

/** Why a tool cannot be taken now; null where it can. */
function whyNot(document: Written, tool: AnyTool, hasBeam: boolean): string | null {
  if (tool === 'span') return null;
  if (tool === 'left' || tool === 'right') return noOverhang(document, tool);
  return hasBeam ? null : 'Add a span first.';
}

interface DrawingProps extends BoardProps {
  readonly sketch: Sketch;
  readonly tool: Tool | null;
  readonly onAdd: (added: Added) => void;
  readonly onLeave: () => void;
}

function Drawing({ editor, sketch, isNow, width, system, tool, onAdd, onLeave, children }: DrawingProps) {
  const bar = useRef<HTMLDivElement>(null);
  const stage = useRef<HTMLDivElement>(null);
  const drawn = useMemo(() => drawnOf(sketch), [sketch]);
  const layout = useMemo(() => layStage(drawn.beam, width), [drawn, width]);
  const reading = useMemo(() => beamOf(sketch), [sketch]);
  const moves = partMoves(editor, sketch);
  const part = drawn.parts.find(({ pointer }) => isPartOf(pointer, editor.selected));
  const motion = 'faults' in reading ? reading.faults.find((fault) => fault.motion)?.motion : undefined;
  const remove = (gone: Part) => {
    flushSync(() => moves.remove(gone));
    focusParts(stage.current);
  };
  const open = useCallback(
    () => requestAnimationFrame(() => bar.current?.querySelector<HTMLElement>('select, button')?.focus()),
    [],
  );
  return (
    <>
      <div ref={stage}>
        <Stage
          drawn={drawn}
          layout={layout}
          selected={editor.selected}
          motion={motion}
          isLastGood={!isNow}
          onSelect={editor.select}
          onRemove={moves.remove}
          onDrag={moves.drag}
          onNudge={moves.nudge}
          onOpen={open}
        >
          {tool && <Placing {...{ tool, sketch, layout, editor, onAdd, onLeave }} />}
        </Stage>
      </div>
      <div ref={bar}>
        {isNow && part && !tool && (
          <PartBar editor={editor} sketch={sketch} part={part} onRemove={() => remove(part)} />
        )}
        {tool && <PlacingHelp tool={tool} onLeave={onLeave} />}
      </div>
      {children}
      {isNow && (
        <Findings editor={editor} sketch={sketch} reading={reading} layout={layout} system={system} />
      )}
    </>
  );
}

interface FindingsProps extends Pick<DrawingProps, 'editor' | 'sketch' | 'system'> {
  readonly reading: BeamReading;
  readonly layout: StageLayout;
}

/** What follows from the draft at these values: its releases, moments and reactions, or why it has none. */
function Findings({ editor, sketch, reading, layout, system }: FindingsProps) {
  const rested = useRestedValue(sketch);
  if ('faults' in reading)
    return (
      <p className="font-semibold text-error" role="status">
        {reading.faults.map(standingWords).join(' ')}
      </p>
    );
  return (
    <>
      <Named title="Released first">
        <Releases editor={editor} sketch={sketch} beam={reading.beam} />
      </Named>
      <Named title="Moment and reactions">
        <Preview sketch={rested} layout={layout} system={system} />
      </Named>
    </>
  );
}

/** A template's beam is always held sideways: it has no other way out. */
const standingWords = ({ code, motion, message }: Fault): string =>
  code === 'unstable' && !motion ? 'Nothing holds the beam sideways. Make one support a pin.' : message;

const isPartOf = (part: string, selected: string | null): boolean =>
  selected === part || (selected?.startsWith(`${part}/`) ?? false);

function Named({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section className="border-t border-rule pt-8" aria-label={title}>
      <h3 className="caps mb-6">{title}</h3>
      {children}
    </section>
  );
}

type PlacingProps = Pick<DrawingProps, 'sketch' | 'editor' | 'onAdd' | 'onLeave'> & {
  readonly tool: Tool;
  readonly layout: StageLayout;
};

function Placing({ tool, sketch, layout, editor, onAdd, onLeave }: PlacingProps) {
  const { document } = editor;
  const shared = { sketch, layout, what: WHAT[tool], onLeave };
  return isPlaceTool(tool) ? (
    <PlacePicker {...shared} onPlace={(target) => onAdd(addAt(document, sketch, tool, target))} />
  ) : (
    <LengthPicker {...shared} onPlace={(bay) => onAdd(addOver(document, sketch, tool, bay))} />
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
