import { useEffect, useRef, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import { type Autosave, startAutosave } from '@/features/author/autosave.api';
import { ChangeZone } from '@/features/author/ChangeZone';
import { type Checker, startCheck } from '@/features/author/check.api';
import { DraftBlock } from '@/features/author/DraftBlock';
import type { Pointer } from '@/features/author/edit';
import { FaultZone } from '@/features/author/FaultZone';
import { SaveNote, SaveNotices } from '@/features/author/Saving';
import { DraftStore } from '@/features/author/store';
import { UndoButtons, useUndoKeys } from '@/features/author/UndoButtons';
import { DraftContext } from '@/features/author/use-editor';
import { partName } from '@/features/desk/part-name';
import type { Written } from '@/features/review/draft';
import { SET_READERS, type SetKind } from '@/features/review/read-set';
import { paths } from '@/paths';
import { type IssuedSet, referredFaults } from './criteria';
import type { SetPageData, ZoneProps } from './page';
import { UnknownFields } from './UnknownFields';
import { ZONES, type Zone } from './zones';

/** Places of a set as its form calls them, where it has other words than the document. */
const PLACES: Readonly<Record<string, string>> = {
  '/name': 'Title',
  '/publication': 'Standard, edition and annex',
  '/combinations': 'Combination set',
  '/families': 'For members of',
  '/letters': 'Letters of the groups',
  '/snow/caution': 'What to heed of snow',
};

const placeWords = (document: Written, at: Pointer): string =>
  PLACES[at] ?? partName(at, document).replace(/^[a-z]/, (letter) => letter.toUpperCase());

/** A set is read in a moment: no worker is needed. */
const checkerOf = (kind: SetKind, sets: readonly IssuedSet[]): Checker => ({
  check: (document, answer) => {
    const reading = SET_READERS[kind](document);
    const faults = reading.ok ? [] : reading.faults;
    answer(kind === 'criteria' ? [...faults, ...referredFaults(document, sets)] : faults);
  },
  stop: () => {},
});

const letterOf = (index: number): string => String.fromCharCode('A'.charCodeAt(0) + index);

/** The draft of a set: its tables as a form, what it comes to beside it, saved while it is written. */
export function SetEditor({ data }: ZoneProps) {
  const { store, autosave } = useOpenDraft(data);
  useUndoKeys(store);
  const { form, side } = ZONES[data.kind];
  const zones: readonly Zone[] = [...form, ['What is new', ChangeZone]];
  return (
    <DraftContext value={store}>
      <SaveNotices autosave={autosave} />
      <div className="grid flex-1 grid-cols-[minmax(0,1fr)] lg:grid-cols-[minmax(0,1fr)_var(--title-column)]">
        <div className="min-w-0">
          {zones.map(([title, Fields], index) => (
            <section key={title} className="zone border-b border-ink">
              <ZoneHeading letter={letterOf(index)}>{title}</ZoneHeading>
              <Fields data={data} />
            </section>
          ))}
        </div>
        <aside className="flex min-w-0 flex-col border-ink max-lg:border-t lg:border-l">
          {/* As long as the form: what sticks stays clear of the title block. */}
          <div className="flex-1">
            <div className="lg:sticky lg:top-0 lg:max-h-[calc(100vh-54px)] lg:overflow-y-auto">
              <Faults letter={letterOf(zones.length)} />
              {side.map(([title, Fields], index) => (
                <section key={title} className="zone border-t border-ink">
                  <ZoneHeading letter={letterOf(zones.length + 1 + index)}>{title}</ZoneHeading>
                  <Fields data={data} />
                </section>
              ))}
            </div>
          </div>
          <div>
            <DraftBlock data={data} autosave={autosave} versionNow={() => store.snapshot.version} />
          </div>
        </aside>
      </div>
    </DraftContext>
  );
}

/** The draft's state while the page is open: checked and saved as it changes. */
function useOpenDraft({ draft, isEditable, kind, sets }: SetPageData) {
  const [store] = useState(() => new DraftStore(draft, !isEditable, placeWords));
  const saver = useRef<Autosave | null>(null);
  useEffect(() => {
    const stopCheck = startCheck(store, checkerOf(kind, sets));
    const autosave = isEditable ? startAutosave(store, draft) : null;
    saver.current = autosave;
    return () => {
      stopCheck();
      autosave?.stop();
    };
  }, [store, draft, isEditable, kind, sets]);
  return { store, autosave: () => saver.current };
}

function Faults({ letter }: { readonly letter: string }) {
  return (
    <section className="zone">
      <ZoneHeading letter={letter} note={<SaveNote />}>
        Faults
      </ZoneHeading>
      <FaultZone none="None. It can be sent to review." />
      <UnknownFields />
      <UndoButtons />
      <p className="mt-10">
        <a className="link" href={paths.helpPage('sets')}>
          How a set is written
        </a>
      </p>
    </section>
  );
}
