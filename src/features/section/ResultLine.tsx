import { Button } from '@/components/ui/Button';
import type { UnitSystemName } from '@/engine/quantity';
import { paths } from '@/paths';
import type { Answer } from './answer';
import { USUAL_COLUMNS } from './columns';
import { sectionsCsv } from './csv';
import { FIELD_WORDS } from './display';
import { type InView, RowsInView } from './in-view';
import { SECTION_MEASURES, type SectionMeasure, type SectionQuery } from './query';

interface ResultLineProps {
  readonly answer: Answer;
  /** How many sections the practice has. */
  readonly of: number;
  readonly inView: InView;
  readonly system: UnitSystemName;
  /** Nothing is called as was typed; these are only like it. */
  readonly nearest: boolean;
  /** What the schedule shows, and a copy takes along; null: the usual ones. */
  readonly columns: readonly SectionMeasure[] | null;
  /** Id of the choice of columns, and whether it is open. */
  readonly chooser: string;
  readonly isChoosing: boolean;
  readonly onChoosing: () => void;
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

function countWords({ answer: { total, query }, of, nearest }: ResultLineProps): [string, string] {
  if (nearest) return ['', `No section is called “${query.q}”. The nearest:`];
  return [String(total), `of ${of} meet every range`];
}

/** How many there are, in which order, which of them are in view; and the way to take them along. */
export function ResultLine(props: ResultLineProps) {
  const { inView, answer, said, onSaid, system, columns } = props;
  const { rows, total, query } = answer;
  const [count, words] = countWords(props);
  return (
    <div className="flex min-h-34 flex-wrap items-center gap-x-18 gap-y-4 border-b border-rule px-(--pad) py-6 text-schedule">
      <p role="status">
        <b className="font-semibold">{count}</b> <span className="text-ink-2">{words}</span>
      </p>
      <span className="text-ink-2">{orderWords(query)}</span>
      {answer.isReading && <span className="text-ink-2">Reading the tables</span>}
      {answer.failure && (
        <span role="alert" className="flex items-center gap-10 font-semibold text-error">
          {answer.failure}
          <Button tone="text" onClick={answer.again}>
            Try again
          </Button>
        </span>
      )}
      <span role="status" className="text-ink-2">
        {said}
      </span>
      <RowsInView inView={inView} total={total} />
      <a className="link" href={paths.buildSection}>
        Make a section
      </a>
      <Button
        tone="text"
        aria-expanded={props.isChoosing}
        aria-controls={props.isChoosing ? props.chooser : undefined}
        data-columns
        onClick={props.onChoosing}
      >
        Columns
      </Button>
      {rows.length > 0 && <CopyCsv {...{ rows, total, columns, system, onSaid }} />}
    </div>
  );
}

interface CopyCsvProps extends Pick<ResultLineProps, 'columns' | 'system' | 'onSaid'> {
  readonly rows: Answer['rows'];
  readonly total: number;
}

function CopyCsv({ rows, total, columns, system, onSaid }: CopyCsvProps) {
  const copy = async () => {
    const fields = (columns ?? USUAL_COLUMNS).map((measure) => SECTION_MEASURES[measure]);
    await navigator.clipboard.writeText(sectionsCsv(rows, fields, system));
    onSaid(
      rows.length < total
        ? `The first ${rows.length} of ${total} rows are copied as CSV, those read so far. Scroll down to read more.`
        : `${rows.length} rows are copied as CSV.`,
    );
  };
  return (
    <Button
      tone="text"
      onClick={() =>
        copy().catch(() => onSaid('The browser does not let this page copy. Allow it, then copy again.'))
      }
    >
      Copy as CSV
    </Button>
  );
}
