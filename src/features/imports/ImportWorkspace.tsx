import { type CSSProperties, useState } from 'react';
import { ZoneHeading } from '@/components/ui/ZoneHeading';
import type { Answer, Mapping } from '@/features/section/import/contract';
import { answer, openQuestions } from '@/features/section/import/mapping';
import { AboutForm, type Draft } from './AboutForm';
import { ColumnTable } from './ColumnTable';
import { FindingZone } from './FindingZone';
import { FIELDS } from './fields';
import { ImportBlock } from './ImportBlock';
import { ImportHead } from './ImportHead';
import type { About, ImportView, TableChoice } from './imports';
import { importApi } from './imports.api';
import { Kept } from './Kept';
import { useImport } from './use-import';
import { LANGUAGE_WORDS } from './words';

export interface ImportWorkspaceProps {
  readonly practice: string;
  readonly first: ImportView;
  readonly tables: readonly TableChoice[];
  /** A number that is free for a new table. */
  readonly reference: string;
}

const ABOUT_KEYS = [
  'table',
  'name',
  'reference',
  'supplier',
  'standard',
  'source',
  'catalogue_date',
  'licence',
  'conventions',
  'notes',
] as const satisfies readonly (keyof About)[];

const draftOf = (about: ImportView['about'], reference: string): Draft => ({
  ...(Object.fromEntries(ABOUT_KEYS.map((key) => [key, about[key] ?? ''])) as Draft),
  reference: about.reference ?? reference,
});

const EDITABLE: readonly ImportView['state'][] = ['mapping', 'failed', 'findings'];

/** What is said of the file and not kept yet, and how it is kept. */
function useSaid({ view, act }: ReturnType<typeof useImport>, reference: string) {
  const { id, version, state } = view;
  const [answers, setAnswers] = useState<readonly Answer[]>([]);
  const [about, setAbout] = useState(() => draftOf(view.about, reference));
  const hasNews =
    answers.length > 0 || JSON.stringify(about) !== JSON.stringify(draftOf(view.about, reference));

  async function keep(said: readonly Answer[]) {
    const kept = await importApi.map(id, version, { about, answers: [...said], check: false });
    if (kept.kind === 'done') setAnswers([]);
    return kept;
  }
  function say(one: Answer) {
    const said = [...answers, one];
    setAnswers(said);
    // In another encoding the headings may read otherwise: the server reads the file anew.
    if (one.kind === 'encoding') void act(() => keep(said));
  }
  const check = () =>
    act(async () => {
      const kept = hasNews || state === 'mapping' ? await keep(answers) : null;
      if (kept && kept.kind !== 'done') return kept;
      const asked = await importApi.check(id, kept?.view.version ?? version);
      // What was said is kept though it is not complete yet.
      return asked.kind === 'refused' && kept ? { ...asked, view: kept.view } : asked;
    });
  return { mapping: answers.reduce(answer, view.mapping), about, setAbout, hasNews, say, check };
}

/** A file on its way to be an edition: its columns, what was found in it, and what becomes of it. */
export function ImportWorkspace({ practice, first, tables, reference }: ImportWorkspaceProps) {
  const found = useImport(first);
  const { view, isBusy, problem, act, isLost, underWay } = found;
  const { mapping, about, setAbout, hasNews, say, check } = useSaid(found, reference);
  const { id, version, state } = view;
  const isEditable = view.may_act && !underWay && !isBusy && EDITABLE.includes(state);
  const fix = (fixes: Parameters<typeof importApi.fix>[2]) => act(() => importApi.fix(id, version, fixes));
  const cancel = async () => {
    const isDone = await act(() => importApi.cancel(id, version));
    // What was pressed is gone.
    if (isDone) document.getElementById('title-block')?.focus();
  };
  return (
    <>
      <ImportHead {...{ view, problem, mapping }} />
      <div className="import-two">
        <section className="zone" style={{ '--columns': mapping.columns.length } as CSSProperties}>
          <ZoneHeading letter="A" note={matchedWords(view, mapping)}>
            Columns
          </ZoneHeading>
          <div className="overflow-x-auto">
            <ColumnTable mapping={mapping} view={view} isFixed={!isEditable} onAnswer={say} />
          </div>
        </section>
        <FindingZone
          {...{ view, mapping, underWay, isLost, isEditable }}
          onAnswer={say}
          onFix={fix}
          onAccept={(accept) => act(() => importApi.accept(id, version, accept))}
          onCancel={cancel}
        />
      </div>
      <div className="import-low">
        <section className="zone">
          <ZoneHeading letter="C">Where it is from</ZoneHeading>
          <AboutForm
            {...{ about, tables }}
            free={reference}
            faults={problem?.faults ?? []}
            isFixed={!isEditable}
            onAbout={setAbout}
          />
          <Kept view={view} isEditable={isEditable} act={act} />
        </section>
        <ImportBlock
          {...{ practice, view, mapping, isBusy, hasNews }}
          open={openQuestions(mapping)}
          onCheck={check}
          onFix={fix}
          onCommit={(body) => act(() => importApi.commit(id, version, body))}
          onCancel={cancel}
        />
      </div>
    </>
  );
}

/** How many columns are known, and what is left to be said of the others. */
function matchedWords({ recognised: { remembered, language } }: ImportView, mapping: Mapping): string {
  const { columns, axes } = mapping;
  const matched = columns.filter(({ field }) => field !== null);
  const waits = columns.filter(({ field, byAxes }) => field === null && byAxes && axes === null).length;
  const hasOpenUnit = matched.some(({ field, unit }) => unit === null && field && FIELDS[field].quantity);
  const headings = language ? LANGUAGE_WORDS[language] : undefined;
  const known = remembered
    ? `Read as the last file of ${remembered.supplier}.`
    : `${matched.length} of ${columns.length} known by ${headings ? `their ${headings} headings` : 'name'}.`;
  const rest = [
    ...(waits > 0 ? [`${waits} wait for the axes.`] : []),
    ...(hasOpenUnit ? ['Say the units that are missing.'] : []),
  ];
  return [known, ...rest].join(' ');
}
