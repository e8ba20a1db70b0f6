/** What the hand and the keys do to a part of the drawing. */
import type { Expression } from '@/engine/template';
import { type EditorState, valueAt } from '../edit';
import { draggedTo, type Handle, handleOf, movedTo, removal, whyKept } from './change';
import type { Part } from './parts';
import { placesOf, snapped } from './places';
import type { Sketch } from './sketch';

/** Where a drag began: the hand's way is measured from there, whatever is drawn meanwhile. */
export interface Drag {
  readonly sketch: Sketch;
  readonly handle: Handle | null;
  readonly from: number;
}

/** A dragged part draws to places within this share of the beam. */
const REACH = 0.02;

const placeIn = ({ template }: Sketch, part: Part): Expression | null => {
  const at = valueAt(template, `${part.pointer}/at`);
  return typeof at === 'object' && at !== null ? (at as Expression) : null;
};

/** The length that follows the hand: what the place ends with, or what is dimensioned. */
function handleIn(sketch: Sketch, part: Part): Handle | null {
  const at = placeIn(sketch, part);
  if (at) return handleOf(sketch, at.tree);
  const symbol = valueAt(sketch.template, `${part.pointer}/symbol`);
  return part.kind === 'dimension' && typeof symbol === 'string' ? handleOf(sketch, symbol) : null;
}

export function partMoves(editor: EditorState, sketch: Sketch, drag: { current: Drag | null }) {
  const { document, readOnly } = editor;
  const put = (part: Part, of: Sketch, x: number) => {
    const place = snapped(placesOf(of), x, REACH * of.instance.beam.length);
    const at = placeIn(sketch, part)?.text;
    if (place && place.text !== at) editor.edit(...movedTo(document, sketch, part.pointer, 'at', place));
  };
  return {
    /** Whether it could be taken away. */
    remove(part: Part): boolean {
      if (readOnly || part.kind === 'dimension' || whyKept(document, part.pointer) !== undefined)
        return false;
      editor.select(null);
      editor.edit(...removal(document, part.pointer));
      return true;
    },
    /** A place that ends with a length changes the value shown; another is put from place to place. */
    drag(part: Part, by: number, isBegun: boolean) {
      if (isBegun || !drag.current)
        drag.current = { sketch, handle: handleIn(sketch, part), from: part.from };
      const { handle, from, sketch: before } = drag.current;
      if (handle) editor.setValues(draggedTo(before.template, editor.values, handle, by));
      else if (!readOnly && placeIn(sketch, part)) put(part, before, from + by);
    },
    /** By a step of the length that it ends with, or to the next place. */
    nudge(part: Part, steps: number) {
      const at = placeIn(sketch, part);
      const handle = handleIn(sketch, part);
      if (handle) {
        editor.setValues(draggedTo(sketch.template, editor.values, handle, steps * handle.step));
        return;
      }
      if (!at || readOnly) return;
      const beyond = placesOf(sketch).filter(({ x }) => (x - part.from) * steps > 1e-9);
      const next = steps > 0 ? beyond[0] : beyond.at(-1);
      if (next) editor.edit(...movedTo(document, sketch, part.pointer, 'at', next));
    },
  };
}
