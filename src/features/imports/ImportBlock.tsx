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
import { firstRowLine } from './report';
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
  const { state, table, edition, by, created_at: at } = view;
  const isReady =
    state === 'findings' && !props.hasNews && !view.unchecked && view.open === 0 && view.may_act;
  const set = (name: keyof typeof EMPTY) => ({
    name,
    value: said[name],
    onChange: ({ target }: { target: { value: string } }) => setSaid({ ...said, [name]: target.value }),
  });
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
        others={othersOf(props)}
      >
        {isReady && (
          <div className="col-span-6 grid gap-10">
            <TextField
              {...set('change_note')}
              label="What is new in this edition, and why"
              rows={3}
              maxLength={2000}
            />
            <div className="grid grid-cols-2 gap-10">
              <ChoiceField
                {...set('change_class')}
                label="Class of change"
                choices={choices(CHANGE_CLASSES)}
              />
              <ChoiceField {...set('consequence')} label="At stake" choices={choices(CONSEQUENCES)} />
            </div>
          </div>
        )}
      </TitleBlock>
      <TitleStrip {...identity} action={action} />
    </aside>
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

/** Leaving out every row that has an error, and ending it. */
function othersOf({ view, isBusy, onFix, onCancel }: ImportBlockProps): readonly BlockAction[] {
  const { state, report } = view;
  if (state === 'committed' || state === 'cancelled' || !view.may_act || isBusy) return [];
  const errors = report?.groups.filter(({ severity }) => severity === 'error') ?? [];
  const found = errors.flatMap(({ findings }) => findings.flatMap(({ line }) => line ?? []));
  const lines = [...new Set(found)].filter((line) => line >= firstRowLine(view.mapping));
  const leave = {
    label: lines.length === 1 ? 'Leave out 1 row' : `Leave out ${lines.length} rows`,
    onPress: () => onFix({ leave_out: lines }),
  };
  return [
    ...(state === 'findings' && lines.length > 0 ? [leave] : []),
    { label: 'Cancel the import', onPress: onCancel },
  ];
}
