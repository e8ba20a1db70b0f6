import { useDeferredValue, useEffect, useMemo, useState } from 'react';
import { ChoiceField } from '@/components/ui/Field';
import { LOAD_GROUP_NAMES, type LoadGroup } from '@/engine/combination';
import { useDraft, useSnapshot } from '@/features/author/use-editor';
import type { Written } from '@/features/review/draft';
import { VARIABLE } from './combinations';
import { categoriesOf, joined, LISTS, type List, type PreviewLine, previewOf, textsById } from './preview';

const TITLES: Readonly<Record<List, string>> = {
  '/strength': 'For the limit state',
  '/service': 'For service',
};

type Chosen = Readonly<Partial<Record<LoadGroup, string>>>;

/** What the set comes to, beside the form: each combination in numbers, with what it was in the issued revision. */
export function PreviewZone({ issued }: { readonly issued: Written | null }) {
  const document = useDeferredValue(useSnapshot(({ history }) => history.document));
  const [chosen, setChosen] = useState<Chosen>({});
  return (
    <>
      <CategoryChoices document={document} chosen={chosen} onChoose={setChosen} />
      {LISTS.map((list) => (
        <Lines key={list} list={list} document={document} issued={issued} chosen={chosen} />
      ))}
    </>
  );
}

interface ChoicesProps {
  readonly document: Written;
  readonly chosen: Chosen;
  readonly onChoose: (chosen: Chosen) => void;
}

function CategoryChoices({ document, chosen, onChoose }: ChoicesProps) {
  const offered = VARIABLE.map((group) => [group, categoriesOf(document, group)] as const).filter(
    ([, categories]) => categories.length > 1,
  );
  if (offered.length === 0) return null;
  return (
    <div className="mb-10 grid gap-8">
      {offered.map(([group, categories]) => (
        <ChoiceField
          key={group}
          label={`${LOAD_GROUP_NAMES[group]} as`}
          choices={categories.map(({ id, name }) => ({ value: id, label: name || id }))}
          value={(categories.find(({ id }) => id === chosen[group]) ?? categories[0])?.id ?? ''}
          onChange={({ target }) => onChoose({ ...chosen, [group]: target.value })}
        />
      ))}
    </div>
  );
}

interface LinesProps {
  readonly list: List;
  readonly document: Written;
  readonly issued: Written | null;
  readonly chosen: Chosen;
}

function Lines({ list, document, issued, chosen }: LinesProps) {
  const lines = useMemo(() => previewOf(document, list, chosen), [document, list, chosen]);
  const before = useMemo(
    () => (issued ? textsById(previewOf(issued, list, chosen)) : null),
    [issued, list, chosen],
  );
  const row = useRowInUse();
  if (lines.length === 0) return null;
  return (
    <section aria-label={`Combinations as used, ${TITLES[list].toLowerCase()}`} className="mb-12">
      <h3 className="caps mb-4">{TITLES[list]}</h3>
      <ol>
        {lines.map((line) => (
          <Line key={line.at} line={line} before={before} isInUse={row === line.at} />
        ))}
      </ol>
    </section>
  );
}

interface LineProps {
  readonly line: PreviewLine;
  readonly before: ReadonlyMap<string, string> | null;
  readonly isInUse: boolean;
}

function Line({ line, before, isInUse }: LineProps) {
  const store = useDraft();
  const text = joined(line.combinations);
  const was = before?.get(line.id);
  const isChanged = before !== null && line.missing === null && was !== text;
  const source = [line.name, line.clause, line.fromMemory ? 'from memory' : ''].filter((part) => part !== '');
  return (
    <li
      data-changed={isChanged || undefined}
      className={`border-b border-rule py-4 ${isInUse ? 'border-l-3 border-l-ochre bg-ochre-wash pl-8' : ''}`}
    >
      <button
        type="button"
        className="block w-full text-left font-semibold hover:underline pointer-coarse:min-h-44"
        onClick={() => {
          store.select(line.at);
          goTo(line.at);
        }}
      >
        {line.missing === null ? text : <span className="font-normal text-ochre-ink">{line.missing}</span>}
      </button>
      {isChanged && (
        <span className="block text-note text-ochre-ink">
          {was === undefined ? 'New in this revision' : <>was {was || 'nothing'}</>}
        </span>
      )}
      <span className="block text-note text-ink-2">{source.join(' · ')}</span>
    </li>
  );
}

/** The first field of a row of the tables, in view and with the focus. */
function goTo(row: string): void {
  requestAnimationFrame(() => {
    const field = document.querySelector<HTMLElement>(`[data-part="${CSS.escape(row)}"] [data-at]`);
    field?.scrollIntoView({ block: 'center' });
    field?.focus({ preventScroll: true });
  });
}

/** The row of the tables that has the focus. */
function useRowInUse(): string | null {
  const [row, setRow] = useState<string | null>(null);
  useEffect(() => {
    const onFocus = ({ target }: FocusEvent) => {
      const part = target instanceof Element ? target.closest<HTMLElement>('tbody[data-part]') : null;
      setRow(part?.dataset['part'] ?? null);
    };
    document.addEventListener('focusin', onFocus);
    return () => document.removeEventListener('focusin', onFocus);
  }, []);
  return row;
}
