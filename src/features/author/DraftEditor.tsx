import { type ComponentType, memo, useDeferredValue, useEffect, useRef, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { paths } from '@/paths';
import { type Autosave, startAutosave } from './autosave.api';
import { BeamZone } from './BeamZone';
import { ChangeZone } from './ChangeZone';
import { startCheck, templateChecker } from './check.api';
import { DerivedZone } from './DerivedZone';
import { DraftBlock } from './DraftBlock';
import { DraftDrawing } from './drawing/DraftDrawing';
import { FaultZone } from './FaultZone';
import { LoadZone } from './LoadZone';
import { NoteZone } from './NoteZone';
import { ParameterZone } from './ParameterZone';
import { ProofZone } from './ProofZone';
import type { DraftPageData } from './page';
import { RedundantZone } from './RedundantZone';
import { ResultZone } from './ResultZone';
import { RuleZone } from './RuleZone';
import { SaveNote, SaveNotices } from './Saving';
import { SourceZone } from './SourceZone';
import { DraftStore } from './store';
import { TitleZone } from './TitleZone';
import { UndoButtons, useUndoKeys } from './UndoButtons';
import { DraftContext, useEditor } from './use-editor';

/** A template's draft: its drawing and its form, saved while it is written. */
export function DraftEditor({ data }: { readonly data: DraftPageData }) {
  const [store] = useState(() => new DraftStore(data.draft, !data.isEditable));
  const saver = useRef<Autosave | null>(null);
  useEffect(() => {
    const stopCheck = startCheck(store, templateChecker());
    const autosave = data.isEditable ? startAutosave(store, data.draft) : null;
    saver.current = autosave;
    return () => {
      stopCheck();
      autosave?.stop();
    };
  }, [store, data]);
  useUndoKeys(store);
  const autosave = () => saver.current;
  return (
    <DraftContext value={store}>
      <SaveNotices autosave={autosave} />
      <div className="grid flex-1 grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_var(--title-column)]">
        <div className="min-w-0">
          <DrawingZone data={data} />
          <FormZones data={data} />
        </div>
        <aside className="flex min-w-0 flex-col border-ink max-lg:border-t lg:border-l">
          <section className="zone lg:sticky lg:top-0">
            <ZoneHeading letter={letterOf(ZONES.length)} note={<SaveNote />}>
              Faults
            </ZoneHeading>
            <FaultZone />
            <UndoButtons />
            <p className="mt-10">
              <a className="link" href={paths.helpPage('authoring')}>
                How a template is written
              </a>
            </p>
          </section>
          <div className="mt-auto">
            <DraftBlock data={data} autosave={autosave} versionNow={() => store.snapshot.version} />
          </div>
        </aside>
      </div>
    </DraftContext>
  );
}

/** The form, in the order in which a template is written. */
const ZONES: readonly (readonly [title: string, Fields: ComponentType<{ readonly data: DraftPageData }>])[] =
  [
    ['Title', TitleZone],
    ['Parameters', ParameterZone],
    ['Derived values', DerivedZone],
    ['Beam', BeamZone],
    ['Loads', LoadZone],
    ['Redundants', RedundantZone],
    ['Validity', RuleZone],
    ['Sources', SourceZone],
    ['Closed forms', ResultZone],
    ['Proof cases', ({ data: { draft } }) => <ProofZone slug={draft.slug} revision={draft.revision} />],
    ['Notes', NoteZone],
    ['What is new', ChangeZone],
  ];

/** After the drawing, which is A. */
const letterOf = (index: number): string => String.fromCharCode('B'.charCodeAt(0) + index);

/** Drawn once: the fields inside follow the draft themselves. */
const FormZones = memo(function FormZones({ data }: { readonly data: DraftPageData }) {
  return ZONES.map(([title, Fields], index) => (
    <section key={title} className="zone border-b border-ink">
      <ZoneHeading letter={letterOf(index)}>{title}</ZoneHeading>
      <Fields data={data} />
    </section>
  ));
});

const Drawing = memo(DraftDrawing);

/** Follows the form a moment behind: whoever types waits for no drawing. */
function DrawingZone({ data }: { readonly data: DraftPageData }) {
  const editor = useDeferredValue(useEditor());
  return <Drawing editor={editor} system={data.system} />;
}
