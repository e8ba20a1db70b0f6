import { type KeyboardEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { type PageState, readAddress, writeAddress } from '../address';
import { SavedList } from './SavedList';
import { SaveForm } from './SaveForm';
import type { SavedSearchView } from './saved';
import { useSaved } from './use-saved';

export interface SavedSearchesOf {
  readonly searches: readonly SavedSearchView[];
  readonly mayShare: boolean;
  /** Of those that others share. */
  readonly mayRemove: boolean;
}

type Part = 'form' | 'list';

/** Which part of the saved searches is open, for the buttons that open it and the strip that it opens in. */
export function useSavedSearches({ searches }: SavedSearchesOf) {
  const id = useId();
  const saved = useSaved(searches);
  const [open, setOpen] = useState<Part | null>(null);
  return { id, saved, open, setOpen };
}
type Opened = ReturnType<typeof useSavedSearches>;

const opener = (id: string, part: Part) => `${id}-${part}`;

export function SavedButtons({ opened: { id, saved, open, setOpen } }: { readonly opened: Opened }) {
  const button = (part: Part, words: string) => (
    <Button
      tone="text"
      id={opener(id, part)}
      aria-expanded={open === part}
      aria-controls={open === part ? id : undefined}
      onClick={() => setOpen(open === part ? null : part)}
    >
      {words}
    </Button>
  );
  return (
    <>
      {button('form', 'Save this search')}
      {button('list', `Saved (${saved.searches.length})`)}
    </>
  );
}

interface SavedStripProps extends SavedSearchesOf {
  readonly opened: Opened;
  readonly state: PageState;
  readonly onState: (change: (state: PageState) => PageState) => void;
}

/** Under the filters: the name for what they ask, or what was saved of it before. */
export function SavedStrip({ opened, state, onState, ...may }: SavedStripProps) {
  const { id, saved, open, setOpen } = opened;
  const query = writeAddress(state);
  if (open === null) return null;
  const close = () => {
    setOpen(null);
    document.getElementById(opener(id, open))?.focus();
  };
  const leave = (event: KeyboardEvent) => event.key === 'Escape' && close();
  return (
    <fieldset
      id={id}
      className="col-span-full min-w-0 border-t border-rule px-20 py-12 max-md:px-12"
      onKeyDown={leave}
    >
      <legend className="sr-only">Saved searches</legend>
      {open === 'form' && query === '' && <NothingAsked onClose={close} />}
      {open === 'form' && query !== '' && (
        <SaveForm
          {...{ query, saved }}
          mayShare={may.mayShare}
          onClose={close}
          onSaved={() => {
            setOpen('list');
            document.getElementById(opener(id, 'list'))?.focus();
          }}
        />
      )}
      {open === 'list' && (
        <SavedList
          {...{ query, saved }}
          mayShare={may.mayShare}
          mayRemove={may.mayRemove}
          onOpen={(asked) => onState(() => readAddress(asked))}
        />
      )}
    </fieldset>
  );
}

const NothingAsked = ({ onClose }: { readonly onClose: () => void }) => (
  <p className="flex flex-wrap items-center gap-x-14 text-schedule">
    Nothing is asked yet. Set a range, a shape or a table first, then save it.
    <Button tone="text" onClick={onClose}>
      Close
    </Button>
  </p>
);
