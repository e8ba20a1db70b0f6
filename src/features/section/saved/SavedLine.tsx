import { type KeyboardEvent, type SyntheticEvent, useId, useState } from 'react';
import { Button } from '@/components/ui/Button';
import { FieldNote } from '@/components/ui/Field';
import { paths } from '@/paths';
import { AddressLink } from '../AddressLink';
import { LONGEST_NAME, type SavedSearchView } from './saved';
import type { Saved } from './use-saved';

interface SavedLineProps {
  readonly search: SavedSearchView;
  /** Whether it is what the page shows. */
  readonly isOpen: boolean;
  readonly mayShare: boolean;
  readonly mayRemove: boolean;
  readonly onOpen: () => void;
  readonly onChange: (change: Parameters<Saved['change']>[1]) => ReturnType<Saved['change']>;
  readonly onRemove: () => void;
  /** Brings the focus back to this line, whose control has gone. */
  readonly onFocus: () => void;
}

/** A saved search as a link, and what may be done with it. */
export function SavedLine(props: SavedLineProps) {
  const { search, isOpen, onOpen, onChange, onFocus } = props;
  const [isRenaming, setRenaming] = useState(false);
  const [failure, setFailure] = useState<string | undefined>();
  const leave = () => {
    setFailure(undefined);
    setRenaming(false);
    if (isRenaming) onFocus();
  };
  const change = async (asked: Parameters<SavedLineProps['onChange']>[0]) => {
    const kept = await onChange(asked);
    if (kept.kind === 'kept') leave();
    else setFailure(kept.message);
  };
  return (
    <li
      data-saved={search.id}
      className="flex min-h-34 flex-wrap items-center gap-x-14 border-b border-rule py-2"
    >
      {isRenaming ? (
        <Rename name={search.name} error={failure} onName={(name) => change({ name })} onClose={leave} />
      ) : (
        <>
          <span className="mr-auto min-w-0 max-md:basis-full">
            <AddressLink href={paths.sections + search.query} isCurrent={isOpen} onFollow={onOpen}>
              {search.name}
            </AddressLink>
            {search.shared && (
              <span className="text-ink-2"> shared by {search.mine ? 'you' : search.by}</span>
            )}
          </span>
          <Acts {...props} onRename={() => setRenaming(true)} onShared={(shared) => change({ shared })} />
          <FieldNote id={`${search.id}-note`} error={failure} />
        </>
      )}
    </li>
  );
}

interface ActsProps
  extends Pick<SavedLineProps, 'search' | 'mayShare' | 'mayRemove' | 'onRemove' | 'onFocus'> {
  readonly onRename: () => void;
  readonly onShared: (shared: boolean) => void;
}

function Acts({ search: { name, mine, shared, by }, ...props }: ActsProps) {
  const { mayShare, mayRemove, onRename, onShared, onRemove, onFocus } = props;
  const [isSure, setSure] = useState(true);
  // What is somebody else's cannot be taken back, and so is asked about first.
  if (!isSure)
    return (
      <>
        <span role="alert">Delete it for {by} and everybody else?</span>
        <Button size="small" onClick={onRemove}>
          Delete
        </Button>
        <Button
          tone="text"
          onClick={() => {
            setSure(true);
            onFocus();
          }}
        >
          Keep
        </Button>
      </>
    );
  return (
    <>
      {mine && (
        <Button tone="text" aria-label={`Rename ${name}`} onClick={onRename}>
          Rename
        </Button>
      )}
      {mine && (shared || mayShare) && (
        <Button
          tone="text"
          aria-label={shared ? `Share ${name} no longer` : `Share ${name} with the practice`}
          onClick={() => onShared(!shared)}
        >
          {shared ? 'Unshare' : 'Share'}
        </Button>
      )}
      {mayRemove && (
        <Button
          tone="text"
          aria-label={`Delete ${name}`}
          onClick={() => {
            if (mine) return onRemove();
            setSure(false);
            onFocus();
          }}
        >
          Delete
        </Button>
      )}
    </>
  );
}

interface RenameProps {
  readonly name: string;
  readonly error: string | undefined;
  readonly onName: (name: string) => void;
  readonly onClose: () => void;
}

function Rename({ name, error, onName, onClose }: RenameProps) {
  const id = useId();
  const [text, setText] = useState(name);
  const submit = (event: SyntheticEvent) => {
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
        aria-invalid={error ? true : undefined}
        aria-describedby={error ? id : undefined}
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
      <span className="basis-full">
        <FieldNote id={id} error={error} />
      </span>
    </form>
  );
}
