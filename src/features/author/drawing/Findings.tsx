import type { ReactNode } from 'react';
import type { Fault } from '@/engine/model';
import type { UnitSystemName } from '@/engine/quantity';
import { useRestedValue } from '@/features/template/use-live';
import type { EditorState } from '../edit';
import type { BeamReading } from './beam-reading';
import { Preview } from './Preview';
import { Releases } from './Releases';
import type { Sketch } from './sketch';
import type { StageLayout } from './stage-layout';

interface FindingsProps {
  readonly editor: EditorState;
  readonly sketch: Sketch;
  readonly reading: BeamReading;
  readonly layout: StageLayout;
  readonly system: UnitSystemName;
}

/** What follows from the draft at these values: its releases, moments and reactions, or why it has none. */
export function Findings({ editor, sketch, reading, layout, system }: FindingsProps) {
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

function Named({ title, children }: { readonly title: string; readonly children: ReactNode }) {
  return (
    <section className="border-t border-rule pt-8" aria-label={title}>
      <h3 className="caps mb-6">{title}</h3>
      {children}
    </section>
  );
}
