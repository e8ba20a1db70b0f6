import { type FormEvent, type KeyboardEvent, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { paths } from '@/paths';
import { AddressLink } from '../AddressLink';
import { isSameSearch, LONGEST_NAME, type SavedSearchView } from './saved';
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

/** To what is left of a line, once it is drawn: its first link or button. */
const focusOn = (id: string) =>
  requestAnimationFrame(() =>
    document.querySelector<HTMLElement>(`[data-saved="${id}"] :is(a, button)`)?.focus(),
  );

/** The searches that a person has saved or others share, each a link to the page as it was. */
export function SavedList({ query, saved, mayShare, mayRemove, onOpen }: SavedListProps) {
  const [removed, setRemoved] = useState<SavedSearchView | null>(null);
  const [failure, setFailure] = useState<string | null>(null);
  const remove = async (search: SavedSearchView) => {
    const kept = await saved.remove(search.id);
    setFailure(kept.kind === 'refused' ? kept.message : null);
    if (kept.kind === 'refused') return;
    setRemoved(search);
    focusOn('removed');
  };
  const restore = async ({ name, query: of, shared }: SavedSearchView) => {
    const kept = await saved.save({ name, query: of, shared });
    setFailure(kept.kind === 'refused' ? kept.message : null);
    if (kept.kind === 'refused') return;
    setRemoved(null);
    focusOn(kept.value.id);
  };
  return (
    <div className="text-schedule">
      {saved.searches.length === 0 ? (
        <p className="text-ink-2">
          No search is saved yet. Set ranges, a shape or a table, then press Save this search.
        </p>
      ) : (
        <ul aria-label="Saved searches" className="grid gap-x-28 lg:grid-cols-2">
          {saved.searches.map((search) => (
            <Line
              key={search.id}
              {...{ search, mayShare, onOpen }}
              isOpen={isSameSearch(search.query, query)}
              mayRemove={search.mine || mayRemove}
              onChange={(change) => saved.change(search.id, change)}
              onRemove={() => remove(search)}
            />
          ))}
        </ul>
      )}
      {removed && (
        <p role="status" data-saved="removed" className="mt-6 flex flex-wrap items-center gap-x-14">
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

interface LineProps {
  readonly search: SavedSearchView;
  readonly isOpen: boolean;
  readonly mayShare: boolean;
  readonly mayRemove: boolean;
  readonly onOpen: (query: string) => void;
  readonly onChange: (change: Parameters<Saved['change']>[1]) => ReturnType<Saved['change']>;
  readonly onRemove: () => void;
}

function Line({ search, isOpen, mayShare, mayRemove, onOpen, onChange, onRemove }: LineProps) {
  const [isRenaming, setRenaming] = useState(false);
  const [failure, setFailure] = useState<string | null>(null);
  const { name, query, shared, mine, by } = search;
  const change = async (asked: Parameters<LineProps['onChange']>[0]) => {
    const kept = await onChange(asked);
    setFailure(kept.kind === 'refused' ? kept.message : null);
    if (kept.kind === 'kept') leave();
  };
  const leave = () => {
    if (isRenaming) focusOn(search.id);
    setRenaming(false);
  };
  return (
    <li
      data-saved={search.id}
      className="flex min-h-34 flex-wrap items-center gap-x-14 border-b border-rule py-2"
    >
      {isRenaming ? (
        <Rename name={name} onName={(asked) => change({ name: asked })} onClose={leave} />
      ) : (
        <>
          <span className="mr-auto min-w-0 max-md:basis-full">
            <AddressLink href={paths.sections + query} isCurrent={isOpen} onFollow={() => onOpen(query)}>
              {name}
            </AddressLink>
            {shared && <span className="text-ink-2"> {mine ? 'shared by you' : `shared by ${by}`}</span>}
          </span>
          {mine && (
            <Button tone="text" aria-label={`Rename ${name}`} onClick={() => setRenaming(true)}>
              Rename
            </Button>
          )}
          {mine && (shared || mayShare) && (
            <Button
              tone="text"
              aria-label={shared ? `Share ${name} no longer` : `Share ${name} with the practice`}
              onClick={() => change({ shared: !shared })}
            >
              {shared ? 'Unshare' : 'Share'}
            </Button>
          )}
          {mayRemove && (
            <Button tone="text" aria-label={`Delete ${name}`} onClick={onRemove}>
              Delete
            </Button>
          )}
        </>
      )}
      {failure && (
        <p role="alert" className="basis-full font-semibold text-error">
          {failure}
        </p>
      )}
    </li>
  );
}

interface RenameProps {
  readonly name: string;
  readonly onName: (name: string) => void;
  readonly onClose: () => void;
}

function Rename({ name, onName, onClose }: RenameProps) {
  const [text, setText] = useState(name);
  const submit = (event: FormEvent) => {
    event.preventDefault();
    onName(text);
  };
  const leave = (event: KeyboardEvent) => {
    if (event.key !== 'Escape') return;
    event.stopPropagation();
    onClose();
  };
  return (
    <form noValidate className="flex flex-1 flex-wrap items-center gap-x-14 gap-y-4" onSubmit={submit}>
      <input
        aria-label={`New name of ${name}`}
        // biome-ignore lint/a11y/noAutofocus: opened by a press, for this field
        autoFocus
        autoComplete="off"
        className="input min-w-0 flex-1"
        maxLength={LONGEST_NAME}
        value={text}
        onChange={(event) => setText(event.target.value)}
        onKeyDown={leave}
      />
      <Button type="submit" size="small">
        Save
      </Button>
      <Button tone="text" onClick={onClose}>
        Cancel
      </Button>
    </form>
  );
}
