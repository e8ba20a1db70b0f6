import { Button } from '@/components/ui/Button';
import { Notice } from '@/components/ui/Notice';
import { valueWords } from '@/features/desk/value-words';
import type { Autosave } from './autosave.api';
import type { DraftStore } from './store';
import { useDraft, useSnapshot } from './use-editor';

const TIME = new Intl.DateTimeFormat('en-GB', { timeStyle: 'short' });

/** "Saved 14:32 · version 7". */
export function SaveNote() {
  const saving = useSnapshot((snapshot) => snapshot.saving);
  const version = useSnapshot((snapshot) => snapshot.version);
  const conflicts = useSnapshot((snapshot) => snapshot.conflicts.length);
  if (useSnapshot((snapshot) => snapshot.readOnly)) return <span>Version {version}</span>;
  return (
    <span role="status" data-saving={conflicts > 0 ? 'conflict' : saving.kind}>
      {conflicts > 0 || saving.kind === 'refused' ? (
        <a className="link" href={`#${NOTICES}`}>
          {conflicts > 0 ? 'Not saved: decide first' : 'Not saved: why'}
        </a>
      ) : (
        wordsOf(saving.kind)
      )}
      {conflicts === 0 && saving.kind === 'saved' && saving.at && ` ${TIME.format(saving.at)}`} · version{' '}
      {version}
    </span>
  );
}

/** Where the notices stand, above the drawing: whoever writes further down is led there. */
const NOTICES = 'save-notices';

const wordsOf = (kind: 'saved' | 'waiting' | 'saving' | 'offline'): string =>
  ({
    saved: 'Saved',
    waiting: 'Not saved yet',
    saving: 'Saving',
    offline: 'No answer: kept here',
  })[kind];

/** What keeps the draft from being saved, and what somebody else changed meanwhile. */
export function SaveNotices({ autosave }: { readonly autosave: () => Autosave | null }) {
  const saving = useSnapshot((snapshot) => snapshot.saving);
  const conflicts = useSnapshot((snapshot) => snapshot.conflicts);
  const mergedAt = useSnapshot((snapshot) => snapshot.mergedAt);
  const again = <Button onClick={() => void autosave()?.flush()}>Save now</Button>;
  return (
    <div id={NOTICES} tabIndex={-1}>
      {saving.kind === 'offline' && (
        <Notice title="The server does not answer." actions={again}>
          <p>Go on writing: it is kept in this tab, and saved as soon as the server answers.</p>
        </Notice>
      )}
      {saving.kind === 'refused' && (
        <Notice tone="error" title="Not saved." actions={again}>
          <p>{saving.message} What you wrote is kept in this tab.</p>
        </Notice>
      )}
      {mergedAt && conflicts.length === 0 && (
        <Notice title={`Somebody else saved at ${TIME.format(mergedAt)}: both changes are in.`}>
          <p>No place was changed by both. What was done before cannot be undone any more.</p>
        </Notice>
      )}
      {conflicts.length > 0 && <Conflicts />}
    </div>
  );
}

function Conflicts() {
  const store = useDraft();
  const conflicts = useSnapshot((snapshot) => snapshot.conflicts);
  const count = conflicts.length;
  return (
    <Notice
      tone="error"
      title={`Somebody else changed ${count === 1 ? 'a place' : `${count} places`} that you changed too.`}
    >
      <p>Everything else of both is in. Choose for each; then it is saved.</p>
      <ul aria-label="Changed by both" className="mt-6 grid gap-10">
        {conflicts.map((conflict) => {
          const place = wordsAt(store, conflict.at);
          return (
            <li key={conflict.at} className="grid gap-6 border-t border-rule-strong pt-6">
              <b className="font-semibold">{place}</b>
              <span className="grid gap-8 md:grid-cols-2">
                <Version
                  title="Yours"
                  value={conflict.mine}
                  place={place}
                  onTake={() => store.decideConflict(conflict, 'mine')}
                />
                <Version
                  title="Theirs"
                  value={conflict.theirs}
                  place={place}
                  onTake={() => store.decideConflict(conflict, 'theirs')}
                />
              </span>
            </li>
          );
        })}
      </ul>
    </Notice>
  );
}

const CHANGE_WORDS: Readonly<Record<string, string>> = {
  '/change_note': 'What is new and why',
  '/change_class': 'Class of change',
  '/consequence': 'What is at stake',
};

const wordsAt = (store: DraftStore, at: string): string =>
  CHANGE_WORDS[at] ?? store.placeWords(store.document, at.replace(/^\/document/, ''));

interface VersionProps {
  readonly title: string;
  readonly value: unknown;
  readonly place: string;
  readonly onTake: () => void;
}

function Version({ title, value, place, onTake }: VersionProps) {
  const text =
    value === undefined ? 'removed' : typeof value === 'string' ? value || 'empty' : valueWords(value);
  return (
    <span className="grid content-start gap-6">
      <span className="caps">{title}</span>
      <span className="max-h-160 overflow-auto text-schedule wrap-anywhere whitespace-pre-wrap">{text}</span>
      <span>
        <Button size="small" aria-label={`Take ${title.toLowerCase()}: ${place}`} onClick={onTake}>
          Take {title.toLowerCase()}
        </Button>
      </span>
    </span>
  );
}
