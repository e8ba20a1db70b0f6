import { useEffect, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { SavedLine } from './SavedLine';
import { isSameSearch, type SavedSearchView } from './saved';
import type { Saved } from './use-saved';

interface SavedListProps {
  /** What the page asks now. */
  readonly query: string;
  readonly saved: Saved;
  readonly mayShare: boolean;
  /** Of those that others share. */
  readonly mayRemove: boolean;
  readonly onOpen: (query: string) => void;
}

/** The searches that a person has saved or others share, each a link to the page as it was. */
export function SavedList({ query, saved, mayShare, mayRemove, onOpen }: SavedListProps) {
  const focusOn = useFocusOn();
  const { removed, failure, remove, restore } = useRemoving(saved, focusOn);
  return (
    <div className="text-schedule">
      {saved.searches.length === 0 ? (
        <p className="text-ink-2">
          No search is saved yet. Set ranges, a shape or a table, then press Save this search.
        </p>
      ) : (
        <ul aria-label="Saved searches" className="grid gap-x-28 lg:grid-cols-2">
          {saved.searches.map((search) => (
            <SavedLine
              key={search.id}
              {...{ search, mayShare }}
              onOpen={() => onOpen(search.query)}
              isOpen={isSameSearch(search.query, query)}
              mayRemove={search.mine || mayRemove}
              onChange={(change) => saved.change(search.id, change)}
              onRemove={() => remove(search)}
              onFocus={() => focusOn(search.id)}
            />
          ))}
        </ul>
      )}
      {removed && (
        <p
          role="status"
          data-saved="removed"
          tabIndex={-1}
          className="mt-6 flex flex-wrap items-center gap-x-14"
        >
          “{removed.name}” is deleted.
          {removed.mine && (
            <Button tone="text" onClick={() => restore(removed)}>
              Take it back
            </Button>
          )}
        </p>
      )}
      {failure && (
        <p role="alert" className="mt-6 font-semibold text-error">
          {failure}
        </p>
      )}
    </div>
  );
}

/** To the first link or button of a line, else to its words, once it stands as it was changed. */
function useFocusOn(): (id: string) => void {
  const [wanted, setWanted] = useState<{ readonly id: string } | null>(null);
  useEffect(() => {
    if (wanted === null) return;
    const line = document.querySelector<HTMLElement>(`[data-saved="${wanted.id}"]`);
    (line?.querySelector<HTMLElement>('a, button') ?? line)?.focus();
  }, [wanted]);
  return (id) => setWanted({ id });
}

/** Deletes, and takes the last one back. */
function useRemoving(saved: Saved, focusOn: (id: string) => void) {
  const [removed, setRemoved] = useState<SavedSearchView | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const remove = async (search: SavedSearchView) => {
    const kept = await saved.remove(search.id);
    setFailure(kept.kind === 'refused' ? kept.message : null);
    if (kept.kind === 'refused') return;
    setRemoved(search);
    focusOn('removed');
  };
  const restore = async ({ name, query, shared }: SavedSearchView) => {
    const kept = await saved.save({ name, query, shared });
    setFailure(kept.kind === 'refused' ? kept.message : null);
    if (kept.kind === 'refused') return;
    setRemoved(null);
    focusOn(kept.value.id);
  };
  return { removed, failure, remove, restore };
}
