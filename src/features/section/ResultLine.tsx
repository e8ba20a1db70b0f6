import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import { sectionsCsv } from './csv';
import { FIELD_WORDS } from './display';
import type { SectionField, SectionQuery } from './query';
import type { SectionItem } from './section';
import type { AllSections } from './use-all-sections';

interface ResultLineProps {
  readonly found: number;
  readonly of: number;
  readonly view: { readonly first: number; readonly last: number };
  readonly all: AllSections;
  readonly query: SectionQuery;
  readonly system: UnitSystemName;
  /** Nothing is called as was typed; these are only like it. */
  readonly nearest: boolean;
  readonly csv: { readonly rows: readonly SectionItem[]; readonly fields: readonly SectionField[] };
  readonly said: string;
  readonly onSaid: (words: string) => void;
}

function orderWords({ q, sort }: SectionQuery): string {
  if (sort === null) return q === '' ? 'lightest first' : 'best answer first';
  const name = sort.field === 'designation' ? 'designation' : FIELD_WORDS[sort.field].name;
  if (sort.field === 'mass_kg_m') return sort.descending ? 'heaviest first' : 'lightest first';
  if (sort.field === 'designation') return sort.descending ? 'designation, last first' : 'by designation';
  return `${sort.descending ? 'greatest' : 'least'} ${name} first`;
}

function countWords({ found, of, nearest, query, all }: ResultLineProps): [string, string] {
  if (!all.whole) return [String(found), 'sections found'];
  if (nearest) return ['', `No section is called “${query.q}”. The nearest:`];
  return [String(found), `of ${of} meet every range`];
}

/** How many there are, in which order, which of them are in view; and the way to take them along. */
export function ResultLine(props: ResultLineProps) {
  const { view, all, query, said, onSaid, found, csv, system } = props;
  const [count, words] = countWords(props);
  const copy = async () => {
    await navigator.clipboard.writeText(sectionsCsv(csv.rows, csv.fields, system));
    onSaid(`${csv.rows.length} rows are copied as CSV.`);
  };
  return (
    <div className="flex min-h-34 flex-wrap items-center gap-x-18 gap-y-4 border-b border-rule px-(--pad) py-6 text-schedule">
      <p role="status">
        <b className="font-semibold">{count}</b> <span className="text-ink-2">{words}</span>
      </p>
      <span className="text-ink-2">{orderWords(query)}</span>
      {!all.whole && !all.failure && <span className="text-ink-2">Reading the tables</span>}
      {all.failure && (
        <span role="alert" className="flex items-center gap-10 font-semibold text-error">
          {all.failure}
          <Button tone="text" onClick={all.again}>
            Try again
          </Button>
        </span>
      )}
      <span role="status" className="text-ink-2">
        {said}
      </span>
      {found > 0 && view.last > 0 && (
        <span className="ml-auto text-ink-2">
          Rows {view.first} to {view.last} of {found}
        </span>
      )}
      <a className="link" href={paths.buildSection}>
        Make a section
      </a>
      {all.whole && csv.rows.length > 0 && (
        <Button
          tone="text"
          onClick={() =>
            copy().catch(() => onSaid('The browser does not let this page copy. Allow it, then copy again.'))
          }
        >
          Copy as CSV
        </Button>
      )}
    </div>
  );
}
