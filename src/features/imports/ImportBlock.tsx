import { useState } from 'react';
import type { BlockAction } from '@/components/ui/BlockActions';
import { ChoiceField, TextField } from '@/components/ui/Field';
import { TitleBlock } from '@/components/ui/TitleBlock';
import { TitleStrip } from '@/components/ui/TitleStrip';
import { CHANGE_CLASSES, CONSEQUENCES } from '@/features/review/review';
import type { Question } from '@/features/section/import/contract';
import { paths } from '@/paths';
import type { Commit, Fixes, ImportView } from './imports';
import { openWords } from './QuestionList';
import { faultyLines, lostWords } from './report';
import { STATE_LABELS } from './words';

interface ImportBlockProps {
  readonly practice: string;
  readonly view: ImportView;
  readonly mapping: ImportView['mapping'];
  /** Kinds of question that are open, with what was just said. */
  readonly open: readonly Question['kind'][];
  readonly hasNews: boolean;
  readonly isBusy: boolean;
  readonly onCheck: () => void;
  readonly onFix: (fixes: Partial<Fixes>) => void;
  readonly onCommit: (body: Commit) => void;
  readonly onCancel: () => void;
}

const capital = (word: string): string => word.charAt(0).toUpperCase() + word.slice(1);
const choices = (words: readonly string[]) => [
  { value: '', label: 'Say which' },
  ...words.map((value) => ({ value, label: capital(value) })),
];
const EMPTY = { change_note: '', change_class: '', consequence: '' };

/** Whose import it is, and its one main action: to be checked, then to become an edition. */
export function ImportBlock(props: ImportBlockProps) {
  const { practice, view } = props;
  const [said, setSaid] = useState(EMPTY);
  const [isEnding, setEnding] = useState(false);
  const { state, table, edition, by, created_at: at } = view;
  const isReady =
    state === 'findings' && !props.hasNews && !view.unchecked && view.open === 0 && view.may_act;
  const action = actionOf(props, isReady, said);
  const identity = {
    kind: 'Section table',
    title: table?.name ?? view.file.name,
    status: edition?.state ?? 'draft',
    statusWord: edition ? undefined : 'No edition yet',
    reference: table?.reference,
    revision: edition ? String(edition.number) : undefined,
    revisionLabel: 'Edn',
  } as const;
  return (
    <aside className="flex min-w-0 flex-col justify-end">
      <TitleBlock
        {...identity}
        org={practice}
        orgNote={STATE_LABELS[state]}
        by={by}
        date={DAY.format(new Date(at))}
        action={action}
        others={isEnding ? endingOf(props, () => setEnding(false)) : othersOf(props, () => setEnding(true))}
      >
        {isEnding && !isOver(view) && (
          <p role="status" className="col-span-6">
            {lostWords(view)} A cancelled import does not come back; its file and the record of it stay.
          </p>
        )}
        {isReady && <CommitFields said={said} onSaid={setSaid} />}
      </TitleBlock>
      <TitleStrip {...identity} action={action} />
    </aside>
  );
}

interface CommitFieldsProps {
  readonly said: Said;
  readonly onSaid: (said: Said) => void;
}

function CommitFields({ said, onSaid }: CommitFieldsProps) {
  const set = (name: keyof Said) => ({
    name,
    value: said[name],
    onChange: ({ target }: { target: { value: string } }) => onSaid({ ...said, [name]: target.value }),
  });
  return (
    <div className="col-span-6 grid gap-10">
      <TextField
        {...set('change_note')}
        label="What is new in this edition, and why"
        rows={3}
        maxLength={2000}
      />
      <div className="grid grid-cols-2 gap-10">
        <ChoiceField {...set('change_class')} label="Class of change" choices={choices(CHANGE_CLASSES)} />
        <ChoiceField {...set('consequence')} label="At stake" choices={choices(CONSEQUENCES)} />
      </div>
    </div>
  );
}

const DAY = new Intl.DateTimeFormat('en-GB', { dateStyle: 'medium', timeZone: 'UTC' });

function actionOf(props: ImportBlockProps, isReady: boolean, said: typeof EMPTY): BlockAction | undefined {
  const { view, open, mapping, isBusy, hasNews, onCheck, onCommit } = props;
  const { state, table, edition } = view;
  if (edition && table && state === 'committed')
    return {
      label: edition.state === 'draft' ? 'Send for review' : 'Open the edition',
      href: paths.review('section-table', table.slug, edition.number),
    };
  if (!view.may_act)
    return {
      label: 'Save as draft edition',
      reason: 'Section tables are imported by a librarian.',
      isQuiet: true,
    };
  if (state === 'cancelled') return { label: 'Bring another file', href: paths.imports };
  if (state === 'checking' || state === 'committing')
    return {
      label: state === 'checking' ? 'Check the file' : 'Save as draft edition',
      reason: 'The worker is at it.',
      isQuiet: true,
    };
  if (state !== 'findings' || hasNews || view.unchecked)
    return {
      label: 'Check the file',
      onPress: onCheck,
      reason: openWords(open, mapping) ?? (isBusy ? 'It is being asked for.' : undefined),
    };
  const missing = isReady ? missingOf(said) : openReason(view.open ?? 0);
  return {
    label: 'Save as draft edition',
    onPress: () => isComplete(said) && onCommit(said),
    reason: missing ?? undefined,
    isQuiet: isReady,
  };
}

type Said = typeof EMPTY;
const isComplete = (said: Said): said is Said & Commit =>
  said.change_note.trim() !== '' && said.change_class !== '' && said.consequence !== '';

function missingOf(said: Said): string | null {
  if (said.change_note.trim() === '') return 'Say what is new.';
  if (said.change_class === '') return 'Say what kind of change it is.';
  return said.consequence === '' ? 'Say what is at stake.' : null;
}

const openReason = (open: number): string => `${open} to clear first`;

const isOver = ({ state, may_act }: ImportView): boolean =>
  state === 'committed' || state === 'cancelled' || !may_act;

/** Asked once more. What keeps it stands where the press was that asked. */
function endingOf(props: ImportBlockProps, onKeep: () => void): readonly BlockAction[] {
  if (isOver(props.view) || props.isBusy) return [];
  const keep = { label: 'Go on with it', onPress: onKeep };
  const end = { label: 'Cancel it for good', onPress: props.onCancel };
  return hasLinesToLeave(props.view) ? [end, keep] : [keep, end];
}

const hasLinesToLeave = (view: ImportView): boolean =>
  view.state === 'findings' && faultyLines(view).length > 0;

/** Leaving out every row that has an error, and ending it. */
function othersOf(
  { view, isBusy, onFix, onCancel }: ImportBlockProps,
  onAskEnd: () => void,
): readonly BlockAction[] {
  if (isOver(view) || isBusy) return [];
  const lines = faultyLines(view);
  const leave = {
    label: lines.length === 1 ? 'Leave out 1 row' : `Leave out ${lines.length} rows`,
    onPress: () => onFix({ leave_out: lines }),
  };
  return [
    ...(hasLinesToLeave(view) ? [leave] : []),
    { label: 'Cancel the import', onPress: lostWords(view) === '' ? onCancel : onAskEnd },
  ];
}
