import { useEffect, useMemo, useRef } from 'react';
import type { Template } from '@/engine/template';
import type { Fault } from '@/lib/app-error';
import { pointer } from '@/lib/pointer';
import type { EditorState } from '../edit';
import { drawableTemplate, type Sketch, sketchAt } from './sketch';

/** What there is to draw of a draft. */
export interface DraftSketch {
  readonly template: Template | null;
  /** Null until something could be drawn. */
  readonly sketch: Sketch | null;
  /** It is the draft as it stands; else it is the last that could be drawn. */
  readonly isNow: boolean;
  /** Of the values that it is shown at, at their symbols. */
  readonly faults: readonly Fault[];
}

/** The draft at the values that are shown; while it cannot be drawn, as it was when it last could. */
export function useSketch({ document, values }: EditorState): DraftSketch {
  const template = useMemo(() => drawableTemplate(document), [document]);
  const reading = useMemo(() => template && sketchAt(template, values), [template, values]);
  const last = useRef<Sketch | null>(null);
  useEffect(() => {
    if (reading?.ok) last.current = reading.sketch;
  }, [reading]);
  const sketch = reading?.ok ? reading.sketch : last.current;
  const faults = reading && !reading.ok ? reading.faults : [];
  return {
    template: template ?? sketch?.template ?? null,
    sketch,
    isNow: reading?.ok ?? false,
    faults: faults.map(({ path, code, message }) => ({
      pointer: pointer(['parameters', ...path]),
      code,
      message,
    })),
  };
}
